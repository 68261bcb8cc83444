import { formatPercent, percentileName } from "@/lib/format";
import type { RunResult } from "@/lib/simulation/types";

/** A week of a run that can be opened; `replication` is the index that the draws depend on, `week` 0-based. */
export type WeekChoice = {
  value: string;
  replication: number;
  week: number;
  rate: number;
  label: string;
  hint?: string;
};

const nWorst = 20;

/** "week 31 of replication 44", both counted from 1. */
export function sayWeek(replication: number, week: number): string {
  return `week ${week + 1} of replication ${replication + 1}`;
}

/** The worst weeks of a run, the worst first, then the one at the percentile of the accepted risk. */
export function listWeekChoices({ fillRates, options }: RunResult, acceptedRisk: number): WeekChoice[] {
  const order = Array.from(fillRates.keys())
    .filter((i) => !Number.isNaN(fillRates[i]))
    .sort((a, b) => fillRates[a] - fillRates[b] || a - b);
  const atRisk = Math.min(order.length - 1, Math.floor(order.length * acceptedRisk + 1e-9));
  const ranks = [...order.slice(0, nWorst).keys(), ...(atRisk >= nWorst ? [atRisk] : [])];
  return ranks.map((rank) => {
    const at = order[rank];
    const replication = (options.firstReplication ?? 0) + Math.floor(at / options.weeks);
    const week = at % options.weeks;
    const hint = rank === atRisk ? percentileName(acceptedRisk) : rank === 0 ? "worst" : undefined;
    const label = `${formatPercent(fillRates[at])}, ${sayWeek(replication, week)}`;
    return { value: `${replication} ${week}`, replication, week, rate: fillRates[at], label, hint };
  });
}
