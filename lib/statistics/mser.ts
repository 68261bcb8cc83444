/** Observations averaged into one before the rule is applied. */
const batchLength = 5;

/**
 * How many observations at the start of a series to leave out, by the marginal standard error rule on batches of five.
 * @param series - Equally spaced, in time order.
 * @returns `cut` in observations, a multiple of 5; `isFound` false where the least error lies in the later half, so
 * that the series is too short to tell. Fewer than 20 observations are never enough.
 * @remarks White, Simulation 69 (1997) 323-334, MSER; batches of five: White, Cobb and Spratt (2000), MSER-5.
 */
export function findTruncation(series: ArrayLike<number>): { cut: number; isFound: boolean } {
  const n = Math.floor(series.length / batchLength);
  const means = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < batchLength; j++) means[i] += series[i * batchLength + j] / batchLength;
  }
  let least = Infinity;
  let best = 0;
  for (let cut = 0; cut <= n - 2; cut++) {
    const kept = n - cut;
    let mean = 0;
    for (let i = cut; i < n; i++) mean += means[i] / kept;
    let squares = 0;
    for (let i = cut; i < n; i++) squares += (means[i] - mean) * (means[i] - mean);
    const error = squares / (kept * kept);
    if (error < least) {
      least = error;
      best = cut;
    }
  }
  return { cut: best * batchLength, isFound: n >= 4 && best <= n / 2 };
}
