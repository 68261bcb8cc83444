import { type Choice, changeAt, chooseLevels } from "./choose-levels";
import { type Curve, curveThrough, fitCurve, observe, type Observation, shareAt } from "./curve";
import { isBetter } from "./is-better";
import { withLevel } from "./problem";
import type { Reading, Sample, Search } from "./runs";

/** Sets chosen from the curves of one look round, each from what the one before turned out: over the look's weeks, over all. */
const mostRoughTries = 2;
const mostTries = 3;
/** A set this close to the accepted risk leaves nothing worth another try; share of weeks. */
const roughly = 0.008;
const enough = 0.001;
/** A look moves a buffer so far that about so many weeks more turn bad, and by at most this part of its size. */
const wantedChange = 0.006;
const mostMoved = 0.25;
/** Where looks are this much shorter than at first, the search has come to rest. */
const shortest = 0.2;
/** Relative doubt about observations one look old, and about older ones: the other buffers have moved since. */
const doubts = [0, 0.3, 0.7];
/** Share of bad weeks that a buffer is thought to answer for before anything is known of it. */
const unknownShare = 0.002;

/** What is known of each buffer's curve, from all looks so far; age in looks. */
export type Knowledge = { likely: number[]; seen: (Observation & { age: number })[][] };

/**
 * @param ample - The run with all buffers at their top: how far the low levels of purchased stock spread says how fast
 * shortage grows as its size falls.
 */
export function beginKnowledge({ problem, places, tops }: Search, ample: Reading): Knowledge {
  const likely = tops.map((top, b) => {
    if (places[b] !== "bought") return 6 / Math.max(6, top);
    const [, low, , , high] = ample.lows[b];
    return Math.log(16) / Math.max(0.5, (high - low) / problem.buffers[b].step);
  });
  return { likely, seen: tops.map(() => []) };
}

/**
 * Improves a set of sizes: looks at each buffer a step down or, every other time, up over a part of the weeks, fits a curve of risk to each, sets
 * all of them at once so that marginal risk for money is alike, and runs the set over all weeks; so again from there.
 * @param accepted - Share of weeks that may be bad.
 * @param mostEffort - Runs of all replications after which no further look round is begun.
 * @returns The best set known that keeps to the accepted risk; where none does, the one of the least risk.
 * @remarks Sequential response surfaces with a trust region (K.-H. Chang, L. J. Hong and H. Wan, Stochastic trust-region
 * response-surface method, INFORMS Journal on Computing 25 (2013) 230-243), here a curve for each buffer in place of a
 * polynomial, since shortage falls off nearly exponentially with stock.
 */
export async function improveSizes(
  search: Search,
  start: Reading,
  accepted: number,
  mostEffort: number,
  knowledge: Knowledge,
): Promise<Reading> {
  const { problem, runs, whole, part } = search;
  const findBest = () =>
    runs.known(whole).reduce((one, other) => (isBetter(other, one, accepted) ? other : one), start);
  let looked = part.replications;
  const end = runs.effort() + mostEffort;
  let at = start;
  let trust = 1;
  for (let round = 0; runs.effort() < end && trust > shortest; round++) {
    // Each look round is at other weeks, so that none of them is fitted to for long.
    const nParts = Math.floor(problem.replications / looked);
    const sample: Sample = { ...whole, replications: looked, firstReplication: (round % nParts) * looked };
    const { choices, from } = await lookRound(search, at, sample, trust, round % 2 === 1, knowledge);
    const { tried, price } = await tryLevels(search, choices, at, from, sample, accepted);
    // Beyond the accepted risk a set costs more than mending it would: a set a little too risky is often a better
    // place to go on from than a dear one within the risk.
    const merit = ({ value, risk }: Reading) => value + 1.5 * price * Math.max(0, risk - accepted);
    const next = [findBest(), ...tried].reduce((one, other) => (merit(other) < merit(one) ? other : one), at);
    if (next === at) trust /= 2;
    else at = next;
    if (trust <= shortest && 2 * looked <= problem.replications) {
      // What fewer weeks can tell is used up.
      looked *= 2;
      trust = 0.5;
    }
  }
  return findBest();
}

