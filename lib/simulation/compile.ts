import type { Line } from "@/lib/line/types";
import { prepareDistribution } from "@/lib/random/distributions";
import { roundHalfUp } from "@/lib/random/elementary";
import { lnFailure } from "@/lib/random/gaps";
import type { Purpose } from "@/lib/random/streams";
import { createWholeQuantile } from "@/lib/random/whole-quantile";
import { checkNumbers } from "./check-numbers";
import { layoutColumns } from "./columns";
import { compileStations } from "./compile-stations";
import { buildGraph, type Graph } from "./graph";
import { bufStride, staStride, type Group, type Model } from "./model";
import type { Shape } from "./tallies";

/** Models are functions of the document; the last few are kept, since workers run one line block by block. */
const nKept = 8;
const kept = new Map<string, Model>();

/**
 * Makes a line ready to run.
 * @throws RangeError where `parseLine` would have found a fault that the run cannot do without.
 */
export function compileModel(line: Line): Model {
  checkNumbers(line);
  const key = JSON.stringify(line);
  const known = kept.get(key);
  if (known) return known;
  const model = compile(line);
  if (kept.size >= nKept) kept.clear();
  kept.set(key, model);
  return model;
}

function compile(line: Line): Model {
  const graph = buildGraph(line);
  const shape = describeShape(line, graph);
  const streams: Model["streams"] = [];
  const addStream = (node: string, purpose: Purpose): number => streams.push({ node, purpose }) - 1;
  const causeAt = (node: string): number => shape.causes.findIndex((cause) => cause.node === node);
  const { tickMinutes, hoursPerDay, daysPerWeek } = line.calendar;
  const groups = groupCustomers(graph);
  const overtime = line.overtime;
  return {
    shape,
    columns: layoutColumns(shape),
    ticksPerDay: roundHalfUp((hoursPerDay * 60) / tickMinutes),
    daysPerWeek,
    overtimeTicks: overtime ? Math.max(1, roundHalfUp((overtime.hoursPerWeek * 60) / tickMinutes)) : 0,
    overtimeTrigger: overtime ? overtime.backlogTrigger : Infinity,
    suppliers: graph.suppliers.map((node, i) => ({
      buffer: graph.supplierBuffer[i],
      quotedDays: Math.max(1, roundHalfUp(node.leadTimeDays)),
      days:
        node.lateness && node.onTimeShare < 1
          ? createWholeQuantile(prepareDistribution(node.lateness, node.id), node.leadTimeDays, 1)
          : null,
      onTimeShare: node.onTimeShare,
      correlation: node.correlation,
      keepsSequence: node.keepsSequence,
      disruption: node.disruption && {
        begins: lnFailure(1 / node.disruption.meanDaysBetween),
        ends: lnFailure(1 / node.disruption.meanDaysLasting),
      },
      rejectRate: node.rejectRate,
      lotRejectRate: node.lotRejectRate,
      share: node.share,
      cause: causeAt(node.id),
      streams: {
        lateness: addStream(node.id, "lateness"),
        disruption: addStream(node.id, "disruption"),
        reject: addStream(node.id, "reject"),
        lot: addStream(node.id, "lot"),
      },
    })),
    buffers: graph.buffers.map((node, i) => ({
      size: node.size,
      startLevel: node.startLevel ?? node.size,
      isPurchased: node.replenishment !== null,
      reviewDays: node.replenishment?.reviewDays ?? 0,
      lot: node.replenishment?.lot ?? 0,
      minimumOrder: node.replenishment?.minimumOrder ?? 0,
      orderMultiple: node.replenishment?.orderMultiple ?? 1,
      suppliers: graph.bufferSuppliers[i],
      feeder: node.replenishment ? -1 : graph.serviceOrder.indexOf(graph.bufferFeeders[i][0]) * staStride,
      group: groups.findIndex((group) => group.buffer === i),
      sizeCause: causeAt(node.id),
    })),
    customers: graph.customers.map((node, i) => ({
      group: groups.findIndex((group) => group.buffer === graph.customerBuffer[i]),
      demand: createWholeQuantile(prepareDistribution(node.weeklyDemand, node.id), 0, 0),
      correlation: node.correlation,
      isWeekly: node.callOff === "weekly",
      isLost: node.unmet === "lost",
      stream: addStream(node.id, "demand"),
    })),
    groups: groups.map((group) => ({ ...group, buffer: group.buffer * bufStride })),
    ...compileStations(line, graph, causeAt, addStream),
    streams,
  };
}

function groupCustomers(graph: Graph): Group[] {
  const drawnOn = graph.buffers.map((_, i) => i).filter((i) => graph.customerBuffer.includes(i));
  return drawnOn.map((buffer) => ({
    buffer,
    customers: Int32Array.from(graph.customers.keys()).filter((i) => graph.customerBuffer[i] === buffer),
    isPurchased: graph.buffers[buffer].replenishment !== null,
  }));
}

function describeShape(line: Line, graph: Graph): Shape {
  return {
    tickMinutes: line.calendar.tickMinutes,
    daysPerWeek: line.calendar.daysPerWeek,
    weeksPerYear: line.calendar.weeksPerYear,
    carryingRate: line.money.carryingRate,
    overtimeCostPerWeek: line.overtime ? line.overtime.hoursPerWeek * line.overtime.costPerHour : 0,
    suppliers: graph.suppliers.map(({ id }) => ({ id })),
    buffers: graph.buffers.map(({ id, unitValue, replenishment }) => ({
      id,
      unitValue,
      isPurchased: replenishment !== null,
    })),
    stations: graph.stations.map(({ id, parallel }, i) => ({
      id,
      parallel,
      scrapValue: graph.stationInputs[i].reduce(
        (sum, input) => sum + input.quantity * graph.buffers[input.buffer].unitValue,
        0,
      ),
      inputs: graph.stationInputs[i].map((input) => graph.buffers[input.buffer].id),
    })),
    customers: graph.customers.map(({ id, lateFine }) => ({ id, lateFine })),
    causes: line.nodes.flatMap((node): Shape["causes"] => {
      if (node.kind === "supplier") return list(node.id, "disrupted", "late");
      if (node.kind === "buffer") return node.replenishment ? list(node.id, "size") : [];
      return node.kind === "station" ? list(node.id, "down", "pace") : [];
    }),
  };
}

function list(node: string, ...reasons: Shape["causes"][number]["reason"][]): Shape["causes"] {
  return reasons.map((reason) => ({ node, reason }));
}
