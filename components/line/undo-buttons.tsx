"use client";

import { Button } from "@/components/ui/button";
import { useLine } from "@/lib/client/line-state";

/** Undo and redo, each saying what it would do. */
export function UndoButtons() {
  const { undo, redo, undoLabel, redoLabel, canUndo, canRedo } = useLine();
  return (
    <span className="flex">
      <Button kind="bare" disabled={!canUndo} onClick={undo} {...describe("Undo", undoLabel, "Ctrl+Z")}>
        <Arrow />
      </Button>
      <Button kind="bare" disabled={!canRedo} onClick={redo} {...describe("Redo", redoLabel, "Ctrl+Shift+Z")}>
        <Arrow isForward />
      </Button>
    </span>
  );
}

function describe(verb: string, label: string | null, keys: string) {
  const text = label ? `${verb}: ${label}` : `Nothing to ${verb.toLowerCase()}`;
  return { "aria-label": text, title: `${text} (${keys})`, "aria-keyshortcuts": keys.replace("Ctrl", "Control") };
}

function Arrow({ isForward = false }: { isForward?: boolean }) {
  return (
    <svg width="16" height="14" viewBox="0 0 16 14" aria-hidden className={isForward ? "-scale-x-100" : ""}>
      <path
        d="M5 1.5 1.5 5 5 8.5M1.5 5H10a4 4 0 0 1 0 8H6"
        fill="none"
        stroke="currentColor"
        strokeWidth="1.6"
        strokeLinejoin="miter"
      />
    </svg>
  );
}
