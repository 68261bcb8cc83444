"use client";

import { useState } from "react";
import { rulerStartOf } from "@/components/charts/reading-ruler";
import { Button } from "@/components/ui/button";
import { Empty } from "@/components/ui/empty";
import { TextField } from "@/components/ui/text-field";
import type { LineSummary } from "@/lib/schema/lines";
import { can, type Role } from "@/lib/schema/roles";
import { LineRow } from "./line-row";
import { NewLineDialog } from "./new-line-dialog";
import { OpenFile } from "./open-file";

/** All lines of the workspace with what each ships in so many weeks of ten, on one scale. */
export function LinesRegister({ lines, role }: { lines: readonly LineSummary[]; role: Role }) {
  const [wanted, setWanted] = useState("");
  const [isNaming, setNaming] = useState(false);
  const mayEdit = can(role, "edit");
  const found = lines.filter(({ name }) => name.toLowerCase().includes(wanted.trim().toLowerCase()));
  const from = rulerStartOf(lines.map(({ reading }) => reading));
  return (
    <>
      <div className="flex flex-wrap items-end gap-x-4 gap-y-3">
        <div className="mr-auto">
          <h1 className="text-[30px]/[36px] font-title tracking-[-.015em]">Lines</h1>
          <p className="text-ink-2">What each line ships at its accepted risk, from its last kept full run</p>
        </div>
        {lines.length > 3 && (
          <TextField
            label="Find a line"
            type="search"
            className="w-52 max-sm:w-full"
            value={wanted}
            onChange={setWanted}
          />
        )}
        {mayEdit && (
          <span className="flex gap-2 *:max-sm:h-11">
            <OpenFile />
            <Button kind="main" onClick={() => setNaming(true)}>
              New line
            </Button>
          </span>
        )}
      </div>
      {lines.length === 0 ? (
        <div className="mt-8 border-t border-ink pt-4">
          <Empty
            title="No lines yet"
            action={
              mayEdit && (
                <Button kind="main" onClick={() => setNaming(true)}>
                  New line
                </Button>
              )
            }
          >
            {mayEdit
              ? "Draw the first one, or begin with the example: the drive unit line of an invented plant."
              : "An engineer or owner of this workspace can draw the first one."}
          </Empty>
        </div>
      ) : (
        <ul className="mt-6 border-t border-ink">
          {found.map((line) => (
            <LineRow key={line.id} line={line} role={role} from={from} />
          ))}
        </ul>
      )}
      {lines.length > 0 && found.length === 0 && (
        <p className="py-6 text-ink-2">No line is called “{wanted.trim()}”.</p>
      )}
      <NewLineDialog isOpen={isNaming} onClose={() => setNaming(false)} />
    </>
  );
}
