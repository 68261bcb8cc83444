import type { LevelCounts } from "./tallies";

/** Counts of whole levels: an array for the low ones, a map for the rest. */
export type LevelTally = { low: Int32Array; high: Map<number, number> };

const lowest = 64;
const mostLow = 16_384;

export function createLevelTally(): LevelTally {
  return { low: new Int32Array(lowest), high: new Map() };
}

/** @param level - Whole, >= 0. */
export function countLevel(tally: LevelTally, level: number): void {
  if (level < tally.low.length) {
    tally.low[level]++;
    return;
  }
  if (level >= mostLow) {
    tally.high.set(level, (tally.high.get(level) ?? 0) + 1);
    return;
  }
  let length = tally.low.length;
  while (length <= level) length *= 2;
  const larger = new Int32Array(length);
  larger.set(tally.low);
  larger[level]++;
  tally.low = larger;
}

/** Levels ascending, those that never stood left out. */
export function listLevels(tally: LevelTally): LevelCounts {
  const levels: number[] = [];
  const counts: number[] = [];
  tally.low.forEach((count, level) => {
    if (count > 0) {
      levels.push(level);
      counts.push(count);
    }
  });
  for (const [level, count] of [...tally.high].sort((a, b) => a[0] - b[0])) {
    levels.push(level);
    counts.push(count);
  }
  return { levels: Int32Array.from(levels), counts: Float64Array.from(counts) };
}

/** Adds up counts of the same buffer. */
export function addLevels(parts: LevelCounts[]): LevelCounts {
  const totals = new Map<number, number>();
  for (const { levels, counts } of parts) {
    levels.forEach((level, i) => totals.set(level, (totals.get(level) ?? 0) + counts[i]));
  }
  const sorted = [...totals].sort((a, b) => a[0] - b[0]);
  return {
    levels: Int32Array.from(sorted, ([level]) => level),
    counts: Float64Array.from(sorted, ([, count]) => count),
  };
}
