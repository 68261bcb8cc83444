import type { Line, Stoppages } from "@/lib/line/types";
import { lnFailure } from "@/lib/random/gaps";
import type { Purpose } from "@/lib/random/streams";
import { getWorkTable } from "@/lib/random/work-table";
import type { Graph } from "./graph";
import { amt, amtStride, blockLength, bufStride, sta, staStride, type Model, type StationModel } from "./model";

/** Stations in the order of service, with their records as they stand at the start of a replication. */
export function compileStations(
  line: Line,
  graph: Graph,
  causeAt: (node: string) => number,
  addStream: (node: string, purpose: Purpose) => number,
): Pick<Model, "stations" | "inputs" | "stationStart" | "amountStart"> {
  const { tickMinutes } = line.calendar;
  const stations: StationModel[] = [];
  const inputs: number[] = [];
  const stationStart = new Int32Array(graph.stations.length * staStride);
  const lastFeeder = new Map(graph.serviceOrder.map((index) => [graph.stationOutput[index], index]));
  const amountStart = new Float64Array(graph.stations.length * amtStride);
  graph.serviceOrder.forEach((index, position) => {
    const node = graph.stations[index];
    stations.push({
      index,
      work: node.cycleMinutes / tickMinutes,
      table: node.cycleCv > 0 ? getWorkTable(node.cycleCv) : null,
      scrap: node.scrapRate > 0 ? lnFailure(node.scrapRate) : null,
      stoppages: node.stoppages && describeStoppages(node.stoppages, tickMinutes),
      streams: {
        work: addStream(node.id, "work"),
        scrap: addStream(node.id, "scrap"),
        stoppage: addStream(node.id, "stoppage"),
      },
    });
    const at = position * staStride;
    const output = graph.stationOutput[index];
    stationStart[at + sta.next] = amountStart.length + position * blockLength;
    stationStart[at + sta.end] = stationStart[at + sta.next] + blockLength;
    stationStart[at + sta.out] = output * bufStride;
    stationStart[at + sta.inputs] = inputs.length;
    for (const { buffer, quantity } of graph.stationInputs[index]) inputs.push(buffer * bufStride, quantity);
    stationStart[at + sta.inputsEnd] = inputs.length;
    stationStart[at + sta.lostTick] = -2;
    stationStart[at + sta.idleStep] = node.stoppages && isAlways(node.stoppages) ? 0 : 1;
    stationStart[at + sta.isCharged] = graph.customerBuffer.includes(output) ? 1 : 0;
    stationStart[at + sta.closesOut] = lastFeeder.get(output) === index ? 1 : 0;
    stationStart[at + sta.cause] = causeAt(node.id);
    amountStart[position * amtStride + amt.speed] = node.parallel;
  });
  partInputs(graph, stationStart, inputs);
  return { stations, inputs: Int32Array.from(inputs), stationStart, amountStart };
}

/** Lays out each station's inputs once more, behind all of them: those it takes alone as kits, then the others. */
function partInputs(graph: Graph, stationStart: Int32Array, inputs: number[]): void {
  const before = graph.buffers.length * bufStride + stationStart.length;
  graph.serviceOrder.forEach((index, position) => {
    const at = position * staStride;
    const own = graph.stationInputs[index];
    const kit = own.filter(({ buffer }) => isTakenByOneStation(graph, buffer));
    const open = own.filter((input) => !kit.includes(input));
    stationStart[at + sta.kit] = inputs.length;
    for (const { buffer, quantity } of kit) inputs.push(buffer * bufStride, quantity);
    stationStart[at + sta.kitEnd] = inputs.length;
    stationStart[at + sta.open] = before + inputs.length;
    for (const { buffer, quantity } of open) inputs.push(buffer * bufStride, quantity);
    stationStart[at + sta.openEnd] = before + inputs.length;
    stationStart[at + sta.sharesStock] = open.some(({ buffer }) => graph.buffers[buffer].replenishment) ? 1 : 0;
  });
}

/** Whether a buffer is purchased and one station takes all of it. */
function isTakenByOneStation(graph: Graph, buffer: number): boolean {
  return (
    graph.buffers[buffer].replenishment !== null &&
    graph.bufferTakers[buffer].length === 1 &&
    !graph.customerBuffer.includes(buffer)
  );
}

function isAlways(stoppages: Stoppages): boolean {
  return stoppages.pattern === "perTick" || stoppages.clock === "always";
}

/** Ticks that are up independently of each other make geometric runs; the model's mean below one tick counts as one. */
function describeStoppages(stoppages: Stoppages, tickMinutes: number): StationModel["stoppages"] {
  if (stoppages.pattern === "perTick") {
    const up = stoppages.upProbability;
    return up >= 1 ? null : { startsDown: 1 - up, upEnds: lnFailure(1 - up), down: { ends: lnFailure(up) } };
  }
  const meanDown = (stoppages.meanDownHours * 60) / tickMinutes;
  return {
    startsDown: 0,
    upEnds: lnFailure(1 / Math.max(1, (stoppages.meanUpHours * 60) / tickMinutes)),
    down:
      stoppages.downCv === null
        ? { ends: lnFailure(1 / Math.max(1, meanDown)) }
        : { mean: meanDown, cv: stoppages.downCv },
  };
}
