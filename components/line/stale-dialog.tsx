"use client";

import { Button } from "@/components/ui/button";
import { Dialog, DialogAnswers } from "@/components/ui/dialog";
import { useLine } from "@/lib/client/line-state";
import { formatTime } from "@/lib/format";

const nShown = 8;

/** Somebody else saved first: says what differs and lets the user choose. Whichever is not chosen is one undo away. */
export function StaleDialog() {
  const { saveState, resolveStale, scenario } = useLine();
  if (saveState.status !== "stale") return null;
  const { theirs, differs } = saveState;
  return (
    <Dialog
      open
      title={`${theirs.updatedBy} edited ${scenario.name} meanwhile. Which edits shall stand?`}
      description={`Saved ${formatTime(theirs.updatedAt)}. Your own edits since then are on screen and not saved. The ones you do not choose can be brought back with Undo.`}
    >
      {differs.length > 0 && (
        <>
          <h3 className="mt-4 border-b border-ink pb-1 text-s font-semibold">What differs</h3>
          <ul className="text-m">
            {differs.slice(0, nShown).map((text) => (
              <li key={text} className="border-b border-rule py-1">
                {text}
              </li>
            ))}
          </ul>
          {differs.length > nShown && <p className="mt-1 text-s text-ink-3">and {differs.length - nShown} more</p>}
        </>
      )}
      <DialogAnswers>
        <Button onClick={() => resolveStale("theirs")}>Take theirs</Button>
        <Button kind="stop" onClick={() => resolveStale("mine")}>
          Save mine over theirs
        </Button>
      </DialogAnswers>
    </Dialog>
  );
}
