"use client";

import { useReactFlow, useStoreApi } from "@xyflow/react";
import { useCallback } from "react";
import { useLine } from "@/lib/client/line-state";
import { addNode, addNote } from "@/lib/line/edits";
import { createNode } from "@/lib/line/edits/nodes";
import type { NodeKind } from "@/lib/line/types";
import { sizeOf } from "@/lib/line/sheet-sizes";

/** Adds a node or a note at a free place in the middle of what is on screen, and selects it. */
export function useAdd() {
  const { document, layout, notes, apply, select, line } = useLine();
  const { screenToFlowPosition } = useReactFlow();
  const store = useStoreApi();

  const findPlace = useCallback(
    (width: number, height: number) => {
      const { domNode } = store.getState();
      const box = domNode?.getBoundingClientRect();
      const middle = screenToFlowPosition({
        x: (box?.left ?? 0) + (box?.width ?? 0) / 2,
        y: (box?.top ?? 0) + (box?.height ?? 0) / 2,
      });
      const taken = document.nodes.flatMap((node) => {
        const at = layout.positions[node.id];
        return at ? [{ ...at, ...sizeOf(document, node) }] : [];
      });
      const isFree = (x: number, y: number) =>
        taken.every(
          (t) => x + width + 8 < t.x || t.x + t.width + 8 < x || y + height + 8 < t.y || t.y + t.height + 8 < y,
        );
      for (let ring = 0; ring < 40; ring++)
        for (const [dx, dy] of ring === 0
          ? [[0, 0]]
          : [
              [0, 1],
              [1, 0],
              [0, -1],
              [-1, 0],
              [1, 1],
              [-1, -1],
            ]) {
          const x = Math.round(middle.x - width / 2 + dx * ring * 40);
          const y = Math.round(middle.y - height / 2 + dy * ring * 40);
          if (isFree(x, y)) return { x, y };
        }
      return { x: Math.round(middle.x), y: Math.round(middle.y) };
    },
    [document, layout, screenToFlowPosition, store],
  );

  return useCallback(
    (kind: NodeKind | "note") => {
      if (kind === "note") {
        const id = `note-${notes.length + 1}-${Date.now().toString(36)}`;
        const at = new Date().toISOString();
        apply(addNote({ id, ...findPlace(240, 90), text: "", author: line.userName, at }));
        select([id]);
        return;
      }
      const node = createNode(document, kind);
      const { width, height } = sizeOf(document, node);
      apply(addNode(kind, findPlace(width, height)));
      select([node.id]);
    },
    [apply, document, findPlace, notes.length, select, line.userName],
  );
}
