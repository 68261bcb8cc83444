import { layoutColumns } from "./columns";
import { addLevels } from "./level-tally";
import { summarise } from "./summarise";
import type { Tallies } from "./tallies";
import type { RunOptions, RunResult } from "./types";

/**
 * Joins results of disjoint replications of one line and one set of options.
 * @param parts - In any order; their arrays are copied.
 * @returns The same bits for any order and any split. `options.replications` counts the replications present.
 * @throws RangeError for no parts, for parts of different runs and for replications that occur twice.
 */
export function mergeRuns(parts: RunResult[]): RunResult {
  if (parts.length === 0) throw new RangeError("mergeRuns needs at least one part");
  const [head] = parts;
  const key = describeRun(head);
  for (const part of parts) {
    if (describeRun(part) !== key)
      throw new RangeError("parts of different lines, options or engines cannot be merged");
  }
  const rows = parts
    .flatMap(({ tallies }) => Array.from(tallies.replications, (replication, row) => ({ tallies, replication, row })))
    .sort((a, b) => a.replication - b.replication);
  rows.forEach(({ replication }, i) => {
    if (i > 0 && rows[i - 1].replication === replication) {
      throw new RangeError(`replication ${replication} is in two parts`);
    }
  });
  const { shape } = head.tallies;
  const { seed, weeks, warmupWeeks, targetFillRate } = head.options;
  const nCells = weeks * shape.customers.length;
  const { count } = layoutColumns(shape);
  const tallies: Tallies = {
    shape,
    replications: Int32Array.from(rows, ({ replication }) => replication),
    sums: new Float64Array(rows.length * count),
    demand: new Int32Array(rows.length * nCells),
    onTime: new Int32Array(rows.length * nCells),
    weekSums: new Float64Array(head.tallies.weekSums.length),
    dayLevels: shape.buffers.map((_, i) => addLevels(parts.map((part) => part.tallies.dayLevels[i]))),
  };
  rows.forEach(({ tallies: from, row }, i) => {
    tallies.sums.set(from.sums.subarray(row * count, (row + 1) * count), i * count);
    tallies.demand.set(from.demand.subarray(row * nCells, (row + 1) * nCells), i * nCells);
    tallies.onTime.set(from.onTime.subarray(row * nCells, (row + 1) * nCells), i * nCells);
  });
  for (const part of parts) part.tallies.weekSums.forEach((sum, i) => (tallies.weekSums[i] += sum));
  const options: RunOptions = { seed, replications: rows.length, weeks, warmupWeeks, targetFillRate };
  const first = rows[0].replication;
  return summarise(first === 0 ? options : { ...options, firstReplication: first }, tallies);
}

function describeRun({ engine, options, tallies }: RunResult): string {
  const { seed, weeks, warmupWeeks, targetFillRate } = options;
  return JSON.stringify([engine, seed, weeks, warmupWeeks, targetFillRate, tallies.shape]);
}
