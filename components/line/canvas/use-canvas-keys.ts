"use client";

import type { KeyboardEvent } from "react";
import { toast } from "@/components/ui/toast";
import { useLine } from "@/lib/client/line-state";
import { deleteItems, duplicate } from "@/lib/line/edits";
import type { NodeKind } from "@/lib/line/types";
import { useAdd } from "./use-add";

/** Keys by which things are added while the sheet has the focus. */
export const addKeys: Record<string, NodeKind | "note"> = {
  s: "supplier",
  b: "buffer",
  t: "station",
  c: "customer",
  n: "note",
};

const isTyping = (target: EventTarget) =>
  target instanceof HTMLElement && (target.isContentEditable || /^(INPUT|TEXTAREA|SELECT)$/.test(target.tagName));

/** Add, delete, duplicate, select all, deselect. */
export function useCanvasKeys() {
  const { document, notes, selection, select, apply, undo, mayEdit } = useLine();
  const add = useAdd();

  return (event: KeyboardEvent) => {
    if (isTyping(event.target) || event.altKey) return;
    const key = event.key.toLowerCase();
    const isCommand = event.ctrlKey || event.metaKey;
    if (key === "escape" && selection.length > 0) return select([]);
    if (isCommand && key === "a") {
      event.preventDefault();
      return select([...document.nodes.map(({ id }) => id), ...notes.map(({ id }) => id)]);
    }
    if (!mayEdit) return;
    if (isCommand && key === "d" && selection.length > 0) {
      event.preventDefault();
      return apply(duplicate(selection));
    }
    if ((key === "delete" || key === "backspace") && selection.length > 0) {
      event.preventDefault();
      apply(deleteItems(selection));
      select([]);
      return toast(selection.length === 1 ? "Deleted." : `Deleted ${selection.length} things.`, {
        action: { label: "Undo", onClick: undo },
      });
    }
    if (!isCommand && !event.shiftKey && addKeys[key]) {
      event.preventDefault();
      add(addKeys[key]);
    }
  };
}
