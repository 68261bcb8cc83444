import { isBetter } from "./is-better";
import type { Levels } from "./problem";
import type { Reading, Search } from "./runs";

/** Sets that are few enough to be run through one by one. */
const mostSets = 256;
/** Sets run over all weeks once all have been over a part of them. */
const mostWhole = 24;
/** A set this much riskier over a part of the weeks may still keep to the risk over all of them; share of weeks. */
const margin = 0.05;

export function isSmall({ tops }: Search): boolean {
  return tops.reduce((product, top) => product * (top + 1), 1) <= mostSets;
}

/** The best of all sets: each over a part of the weeks, the cheapest of those that may keep to the risk over all. */
export async function enumerateSets({ runs, tops, whole, part }: Search, accepted: number): Promise<Reading> {
  const sets = tops.reduce<Levels[]>(
    (all, top) => all.flatMap((set) => Array.from({ length: top + 1 }, (_, level) => [...set, level])),
    [[]],
  );
  const readings = await runs.read(sets, part);
  const isExact = part.replications === whole.replications;
  const hopeful = readings
    .filter(({ risk }) => risk <= accepted + (isExact ? 0 : margin))
    .sort((one, other) => one.value - other.value)
    .slice(0, mostWhole);
  const tried = await runs.read([tops, ...hopeful.map(({ levels }) => levels)], whole);
  return tried.reduce((best, other) => (isBetter(other, best, accepted) ? other : best));
}
