import type { ScenarioOptions } from "@/lib/schema/lines";
import { mostWeeks } from "@/lib/simulation/options";

export type RunSize = Pick<ScenarioOptions, "replications" | "weeks" | "warmupWeeks">;

/** As many replications as the schema of the options allows. */
export const mostReplications = 20_000;

export function totalWeeks({ replications, weeks }: RunSize): number {
  return replications * weeks;
}

/** Recorded weeks that one run may have, at this split. */
export function mostTotalWeeks({ weeks, warmupWeeks }: RunSize): number {
  return weeks * Math.min(mostReplications, Math.floor(mostWeeks / (weeks + warmupWeeks)));
}

/** Replications that give at least so many weeks at this split; a part of a replication counts as a whole one. */
export function replicationsFor(total: number, size: RunSize): number {
  return Math.max(1, Math.ceil(Math.min(total, mostTotalWeeks(size)) / size.weeks));
}

/** Whether the split stays within what one run may have. */
export function isRunSizeAllowed({ replications, weeks, warmupWeeks }: RunSize): boolean {
  return replications <= mostReplications && replications * (weeks + warmupWeeks) <= mostWeeks;
}
