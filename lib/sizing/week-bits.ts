import type { RunResult } from "@/lib/simulation/types";

/** Which weeks were bad: 1 below the target, 0 otherwise; replication after replication. `nDue`: weeks with demand. */
export type BadWeeks = { bad: Uint8Array; nDue: number };

export function readBadWeeks({ fillRates }: RunResult, targetFillRate: number): BadWeeks {
  const bad = new Uint8Array(fillRates.length);
  let nDue = 0;
  for (let w = 0; w < bad.length; w++) {
    const rate = fillRates[w];
    if (Number.isNaN(rate)) continue;
    nDue++;
    // Rates are stored in single precision, so that one on the target may read a little less.
    if (rate < targetFillRate - 1e-6) bad[w] = 1;
  }
  return { bad, nDue };
}

/** Eight weeks a byte, as base64. */
export function packBits(bits: Uint8Array): string {
  const bytes = new Uint8Array(Math.ceil(bits.length / 8));
  bits.forEach((bit, i) => (bytes[i >> 3] |= bit << (i & 7)));
  let text = "";
  for (const byte of bytes) text += String.fromCharCode(byte);
  return btoa(text);
}

/** @param length - Bits that were packed. */
export function unpackBits(text: string, length: number): Uint8Array {
  const bytes = atob(text);
  return Uint8Array.from({ length }, (_, i) => (bytes.charCodeAt(i >> 3) >> (i & 7)) & 1);
}
