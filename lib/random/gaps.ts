import { exp, ln, ln1p } from "./elementary";
import { normalScore } from "./whole-quantile";
import { nextUniform } from "./sfc32";

/** Stands for "never": a counter that starts here does not reach 0 in any run allowed. */
export const never = 2 ** 30;

/**
 * What `nextGap` needs to know of the trials.
 * @param probability - Of success, > 0.
 * @returns Logarithm of the chance that a trial fails; -Infinity where the probability is 1 or above.
 */
export function lnFailure(probability: number): number {
  return probability < 1 ? ln1p(-probability) : -Infinity;
}

/**
 * Number of the first success in a row of independent trials.
 * @param failure - `lnFailure` of the probability of success; at -Infinity the first trial succeeds and nothing is drawn.
 * @returns Whole, 1..never. One uniform draw otherwise.
 * @remarks Inversion; Devroye, Non-Uniform Random Variate Generation (1986), section X.2.
 */
export function nextGap(states: Int32Array, at: number, failure: number): number {
  if (failure === -Infinity) return 1;
  const gap = Math.floor(ln(nextUniform(states, at)) / failure) + 1;
  return gap < never ? gap : never;
}

/**
 * Lognormal duration rounded to whole ticks, at least 1.
 * @param mean - Ticks, > 0.
 * @param cv - Coefficient of variation, >= 0; 0 is fixed, but one uniform is drawn all the same.
 */
export function nextLognormalTicks(states: Int32Array, at: number, mean: number, cv: number): number {
  const z = normalScore(nextUniform(states, at));
  const variance = ln1p(cv * cv);
  const ticks = Math.floor(mean * exp(Math.sqrt(variance) * z - variance / 2) + 0.5);
  return ticks < 1 ? 1 : ticks < never ? ticks : never;
}
