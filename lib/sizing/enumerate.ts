import { isBetter } from "./improve";
import { type Levels, type SizingProblem, topLevels } from "./problem";
import type { Reading, Runs, Sample } from "./runs";

/** Sets that are few enough to be run through one by one. */
const mostSets = 256;
/** Sets run over all weeks once all have been over a part of them. */
const mostWhole = 24;
/** A set this much riskier over a part of the weeks may still keep to the risk over all of them; share of weeks. */
const margin = 0.05;

export function isSmall(problem: SizingProblem): boolean {
  return topLevels(problem).reduce((product, top) => product * (top + 1), 1) <= mostSets;
}

/** The best of all sets: each over a part of the weeks, the cheapest of those that may keep to the risk over all. */
export async function enumerateSets(
  problem: SizingProblem,
  runs: Runs,
  part: Sample,
  whole: Sample,
  accepted: number,
): Promise<Reading> {
  const sets = topLevels(problem).reduce<Levels[]>(
    (all, top) => all.flatMap((set) => Array.from({ length: top + 1 }, (_, level) => [...set, level])),
    [[]],
  );
  const readings = await runs.read(sets, part);
  const isExact = part.replications === whole.replications;
  const hopeful = readings
    .filter(({ risk }) => risk <= accepted + (isExact ? 0 : margin))
    .sort((one, other) => one.value - other.value)
    .slice(0, mostWhole);
  const tried = await runs.read([topLevels(problem), ...hopeful.map(({ levels }) => levels)], whole);
  return tried.reduce((best, other) => (isBetter(other, best, accepted) ? other : best));
}
