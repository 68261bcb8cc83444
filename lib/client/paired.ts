import type { Figure, RunResult } from "@/lib/simulation/types";
import { pickQuantile } from "@/lib/statistics/quantile";
import { cutSections, sectionHalfWidth } from "@/lib/statistics/sections";

/**
 * What an edit does to a percentile of the weekly fill rate, read from two runs with the same draws.
 * @param edited, base - Equal replications and weeks.
 * @param p - 0..1, as in `percentile`.
 * @returns Edited less base; the half-width is that of the difference, so what both runs share in luck does not widen it.
 * @remarks Common random numbers with sectioning; Asmussen and Glynn, Stochastic Simulation (2007), chapters III.5 and V.
 */
export function pairedDifference(edited: RunResult, base: RunResult, p: number): Figure {
  const { replications, weeks } = edited.options;
  if (replications !== base.options.replications || weeks !== base.options.weeks) {
    throw new RangeError(
      `runs of ${replications} x ${weeks} and ${base.options.replications} x ${base.options.weeks} are no pair`,
    );
  }
  const differ = (from: number, to: number): number =>
    quantile(edited.fillRates, from * weeks, to * weeks, p) - quantile(base.fillRates, from * weeks, to * weeks, p);
  const bounds = cutSections(replications);
  const sections = bounds.slice(1).map((to, i) => differ(bounds[i], to));
  return { value: differ(0, replications), halfWidth: sectionHalfWidth(sections) };
}

/** A settled figure moved by a difference; both are off independently. */
export function moveFigure(settled: Figure, difference: Figure): Figure {
  const halfWidths = [settled.halfWidth ?? 0, difference.halfWidth ?? 0];
  return {
    value: Math.min(1, Math.max(0, settled.value + difference.value)),
    halfWidth: difference.halfWidth === null ? null : Math.hypot(...halfWidths),
  };
}

function quantile(rates: Float32Array, from: number, to: number, p: number): number {
  const present = rates.slice(from, to).filter((rate) => rate === rate);
  return pickQuantile(present.sort(), p);
}
