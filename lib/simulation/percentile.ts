import { pickCountedQuantile, pickQuantile } from "@/lib/statistics/quantile";
import { figureOf } from "./figures";
import { sortedRates } from "./rates";
import type { Figure, RunResult } from "./types";

/**
 * Percentile of the weekly fill rates of the line or of one customer.
 * @param p - 0..1: at least 1 - p of the weeks met or beat the value.
 * @throws RangeError on another p and on an unknown customer.
 */
export function percentile(result: RunResult, p: number, customerId?: string): Figure {
  if (!(p >= 0 && p <= 1)) throw new RangeError(`p must be from 0 to 1, got ${p}`);
  const { tallies } = result;
  const customer =
    customerId === undefined ? -1 : tallies.shape.customers.findIndex((candidate) => candidate.id === customerId);
  if (customerId !== undefined && customer === -1) throw new RangeError(`no customer has the id "${customerId}"`);
  return figureOf(sortedRates(tallies, customer), (rates) => pickQuantile(rates, p));
}

/**
 * Percentile of a buffer's level over the ends of regular days, units.
 * @param p - 0..1.
 * @throws RangeError on another p and on an unknown buffer.
 */
export function levelPercentile({ tallies }: RunResult, bufferId: string, p: number): number {
  if (!(p >= 0 && p <= 1)) throw new RangeError(`p must be from 0 to 1, got ${p}`);
  const buffer = tallies.shape.buffers.findIndex(({ id }) => id === bufferId);
  if (buffer === -1) throw new RangeError(`no buffer has the id "${bufferId}"`);
  const { levels, counts } = tallies.dayLevels[buffer];
  return pickCountedQuantile(levels, counts, p);
}
