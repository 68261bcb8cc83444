import { findTruncation } from "@/lib/statistics/mser";
import type { Figure, RunResult } from "./types";

export type WarmupVerdict = {
  isEnough: boolean;
  /** Weeks after which the start no longer shows; null where the run is too short to tell. */
  suggestedWeeks: number | null;
};

/** Differences from the settled level that are of no weight: half a point of fill rate, one percent of the money. */
const ofNoWeight = { fillRate: 0.005, money: 0.01 };

/**
 * Whether the recorded weeks still carry traces of the start, by the weekly means over replications, warm-up included,
 * of the fill rate and of the money tied up.
 * @remarks MSER-5 (`findTruncation`) where it finds a cut within the first half; where the series is too restless for
 * it, Welch's moving average of five weeks (Welch 1983; Law, Simulation Modeling and Analysis, section 9.5.1) against
 * the level of the second half.
 */
export function judgeWarmup(result: RunResult): WarmupVerdict {
  const { shape, weekSums } = result.tallies;
  const { warmupWeeks, weeks } = result.options;
  const nColumns = 3 + shape.buffers.length;
  const column = (read: (at: number) => number) =>
    Float64Array.from({ length: warmupWeeks + weeks }, (_, week) => read(week * nColumns));
  const fillRate = column((at) => (weekSums[at + 1] > 0 ? weekSums[at] / weekSums[at + 1] : 1));
  const money = column((at) =>
    shape.buffers.reduce((sum, { unitValue }, i) => sum + unitValue * weekSums[at + 3 + i], 0),
  );
  const cuts = [findSettled(fillRate, ofNoWeight.fillRate), findSettled(money, ofNoWeight.money * Math.max(...money))];
  const known = cuts.filter((cut) => cut !== null);
  if (known.length < cuts.length) return { isEnough: false, suggestedWeeks: null };
  const suggestedWeeks = Math.max(...known);
  return { isEnough: suggestedWeeks <= warmupWeeks, suggestedWeeks };
}

const halfWindow = 2;

/** Weeks until a series has settled, or null where it has not by its middle. */
function findSettled(series: Float64Array, leastBand: number): number | null {
  const { cut, isFound } = findTruncation(series);
  if (isFound) return cut;
  const n = series.length;
  if (n < 20) return null;
  const smooth = series.map((_, i) => {
    const reach = Math.min(halfWindow, i, n - 1 - i);
    return mean(series.subarray(i - reach, i + reach + 1));
  });
  const late = smooth.subarray(Math.ceil(n / 2));
  const level = mean(late);
  const spread = Math.sqrt(mean(late.map((value) => (value - level) * (value - level))));
  const first = smooth.findIndex((value) => Math.abs(value - level) <= Math.max(leastBand, 2 * spread));
  return first >= 0 && first <= n / 2 ? first : null;
}

const mean = (values: Float64Array) => values.reduce((sum, value) => sum + value, 0) / values.length;

export type RunsVerdict = { tooFewBeyond: boolean; tooFewReplications: boolean; tooWide: boolean; nBeyond: number };

/** Weeks that have to lie beyond a percentile, replications, and the half-width in share, for a figure to be read. */
const least = { beyond: 10, replications: 10, halfWidth: 0.02 };

/**
 * Whether a run has weeks enough for a percentile of the weekly fill rate.
 * @param p - 0..1; `figure` that percentile.
 * @remarks Ten observations beyond a quantile and ten independent sections are common practice, not a theorem.
 */
export function judgeRuns(result: RunResult, p: number, figure: Figure): RunsVerdict {
  const nWeeks = result.fillRates.reduce((sum, rate) => sum + (Number.isNaN(rate) ? 0 : 1), 0);
  const nBeyond = Math.floor(nWeeks * Math.min(p, 1 - p));
  return {
    nBeyond,
    tooFewBeyond: nBeyond < least.beyond,
    tooFewReplications: result.options.replications < least.replications,
    tooWide: figure.halfWidth !== null && figure.halfWidth > least.halfWidth,
  };
}
