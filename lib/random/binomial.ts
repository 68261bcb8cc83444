import { ln } from "./elementary";
import { lnFailure, nextGap } from "./gaps";
import { nextUniform } from "./sfc32";
import { normalScore } from "./whole-quantile";

/**
 * Successes in n independent trials.
 * @param n - Whole, >= 0.
 * @param probability - 0..1.
 * @remarks Split at the median order statistic until few successes are left, then gap by gap; Devroye, Non-Uniform
 * Random Variate Generation (1986), section X.4.3. About log2 n splits.
 */
export function nextBinomial(states: Int32Array, at: number, n: number, probability: number): number {
  let successes = 0;
  let p = probability;
  while (n * p > 24) {
    const i = Math.floor((n + 1) / 2);
    const g = nextGamma(states, at, i);
    const split = g / (g + nextGamma(states, at, n + 1 - i));
    if (split <= p) {
      successes += i;
      n -= i;
      p = (p - split) / (1 - split);
    } else {
      n = i - 1;
      p /= split;
    }
  }
  if (!(p > 0)) return successes;
  const failure = lnFailure(p);
  for (let left = n - nextGap(states, at, failure); left >= 0; left -= nextGap(states, at, failure)) successes++;
  return successes;
}

/**
 * Gamma variate of unit scale for shapes >= 1.
 * @remarks Marsaglia and Tsang, ACM Trans. Math. Softw. 26 (2000) 363-372; takes a varying number of draws.
 */
export function nextGamma(states: Int32Array, at: number, shape: number): number {
  const d = shape - 1 / 3;
  const c = 1 / Math.sqrt(9 * d);
  for (;;) {
    const z = normalScore(nextUniform(states, at));
    const root = 1 + c * z;
    if (root <= 0) continue;
    const v = root * root * root;
    if (ln(nextUniform(states, at)) < 0.5 * z * z + d - d * v + d * ln(v)) return d * v;
  }
}
