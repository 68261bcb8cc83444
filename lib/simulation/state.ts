import { createSeedKey, createStreamKey, seedStream, type Key } from "@/lib/random/streams";
import { wordsPerStream } from "@/lib/random/sfc32";
import { amt, amtStride, blockLength, buf, bufStride, staStride, type Model } from "./model";
import { clearOrders, createOrders, type Orders } from "./orders";
import { countFinished, drawFirstGaps } from "./station-draws";

/** Everything that changes in a run. Reset at the start of each replication. */
export type State = {
  model: Model;
  keys: Key[];
  streams: Int32Array;
  /** Records of buffers, of stations, then inputs: the first of these is at 0, the others are views too. */
  ints: Int32Array;
  /** Amounts of the stations, then a block of work amounts of each. */
  reals: Float64Array;
  buffers: Int32Array;
  stations: Int32Array;
  inputs: Int32Array;
  amounts: Float64Array;
  /** Ticks of one workplace lost to each missing input, by pair of `inputs`. */
  starved: Float64Array;
  /** Ticks charged to each cause. */
  causes: Float64Array;
  /** Sum over units shipped in this stretch of their tick number, by group. */
  shipArea: Float64Array;
  /** Owed from earlier weeks, owed of this week, demand of this week: by customer; then sums by group. */
  owedOld: Float64Array;
  owedNew: Float64Array;
  demand: Float64Array;
  groupOld: Float64Array;
  groupNew: Float64Array;
  /** Working space of the fair sharing, by customer. */
  remainders: Float64Array;
  owedTotal: number;
  demandScores: Float64Array;
  /** By supplier. */
  orders: Orders[];
  latenessScores: Float64Array;
  isDisrupted: Uint8Array;
  /** The so many-th delivered unit from here is the next rejected one. */
  rejectGaps: Float64Array;
  /** Days until the supplier's disruption begins or ends. */
  disruptionGaps: Float64Array;
  onOrder: Float64Array;
  day: number;
  /** One row of `Tallies.sums`. */
  row: Float64Array;
  /** Buffer record whose lowest level is watched, -1 for none, and the lowest level at the end of a tick so far. */
  watched: number;
  lowest: number;
};

/** @throws RangeError as `compileModel`. */
export function createState(model: Model, seed: string): State {
  const seedKey = createSeedKey(seed);
  const nBuffers = model.buffers.length;
  const nCustomers = model.customers.length;
  const nSuppliers = model.suppliers.length;
  const nGroups = model.groups.length;
  return {
    model,
    keys: model.streams.map(({ node, purpose }) => createStreamKey(seedKey, node, purpose)),
    streams: new Int32Array(model.streams.length * wordsPerStream),
    ...createRecords(model),
    starved: new Float64Array(model.inputs.length / 2),
    causes: new Float64Array(model.shape.causes.length),
    shipArea: new Float64Array(nGroups),
    owedOld: new Float64Array(nCustomers),
    owedNew: new Float64Array(nCustomers),
    demand: new Float64Array(nCustomers),
    groupOld: new Float64Array(nGroups),
    groupNew: new Float64Array(nGroups),
    remainders: new Float64Array(nCustomers),
    owedTotal: 0,
    demandScores: new Float64Array(nCustomers),
    orders: model.suppliers.map(() => createOrders()),
    latenessScores: new Float64Array(nSuppliers),
    isDisrupted: new Uint8Array(nSuppliers),
    rejectGaps: new Float64Array(nSuppliers),
    disruptionGaps: new Float64Array(nSuppliers),
    onOrder: new Float64Array(nBuffers),
    day: 0,
    row: new Float64Array(model.columns.count),
    watched: -1,
    lowest: 0,
  };
}

/** The hot loop reads two arrays only. Stations without variation have their one amount of work laid out for good. */
function createRecords(model: Model): Pick<State, "ints" | "reals" | "buffers" | "stations" | "inputs" | "amounts"> {
  const nBuffers = model.buffers.length * bufStride;
  const nStations = model.stationStart.length;
  const nAmounts = model.amountStart.length;
  const ints = new Int32Array(nBuffers + nStations + model.inputs.length);
  const reals = new Float64Array(nAmounts + model.stations.length * blockLength);
  const inputs = ints.subarray(nBuffers + nStations);
  inputs.set(model.inputs);
  model.stations.forEach((station, i) => {
    reals.fill(station.work, nAmounts + i * blockLength, nAmounts + (i + 1) * blockLength);
  });
  return {
    ints,
    reals,
    buffers: ints.subarray(0, nBuffers),
    stations: ints.subarray(nBuffers, nBuffers + nStations),
    inputs,
    amounts: reals.subarray(0, nAmounts),
  };
}

/** Puts the state to the start of one replication: model.md, 2.1. */
export function resetState(s: State, replication: number): void {
  const { model } = s;
  s.keys.forEach((key, i) => seedStream(s.streams, i * wordsPerStream, key, replication));
  s.stations.set(model.stationStart);
  s.amounts.set(model.amountStart);
  model.buffers.forEach((buffer, i) => {
    const at = i * bufStride;
    s.buffers.fill(0, at, at + bufStride);
    s.buffers[at + buf.level] = buffer.startLevel;
    s.buffers[at + buf.free] = buffer.size - buffer.startLevel - (buffer.isPurchased ? 1 : 0);
    s.buffers[at + buf.cause] = buffer.isPurchased ? buffer.sizeCause : -1;
    s.buffers[at + buf.feeder] = buffer.feeder;
  });
  s.owedOld.fill(0);
  s.owedNew.fill(0);
  s.groupOld.fill(0);
  s.groupNew.fill(0);
  s.owedTotal = 0;
  s.demandScores.fill(NaN);
  s.latenessScores.fill(NaN);
  s.isDisrupted.fill(0);
  s.onOrder.fill(0);
  s.shipArea.fill(0);
  s.day = 0;
  s.orders.forEach(clearOrders);
  drawFirstGaps(s);
  clearCounts(s);
}

/** Sets everything that is counted to 0, at the start of a replication and again of its first recorded week. */
export function clearCounts(s: State): void {
  s.row.fill(0);
  s.starved.fill(0);
  s.causes.fill(0);
  for (let at = 0, am = 0; am < s.amounts.length; at += staStride, am += amtStride) {
    s.amounts[am + amt.blocked] = 0;
    s.amounts[am + amt.down] = 0;
    s.amounts[am + amt.scrapped] = 0;
    s.amounts[am + amt.startedBefore] -= countFinished(s, at);
  }
}
