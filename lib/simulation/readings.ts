import { pickCountedQuantile } from "@/lib/statistics/quantile";
import { bufferColumn, layoutColumns, stationColumn, supplierColumn } from "./columns";
import { figureOf, shareOf, type Sectioned } from "./figures";
import { addUnits, meanRate, rateQuantiles, riskOf, sectionWeeks } from "./rates";
import type { Sums } from "./summarise";
import type { Tallies } from "./tallies";
import type { Cause, RunResult } from "./types";

/** Figures of each node by its id. `weeks`: recorded weeks of a replication. */
export function readBuffers(tallies: Tallies, sums: Sectioned<Sums>, weeks: number): RunResult["buffers"] {
  const { shape, dayLevels } = tallies;
  const columns = layoutColumns(shape);
  const entries = shape.buffers.map(({ id, isPurchased }, i) => {
    const at = columns.buffers[i];
    const { levels, counts } = dayLevels[i];
    const nDays = sums.nReplications * weeks * shape.daysPerWeek;
    const reading = {
      mean: figureOf(sums, ({ row }) => row[at + bufferColumn.level] / row[columns.ticks]),
      empty: figureOf(sums, ({ row }) => row[at + bufferColumn.empty] / row[columns.ticks]),
      full: figureOf(sums, ({ row }) => row[at + bufferColumn.full] / row[columns.ticks]),
      p10: pickCountedQuantile(levels, counts, 0.1),
      p50: pickCountedQuantile(levels, counts, 0.5),
      p90: pickCountedQuantile(levels, counts, 0.9),
      meanOnOrder: isPurchased ? sums.total.row[at + bufferColumn.onOrder] / nDays : null,
    };
    return [id, reading] as const;
  });
  return Object.fromEntries(entries);
}

export function readStations(tallies: Tallies, sums: Sectioned<Sums>, weeks: number): RunResult["stations"] {
  const columns = layoutColumns(tallies.shape);
  const entries = tallies.shape.stations.map(({ id, inputs }, i) => {
    const at = columns.stations[i];
    const share = (column: number) => (s: Sums) => s.row[at + column] / s.row[columns.ticks];
    const perWeek = (column: number) => (s: Sums) => s.row[at + column] / (s.nReplications * weeks);
    const starved = ({ row }: Sums): number =>
      inputs.reduce((sum, _, k) => sum + row[at + stationColumn.starvedBy + k], 0) / row[columns.ticks];
    const down = share(stationColumn.down);
    const blocked = share(stationColumn.blocked);
    const reading = {
      working: figureOf(sums, (s) => Math.max(0, 1 - (down(s) + starved(s) + blocked(s)))),
      down: figureOf(sums, down),
      starved: figureOf(sums, starved),
      blocked: figureOf(sums, blocked),
      starvedBy: Object.fromEntries(
        inputs.map((input, k) => [input, figureOf(sums, share(stationColumn.starvedBy + k))]),
      ),
      goodPerWeek: figureOf(sums, perWeek(stationColumn.good)),
      scrapPerWeek: figureOf(sums, perWeek(stationColumn.scrap)),
    };
    return [id, reading] as const;
  });
  return Object.fromEntries(entries);
}

export function readSuppliers(tallies: Tallies, sums: Sectioned<Sums>, weeks: number): RunResult["suppliers"] {
  const { shape } = tallies;
  const columns = layoutColumns(shape);
  const entries = shape.suppliers.map(({ id }, i) => {
    const at = columns.suppliers[i];
    const perWeek = (column: number) => (s: Sums) => s.row[at + column] / (s.nReplications * weeks);
    const perDelivery = (column: number) => (s: Sums) => s.row[at + column] / s.row[at + supplierColumn.arrived];
    const reading = {
      ordersPerWeek: figureOf(sums, perWeek(supplierColumn.orders)),
      unitsOrderedPerWeek: figureOf(sums, perWeek(supplierColumn.ordered)),
      lateShare: shareOf(sums, perDelivery(supplierColumn.late)),
      meanLateness: figureOf(sums, perDelivery(supplierColumn.lateness)),
      rejectedPerWeek: figureOf(sums, perWeek(supplierColumn.rejected)),
      refusedPerWeek: figureOf(sums, perWeek(supplierColumn.refused)),
      disruptedShare: figureOf(sums, (s) => perWeek(supplierColumn.disruptedDays)(s) / shape.daysPerWeek),
    };
    return [id, reading] as const;
  });
  return Object.fromEntries(entries);
}

export function readCustomers(tallies: Tallies, target: number): RunResult["customers"] {
  const entries = tallies.shape.customers.map(({ id }, i) => {
    const weeks = sectionWeeks(addUnits(tallies, i), target);
    const [p10] = rateQuantiles(weeks, [0.1]);
    return [id, { mean: meanRate(weeks), p10, risk: riskOf(weeks) }] as const;
  });
  return Object.fromEntries(entries);
}

/** Largest first, ties in document order; causes that never struck are left out. */
export function readCauses(tallies: Tallies, sums: Sectioned<Sums>, weeks: number): Cause[] {
  const { shape } = tallies;
  const columns = layoutColumns(shape);
  return shape.causes
    .map(({ node, reason }, i) => ({
      node,
      reason,
      hoursPerWeek: figureOf(
        sums,
        (s) => (s.row[columns.causes + i] * shape.tickMinutes) / 60 / (s.nReplications * weeks),
      ),
    }))
    .filter((cause) => cause.hoursPerWeek.value > 0)
    .sort((a, b) => b.hoursPerWeek.value - a.hoursPerWeek.value);
}
