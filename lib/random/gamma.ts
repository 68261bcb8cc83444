import { exp, ln } from "./elementary";
import { lnGamma, poissonTerm } from "./gamma-function";
import { normalQuantile } from "./normal";

/** Above it the quantile comes from the Cornish-Fisher expansion, whose relative error there is below 1e-8. */
const largeShape = 1e5;

/**
 * One tail of the gamma distribution of unit scale, relative error below 1e-12 for shapes up to 1e5.
 * @param shape - > 0.
 * @param x - Any number.
 * @param isUpper - True: P(X > x); false: P(X <= x). Each keeps its digits where it is small.
 * @remarks Series and continued fraction; Press et al., Numerical Recipes (2007), section 6.2.
 */
export function gammaTail(shape: number, x: number, isUpper: boolean): number {
  if (!(x > 0)) return isUpper ? 1 : 0;
  if (x === Infinity) return isUpper ? 0 : 1;
  const term = poissonTerm(shape, x);
  if (x < shape + 1) {
    let sum = 1;
    let part = 1;
    for (let n = 1; part > sum * 1e-17; n++) {
      part *= x / (shape + n);
      sum += part;
    }
    const lower = sum * term;
    return isUpper ? 1 - lower : lower;
  }
  let b = x + 1 - shape;
  let c = 1e300;
  let d = 1 / b;
  let h = d;
  for (let i = 1; i < 1e6; i++) {
    const a = -i * (i - shape);
    b += 2;
    d = 1 / (a * d + b);
    c = b + a / c;
    const factor = c * d;
    h *= factor;
    if (Math.abs(factor - 1) < 1e-16) break;
  }
  const upper = term * shape * h;
  return isUpper ? upper : 1 - upper;
}

/**
 * Quantile of the gamma distribution of unit scale, relative error below 1e-8; underflows to 0 for tiny shapes.
 * @param shape - > 0.
 * @param p - In (0, 1).
 * @param q - 1 - p, given apart so that the upper tail keeps its digits.
 * @param start - A near value to begin from, 0 if none is known.
 * @remarks Newton steps on the logarithm of the smaller tail, over ln x, kept between bounds.
 */
export function gammaQuantile(shape: number, p: number, q: number, start = 0): number {
  if (shape > largeShape) return expandQuantile(shape, normalQuantile(p, q));
  const isUpper = q < p;
  const target = isUpper ? q : p;
  const lnTarget = ln(target);
  let y = start > 0 ? ln(start) : guessLn(shape, p, q);
  if (y < -700) return 0;
  let low = -Infinity;
  let high = Infinity;
  for (let i = 0; i < 100; i++) {
    const x = exp(y);
    const tail = gammaTail(shape, x, isUpper);
    const excess = tail > 0 ? ln(tail) - lnTarget : -Infinity;
    if (excess > 0 === isUpper) low = y;
    else high = y;
    const slope = (isUpper ? -1 : 1) * ((shape * poissonTerm(shape, x)) / tail);
    let next = y - excess / slope;
    if (!(next > low) || !(next < high)) {
      if (low === -Infinity) next = high - 1;
      else if (high === Infinity) next = low + 1;
      else next = (low + high) / 2;
    }
    if (next < -700) return 0;
    if (Math.abs(next - y) < 1e-11) return exp(next);
    y = next;
  }
  return exp(y);
}

function guessLn(shape: number, p: number, q: number): number {
  const z = normalQuantile(p, q);
  const root = 1 - 1 / (9 * shape) + z / (3 * Math.sqrt(shape));
  if (shape >= 1 && root > 0.1) return ln(shape * root * root * root);
  const fromBelow = (ln(p) + lnGamma(shape + 1)) / shape;
  return q < 0.1 ? ln(shape - ln(q)) : Math.min(fromBelow, ln(shape + 1));
}

/** Cornish and Fisher (1938), to the third order, with the gamma's skewness 2/sqrt(k) and excess 6/k. */
function expandQuantile(shape: number, z: number): number {
  const root = Math.sqrt(shape);
  const z2 = z * z;
  const correction = (z2 - 1) / (3 * root) + (z * (z2 - 7)) / (36 * shape);
  return shape + root * (z + correction);
}
