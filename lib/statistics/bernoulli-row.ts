/**
 * Stations in a row with a buffer between each two. In every cycle each is up with its probability by itself; a part
 * stays in the buffer while it is worked on, and a station is blocked before it starts.
 */
export type BernoulliRow = {
  /** Probability 0 < . <= 1 to be up in a cycle. */
  up: readonly number[];
  /** Share 0 < . <= 1 of a station's parts that are good; the others leave the row. */
  good: readonly number[];
};

/**
 * Q(p, q, N): probability that the second of two stations finds the buffer between them empty; turned round, Q(q, p, N)
 * is the probability that the first finds it full and the second taking nothing.
 * @param p, q - Up probabilities of the first and the second, 0 < . <= 1.
 * @param places - N, whole, >= 1.
 * @remarks J. Li and S. M. Meerkov, Production Systems Engineering (Springer, 2009), section 4.2. Theirs is
 * (1 - p)(1 - a) / (1 - (p / q) a^N) with a = p(1 - q) / (q(1 - p)); the same divided by 1 - a, since that loses all
 * digits where p comes near q, as it does in every balanced row.
 */
export function emptyProbability(p: number, q: number, places: number): number {
  if (p >= 1) return 0;
  const more = (p - q) / (q * (1 - p));
  const sum = more === 0 ? places : Math.expm1(places * Math.log1p(more)) / more;
  return (1 - p) / (1 - p + (p / q) * sum);
}

/**
 * Good parts a cycle that leave a row which is never short of parts at its head nor of room at its end.
 * @param places - Of the buffers, one fewer than the stations, whole, >= 1.
 * @returns Exact for one and two stations; for more within one or two per cent.
 * @throws RangeError on arguments out of range.
 * @remarks Recursive aggregation, Li and Meerkov (2009), section 4.3. What is not good never reaches the next buffer:
 * to it, a station that is up fills a place with probability up times good.
 */
export function rowRate(row: BernoulliRow, places: readonly number[]): number {
  checkRow(row);
  if (places.length !== row.up.length - 1)
    throw new RangeError(`${row.up.length} stations need ${row.up.length - 1} buffers, got ${places.length}`);
  const wrong = places.find((n) => !Number.isInteger(n) || n < 1);
  if (wrong !== undefined) throw new RangeError(`places must be whole and >= 1, got ${wrong}`);
  return aggregate(row, places, () => false);
}

const mostRounds = 10_000;
const precision = 1e-11;

/**
 * Rounds of the aggregation until the rate at the head, which rises, and that at the end, which falls, have met or
 * `isDecided` by the two; the latter is returned.
 */
function aggregate(
  { up, good }: BernoulliRow,
  places: readonly number[],
  isDecided: (low: number, high: number) => boolean,
): number {
  const last = up.length - 1;
  const through = good.reduce((product, share) => product * share, 1);
  const forward = [...up];
  const backward = [...up];
  for (let round = 0; round < mostRounds; round++) {
    for (let i = last - 1; i >= 0; i--)
      backward[i] = up[i] * (1 - emptyProbability(backward[i + 1], forward[i] * good[i], places[i]));
    for (let i = 1; i <= last; i++)
      forward[i] = up[i] * (1 - emptyProbability(forward[i - 1] * good[i - 1], backward[i], places[i - 1]));
    const [low, high] = [backward[0] * through, forward[last] * good[last]];
    if (high - low < precision || isDecided(low, high)) break;
  }
  return forward[last] * good[last];
}

/** Good parts a cycle with endless buffers: what the station that holds the row up most lets through. */
export function endlessRowRate(row: BernoulliRow): number {
  checkRow(row);
  let least = Infinity;
  let through = 1;
  for (let i = row.up.length - 1; i >= 0; i--) {
    through *= row.good[i];
    least = Math.min(least, row.up[i] * through);
  }
  return least;
}

/** A wanted rate that is met exactly must not be missed by a rounding error. */
const slack = 1e-9;

