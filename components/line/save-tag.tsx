"use client";

import { useLine } from "@/lib/client/line-state";
import { LocalTime } from "./local-time";

/** Whether the draft is saved, and when it was. */
export function SaveTag() {
  const { saveState, retrySave, mayEdit } = useLine();
  if (!mayEdit) return <span className="text-s whitespace-nowrap text-ink-3">Read only</span>;
  return (
    <span role="status" className="text-s whitespace-nowrap text-ink-3">
      {saveState.status === "saved" && (
        <>
          Saved <LocalTime at={saveState.at} />
        </>
      )}
      {saveState.status === "waiting" && "Not saved yet"}
      {saveState.status === "saving" && "Saving"}
      {saveState.status === "stale" && <span className="text-silt-700">Saved by somebody else</span>}
      {saveState.status === "failed" && (
        <span className="text-silt-700" title={saveState.message}>
          Not saved: {saveState.message}{" "}
          <button type="button" className="underline underline-offset-3" onClick={retrySave}>
            Try again
          </button>
        </span>
      )}
    </span>
  );
}
