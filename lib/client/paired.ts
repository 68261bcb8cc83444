import type { Figure } from "@/lib/simulation/types";

/** A settled figure moved by a difference; both are off independently. */
export function moveFigure(settled: Figure, difference: Figure): Figure {
  const halfWidths = [settled.halfWidth ?? 0, difference.halfWidth ?? 0];
  return {
    value: Math.min(1, Math.max(0, settled.value + difference.value)),
    halfWidth: difference.halfWidth === null ? null : Math.hypot(...halfWidths),
  };
}
