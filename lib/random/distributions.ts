import type { Distribution } from "@/lib/line/types";
import { exp, expm1, ln, ln1p } from "./elementary";
import { gammaQuantile, gammaTail } from "./gamma";
import { normalCdf, normalQuantile } from "./normal";

/** A distribution whose quantiles are had without a table. */
export type Continuous = Exclude<Distribution, { type: "poisson" } | { type: "negativeBinomial" }>;

/**
 * Puts a distribution into the form that the functions here take: `sd` 0 becomes fixed, empirical values ascend.
 * @throws RangeError where a parameter is outside the model's range.
 */
export function prepareDistribution(d: Distribution, where: string): Distribution {
  const demand = (isSound: boolean): void => {
    if (!isSound) throw new RangeError(`${where} has a ${d.type} distribution with parameters out of range`);
  };
  switch (d.type) {
    case "fixed":
      demand(isFinite(d.value));
      return d;
    case "normal":
      demand(isFinite(d.mean) && d.sd >= 0 && isFinite(d.sd));
      return d.sd > 0 ? d : { type: "fixed", value: d.mean };
    case "lognormal":
    case "gamma":
      demand(d.mean > 0 && isFinite(d.mean) && d.sd >= 0 && isFinite(d.sd));
      return d.sd > 0 ? d : { type: "fixed", value: d.mean };
    case "weibull":
      demand(d.shape > 0 && isFinite(d.shape) && d.scale > 0 && isFinite(d.scale));
      return d;
    case "exponential":
    case "poisson":
      demand(d.mean > 0 && isFinite(d.mean));
      return d;
    case "uniform":
      demand(d.min < d.max && isFinite(d.max - d.min));
      return d;
    case "triangular":
      demand(d.min <= d.mode && d.mode <= d.max && d.min < d.max && isFinite(d.max - d.min));
      return d;
    case "negativeBinomial":
      demand(d.mean > 0 && isFinite(d.sd) && d.sd * d.sd > d.mean);
      return d;
    case "empirical":
      demand(d.values.length > 0 && d.values.every((value) => isFinite(value)));
      return { type: "empirical", values: [...d.values].sort((a, b) => a - b) };
    default:
      throw new RangeError(`${where} has an unknown distribution`);
  }
}

/**
 * F^-1 of a prepared distribution, relative error below 1e-8.
 * @param p - In (0, 1).
 * @param q - 1 - p, given apart so that the upper tail keeps its digits.
 */
export function quantile(d: Continuous, p: number, q: number): number {
  switch (d.type) {
    case "fixed":
      return d.value;
    case "normal":
      return d.mean + d.sd * normalQuantile(p, q);
    case "lognormal": {
      const variance = ln1p((d.sd * d.sd) / (d.mean * d.mean));
      return exp(ln(d.mean) - variance / 2 + Math.sqrt(variance) * normalQuantile(p, q));
    }
    case "gamma": {
      const scale = (d.sd * d.sd) / d.mean;
      return scale * gammaQuantile(d.mean / scale, p, q);
    }
    case "weibull":
      return d.scale * exp(ln(hazard(p, q)) / d.shape);
    case "exponential":
      return d.mean * hazard(p, q);
    case "uniform":
      return d.min + (d.max - d.min) * p;
    case "triangular": {
      const range = d.max - d.min;
      if (p * range <= d.mode - d.min) return d.min + Math.sqrt(p * range * (d.mode - d.min));
      return d.max - Math.sqrt(q * range * (d.max - d.mode));
    }
    case "empirical": {
      const n = d.values.length;
      return d.values[Math.min(Math.floor(p * n), n - 1)];
    }
  }
}

/** -ln(1 - p), by whichever tail keeps its digits. */
function hazard(p: number, q: number): number {
  return p < 0.5 ? -ln1p(-p) : -ln(q);
}

/**
 * Both tails of a prepared distribution at x: [P(X < x), P(X >= x)], each with its own digits where it is small.
 * The first is strict, so that it is also right for distributions with atoms.
 */
export function tailsAt(d: Continuous, x: number): [number, number] {
  switch (d.type) {
    case "fixed":
      return d.value < x ? [1, 0] : [0, 1];
    case "normal":
      return normalTails((x - d.mean) / d.sd);
    case "lognormal": {
      if (x <= 0) return [0, 1];
      const variance = ln1p((d.sd * d.sd) / (d.mean * d.mean));
      return normalTails((ln(x / d.mean) + variance / 2) / Math.sqrt(variance));
    }
    case "gamma": {
      const scale = (d.sd * d.sd) / d.mean;
      return [gammaTail(d.mean / scale, x / scale, false), gammaTail(d.mean / scale, x / scale, true)];
    }
    case "weibull":
      return x <= 0 ? [0, 1] : hazardTails(exp(d.shape * ln(x / d.scale)));
    case "exponential":
      return x <= 0 ? [0, 1] : hazardTails(x / d.mean);
    case "uniform": {
      const share = Math.min(1, Math.max(0, (x - d.min) / (d.max - d.min)));
      return [share, 1 - share];
    }
    case "triangular": {
      if (x <= d.min) return [0, 1];
      if (x >= d.max) return [1, 0];
      const range = d.max - d.min;
      if (x <= d.mode) {
        const lower = ((x - d.min) * (x - d.min)) / (range * (d.mode - d.min));
        return [lower, 1 - lower];
      }
      const upper = ((d.max - x) * (d.max - x)) / (range * (d.max - d.mode));
      return [1 - upper, upper];
    }
    case "empirical": {
      let below = 0;
      while (below < d.values.length && d.values[below] < x) below++;
      return [below / d.values.length, (d.values.length - below) / d.values.length];
    }
  }
}

function normalTails(z: number): [number, number] {
  return [normalCdf(z), normalCdf(-z)];
}

function hazardTails(h: number): [number, number] {
  return [-expm1(-h), exp(-h)];
}
