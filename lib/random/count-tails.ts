import type { Distribution } from "@/lib/line/types";
import { exp, ln, ln1p } from "./elementary";
import { lnGamma, poissonTerm } from "./gamma-function";

type Count = Extract<Distribution, { type: "poisson" } | { type: "negativeBinomial" }>;

/**
 * Distribution function of a Poisson or negative binomial count, over all values of probability above 1e-20.
 * @returns `atMost[i]` is P(X <= first + i).
 * @remarks Probabilities from the mode outward by their ratios; summed from the small end.
 */
export function listCountTails(d: Count): { first: number; atMost: Float64Array } {
  const mode = findMode(d);
  const peak = probability(d, mode);
  const below: number[] = [];
  for (let k = mode, p = peak; k > 0; k--) {
    p /= ratio(d, k - 1);
    if (p < 1e-20) break;
    below.push(p);
  }
  const probabilities = below.reverse();
  const first = mode - probabilities.length;
  for (let k = mode, p = peak; p > 1e-20; k++) {
    probabilities.push(p);
    p *= ratio(d, k);
  }
  const atMost = new Float64Array(probabilities.length);
  let sum = 0;
  for (let i = 0; i < atMost.length; i++) {
    sum += probabilities[i];
    atMost[i] = sum;
  }
  return { first, atMost };
}

/** P(k + 1) / P(k). */
function ratio(d: Count, k: number): number {
  if (d.type === "poisson") return d.mean / (k + 1);
  const variance = d.sd * d.sd;
  const size = (d.mean * d.mean) / (variance - d.mean);
  return ((k + size) / (k + 1)) * ((variance - d.mean) / variance);
}

function findMode(d: Count): number {
  if (d.type === "poisson") return Math.floor(d.mean);
  const variance = d.sd * d.sd;
  const size = (d.mean * d.mean) / (variance - d.mean);
  return size > 1 ? Math.max(0, Math.floor(((size - 1) * (variance - d.mean)) / d.mean)) : 0;
}

function probability(d: Count, k: number): number {
  if (d.type === "poisson") return poissonTerm(k, d.mean);
  const variance = d.sd * d.sd;
  const size = (d.mean * d.mean) / (variance - d.mean);
  const lnSuccess = ln(d.mean / variance);
  const lnFailure = ln1p(-d.mean / variance);
  if (k === 0) return exp(size * lnSuccess);
  return exp(lnGamma(k + size) - lnGamma(size) - lnGamma(k + 1) + size * lnSuccess + k * lnFailure);
}
