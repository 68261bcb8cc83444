import { pickQuantile } from "@/lib/statistics/quantile";
import { computeSections, figureOf, shareOf, type Sectioned } from "./figures";
import type { Tallies } from "./tallies";
import type { Figure } from "./types";

/** Weeks of some replications. */
export type Weeks = {
  /** Fill rates of the weeks with demand, in order. */
  rates: Float64Array;
  /** Weeks below the target, and weeks in full. */
  below: number;
  inFull: number;
};

/** Weekly units, replications x weeks, of the whole line or of one customer. */
export type WeeklyUnits = { demand: Float64Array; onTime: Float64Array; nWeeks: number; nReplications: number };

/** @param customer - Index; -1 for all customers together. */
export function addUnits(tallies: Tallies, customer: number): WeeklyUnits {
  const nCustomers = tallies.shape.customers.length;
  const n = tallies.demand.length / nCustomers;
  const demand = new Float64Array(n);
  const onTime = new Float64Array(n);
  const from = customer < 0 ? 0 : customer;
  const to = customer < 0 ? nCustomers : customer + 1;
  for (let i = 0; i < n; i++) {
    for (let c = from; c < to; c++) {
      demand[i] += tallies.demand[i * nCustomers + c];
      onTime[i] += tallies.onTime[i * nCustomers + c];
    }
  }
  const nReplications = tallies.replications.length;
  return { demand, onTime, nWeeks: n / nReplications, nReplications };
}

export function sectionWeeks(units: WeeklyUnits, target: number): Sectioned<Weeks> {
  return computeSections(units.nReplications, (from, to) => collectWeeks(units, target, from, to));
}

function collectWeeks(units: WeeklyUnits, target: number, from: number, to: number): Weeks {
  const rates = new Float64Array((to - from) * units.nWeeks);
  let n = 0;
  let below = 0;
  let inFull = 0;
  for (let i = from * units.nWeeks; i < to * units.nWeeks; i++) {
    const demand = units.demand[i];
    const onTime = units.onTime[i];
    if (demand === 0) continue;
    rates[n++] = onTime / demand;
    if (onTime < target * demand - 1e-9) below++;
    if (onTime === demand) inFull++;
  }
  return { rates: rates.subarray(0, n), below, inFull };
}

export function meanRate(weeks: Sectioned<Weeks>): Figure {
  return figureOf(weeks, ({ rates }) => {
    let sum = 0;
    for (let i = 0; i < rates.length; i++) sum += rates[i];
    return sum / rates.length;
  });
}

export function riskOf(weeks: Sectioned<Weeks>): Figure {
  return shareOf(weeks, ({ rates, below }) => below / rates.length);
}

export function shareInFull(weeks: Sectioned<Weeks>): Figure {
  return shareOf(weeks, ({ rates, inFull }) => inFull / rates.length);
}

/** Percentiles of the weekly fill rates. */
export function rateQuantiles(weeks: Sectioned<Weeks>, shares: number[]): Figure[] {
  const sorted = sortRates(weeks);
  return shares.map((p) => figureOf(sorted, (rates) => pickQuantile(rates, p)));
}

function sortRates(weeks: Sectioned<Weeks>): Sectioned<Float64Array> {
  const sort = ({ rates }: Weeks): Float64Array => rates.slice().sort();
  return { ...weeks, total: sort(weeks.total), sections: weeks.sections.map(sort) };
}

const sortedBefore = new WeakMap<Tallies, Map<number, Sectioned<Float64Array>>>();

/**
 * Weekly fill rates ascending, over all replications and in each section. Kept with the tallies: pages read percentiles
 * of one result many times a second while another runs.
 * @param customer - Index; -1 for all customers together.
 */
export function sortedRates(tallies: Tallies, customer: number): Sectioned<Float64Array> {
  const own = sortedBefore.get(tallies) ?? new Map<number, Sectioned<Float64Array>>();
  sortedBefore.set(tallies, own);
  // The target plays no part in the rates.
  const sorted = own.get(customer) ?? sortRates(sectionWeeks(addUnits(tallies, customer), 0));
  own.set(customer, sorted);
  return sorted;
}
