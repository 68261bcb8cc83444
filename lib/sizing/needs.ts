import { type SizingProblem, withLevel } from "./problem";
import type { Reading, Search } from "./runs";
import { countBad, countDue, isBad, rateOf } from "./week-rates";

/** What each week needs of one buffer while all others are ample. */
export type Need = {
  /** Lowest level that was looked at and leaves the risk near enough to what may be accepted. */
  floor: number;
  top: number;
  /** Lowest level at which each week is good; 0 where any will do. Weeks that are bad at the top as well: 0. */
  levels: Int32Array;
  /** What the objective loses from the top down to each level, by level - floor. */
  savings: Float64Array;
};

/** `ample`: the run with all buffers at their top. */
export type Needs = { ample: Reading; byBuffer: Need[] };

const mostReadings = 7;
/** Intervals that matter less than this are not cut further: share of weeks decided in it times its part of the range. */
const resolution = 0.0015;

/**
 * Runs each buffer at several levels with all others at their top, closing in on where weeks turn bad.
 * @remarks In such runs a week's fill rate falls with that buffer's shortage alone, so the size that the week would
 * have needed can be read off between two levels. All runs share their draws: a week is the same week in each.
 */
export async function measureNeeds({ problem, runs, tops, part }: Search): Promise<Needs> {
  const [ample] = await runs.read([tops], part);
  const nDue = Math.max(1, countDue(ample.codes));
  const baseBad = countBad(ample.codes);
  const most = Math.max(...problem.acceptedRisks) + 0.01;
  const addedOf = (reading: Reading) => Math.min(most, Math.max(0, (countBad(reading.codes) - baseBad) / nDue));
  const ladders = tops.map((): Reading[] => [ample]);
  for (let round = 0; round < mostReadings; round++) {
    const asked = ladders.flatMap((ladder, b) => {
      const level = nextLevel(problem, ladder, b, tops[b], addedOf, most);
      return level === null ? [] : [{ b, levels: withLevel(tops, b, level) }];
    });
    if (asked.length === 0) break;
    const found = await runs.read(
      asked.map(({ levels }) => levels),
      part,
    );
    asked.forEach(({ b }, i) => ladders[b].push(found[i]));
    ladders.forEach((ladder, b) => ladder.sort((x, y) => x.levels[b] - y.levels[b]));
  }
  const byBuffer = ladders.map((ladder, b) => readNeed(problem, ladder, b, ample, addedOf, most));
  return { ample, byBuffer };
}

/** Where to look next on one buffer's ladder, ascending; null: well enough known. */
function nextLevel(
  problem: SizingProblem,
  ladder: readonly Reading[],
  b: number,
  top: number,
  addedOf: (reading: Reading) => number,
  most: number,
): number | null {
  if (top === 0 || ladder.length >= mostReadings) return null;
  const { id, step } = problem.buffers[b];
  const lowest = ladder[0];
  if (addedOf(lowest) < most && lowest.levels[b] > 0) {
    // Nothing below is known to be too little. Purchased stock moves almost one for one with its size, so that what
    // lies on hand in nine days of ten is the first guess of what can be spared.
    const node = problem.line.nodes.find((one) => one.id === id);
    if (node?.kind === "buffer" && node.replenishment === null) return 0;
    const spare = Math.max(1, Math.round(lowest.lows[b] / step));
    return Math.max(0, lowest.levels[b] - spare);
  }
  let best: number | null = null;
  let bestWeight = resolution;
  for (let i = 1; i < ladder.length; i++) {
    const [low, high] = [ladder[i - 1], ladder[i]];
    const gap = high.levels[b] - low.levels[b];
    const weight = (addedOf(low) - addedOf(high)) * (gap / top);
    if (gap > 1 && weight > bestWeight) {
      best = Math.round((low.levels[b] + high.levels[b]) / 2);
      bestWeight = weight;
    }
  }
  return best;
}

function readNeed(
  problem: SizingProblem,
  ladder: readonly Reading[],
  b: number,
  ample: Reading,
  addedOf: (reading: Reading) => number,
  most: number,
): Need {
  // The highest level that is surely too low ends the range; without one the lowest that was looked at.
  const from = Math.max(
    0,
    ladder.findLastIndex((reading) => addedOf(reading) >= most),
  );
  const rungs = ladder.slice(from);
  const levels = new Int32Array(ample.codes.length);
  const { targetFillRate } = problem;
  for (let w = 0; w < levels.length; w++) {
    if (isBad(ample.codes[w])) continue;
    for (let i = rungs.length - 2; i >= 0; i--) {
      if (!isBad(rungs[i].codes[w])) continue;
      const [low, high] = [rungs[i], rungs[i + 1]];
      const below = rateOf(low.codes[w], targetFillRate);
      const reached = rateOf(high.codes[w], targetFillRate);
      // What a week that shipped everything had to spare is unknown: as much as the other lacked.
      const above = reached >= 1 ? 2 * targetFillRate - below : reached;
      const part = (targetFillRate - below) / Math.max(1e-9, above - below);
      const gap = high.levels[b] - low.levels[b];
      levels[w] = low.levels[b] + Math.min(gap, Math.max(1, Math.ceil(part * gap)));
      break;
    }
  }
  const floor = rungs[0].levels[b];
  const top = rungs[rungs.length - 1].levels[b];
  const savings = new Float64Array(top - floor + 1);
  for (let i = 1; i < rungs.length; i++) {
    const [low, high] = [rungs[i - 1], rungs[i]];
    const span = high.levels[b] - low.levels[b];
    for (let k = 0; k <= span; k++) {
      const value = low.value + ((high.value - low.value) * k) / span;
      savings[low.levels[b] - floor + k] = ample.value - value;
    }
  }
  return { floor, top, levels, savings };
}
