import { useMemo } from "react";
import { autoLayout } from "@/lib/line/auto-layout";
import type { DraftLine, Fault, Layout } from "@/lib/line/types";
import type { RunResult } from "@/lib/simulation/types";
import type { NodeDrawingProps } from "./node-drawing";
import { readingOf } from "./node-reading";
import type { Point } from "@/lib/line/sheet-sizes";

/** Places of all nodes; those that nobody has placed yet are placed in flow order. */
export function placesOf(document: DraftLine, layout: Layout): Record<string, Point> {
  if (document.nodes.every(({ id }) => layout.positions[id])) return layout.positions;
  return { ...autoLayout(document).positions, ...layout.positions };
}

export type Drawing = Omit<NodeDrawingProps, "onSizeChange">;

/** What the sheet draws of every node, by id. */
export function drawingsOf(
  document: DraftLine,
  result: RunResult | null,
  faults: readonly Fault[] = [],
  former?: DraftLine,
): Map<string, Drawing> {
  const names = new Map(document.nodes.map((node) => [node.id, node.name]));
  const before = new Map(former?.nodes.map((node) => [node.id, node]));
  return new Map(
    document.nodes.map((node) => {
      const old = before.get(node.id);
      const inlets =
        node.kind === "station"
          ? document.links
              .filter((link) => link.to === node.id)
              .map(({ from }) => ({ id: from, name: names.get(from) ?? from }))
          : [];
      return [
        node.id,
        {
          node,
          inlets,
          reading: readingOf(document, node, result),
          formerSize: old?.kind === "buffer" ? old.size : undefined,
          fault: faults.find((fault) => fault.node === node.id)?.message,
        },
      ];
    }),
  );
}

export function useDrawings(
  document: DraftLine,
  result: RunResult | null,
  faults: readonly Fault[],
  former?: DraftLine,
) {
  return useMemo(() => drawingsOf(document, result, faults, former), [document, result, faults, former]);
}
