import { bufferColumn, stationColumn } from "./columns";
import type { LevelTally } from "./level-tally";
import { countLevel } from "./level-tally";
import { amt, amtStride, buf, bufStride, sta, staStride, type Model } from "./model";
import { startDay } from "./start-day";
import { clearCounts, resetState, type State } from "./state";
import { countFinished } from "./station-draws";
import { closeStretch, turnAllKits } from "./stretch";
import { runTicks } from "./tick";
import type { RunOptions } from "./types";
import { closeWeek, drawDemand } from "./week";

/** Where one call of `simulate` gathers its counts. */
export type Recorder = {
  sums: Float64Array;
  demand: Int32Array;
  onTime: Int32Array;
  weekSums: Float64Array;
  dayLevels: LevelTally[];
};

/** Columns of `Tallies.weekSums` before the buffers. */
export const weekColumns = 3;

/** Runs a stretch of ticks. */
export type RunStretch = (s: State, nTicks: number) => void;

export function runStretch(s: State, nTicks: number): void {
  turnAllKits(s);
  runTicks(s, nTicks);
  closeStretch(s, nTicks);
}

/**
 * Runs one replication and writes its row of each array of the recorder.
 * @param row - Row of the recorder.
 * @param replication - Index that the draws depend on.
 * @param run - `runStretch`, or a slower one that looks on.
 * @param afterWeek - Told of each week, warm-up included, when its accounts are closed.
 */
export function runReplication(
  s: State,
  options: RunOptions,
  replication: number,
  row: number,
  recorder: Recorder,
  run: RunStretch,
  afterWeek?: (week: number) => void,
): void {
  const { model } = s;
  const nCustomers = model.customers.length;
  const nWeeks = options.warmupWeeks + options.weeks;
  const weekWidth = weekColumns + model.buffers.length;
  resetState(s, replication);
  for (let week = 0; week < nWeeks; week++) {
    const recorded = week - options.warmupWeeks;
    if (recorded === 0) clearCounts(s);
    const hasOvertime = s.owedTotal > model.overtimeTrigger;
    drawDemand(s);
    for (let d = 0; d < model.daysPerWeek; d++) {
      startDay(s, d);
      run(s, model.ticksPerDay);
      closeDay(s, recorded >= 0 ? recorder.dayLevels : null);
      if (d < model.daysPerWeek - 1 || !hasOvertime) s.day++;
    }
    if (hasOvertime) {
      run(s, model.overtimeTicks);
      s.day++;
      s.row[model.columns.overtimeWeeks] += 1;
    }
    const at = recorded < 0 ? -1 : (row * options.weeks + recorded) * nCustomers;
    closeWeek(s, at, recorder.demand, recorder.onTime, week * weekWidth, recorder.weekSums);
    for (let i = 0; i < model.buffers.length; i++) {
      recorder.weekSums[week * weekWidth + weekColumns + i] += s.buffers[i * bufStride + buf.level];
    }
    afterWeek?.(week);
  }
  gatherStations(s);
  s.row.set(s.causes, model.columns.causes);
  recorder.sums.set(s.row, row * model.columns.count);
}

function closeDay(s: State, dayLevels: LevelTally[] | null): void {
  const { buffers, columns } = s.model;
  for (let i = 0; i < buffers.length; i++) {
    s.row[columns.buffers[i] + bufferColumn.onOrder] += s.onOrder[i];
    if (dayLevels) countLevel(dayLevels[i], s.buffers[i * bufStride + buf.level]);
  }
}

function gatherStations(s: State): void {
  const { model, row } = s;
  for (let k = 0; k < model.stations.length; k++) {
    const at = k * staStride;
    const am = k * amtStride;
    const column = model.columns.stations[model.stations[k].index];
    const scrapped = s.amounts[am + amt.scrapped];
    row[column + stationColumn.down] = s.amounts[am + amt.down];
    row[column + stationColumn.blocked] = s.amounts[am + amt.blocked] / s.amounts[am + amt.speed];
    row[column + stationColumn.good] = countFinished(s, at) - scrapped;
    row[column + stationColumn.scrap] = scrapped;
    const first = s.stations[at + sta.inputs];
    for (let i = first; i < s.stations[at + sta.inputsEnd]; i += 2) {
      row[column + stationColumn.starvedBy + (i - first) / 2] = s.starved[i / 2];
    }
  }
}

export function createRecorder(model: Model, options: RunOptions, createTally: () => LevelTally): Recorder {
  const nCells = options.replications * options.weeks * model.customers.length;
  return {
    sums: new Float64Array(options.replications * model.columns.count),
    demand: new Int32Array(nCells),
    onTime: new Int32Array(nCells),
    weekSums: new Float64Array((options.warmupWeeks + options.weeks) * (weekColumns + model.buffers.length)),
    dayLevels: model.buffers.map(createTally),
  };
}
