"use client";

import { useMemo } from "react";
import { useLine } from "@/lib/client/line-state";
import { autoLayout } from "@/lib/line/auto-layout";
import { useShownResult } from "./canvas/use-shown-result";
import { NodeDrawing } from "./drawing/node-drawing";
import { sizeOf } from "@/lib/line/sheet-sizes";
import { useDrawings } from "./drawing/use-sheet";

/** The line for narrow screens: its nodes in the order of flow, to be read. */
export function ReadingForm() {
  const { document, faults, scenario } = useLine();
  const drawings = useDrawings(document, useShownResult(), faults, scenario.kept.document);
  const order = useMemo(() => {
    const { positions } = autoLayout(document);
    return [...document.nodes].sort(
      (a, b) => positions[a.id].x - positions[b.id].x || positions[a.id].y - positions[b.id].y,
    );
  }, [document]);
  return (
    <div className="px-4 py-4">
      <p className="caution text-ink-2">
        Drawing needs a screen of 1024 px or more. Here the line can be read, node by node in the order of flow.
      </p>
      {order.length === 0 && <p className="mt-4 text-ink-2">Nothing is drawn yet.</p>}
      <ul className="mt-4 grid grid-cols-[repeat(auto-fill,minmax(156px,1fr))] gap-x-4 gap-y-5">
        {order.map((node) => {
          const drawing = drawings.get(node.id);
          return (
            <li key={node.id} className="relative" style={sizeOf(document, node)}>
              {drawing && <NodeDrawing {...drawing} />}
            </li>
          );
        })}
      </ul>
    </div>
  );
}
