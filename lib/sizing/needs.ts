import type { Line } from "@/lib/line/types";
import type { RunOptions } from "@/lib/simulation/types";
import type { StockNeeds } from "@/lib/simulation/stock-needs";
import { withSizes } from "./problem";

/** A need in the middle of all weeks, and the one that covers all but the accepted share of them; units. */
export type Cover = { p50: number; covered: number };

export type BufferNeed = {
  id: string;
  /** Size of today. */
  size: number;
  /** False: the size itself bounds what can be seen of the need, which may be more. */
  isOpenEnded: boolean;
  /** Of a week's highest need, over all weeks. */
  week: Cover;
  /** Of the highest need in all weeks of one replication. */
  year: Cover;
  /** By day of the week, and by recorded week. */
  days: Cover[];
  weeks: Cover[];
};

/** Runs a line for its daily needs. */
export type RunNeeds = (line: Line, options: RunOptions) => Promise<StockNeeds>;

const mostRuns = 4;

/**
 * The stock that covers each buffer's need at the accepted risk, over the week and over the year.
 * @param acceptedRisk - Share of weeks (of replications for `year`) whose need may be higher, 0..1.
 * @remarks Purchased stock is run at ample sizes, so that its need is that of a line which is never short of it; stock
 * that stations fill keeps its size, since more room would change the line.
 */
export async function findNeeds(
  line: Line,
  options: RunOptions,
  acceptedRisk: number,
  run: RunNeeds,
): Promise<BufferNeed[]> {
  const purchased = line.nodes.flatMap((node) => (node.kind === "buffer" && node.replenishment !== null ? [node] : []));
  const ample: Record<string, number> = Object.fromEntries(purchased.map(({ id, size }) => [id, 2 * size]));
  for (let i = 1; ; i++) {
    const found = await run(withSizes(line, ample), options);
    const needs = found.bufferIds.map((id, b) => readNeed(found, b, acceptedRisk, sizeOf(line, id), id in ample));
    // A tenth of the risk keeps the few days that did run dry from reaching what is read.
    const scarce = purchased.filter(
      ({ id }) => coverOf(highest(found, indexOf(found, id)), acceptedRisk / 10) >= ample[id],
    );
    if (scarce.length === 0 || i === mostRuns) {
      const bounded = new Set(scarce.map(({ id }) => id));
      return needs.map((need) => (bounded.has(need.id) ? { ...need, isOpenEnded: false } : need));
    }
    for (const { id } of scarce) ample[id] *= 2;
  }
}

function readNeed(found: StockNeeds, b: number, risk: number, size: number, isOpenEnded: boolean): BufferNeed {
  const { nReplications, nWeeks, daysPerWeek, needs, bufferIds } = found;
  const top = highest(found, b);
  const years = Float64Array.from({ length: nReplications }, (_, r) =>
    Math.max(...top.subarray(r * nWeeks, (r + 1) * nWeeks)),
  );
  const nBuffers = bufferIds.length;
  const days = Array.from({ length: daysPerWeek }, (_, d) =>
    Float64Array.from({ length: nReplications * nWeeks }, (_, w) => needs[(w * daysPerWeek + d) * nBuffers + b]),
  );
  const weeks = Array.from({ length: nWeeks }, (_, w) =>
    Float64Array.from({ length: nReplications }, (_, r) => top[r * nWeeks + w]),
  );
  const cover = (values: Float64Array): Cover => ({ p50: coverOf(values, 0.5), covered: coverOf(values, risk) });
  return {
    id: bufferIds[b],
    size,
    isOpenEnded,
    week: cover(top),
    year: cover(years),
    days: days.map(cover),
    weeks: weeks.map(cover),
  };
}

/** Highest need of each week, replication after replication. */
function highest({ nReplications, nWeeks, daysPerWeek, needs, bufferIds }: StockNeeds, b: number): Float64Array {
  return Float64Array.from({ length: nReplications * nWeeks }, (_, w) => {
    let most = -Infinity;
    for (let d = 0; d < daysPerWeek; d++) most = Math.max(most, needs[(w * daysPerWeek + d) * bufferIds.length + b]);
    return most;
  });
}

/**
 * The least level, never below 0, that all but a share of the needs stay within.
 * @remarks The model's rule for percentiles from above: at most a share `risk` of the values lie higher.
 */
function coverOf(values: Float64Array, risk: number): number {
  const sorted = values.slice().sort();
  const n = sorted.length;
  return Math.max(0, sorted[Math.max(0, n - 1 - Math.floor(n * risk + 1e-9))]);
}

const indexOf = ({ bufferIds }: StockNeeds, id: string): number => bufferIds.indexOf(id);

function sizeOf(line: Line, id: string): number {
  const node = line.nodes.find((one) => one.id === id);
  return node?.kind === "buffer" ? node.size : 0;
}
