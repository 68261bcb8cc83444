import { exampleLine } from "@/lib/line/example";
import type { SizingProblem } from "@/lib/sizing";

/** The demo line's sizing, as tests and benchmark ask it: 90 % shipped in 9 of 10 weeks for the least capital. */
export const demoSizing: SizingProblem = {
  line: exampleLine,
  buffers: exampleLine.nodes.flatMap((node) => {
    if (node.kind !== "buffer") return [];
    const { id, size } = node;
    if (node.replenishment) return [{ id, min: roundTo(0.5 * size), max: roundTo(1.6 * size), step: 50 }];
    return [id === "fg" ? { id, min: 20, max: 400, step: 5 } : { id, min: 6, max: 2 * size, step: 2 }];
  }),
  targetFillRate: 0.9,
  acceptedRisks: [0.1],
  objective: "moneyTiedUp",
  seed: "1",
  replications: 200,
  weeks: 50,
  warmupWeeks: 12,
};

function roundTo(size: number): number {
  return Math.round(size / 50) * 50;
}
