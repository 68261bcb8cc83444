import { pickQuantile } from "@/lib/statistics/quantile";
import { sectionHalfWidth } from "@/lib/statistics/sections";
import type { Sectioned } from "./figures";
import { addUnits, sectionWeeks, sortedRates } from "./rates";
import { sumSections } from "./summarise";
import { readMoney } from "./summary";
import type { Figure, RunResult } from "./types";

/** One run less another over the same weeks. */
export type PairedDifferences = {
  /** Of the percentile asked for, shares. */
  atRisk: Figure;
  mean: Figure;
  risk: Figure;
  moneyTiedUp: Figure;
  costPerYear: Figure;
};

/**
 * Whether two runs face the same weeks, so that their difference can be read pair by pair: common demand and lateness
 * wherever nodes share ids.
 */
export function arePaired(a: RunResult, b: RunResult): boolean {
  const key = ({ engine, options }: RunResult) => {
    const { seed, replications, weeks, warmupWeeks, firstReplication = 0 } = options;
    return JSON.stringify([engine, seed, replications, weeks, warmupWeeks, firstReplication]);
  };
  return key(a) === key(b);
}

/**
 * What differs between two runs over the same weeks: `edited` less `base`.
 * @param p - 0..1, as in `percentile`.
 * @returns Half-widths are those of the differences, so what both runs share in luck does not widen them.
 * @throws RangeError where the runs are no pair.
 * @remarks Common random numbers with sectioning; Asmussen and Glynn, Stochastic Simulation (2007), chapters III.5 and V.
 */
export function pairedDifferences(edited: RunResult, base: RunResult, p: number): PairedDifferences {
  requirePair(edited, base);
  const [weeksA, weeksB] = [edited, base].map(({ tallies, options }) =>
    sectionWeeks(addUnits(tallies, -1), options.targetFillRate),
  );
  const [sumsA, sumsB] = [sumSections(edited.tallies), sumSections(base.tallies)];
  const [moneyA, moneyB] = [edited, base].map(({ tallies, options }) => readMoney(tallies.shape, options.weeks));
  return {
    atRisk: pairedDifference(edited, base, p),
    mean: differ(weeksA, weeksB, ({ rates }) => rates.reduce((sum, rate) => sum + rate, 0) / rates.length),
    risk: differ(weeksA, weeksB, ({ rates, below }) => below / rates.length),
    moneyTiedUp: differ(sumsA, sumsB, moneyA.moneyTiedUp, moneyB.moneyTiedUp),
    costPerYear: differ(sumsA, sumsB, moneyA.total, moneyB.total),
  };
}

/** The same for a percentile of the weekly fill rate alone. */
export function pairedDifference(edited: RunResult, base: RunResult, p: number): Figure {
  requirePair(edited, base);
  const [ratesA, ratesB] = [edited, base].map(({ tallies }) => sortedRates(tallies, -1));
  return differ(ratesA, ratesB, (rates) => pickQuantile(rates, p));
}

function requirePair(edited: RunResult, base: RunResult): void {
  if (arePaired(edited, base)) return;
  const say = ({ options: { seed, replications, weeks } }: RunResult) =>
    `${replications} x ${weeks} weeks, seed phrase "${seed}"`;
  throw new RangeError(`runs of ${say(edited)} and ${say(base)} are no pair`);
}

function differ<T>(
  a: Sectioned<T>,
  b: Sectioned<T>,
  read: (part: T) => number,
  readBase: (part: T) => number = read,
): Figure {
  const values = a.sections.map((part, i) => read(part) - readBase(b.sections[i]));
  return { value: read(a.total) - readBase(b.total), halfWidth: sectionHalfWidth(values) };
}
