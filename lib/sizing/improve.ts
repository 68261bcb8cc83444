import { combineMoves, type Combination, describeMoves, type Move } from "./moves";
import { withLevel, type Needs } from "./needs";
import type { Levels, SizingProblem } from "./problem";
import type { Reading, Runs, Sample } from "./runs";
import { countDue } from "./week-rates";

/** Part of its size by which a buffer is moved at first. */
const firstStep = 0.08;
/** Times that sets are composed anew after one look round. */
const mostTries = 3;
/** Single moves run in full where joint ones do not help. */
const mostSingle = 4;
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
  problem: SizingProblem,
  runs: Runs,
  { byBuffer, sample: part }: Needs,
  start: Reading,
  accepted: number,
  mostEffort: number,
): Promise<Reading> {
  const whole: Sample = { seed: problem.seed, replications: problem.replications, firstReplication: 0 };
  let best = start;
  // Each look round is at other weeks, so that none of them is fitted to for long.
  const nParts = Math.floor(problem.replications / part.replications);
  const look = (round: number): Sample => ({ ...part, firstReplication: ((round + 1) % nParts) * part.replications });
  const steps = problem.buffers.map(({ min, step }, b) =>
    Math.max(1, Math.round((firstStep * (min + start.levels[b] * step)) / step)),
  );
  const end = runs.effort() + mostEffort;
  for (let round = 0; runs.effort() < end; round++) {
    const [from, ...moved] = await runs.read(
      [
        best.levels,
        ...neighbours(
          best.levels,
          steps,
          byBuffer.map(({ top }) => top),
        ),
      ],
      look(round),
    );
    const moves = moved.flatMap((to) => {
      const b = to.levels.findIndex((level, i) => level !== from.levels[i]);
      return describeMoves(from, to, b, problem.targetFillRate);
    });
    const next = await tryMoves(runs, moves, best, from, accepted, whole);
    const hasMoved = steps.map((step, b) => Math.abs(next.levels[b] - best.levels[b]) >= step);
    if (next === best && steps.every((step) => step === 1)) break;
    // Where a whole step was right, the next one may be longer; where nothing helped, all are too long.
    steps.forEach((step, b) => {
      if (next === best) steps[b] = Math.max(1, step >> 1);
      else if (hasMoved[b]) steps[b] = 2 * step;
    });
    best = next;
  }
  return best;
}

/**
 * Runs sets composed of moves over all weeks. What they turn out worse than the moves alone promised is allowed for in
 * the next ones; where joint moves do not help, the best single ones are tried.
 */
async function tryMoves(
  runs: Runs,
  moves: readonly Move[],
  best: Reading,
  from: Reading,
  accepted: number,
  whole: Sample,
): Promise<Reading> {
  const nDue = countDue(from.codes);
  const setOf = ({ moves: set }: Combination): Levels =>
    set.reduce<Levels>((levels, { b, by }) => withLevel(levels, b, levels[b] + by), best.levels);
  let next = best;
  let overshoot = 0;
  for (let i = 0; i < mostTries; i++) {
    const slack = Math.floor((accepted - best.risk - overshoot) * nDue + 1e-6);
    const { joint, single } = combineMoves(moves, from.codes.length, slack);
    const isLast = i === mostTries - 1 || joint.length === 0;
    const asked = isLast && next === best ? single.slice(0, mostSingle) : [joint.at(-1), joint[joint.length >> 1]];
    const sets = asked.filter((set) => set !== undefined);
    if (sets.length === 0) break;
    const tried = await runs.read(sets.map(setOf), whole);
    next = tried.reduce((one, other) => (isBetter(other, one, accepted) ? other : one), next);
    if (isLast || (tried[0].risk <= accepted && tried[0].risk > accepted - enough)) break;
    overshoot = tried[0].risk - best.risk - sets[0].change / nDue;
  }
  return next;
}

/** Keeping to the accepted risk comes first, then the objective. */
export function isBetter(one: Reading, other: Reading, accepted: number): boolean {
  const keeps = one.risk <= accepted;
  if (keeps !== other.risk <= accepted) return keeps;
  return keeps ? one.value < other.value : one.risk < other.risk;
}

function neighbours(levels: Levels, steps: readonly number[], tops: readonly number[]): Levels[] {
  return levels.flatMap((level, b) => {
    const down = Math.max(0, level - steps[b]);
    const up = Math.min(tops[b], level + steps[b]);
    return [down, up].filter((other) => other !== level).map((other) => withLevel(levels, b, other));
  });
}
