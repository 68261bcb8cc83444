import { availability } from "@/lib/line/capacity";
import type { Line, Station } from "@/lib/line/types";
import { bernoulliRate, leanPlaces } from "./bernoulli-line";

/** A serial part of a line: stations one after another, each fed by the one before alone. */
export type SerialPart = {
  stations: string[];
  buffers: string[];
  estimate:
    | {
        applies: true;
        /** Good units an hour that the part can make with the sizes as they are, and with endless ones. */
        perHour: number;
        perHourEndless: number;
        /** Fewest places, alike in all its buffers, for 95 % of that; null: more than 10 000. */
        leanPlaces: number | null;
      }
    | { applies: false; reason: string };
};

/** Part of the endless rate that lean places have to reach. */
export const leanShare = 0.95;
/** Cycle times this far apart still count as alike. */
const alike = 0.05;

/**
 * The serial parts of a line with the Bernoulli estimate of what each can make.
 * @remarks A cycle is the common cycle time and a stoppage is taken as lost cycles each on its own; Li and Meerkov,
 * Production Systems Engineering (2009), chapters 4 and 6.
 */
export function serialParts(line: Line): SerialPart[] {
  const stations = new Map(line.nodes.flatMap((node) => (node.kind === "station" ? [[node.id, node] as const] : [])));
  const next = new Map<string, { buffer: string; station: string }>();
  for (const { id } of stations.values()) {
    const buffer = line.links.find(({ from }) => from === id)?.to;
    if (buffer === undefined || line.links.filter(({ to }) => to === buffer).length !== 1) continue;
    const takers = line.links.filter(({ from }) => from === buffer);
    const taker = takers.length === 1 ? takers[0] : null;
    if (taker && stations.has(taker.to) && (taker.quantity ?? 1) === 1) next.set(id, { buffer, station: taker.to });
  }
  const isStationFed = (id: string) => line.links.some(({ from, to }) => to === id && stations.has(from));
  const isJoint = (id: string) => line.links.filter(({ from, to }) => to === id && isStationFed(from)).length > 1;
  const follows = new Set([...next.values()].filter(({ station }) => !isJoint(station)).map(({ station }) => station));
  return [...stations.keys()]
    .filter((id) => !follows.has(id))
    .flatMap((id): SerialPart[] => {
      const part = { stations: [id], buffers: [] as string[] };
      for (let step = next.get(id); step && follows.has(step.station); step = next.get(step.station)) {
        part.stations.push(step.station);
        part.buffers.push(step.buffer);
      }
      if (part.buffers.length === 0) return [];
      const own = part.stations.map((station) => stations.get(station)!);
      return [{ ...part, estimate: estimatePart(line, own, part.buffers) }];
    });
}

function estimatePart(line: Line, own: readonly Station[], bufferIds: readonly string[]): SerialPart["estimate"] {
  const cycles = own.map(({ cycleMinutes, parallel }) => cycleMinutes / parallel);
  const cycle = Math.max(...cycles);
  if (Math.min(...cycles) < cycle * (1 - alike))
    return { applies: false, reason: "its stations have different cycle times" };
  const isLong = ({ stoppages }: Station) =>
    stoppages?.pattern === "upDown" && stoppages.meanDownHours * 60 > 3 * cycle;
  if (own.some(isLong))
    return { applies: false, reason: "its stoppages last many cycles, which the estimate takes for single lost ones" };
  const sizes = bufferIds.map((id) => {
    const node = line.nodes.find((one) => one.id === id);
    return node?.kind === "buffer" ? node.size : 1;
  });
  const up = own.map(availability);
  const good = own.reduce((share, { scrapRate }) => share * (1 - scrapRate), 1);
  const perCycle = (60 / cycle) * good;
  return {
    applies: true,
    perHour: bernoulliRate(up, sizes) * perCycle,
    perHourEndless: Math.min(...up) * perCycle,
    leanPlaces: leanPlaces(up, leanShare),
  };
}
