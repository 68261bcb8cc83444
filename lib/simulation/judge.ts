import { findTruncation } from "@/lib/statistics/mser";
import type { Figure, RunResult } from "./types";

export type WarmupVerdict = {
  isEnough: boolean;
  /** Weeks after which the start no longer shows; null where the run is too short to tell. */
  suggestedWeeks: number | null;
};

/**
 * Whether the recorded weeks still carry traces of the start: MSER-5 on the weekly means over replications, warm-up
 * included, of the fill rate, the backlog and the money tied up.
 * @remarks White, Simulation 69 (1997) 323-334; White, Cobb and Spratt (2000). A week or two of difference is noise:
 * batches of five weeks are the rule's own grain.
 */
export function judgeWarmup(result: RunResult): WarmupVerdict {
  const { shape, weekSums } = result.tallies;
  const { warmupWeeks, weeks } = result.options;
  const nColumns = 3 + shape.buffers.length;
  const column = (read: (at: number) => number) =>
    Float64Array.from({ length: warmupWeeks + weeks }, (_, week) => read(week * nColumns));
  const fillRate = column((at) => (weekSums[at + 1] > 0 ? weekSums[at] / weekSums[at + 1] : 1));
  const backlog = column((at) => weekSums[at + 2]);
  const money = column((at) =>
    shape.buffers.reduce((sum, { unitValue }, i) => sum + unitValue * weekSums[at + 3 + i], 0),
  );
  const cuts = [fillRate, backlog, money].map(findTruncation);
  if (cuts.some(({ isFound }) => !isFound)) return { isEnough: false, suggestedWeeks: null };
  const suggestedWeeks = Math.max(...cuts.map(({ cut }) => cut));
  return { isEnough: suggestedWeeks <= warmupWeeks, suggestedWeeks };
}

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
