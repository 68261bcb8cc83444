import type { Distribution } from "@/lib/line/types";
import { quantile, tailsAt, type Continuous } from "./distributions";
import { roundHalfUp } from "./elementary";
import { listCountTails } from "./count-tails";
import { normalQuantile } from "./normal";

/**
 * Quantile function of a rounded quantity. With a table: `first` plus the number of thresholds at or below p; `guide`
 * holds where to begin for each of its equal cells. Without one the distribution is inverted at each draw.
 */
export type WholeQuantile = {
  shift: number;
  least: number;
  distribution: Continuous;
  table: null | { first: number; thresholds: Float64Array; guide: Int32Array };
};

/** Whole numbers stay below this. */
export const greatestCount = 2 ** 30;
/** A gamma spread over more units than this is inverted draw by draw instead of tabled. */
const longestGammaTable = 3000;
/** A count spread over more units than this is taken as a gamma of its mean and sd; its quantiles are off by about a unit in 50 000. */
const longestCountTable = 2 ** 20;

/**
 * Prepares draws of max(least, round(shift + X)), capped at `greatestCount`.
 * @param d - Prepared by `prepareDistribution`.
 */
export function createWholeQuantile(d: Distribution, shift: number, least: number): WholeQuantile {
  if (d.type === "poisson" || d.type === "negativeBinomial") {
    const sd = d.type === "poisson" ? Math.sqrt(d.mean) : d.sd;
    const nUnits = d.mean + 9 * sd + (40 * sd * sd) / d.mean;
    const distribution: Continuous = { type: "gamma", mean: d.mean, sd };
    if (Math.min(nUnits, 9 * sd * 2 + (40 * sd * sd) / d.mean) > longestCountTable) {
      return { shift, least, distribution, table: null };
    }
    const tails = listCountTails(d);
    return { shift, least, distribution, table: buildTable(tails.first, tails.atMost, shift, least) };
  }
  if (d.type === "gamma") {
    const nUnits = 12 * d.sd + (60 * d.sd * d.sd) / d.mean;
    if (nUnits <= longestGammaTable && d.mean * d.mean < d.sd * d.sd * 1e5) {
      // Nine and a half sd below the mean a gamma has less than 1e-20.
      const first = Math.max(roundHalfUp(shift), least, Math.floor(shift + d.mean - 9.5 * d.sd));
      const atMost: number[] = [];
      for (let value = first; atMost.length <= longestGammaTable; value++) {
        const [lower, upper] = tailsAt(d, value + 0.5 - shift);
        atMost.push(lower);
        if (upper < 1e-16) break;
      }
      return { shift, least, distribution: d, table: buildTable(first, atMost, 0, least) };
    }
  }
  return { shift, least, distribution: d, table: null };
}

/**
 * The whole quantity at p.
 * @param p - In (0, 1).
 * @param q - 1 - p.
 */
export function wholeQuantile(w: WholeQuantile, p: number, q: number): number {
  if (w.table === null) {
    const value = roundHalfUp(w.shift + quantile(w.distribution, p, q));
    return value > w.least ? Math.min(value, greatestCount) : w.least;
  }
  const { first, thresholds, guide } = w.table;
  let i = guide[Math.min(guide.length - 1, Math.floor(p * guide.length))];
  while (i < thresholds.length && thresholds[i] <= p) i++;
  return first + i;
}

/** `atMost[i]`: P(X <= first + i), ascending. A whole shift only moves `first`; another is rounded with it. */
function buildTable(first: number, atMost: ArrayLike<number>, shift: number, least: number): WholeQuantile["table"] {
  const from = roundHalfUp(first + shift);
  const nBelow = Math.min(Math.max(0, least - from), atMost.length);
  const thresholds = Float64Array.from(atMost).subarray(nBelow);
  const guide = new Int32Array(Math.min(4096, Math.max(16, thresholds.length)));
  let i = 0;
  for (let cell = 0; cell < guide.length; cell++) {
    while (i < thresholds.length && thresholds[i] <= cell / guide.length) i++;
    guide[cell] = i;
  }
  return { first: Math.max(from, least), thresholds, guide };
}

/** Standard normal score of a uniform draw. */
export function normalScore(u: number): number {
  return normalQuantile(u, 1 - u);
}
