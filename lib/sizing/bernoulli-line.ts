/**
 * Probability that the second of two Bernoulli stations finds the buffer between them empty.
 * @param p, q - Probabilities 0 < . <= 1 that the first and the second are up in a cycle.
 * @param places - Of the buffer, whole, >= 1.
 * @remarks J. Li and S. M. Meerkov, Production Systems Engineering (Springer, 2009), section 4.2. A part stays in the
 * buffer while it is worked on; a station is blocked before it starts.
 */
export function emptyShare(p: number, q: number, places: number): number {
  if (p >= 1) return 0;
  if (Math.abs(p - q) < 1e-12) return (1 - p) / (places + 1 - p);
  if (q >= 1) return 1 - p;
  const ratio = (p * (1 - q)) / (q * (1 - p));
  return ((1 - p) * (1 - ratio)) / (1 - (p / q) * ratio ** places);
}

const mostRounds = 100_000;
const precision = 1e-13;

/**
 * Parts a cycle that a serial line of Bernoulli stations makes.
 * @param up - Probability of each station to be up in a cycle, 0 < . <= 1.
 * @param places - Of the buffers between them, one fewer than the stations, whole, >= 1.
 * @returns Exact for two stations, within about one per cent for more.
 * @throws RangeError on arguments out of range.
 * @remarks Recursive aggregation, Li and Meerkov (2009), section 4.3.
 */
export function bernoulliRate(up: readonly number[], places: readonly number[]): number {
  if (up.length === 0 || places.length !== up.length - 1)
    throw new RangeError(`${up.length} stations need ${up.length - 1} buffers, got ${places.length}`);
  if (!up.every((p) => p > 0 && p <= 1)) throw new RangeError(`up must be above 0 and at most 1, got ${up.join(", ")}`);
  if (!places.every((n) => Number.isInteger(n) && n >= 1))
    throw new RangeError(`places must be whole and at least 1, got ${places.join(", ")}`);
  const last = up.length - 1;
  const forward = [...up];
  const backward = [...up];
  for (let round = 0; round < mostRounds; round++) {
    for (let i = last - 1; i >= 0; i--) backward[i] = up[i] * (1 - emptyShare(backward[i + 1], forward[i], places[i]));
    let moved = 0;
    for (let i = 1; i <= last; i++) {
      const next = up[i] * (1 - emptyShare(forward[i - 1], backward[i], places[i - 1]));
      moved = Math.max(moved, Math.abs(next - forward[i]));
      forward[i] = next;
    }
    if (moved < precision) break;
  }
  return forward[last];
}

const mostPlaces = 10_000;

/**
 * The fewest places, alike in all buffers, with which a line makes a share of what its slowest station alone would.
 * @param share - 0 < . < 1.
 * @returns Null where no number of places up to 10 000 does.
 * @remarks Lean buffering, Li and Meerkov (2009), chapter 6.
 */
export function leanPlaces(up: readonly number[], share: number): number | null {
  const wanted = share * Math.min(...up) * (1 - 1e-12);
  const rate = (n: number) => bernoulliRate(up, new Array<number>(up.length - 1).fill(n));
  let high = 1;
  while (rate(high) < wanted) {
    high *= 2;
    if (high > mostPlaces) return null;
  }
  let low = Math.floor(high / 2);
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (rate(middle) < wanted) low = middle;
    else high = middle;
  }
  return high;
}
