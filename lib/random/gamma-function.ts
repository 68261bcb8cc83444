import { exp, ln, minusLn1p } from "./elementary";

const halfLnTwoPi = 0.9189385332046727;

/** Stirling's remainder: ln Gamma(x) - ((x - 1/2) ln x - x + ln(2 pi)/2), for x >= 10. */
function stirlingRemainder(x: number): number {
  const s = 1 / (x * x);
  return (1 / 12 - s * (1 / 360 - s * (1 / 1260 - s * (1 / 1680 - s * (1 / 1188 - s * (691 / 360360 - s / 156)))))) / x;
}

/**
 * Logarithm of the gamma function, relative error about 1e-15 away from its zeros at 1 and 2.
 * @param x - > 0.
 * @remarks Stirling's series after an upward shift to 15; Abramowitz and Stegun (1964), 6.1.41.
 */
export function lnGamma(x: number): number {
  let factor = 1;
  let y = x;
  while (y < 15) factor *= y++;
  return (y - 0.5) * ln(y) - y + halfLnTwoPi + stirlingRemainder(y) - ln(factor);
}

/**
 * x^a e^-x / Gamma(a + 1): the Poisson probability of a at mean x, for real a.
 * @param a - >= 0.
 * @param x - > 0.
 * @remarks Saddle point form, Loader (2000): keeps its digits for large a.
 */
export function poissonTerm(a: number, x: number): number {
  if (a < 15) return exp(a * ln(x) - x - lnGamma(a + 1));
  const root = Math.sqrt(2 * Math.PI * a);
  return exp(-a * minusLn1p((x - a) / a) - stirlingRemainder(a)) / root;
}
