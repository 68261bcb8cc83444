import type { RunResult } from "@/lib/simulation/types";

/** Codes of a week: 0 nothing due; 1..127 below the target, in equal steps; 128..255 at or above it. */
const nSteps = 127;
const firstGood = 128;

/**
 * Weekly fill rates as one byte each, exact in whether the target was met.
 * @returns One code a week, replication after replication.
 */
export function codeWeeks(result: RunResult, targetFillRate: number): Uint8Array {
  const { fillRates } = result;
  const codes = new Uint8Array(fillRates.length);
  for (let i = 0; i < codes.length; i++) {
    const rate = fillRates[i];
    // Rates are stored in single precision, so that one on the target may read a little less.
    if (Number.isNaN(rate)) codes[i] = 0;
    else if (rate < targetFillRate - 1e-6)
      codes[i] = 1 + Math.min(nSteps - 1, Math.floor((rate / targetFillRate) * nSteps));
    else
      codes[i] =
        firstGood + Math.round(Math.min(1, (rate - targetFillRate) / Math.max(1e-9, 1 - targetFillRate)) * nSteps);
  }
  return codes;
}

export const isBad = (code: number): boolean => code > 0 && code < firstGood;

/** Weeks with demand. */
export function countDue(codes: Uint8Array): number {
  let n = 0;
  for (let i = 0; i < codes.length; i++) if (codes[i] > 0) n++;
  return n;
}

export function countBad(codes: Uint8Array): number {
  let n = 0;
  for (let i = 0; i < codes.length; i++) if (isBad(codes[i])) n++;
  return n;
}

/** A fill rate from its code, to a hundredth or so; below 0 never. */
export function rateOf(code: number, targetFillRate: number): number {
  if (isBad(code)) return ((code - 0.5) / nSteps) * targetFillRate;
  return targetFillRate + ((code - firstGood) / nSteps) * (1 - targetFillRate);
}
