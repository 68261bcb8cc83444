"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { toast } from "@/components/ui/toast";
import { useLine } from "@/lib/client/line-state";
import { NameDialog } from "./name-dialog";

/** Keep, save as, revert: what can be done with the edits since the last kept version. */
export function KeepControls() {
  const { scenario, nEditsNotKept, keep, revert, undo } = useLine();
  const [isNaming, setNaming] = useState(false);
  const [isKeeping, setKeeping] = useState(false);
  const [error, setError] = useState<string | null>(null);
  const hasEdits = nEditsNotKept > 0;

  async function keepNow(): Promise<void> {
    setKeeping(true);
    const result = await keep();
    setKeeping(false);
    setError(result.ok ? null : result.message);
    if (result.ok) toast(`Kept in ${scenario.name}.`);
  }

  function revertNow(): void {
    revert();
    toast(`Back to version ${scenario.kept.number} of ${scenario.name}.`, { action: { label: "Undo", onClick: undo } });
  }

  return (
    <>
      {error && (
        <span role="alert" className="max-w-60 truncate text-s text-silt-700" title={error}>
          {error}
        </span>
      )}
      {hasEdits && (
        <Button kind="plain" size="small" className="max-sm:hidden" onClick={revertNow}>
          Revert
        </Button>
      )}
      <Button size="small" className="max-sm:hidden" onClick={() => setNaming(true)}>
        Save as scenario
      </Button>
      {hasEdits && (
        <Button
          kind="main"
          size="small"
          className="max-sm:min-h-11"
          disabled={isKeeping}
          onClick={() => void keepNow()}
        >
          <span className="max-w-40 truncate">Keep in {scenario.name}</span>
        </Button>
      )}
      <SaveAsDialog isOpen={isNaming} onClose={() => setNaming(false)} />
    </>
  );
}

function SaveAsDialog({ isOpen, onClose }: { isOpen: boolean; onClose(): void }) {
  const { line, scenario, saveAsScenario, selectScenario, full } = useLine();
  return (
    <NameDialog
      title="Save as a scenario of its own?"
      intro={`What is on screen becomes a new scenario beside ${scenario.name}, whose draft stays as it is.`}
      action="Save as scenario"
      initialName={freeName(
        scenario.name,
        line.scenarios.map(({ name }) => name),
      )}
      isOpen={isOpen}
      onClose={onClose}
      submit={async (name) => {
        const result = await saveAsScenario(name, undefined, full?.isCurrent ? full : undefined);
        if (!result.ok) return result;
        selectScenario(result.value.scenarioId);
        toast(`Saved as ${name}.`);
        return result;
      }}
    />
  );
}

function freeName(name: string, taken: string[]): string {
  const stem = name.replace(/, variant( \d+)?$/, "");
  for (let n = 1; ; n++) {
    const candidate = n === 1 ? `${stem}, variant` : `${stem}, variant ${n}`;
    if (!taken.includes(candidate)) return candidate;
  }
}
