import { meanUsesAWeek } from "./mean-use";
import type { DraftLine, Line, Station } from "./types";
import { meanOf } from "./distribution-mean";

/** Units due a week on average, all customers together; null while a demand is missing. */
export function dueAWeek(document: DraftLine): number | null {
  let total = 0;
  for (const node of document.nodes) {
    if (node.kind !== "customer") continue;
    const mean = meanOf(node.weeklyDemand);
    if (mean === null) return null;
    total += Math.max(0, mean);
  }
  return total;
}

/** Share of its time in which a station is up in the long run, were it never short of parts or room. */
export function availability(station: Station): number {
  const { stoppages } = station;
  if (!stoppages) return 1;
  if (stoppages.pattern === "perTick") return stoppages.upProbability;
  return stoppages.meanUpHours / (stoppages.meanUpHours + stoppages.meanDownHours);
}

/** Good units a week that a station makes on its own: work time over cycle, less stoppages and scrap; no overtime. */
export function capacityAWeek(line: Line, station: Station): number {
  const { hoursPerDay, daysPerWeek } = line.calendar;
  const started = (hoursPerDay * daysPerWeek * 60 * station.parallel) / station.cycleMinutes;
  return started * availability(station) * (1 - station.scrapRate);
}

/** What one station is asked for and what it can make, good units a week. */
export type Load = { station: Station; due: number; capacity: number };

/** Loads of all stations whose need is known, the most loaded first. */
export function loadsOf(line: Line): Load[] {
  const weeklyUse = meanUsesAWeek(line);
  const loads = line.nodes.flatMap((node): Load[] => {
    if (node.kind !== "station") return [];
    const output = line.links.find((link) => link.from === node.id);
    const use = output ? weeklyUse(output.to) : null;
    if (!output || use === null) return [];
    const nFeeders = line.links.filter((link) => link.to === output.to).length;
    return [{ station: node, due: use / nFeeders, capacity: capacityAWeek(line, node) }];
  });
  return loads.sort((a, b) => b.due / b.capacity - a.due / a.capacity);
}