/** Runs each buffer a step to one side (down from its top, up from its least), and says what is known of all then. */
async function lookRound(
  { problem, runs, tops }: Search,
  at: Reading,
  sample: Sample,
  trust: number,
  looksUp: boolean,
  { likely, seen }: Knowledge,
): Promise<{ choices: Choice[]; from: Reading }> {
  const steps = tops.map((_, b) => {
    const level = at.levels[b];
    const curve = curveOf(seen[b], likely[b], level);
    const { min, step } = problem.buffers[b];
    const wanted = Math.log1p((wantedChange * trust) / shareAt(curve, level)) / curve.k;
    return Math.max(1, Math.round(Math.min(wanted, mostMoved * trust * (level + min / step))));
  });
  const moves = tops.flatMap((top, b) => {
    const level = at.levels[b];
    const isUp = level === 0 || (looksUp && level < top);
    const to = isUp ? Math.min(top, level + steps[b]) : Math.max(0, level - steps[b]);
    return to === level ? [] : [{ b, levels: withLevel(at.levels, b, to) }];
  });
  const [from, ...moved] = await runs.read([at.levels, ...moves.map(({ levels }) => levels)], sample);
  const costs = tops.map(() => 0);
  for (const own of seen) for (const observation of own) observation.age++;
  moves.forEach(({ b }, i) => {
    seen[b].push({ ...observe(from, moved[i], b), age: 0 });
    costs[b] = (moved[i].value - from.value) / (moved[i].levels[b] - from.levels[b]);
  });
  const choices = tops.map((top, b): Choice => {
    const level = at.levels[b];
    const curve = curveOf(seen[b], likely[b], level);
    // Down no further than a look goes: what lies beyond may fall off a cliff that the curve does not know.
    const lowest = Math.max(0, level - steps[b]);
    const reach = Math.min(2 * steps[b], Math.max(steps[b], Math.round(trust / curve.k)));
    return { curve, cost: costs[b], from: level, lowest, highest: Math.min(top, level + reach) };
  });
  return { choices, from };
}

/** Of one buffer: fitted to what was seen of it, the less the older; a guess at its level before anything was. */
function curveOf(seen: Knowledge["seen"][number], likely: number, level: number): Curve {
  if (seen.length === 0) return curveThrough(level, unknownShare, likely);
  const weighed = seen.map(({ age, ...observation }) => {
    const doubt = doubts[Math.min(age, doubts.length - 1)] * observation.change;
    return { ...observation, variance: observation.variance + doubt * doubt };
  });
  return fitCurve(weighed, likely);
}

/**
 * Runs the sets that the curves suggest, allowing in each for what the ones before turned out worse: first over the weeks
 * of the look, which is cheap, then over all weeks.
 * @param seen - The base over the weeks of the look.
 */
async function tryLevels(
  { runs, whole }: Search,
  choices: readonly Choice[],
  base: Reading,
  seen: Reading,
  sample: Sample,
  accepted: number,
): Promise<{ tried: Reading[]; price: number }> {
  const room = accepted - base.risk;
  const rough = createAllowance(room, roughly);
  for (let i = 0; i < mostRoughTries && !rough.isMet(); i++) {
    const { levels } = chooseLevels(choices, room - rough.value());
    const [reading] = await runs.read([levels], sample);
    rough.learn(changeAt(choices, levels), reading.risk - seen.risk);
  }
  const tried: Reading[] = [];
  const exact = createAllowance(room, enough, rough.value());
  let price = 0;
  for (let i = 0; i < mostTries && !exact.isMet(); i++) {
    const chosen = chooseLevels(choices, room - exact.value());
    price = chosen.price;
    if (tried.some(({ levels }) => levels.join() === chosen.levels.join())) break;
    const [reading] = await runs.read([chosen.levels], whole);
    tried.push(reading);
    exact.learn(changeAt(choices, chosen.levels), reading.risk - base.risk);
  }
  return { tried, price };
}

/**
 * How much less room to ask the curves for, so that sets come out within the room there is.
 * @param within - A set that leaves no more than this of the room is good enough.
 */
function createAllowance(room: number, within: number, first = 0) {
  // Allowances with which a set came out too risky, and within the room.
  let [tooLittle, plenty] = [-Infinity, Infinity];
  let value = first;
  let isMet = false;
  return {
    value: () => value,
    isMet: () => isMet,
    learn(predicted: number, change: number): void {
      isMet = change <= room && change > room - within;
      if (isMet) return;
      if (change > room) tooLittle = Math.max(tooLittle, value);
      else plenty = Math.min(plenty, value);
      const isBracketed = tooLittle > -Infinity && plenty < Infinity;
      if (isBracketed) value = (tooLittle + plenty) / 2;
      // A rise that came out larger than foretold will do so in proportion; any other error is taken as it is.
      else if (predicted > 0.01 && change > predicted) value = room - (room * predicted) / change;
      else value = change - predicted;
    },
  };
}
