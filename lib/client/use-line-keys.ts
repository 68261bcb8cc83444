"use client";

import { useEffect, useEffectEvent } from "react";
import type { LineState } from "./line-state";

type Keys = Pick<LineState, "undo" | "redo" | "runFull" | "cancelRun" | "progress" | "mayEdit">;

/** R runs, Esc cancels the run, Ctrl+Z undoes, Ctrl+Shift+Z and Ctrl+Y redo; none of them while typing or in a dialog. */
export function useLineKeys({ undo, redo, runFull, cancelRun, progress, mayEdit }: Keys): void {
  const press = useEffectEvent((event: KeyboardEvent) => {
    if (event.defaultPrevented || isElsewhere(event.target)) return;
    const key = event.key.toLowerCase();
    const hasControl = event.ctrlKey || event.metaKey;
    const act = ((): (() => void) | null => {
      if (event.altKey) return null;
      if (hasControl && mayEdit && key === "z") return event.shiftKey ? redo : undo;
      if (hasControl && mayEdit && key === "y") return redo;
      if (hasControl || event.shiftKey || event.repeat) return null;
      if (key === "r") return runFull;
      return key === "escape" && progress ? cancelRun : null;
    })();
    if (!act) return;
    event.preventDefault();
    act();
  });
  useEffect(() => {
    const listen = (event: KeyboardEvent): void => press(event);
    window.addEventListener("keydown", listen);
    return () => window.removeEventListener("keydown", listen);
  }, []);
}

function isElsewhere(target: EventTarget | null): boolean {
  if (!(target instanceof Element)) return false;
  const typing = "input, textarea, select, [contenteditable=''], [contenteditable='true']";
  return target.closest(`${typing}, [role='dialog'], [role='alertdialog'], [role='menu'], [role='listbox']`) !== null;
}
