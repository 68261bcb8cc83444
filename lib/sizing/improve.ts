import { combineMoves, type Combination, describeMoves, type Move } from "./moves";
import { type Levels, withLevel } from "./problem";
import type { Reading, Sample, Search } from "./runs";
import { countDue } from "./week-rates";

/** Part of its size by which a buffer is moved at first. */
const firstStep = 0.08;
/** Times that sets are composed anew after one look round. */
const mostTries = 4;
/** Single moves run in full where joint ones do not help. */
const mostSingle = 3;
/** Parts of the weeks over which moves that seem not to help are looked at before they are made shorter. */
const mostJoined = 2;
/** A set this close to the accepted risk leaves nothing worth another try; share of weeks. */
const enough = 0.002;

/**
 * Looks round a set of sizes and moves to a better one while there is one: each buffer a step down and a step up over a
 * part of the weeks, the most promising moves together over all of them.
 * @param accepted - Share of weeks that may be bad.
 * @param mostEffort - Runs of all replications after which no further look round is begun.
 * @returns The cheapest set found that keeps to the accepted risk; where none does, the one of the least risk.
 * @remarks Neighbourhood search on a fixed sample of weeks, as in H. Wang, R. Pasupathy and B. W. Schmeiser,
 * Integer-ordered simulation optimization using R-SPLINE, ACM TOMACS 23 (2013) 17.
 */
export async function improveSizes(
  search: Search,
  start: Reading,
  accepted: number,
  mostEffort: number,
): Promise<Reading> {
  const { problem, runs, whole, part } = search;
  const findBest = () =>
    runs.known(whole).reduce((one, other) => (isBetter(other, one, accepted) ? other : one), start);
  let at = start;
  // Each look round is at other weeks, so that none of them is fitted to for long.
  const nParts = Math.floor(problem.replications / part.replications);
  const partOf = (round: number): Sample => ({
    ...part,
    firstReplication: ((round + 1) % nParts) * part.replications,
  });
  const steps = problem.buffers.map(({ min, step }, b) =>
    Math.max(1, Math.round((firstStep * (min + start.levels[b] * step)) / step)),
  );
  const end = runs.effort() + mostEffort;
  let seen: Look | null = null;
  for (let round = 0; runs.effort() < end; round++) {
    const look = await lookRound(search, at.levels, steps, partOf(round));
    seen = seen ? joinLooks(seen, look) : look;
    const { tried, price } = await tryMoves(search, seen, at, accepted);
    const best = findBest();
    const next = pickBase([at, ...tried], accepted, price * seen.nDue);
    if (next !== at) {
      // Where a whole step was right, the next one may be longer.
      steps.forEach((step, b) => {
        if (Math.abs(next.levels[b] - at.levels[b]) >= step) steps[b] = 2 * step;
      });
      at = next;
    } else if (seen.nParts < Math.min(nParts, mostJoined)) continue;
    else if (at !== best) at = best;
    else if (steps.every((step) => step === 1)) break;
    else steps.forEach((step, b) => (steps[b] = Math.max(1, step >> 1)));
    seen = null;
  }
  return findBest();
}

/**
 * The set to look round next: the one of the least objective, where risk beyond the accepted one is priced somewhat above
 * what it costs to mend. A set a little too risky is often a better place to go on from than a dear one within the risk.
 * @param price - Of a share of weeks, in the objective; 0: unknown.
 */
function pickBase(sets: readonly Reading[], accepted: number, price: number): Reading {
  const merit = ({ value, risk }: Reading) => value + 1.5 * price * Math.max(0, risk - accepted);
  return sets.reduce((one, other) =>
    price > 0 ? (merit(other) < merit(one) ? other : one) : isBetter(other, one, accepted) ? other : one,
  );
}

/** Moves of each buffer, as runs over one or several parts of the weeks show them. */
type Look = { moves: Move[]; nParts: number; nWeeks: number; nDue: number };

async function lookRound(
  { problem, runs, tops }: Search,
  levels: Levels,
  steps: readonly number[],
  part: Sample,
): Promise<Look> {
  const [from, ...moved] = await runs.read([levels, ...neighbours(levels, steps, tops)], part);
  const moves = moved.flatMap((to) => {
    const b = to.levels.findIndex((level, i) => level !== from.levels[i]);
    return describeMoves(from, to, b, problem.targetFillRate);
  });
  return { moves, nParts: 1, nWeeks: from.codes.length, nDue: countDue(from.codes) };
}

/** Looks at the same moves from the same sizes over different weeks. */
function joinLooks(one: Look, other: Look): Look {
  const moves = one.moves.map((move, i): Move => {
    const { gain, lost, won } = other.moves[i];
    const later = (weeks: number[]) => weeks.map((w) => w + one.nWeeks);
    return {
      ...move,
      gain: (one.nParts * move.gain + other.nParts * gain) / (one.nParts + other.nParts),
      lost: [...move.lost, ...later(lost)],
      won: [...move.won, ...later(won)],
    };
  });
  return {
    moves,
    nParts: one.nParts + other.nParts,
    nWeeks: one.nWeeks + other.nWeeks,
    nDue: one.nDue + other.nDue,
  };
}

/**
 * Runs sets composed of moves over all weeks. What they turn out worse than the moves alone promised is allowed for in
 * the next ones, by halving the bracket; where joint moves do not help, the best single ones are tried.
 */
async function tryMoves(
  { runs, whole }: Search,
  { moves, nWeeks, nDue }: Look,
  base: Reading,
  accepted: number,
): Promise<{ tried: Reading[]; price: number }> {
  const setOf = ({ moves: set }: Combination): Levels =>
    set.reduce<Levels>((levels, { b, by }) => withLevel(levels, b, levels[b] + by), base.levels);
  const combine = (allowance: number) =>
    combineMoves(moves, nWeeks, Math.floor((accepted - base.risk - allowance) * nDue + 1e-6));
  const tried: Reading[] = [];
  const { single, price } = combine(0);
  let allowance = 0;
  // Allowances with which a set came out too risky, and within the risk.
  let [tooLittle, plenty] = [-Infinity, Infinity];
  for (let i = 0; i < mostTries; i++) {
    const set = combine(allowance).joint.at(-1);
    if (!set) break;
    const [reading] = await runs.read([setOf(set)], whole);
    tried.push(reading);
    const off = reading.risk - base.risk - set.change / nDue;
    if (reading.risk > accepted) tooLittle = Math.max(tooLittle, allowance);
    else if (reading.risk > accepted - enough) break;
    else plenty = Math.min(plenty, allowance);
    const isBracketed = tooLittle > -Infinity && plenty < Infinity;
    allowance = isBracketed ? (tooLittle + plenty) / 2 : off === allowance ? 1.5 * off : off;
  }
  if (tried.some((reading) => isBetter(reading, base, accepted))) return { tried, price };
  tried.push(...(await runs.read(single.slice(0, mostSingle).map(setOf), whole)));
  return { tried, price };
}

/** Keeping to the accepted risk comes first, then the objective. */
export function isBetter(one: Reading, other: Reading, accepted: number): boolean {
  const keeps = one.risk <= accepted;
  if (keeps !== other.risk <= accepted) return keeps;
  return keeps ? one.value < other.value : one.risk < other.risk;
}

function neighbours(levels: Levels, steps: readonly number[], tops: Levels): Levels[] {
  return levels.flatMap((level, b) => {
    const down = Math.max(0, level - steps[b]);
    const up = Math.min(tops[b], level + steps[b]);
    return [down, up].filter((other) => other !== level).map((other) => withLevel(levels, b, other));
  });
}