/**
 * The fewest places, alike in all buffers, with which a row makes `share` of its endless rate.
 * @param share - 0 < . < 1.
 * @throws RangeError outside.
 * @remarks Lean buffering, Li and Meerkov (2009), chapter 6. Two stations alike: the least whole N >= E(1 - p) / (1 - E).
 */
export function leanPlacesAlike(row: BernoulliRow, share: number): number {
  const isEnough = enough(row, share);
  const alike = (n: number) => new Array<number>(row.up.length - 1).fill(n);
  let high = 1;
  while (!isEnough(alike(high))) high *= 2;
  let low = high >> 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (isEnough(alike(middle))) high = middle;
    else low = middle;
  }
  return high;
}

/** Exchanges in longer rows take seconds. */
const mostToExchange = 12;

/**
 * Places of each buffer with which a row makes `share` of its endless rate, so few that no buffer can give up one alone.
 * @param share - 0 < . < 1.
 * @throws RangeError outside.
 * @remarks From equal places downwards in halving steps, a step from each buffer in turn, the ends first, which need
 * least; then, in rows of up to 12 buffers, a place more in one buffer for two in its neighbours as long as that is
 * enough. The sum is close to the least there is, not proven to be.
 */
export function leanPlacesEach(row: BernoulliRow, share: number): number[] {
  const isEnough = enough(row, share);
  const alike = leanPlacesAlike(row, share);
  const places = new Array<number>(row.up.length - 1).fill(alike);
  for (let step = 1 << Math.floor(Math.log2(alike)); step >= 1; step >>= 1) lower(places, step, isEnough);
  if (places.length <= mostToExchange) while (exchange(places, isEnough)) lower(places, 1, isEnough);
  return places;
}

/** Takes `step` places at a time from one buffer after another, in place, until none can give them. */
function lower(places: number[], step: number, isEnough: (places: readonly number[]) => boolean): void {
  const n = places.length;
  let open = places.map((_, i) => (i % 2 === 0 ? i / 2 : n - (i + 1) / 2));
  while (open.length > 0)
    // What a buffer cannot give now it cannot give later either, when the others have less.
    open = open.filter((i) => places[i] > step && change(places, [[i, -step]], isEnough));
}

/** Makes the first exchange that saves a place, in place; false where there is none. */
function exchange(places: number[], isEnough: (places: readonly number[]) => boolean): boolean {
  const tryOut = (i: number, j: number, k: number) => {
    const isThere = places[j] > (j === k ? 2 : 1) && places[k] > 1;
    const by: [number, number][] = [
      [i, 1],
      [j, -1],
      [k, -1],
    ];
    return isThere && change(places, by, isEnough);
  };
  return places.some((_, i) => tryOut(i, i - 1, i + 1) || tryOut(i, i - 1, i - 1) || tryOut(i, i + 1, i + 1));
}

/** Adds to places in place and leaves it so where that is enough; else takes it back. */
function change(
  places: number[],
  by: readonly (readonly [number, number])[],
  isEnough: (places: readonly number[]) => boolean,
): boolean {
  for (const [i, more] of by) places[i] += more;
  if (isEnough(places)) return true;
  for (const [i, more] of by) places[i] -= more;
  return false;
}

function enough(row: BernoulliRow, share: number): (places: readonly number[]) => boolean {
  if (!(share > 0 && share < 1)) throw new RangeError(`share must be above 0 and below 1, got ${share}`);
  const wanted = share * endlessRowRate(row) * (1 - slack);
  return (places) => aggregate(row, places, (low, high) => low >= wanted || high < wanted) >= wanted;
}

function checkRow({ up, good }: BernoulliRow): void {
  if (up.length === 0 || good.length !== up.length)
    throw new RangeError(`up and good must be of one length >= 1, got ${up.length} and ${good.length}`);
  const wrong = [...up, ...good].find((share) => !(share > 0 && share <= 1));
  if (wrong !== undefined) throw new RangeError(`up and good must be above 0 and at most 1, got ${wrong}`);
}
