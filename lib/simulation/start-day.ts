import { nextBinomial } from "@/lib/random/binomial";
import { lnFailure, nextGap } from "@/lib/random/gaps";
import { nextUniform, wordsPerStream } from "@/lib/random/sfc32";
import { setPurchasedCauses } from "./causes";
import { supplierColumn } from "./columns";
import { buf, bufStride } from "./model";
import { farDay } from "./orders";
import { reviewBuffers } from "./review";
import type { State } from "./state";

/** Units that a buffer may hold at most before a run is given up. */
const mostUnits = 2 ** 30;
/** Deliveries with more rejects than this in the mean are thinned as a whole, others unit gap by unit gap. */
const manyRejects = 64;

/**
 * What happens before the ticks of a regular day; model.md, 2.3.
 * @param dayOfWeek - From 0.
 */
export function startDay(s: State, dayOfWeek: number): void {
  turnDisruptions(s);
  const { suppliers } = s.model;
  for (let i = 0; i < suppliers.length; i++) {
    if (s.orders[i].nextPlanned <= s.day && s.isDisrupted[i] === 0) receiveDeliveries(s, i);
  }
  reviewBuffers(s);
  setPurchasedCauses(s);
  callOff(s, dayOfWeek);
}

function turnDisruptions(s: State): void {
  const { suppliers, columns } = s.model;
  for (let i = 0; i < suppliers.length; i++) {
    const { disruption, streams } = suppliers[i];
    if (!disruption) continue;
    s.disruptionGaps[i] -= 1;
    if (s.disruptionGaps[i] === 0) {
      s.isDisrupted[i] ^= 1;
      const turns = s.isDisrupted[i] === 1 ? disruption.ends : disruption.begins;
      s.disruptionGaps[i] = nextGap(s.streams, streams.disruption * wordsPerStream, turns);
    }
    s.row[columns.suppliers[i] + supplierColumn.disruptedDays] += s.isDisrupted[i];
  }
}

function receiveDeliveries(s: State, i: number): void {
  const orders = s.orders[i];
  const supplier = s.model.suppliers[i];
  const at = s.model.columns.suppliers[i];
  const { row } = s;
  let nOpen = 0;
  orders.nextPlanned = farDay;
  orders.nextExpected = farDay;
  for (let k = 0; k < orders.count; k++) {
    const planned = orders.planned[k];
    const expected = orders.expected[k];
    const units = orders.units[k];
    if (planned > s.day) {
      orders.planned[nOpen] = planned;
      orders.expected[nOpen] = expected;
      orders.units[nOpen] = units;
      nOpen++;
      if (planned < orders.nextPlanned) orders.nextPlanned = planned;
      if (expected < orders.nextExpected) orders.nextExpected = expected;
      continue;
    }
    s.onOrder[supplier.buffer] -= units;
    row[at + supplierColumn.arrived] += 1;
    row[at + supplierColumn.lateness] += s.day - expected;
    if (s.day > expected) row[at + supplierColumn.late] += 1;
    const lot = supplier.streams.lot * wordsPerStream;
    if (supplier.lotRejectRate > 0 && nextUniform(s.streams, lot) < supplier.lotRejectRate) {
      row[at + supplierColumn.refused] += units;
      continue;
    }
    const rejected = supplier.rejectRate > 0 ? countRejects(s, i, units) : 0;
    row[at + supplierColumn.rejected] += rejected;
    stockUnits(s, supplier.buffer, units - rejected);
  }
  orders.count = nOpen;
}

/** Each unit fails inspection on its own; the gap to the next failure runs on over deliveries. */
export function countRejects(s: State, i: number, units: number): number {
  const { rejectRate, streams } = s.model.suppliers[i];
  const stream = streams.reject * wordsPerStream;
  if (units * rejectRate > manyRejects) return nextBinomial(s.streams, stream, units, rejectRate);
  const failure = lnFailure(rejectRate);
  let rejected = 0;
  let left = units;
  while (left >= s.rejectGaps[i]) {
    left -= s.rejectGaps[i];
    rejected++;
    s.rejectGaps[i] = nextGap(s.streams, stream, failure);
  }
  s.rejectGaps[i] -= left;
  return rejected;
}

function stockUnits(s: State, buffer: number, units: number): void {
  const at = buffer * bufStride;
  if (s.buffers[at + buf.level] + units > mostUnits) {
    throw new RangeError(`buffer "${s.model.shape.buffers[buffer].id}" would hold more than ${mostUnits} units`);
  }
  s.buffers[at + buf.level] += units;
  s.buffers[at + buf.free] -= units;
}

function callOff(s: State, dayOfWeek: number): void {
  const { customers, daysPerWeek } = s.model;
  for (let i = 0; i < customers.length; i++) {
    const { isWeekly, group } = customers[i];
    const demand = s.demand[i];
    const daily = Math.floor((demand * (dayOfWeek + 1)) / daysPerWeek) - Math.floor((demand * dayOfWeek) / daysPerWeek);
    const units = !isWeekly ? daily : dayOfWeek === 0 ? demand : 0;
    s.owedNew[i] += units;
    s.groupNew[group] += units;
    s.owedTotal += units;
  }
}
