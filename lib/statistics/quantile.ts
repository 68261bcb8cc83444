/**
 * Percentile of a sorted sample by the model's rule: x[floor(n p + 1e-9)], at most the last.
 * @param sorted - Ascending.
 * @param p - 0..1; at least 1 - p of the values are at or above the result.
 * @returns NaN for an empty sample.
 */
export function pickQuantile(sorted: ArrayLike<number>, p: number): number {
  return sorted.length === 0 ? NaN : sorted[rankOf(sorted.length, p)];
}

/** Index of the percentile p among n ascending values. */
export function rankOf(n: number, p: number): number {
  return Math.min(n - 1, Math.floor(n * p + 1e-9));
}

/**
 * The same rule over values with counts.
 * @param values - Ascending, length of `counts`.
 */
export function pickCountedQuantile(values: ArrayLike<number>, counts: ArrayLike<number>, p: number): number {
  let n = 0;
  for (let i = 0; i < counts.length; i++) n += counts[i];
  if (n === 0) return NaN;
  let left = rankOf(n, p);
  for (let i = 0; i < counts.length; i++) {
    if (left < counts[i]) return values[i];
    left -= counts[i];
  }
  return values[values.length - 1];
}
