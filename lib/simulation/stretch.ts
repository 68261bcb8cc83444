import { never } from "@/lib/random/gaps";
import { bufferColumn } from "./columns";
import { turnKits } from "./kits";
import { amt, amtStride, buf, bufStride, sta, staStride } from "./model";
import type { State } from "./state";

/** Brings the levels up to date that are counted in kits, and counts those that each station has. */
export function turnAllKits(s: State): void {
  for (let at = 0; at < s.stations.length; at += staStride) turnKits(s, at, 0);
}

/**
 * Closes a stretch of ticks: adds its level sums to the row and turns tick numbers over to the next stretch.
 * @param n - Ticks of the stretch.
 * @remarks The sum of the levels at the ends of ticks 0..n-1 is the last level times n, less each change times the
 * number of the tick it fell in.
 */
export function closeStretch(s: State, n: number): void {
  const { model, stations, amounts, buffers, inputs, row } = s;
  const columns = model.columns;
  row[columns.ticks] += n;
  turnAllKits(s);
  if (s.watched >= 0 && s.ints[s.watched] < s.lowest) s.lowest = s.ints[s.watched];
  for (let i = 0; i < columns.buffers.length; i++) {
    const b = i * bufStride;
    const at = columns.buffers[i];
    row[at + bufferColumn.level] += buffers[b + buf.level] * n;
    if (!model.buffers[i].isPurchased) continue;
    row[at + bufferColumn.full] += buffers[b + buf.full];
    if (buffers[b + buf.level] === 0) row[at + bufferColumn.empty] += n - buffers[b + buf.emptySince];
    if (buffers[b + buf.free] < 0) row[at + bufferColumn.full] += n - buffers[b + buf.fullSince];
    buffers[b + buf.emptySince] = 0;
    buffers[b + buf.fullSince] = 0;
    buffers[b + buf.full] = 0;
  }
  for (let at = 0, am = 0; at < stations.length; at += staStride, am += amtStride) {
    const out = columns.buffers[stations[at + sta.out] / bufStride];
    row[out + bufferColumn.level] -= amounts[am + amt.goodArea];
    if (stations[at + sta.closesOut] === 1) {
      row[out + bufferColumn.empty] += stations[at + sta.outEnds] & 0xffff;
      row[out + bufferColumn.full] += stations[at + sta.outEnds] >>> 16;
    }
    stations[at + sta.outEnds] = 0;
    stations[at + sta.lastUp] = model.stations[at / staStride].stoppages ? stations[at + sta.lastUp] - n : never;
    const startArea = amounts[am + amt.startArea];
    for (let i = stations[at + sta.inputs]; i < stations[at + sta.inputsEnd]; i += 2) {
      row[columns.buffers[inputs[i] / bufStride] + bufferColumn.level] += inputs[i + 1] * startArea;
    }
    amounts[am + amt.goodArea] = 0;
    amounts[am + amt.startArea] = 0;
    stations[at + sta.lostTick] = stations[at + sta.lostTick] === n - 1 ? -1 : -2;
  }
  for (let g = 0; g < model.groups.length; g++) {
    row[columns.buffers[model.groups[g].buffer / bufStride] + bufferColumn.level] += s.shipArea[g];
    s.shipArea[g] = 0;
  }
}
