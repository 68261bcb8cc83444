import type { Line } from "@/lib/line/types";
import type { RunOptions, RunResult } from "@/lib/simulation/types";
import { withSize } from "./with-size";

/** Sizes that a buffer may take: min, min + step, ... up to max; units. */
export type SizeRange = { id: string; min: number; max: number; step: number };

export type Objective = "moneyTiedUp" | "costPerYear";

export type SizingProblem = {
  line: Line;
  /** Buffers that may change; all others keep their size. */
  buffers: SizeRange[];
  /** A week below this share of its demand is a bad one. */
  targetFillRate: number;
  /** Shares of weeks that may be bad; each gets a set of its own, in this order. */
  acceptedRisks: number[];
  objective: Objective;
  seed: string;
  replications: number;
  weeks: number;
  warmupWeeks: number;
};

/** Runs lines, each with the options given, and resolves to their results in the same order. */
export type Evaluate = (lines: Line[], options: RunOptions) => Promise<RunResult[]>;

/** One size of each buffer as numbers of steps above its least, in the order of the problem. */
export type Levels = readonly number[];

/** @throws RangeError on a problem that cannot be searched, with the reason. */
export function checkProblem(problem: SizingProblem): void {
  const { line, buffers, acceptedRisks, targetFillRate } = problem;
  if (buffers.length === 0) throw new RangeError("no buffer may change");
  const known = new Set(line.nodes.flatMap(({ kind, id }) => (kind === "buffer" ? [id] : [])));
  const seen = new Set<string>();
  for (const { id, min, max, step } of buffers) {
    if (!known.has(id)) throw new RangeError(`no buffer has the id "${id}"`);
    if (seen.has(id)) throw new RangeError(`the buffer "${id}" is named twice`);
    seen.add(id);
    if (![min, max, step].every((value) => Number.isInteger(value) && value >= 1))
      throw new RangeError(`sizes of "${id}" and their step must be whole and at least 1`);
    if (min > max) throw new RangeError(`sizes of "${id}" must not end below where they begin`);
  }
  if (acceptedRisks.length === 0) throw new RangeError("no accepted risk is given");
  if (!acceptedRisks.every((risk) => risk >= 0 && risk < 1))
    throw new RangeError("an accepted risk must be at least 0 and below 1");
  if (!(targetFillRate > 0 && targetFillRate <= 1))
    throw new RangeError("the target fill rate must be above 0 and at most 1");
}

/** Where a buffer stands: purchased parts, between stations, or stock that stations fill and customers draw on. */
export type Place = "bought" | "between" | "last";

/** Places of some buffers of a line, in their order. */
export function placesOf(line: Line, bufferIds: readonly string[]): Place[] {
  const nodes = new Map(line.nodes.map((node) => [node.id, node]));
  const drawn = new Set(line.links.flatMap(({ from, to }) => (nodes.get(to)?.kind === "customer" ? [from] : [])));
  return bufferIds.map((id) => {
    const node = nodes.get(id);
    if (node?.kind === "buffer" && node.replenishment !== null) return "bought";
    return drawn.has(id) ? "last" : "between";
  });
}

/** Levels above which no buffer can go. */
export function topLevels({ buffers }: SizingProblem): number[] {
  return buffers.map(({ min, max, step }) => Math.floor((max - min) / step));
}

export function withLevel(levels: Levels, b: number, level: number): number[] {
  return levels.map((own, i) => (i === b ? level : own));
}

export function sizesOf({ buffers }: SizingProblem, levels: Levels): Record<string, number> {
  return Object.fromEntries(buffers.map(({ id, min, step }, i) => [id, min + levels[i] * step]));
}

/** The line with one set of sizes. */
export function lineWith(problem: SizingProblem, levels: Levels): Line {
  return withSizes(problem.line, sizesOf(problem, levels));
}

/** The line with the sizes named. */
export function withSizes(line: Line, sizes: Record<string, number>): Line {
  return Object.entries(sizes).reduce((sized, [id, size]) => withSize(sized, id, size), line);
}
