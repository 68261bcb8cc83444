import type { Reading } from "./runs";

/** What moving one buffer did to the share of bad weeks, all else equal. */
export type Observation = {
  level: number;
  /** Levels moved by, not 0. */
  by: number;
  /** Change of the share of bad weeks, and its variance. */
  change: number;
  variance: number;
};

/** Share of weeks that one buffer makes bad, by its level: exp(a - k level). */
export type Curve = { a: number; k: number };

export const shareAt = ({ a, k }: Curve, level: number): number => Math.exp(a - k * level);

/** The curve of a given rate through a share at a level. */
export const curveThrough = (level: number, share: number, k: number): Curve => ({ a: Math.log(share) + k * level, k });

/** Reads an observation off two runs over the same weeks that differ in one buffer. */
export function observe(from: Reading, to: Reading, b: number): Observation {
  let nLost = 0;
  let nWon = 0;
  for (let w = 0; w < from.bad.length; w++) {
    if (from.bad[w] < to.bad[w]) nLost++;
    else if (from.bad[w] > to.bad[w]) nWon++;
  }
  const nDue = Math.max(1, from.nDue);
  return {
    level: from.levels[b],
    by: to.levels[b] - from.levels[b],
    change: (nLost - nWon) / nDue,
    // As of Poisson counts; one week more keeps a move that turned none from being taken for certain.
    variance: (nLost + nWon + 1) / nDue ** 2,
  };
}

/** Rates tried, from an eighth to eight times the likely one. */
const nTried = 61;
const widest = 8;
/** Standard deviation of the logarithm of a curve's rate about the likely one. */
const spread = 0.7;
const least = 1e-12;

/**
 * Fits a curve to observations of one buffer.
 * @param likely - Rate that is likely beforehand, a level, > 0.
 * @remarks Least squares weighted by variance, with a normal prior for the logarithm of the rate.
 */
export function fitCurve(observations: readonly Observation[], likely: number): Curve {
  let best: Curve = { a: Math.log(least), k: likely };
  let lowest = Infinity;
  for (let i = 0; i < nTried; i++) {
    const off = ((2 * i) / (nTried - 1) - 1) * Math.log(widest);
    const k = likely * Math.exp(off);
    let [xy, xx, yy] = [0, 0, 0];
    for (const { level, by, change, variance } of observations) {
      const x = Math.exp(-k * level) * Math.expm1(-k * by);
      xy += (x * change) / variance;
      xx += (x * x) / variance;
      yy += (change * change) / variance;
    }
    const scale = xx > 0 ? Math.max(0, xy / xx) : 0;
    const misfit = yy - 2 * scale * xy + scale * scale * xx + (off / spread) ** 2;
    if (misfit < lowest) {
      lowest = misfit;
      best = { a: Math.log(Math.max(least, scale)), k };
    }
  }
  return best;
}
