"use client";

import { Tag } from "@/components/ui/tag";
import { useLine } from "@/lib/client/line-state";
import { BarSlot } from "./bar-slot";
import { Checks } from "./checks";
import { KeepControls } from "./keep-controls";
import { ScenarioMenu } from "./scenario-menu";
import { ScenarioPick } from "./scenario-pick";
import { UndoButtons } from "./undo-buttons";

/** The bar under the masthead: which scenario, what is not kept of it, the view's tools, undo, checks, keeping. */
export function ScenarioBar() {
  const { mayEdit, nEditsNotKept } = useLine();
  return (
    <div className="flex min-h-[47px] shrink-0 flex-wrap items-center gap-x-2.5 gap-y-1.5 border-b border-rule px-3 py-1.5 sm:px-[18px] print:hidden">
      <ScenarioPick />
      <ScenarioMenu />
      {mayEdit && nEditsNotKept > 0 && (
        <Tag tone="water">
          {nEditsNotKept} {nEditsNotKept === 1 ? "edit" : "edits"} not kept
        </Tag>
      )}
      <span aria-hidden className="mx-1 h-5 w-px shrink-0 bg-rule max-lg:hidden" />
      <BarSlot name="tools" />
      {mayEdit && <UndoButtons />}
      <span className="flex flex-wrap items-center gap-x-2.5 gap-y-1.5 lg:ml-auto">
        <Checks />
        <BarSlot name="end" />
        {mayEdit && <KeepControls />}
      </span>
    </div>
  );
}
