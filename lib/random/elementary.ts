import stdlibExp from "@stdlib/math-base-special-exp";
import stdlibLn from "@stdlib/math-base-special-ln";

/** Natural logarithm and exponential by IEEE-fixed arithmetic only (FreeBSD msun in JavaScript): the same bits in every browser. */
export const ln: (x: number) => number = stdlibLn;
export const exp: (x: number) => number = stdlibExp;

/**
 * ln(1 + x), accurate for small x.
 * @param x - > -1.
 * @remarks Kahan's correction; Goldberg, What every computer scientist should know (1991), theorem 4.
 */
export function ln1p(x: number): number {
  const u = 1 + x;
  return u === 1 ? x : (ln(u) * x) / (u - 1);
}

/** exp(x) - 1, accurate for small x; Kahan's correction. */
export function expm1(x: number): number {
  const u = exp(x);
  if (u === 1) return x;
  if (u - 1 === -1) return -1;
  return u === Infinity ? u : ((u - 1) * x) / ln(u);
}

/**
 * d - ln(1 + d), accurate near 0.
 * @param d - > -1.
 */
export function minusLn1p(d: number): number {
  if (d > 0.15 || d < -0.15) return d - ln1p(d);
  // ln(1 + d) = 2 (s + s^3/3 + s^5/5 + ...) with s = d / (2 + d), and d - 2 s = d s.
  const s = d / (2 + d);
  const s2 = s * s;
  let power = s * s2;
  let sum = 0;
  for (let k = 3; k < 40; k += 2) {
    const term = power / k;
    sum += term;
    if (Math.abs(term) <= 1e-18 * Math.abs(sum)) break;
    power *= s2;
  }
  return d * s - 2 * sum;
}

/** Nearest whole number, halves upward: the model's rounding. */
export function roundHalfUp(x: number): number {
  return Math.floor(x + 0.5);
}
