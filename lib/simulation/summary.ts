import { bufferColumn, customerColumn, layoutColumns, stationColumn } from "./columns";
import { figureOf, shareOf, type Sectioned } from "./figures";
import { meanRate, rateQuantiles, riskOf, shareInFull, type Weeks } from "./rates";
import type { Sums } from "./summarise";
import type { Shape } from "./tallies";
import type { Summary } from "./types";

/** How the line's money and backlog follow from sums over replications of one shape. */
export function readMoney(shape: Shape, weeksPerReplication: number) {
  const columns = layoutColumns(shape);
  const { weeksPerYear, carryingRate, overtimeCostPerWeek } = shape;
  const add = (at: number[], value: (column: number, i: number) => number): number =>
    at.reduce((sum, column, i) => sum + value(column, i), 0);
  const nWeeks = (s: Sums): number => s.nReplications * weeksPerReplication;
  const tiedUp = ({ row }: Sums): number =>
    add(columns.buffers, (at, i) => (row[at + bufferColumn.level] / row[columns.ticks]) * shape.buffers[i].unitValue);
  const carrying = (s: Sums): number => carryingRate * tiedUp(s);
  const fines = (s: Sums): number =>
    (weeksPerYear * add(columns.customers, (at, i) => s.row[at + customerColumn.owed] * shape.customers[i].lateFine)) /
    nWeeks(s);
  const overtime = (s: Sums): number => (weeksPerYear * s.row[columns.overtimeWeeks] * overtimeCostPerWeek) / nWeeks(s);
  const scrap = (s: Sums): number =>
    (weeksPerYear * add(columns.stations, (at, i) => s.row[at + stationColumn.scrap] * shape.stations[i].scrapValue)) /
    nWeeks(s);
  return {
    backlog: (s: Sums) => add(columns.customers, (at) => s.row[at + customerColumn.backlog]) / nWeeks(s),
    moneyTiedUp: tiedUp,
    overtimeWeeks: (s: Sums) => s.row[columns.overtimeWeeks] / nWeeks(s),
    carrying,
    fines,
    overtime,
    scrap,
    total: (s: Sums) => carrying(s) + fines(s) + overtime(s) + scrap(s),
  };
}

/** Figures of the whole line. */
export function summariseRun(
  shape: Shape,
  sums: Sectioned<Sums>,
  weeks: Sectioned<Weeks>,
  weeksPerReplication: number,
): Summary {
  const read = readMoney(shape, weeksPerReplication);
  const [p01, p05, p10, p25, p50] = rateQuantiles(weeks, [0.01, 0.05, 0.1, 0.25, 0.5]);
  return {
    mean: meanRate(weeks),
    p01,
    p05,
    p10,
    p25,
    p50,
    risk: riskOf(weeks),
    weeksInFull: shareInFull(weeks),
    backlog: figureOf(sums, read.backlog),
    moneyTiedUp: figureOf(sums, read.moneyTiedUp),
    overtimeWeeks: shareOf(sums, read.overtimeWeeks),
    costPerYear: {
      carrying: figureOf(sums, read.carrying),
      fines: figureOf(sums, read.fines),
      overtime: figureOf(sums, read.overtime),
      scrap: figureOf(sums, read.scrap),
      total: figureOf(sums, read.total),
    },
  };
}
