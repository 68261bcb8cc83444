/** Lower end of the scale: a full twentieth, and never so high that nothing is left to read a value off. */
export const sweepStart = (low: number) => Math.min(0.95, Math.max(0, Math.floor(low * 20 + 1e-9) / 20));

/** Heights from the top, at least 15 px apart and none below `bottom`. */
export function spread(wanted: readonly number[], bottom: number): number[] {
  let last = -Infinity;
  const apart = wanted.map((at) => (last = Math.max(at, last + 15)));
  return apart.map((at, i) => Math.min(at, bottom - 15 * (apart.length - 1 - i)));
}

/** Which labels, from the left, have room beside those before them. */
export function labelled(labels: readonly { at: number; width: number }[]): Set<number> {
  let end = -Infinity;
  const kept = labels.flatMap(({ at, width }, i) => {
    if (at - width / 2 < end) return [];
    end = at + width / 2;
    return [i];
  });
  return new Set(kept);
}
