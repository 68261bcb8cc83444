import type { Line, LineNode, Link, Station } from "@/lib/line/types";
import { endlessRowRate, leanPlacesAlike, leanPlacesEach, rowRate } from "@/lib/statistics/bernoulli-row";

/** Stations one after another with one buffer between each two, or what stands where a line is not of that kind. */
export type SerialEstimate = {
  /** Upstream first. */
  stations: string[];
  buffers: string[];
  estimate:
    | {
        applies: true;
        /** Good units an hour that the part makes with the sizes as they are, and with endless ones. */
        perHour: number;
        perHourEndless: number;
        /** Fewest places, alike in all its buffers, for `leanShare` of the endless rate. */
        leanPlaces: number;
        /** The same, each buffer with its own: none can give up a place alone. */
        lean: { id: string; size: number; lean: number }[];
      }
    | { applies: false; reason: string };
};

/** Share of the endless rate that lean places have to reach. */
export const leanShare = 0.95;

/** What the estimate takes for granted, in plain sentences. */
export const serialAssumptions = [
  "The first station never waits for parts and the last one never for room or for demand; purchased parts are always there.",
  "In each cycle a station is up with the same probability, whatever the others do and whatever it did before.",
  "Stoppages come by the clock; where they come with running time only, a line with little room makes somewhat more.",
  "Scrap leaves the line where it is made and takes no place.",
  "Rows of more than two stations are estimated by aggregation, which is one or two per cent off.",
] as const;

/**
 * Every buffer between stations, once: in a serial part with its estimate, or apart with the reason for none.
 * @param line - Valid.
 * @remarks Bernoulli line of J. Li and S. M. Meerkov, Production Systems Engineering (Springer, 2009), chapters 4 and 6.
 * A buffer's N of theirs is its `size` here: a part that is worked on for a cycle holds its place downstream instead of
 * upstream, and both lines serve downstream first.
 */
export function estimateSerialParts(line: Line): SerialEstimate[] {
  const { joints, refused } = readJoints(line);
  const isFollower = new Set([...joints.values()].map(({ to }) => to.id));
  const parts = [...joints].flatMap(([head, { from }]): SerialEstimate[] => {
    if (isFollower.has(head)) return [];
    const stations = [from];
    const buffers: string[] = [];
    for (let joint = joints.get(head); joint; joint = joints.get(joint.to.id)) {
      stations.push(joint.to);
      buffers.push(joint.buffer);
    }
    return [{ stations: stations.map(({ id }) => id), buffers, estimate: estimate(line, stations, buffers) }];
  });
  return [...parts, ...refused];
}

type Joint = { from: Station; buffer: string; to: Station };

/** Links of station to station over a buffer of their own, by the first's id, and what is none. */
function readJoints(line: Line): { joints: Map<string, Joint>; refused: SerialEstimate[] } {
  const nodes = new Map(line.nodes.map((node) => [node.id, node]));
  const [incoming, outgoing] = [groupBy(line.links, "to"), groupBy(line.links, "from")];
  const stationsOf = (ids: readonly string[]) => ids.map((id) => nodes.get(id)).filter((node) => isStation(node));
  const feedersOf = (id: string) => stationsOf((incoming.get(id) ?? []).map(({ from }) => from));
  const joints = new Map<string, Joint>();
  const refused: SerialEstimate[] = [];
  const assemblies = new Map<string, { stations: string[]; buffers: string[] }>();
  for (const { kind, id } of line.nodes) {
    const feeders = kind === "buffer" ? feedersOf(id) : [];
    const takers = outgoing.get(id) ?? [];
    const to = stationsOf(takers.map((link) => link.to));
    if (feeders.length === 0 || to.length === 0) continue;
    const isAssembly = (incoming.get(to[0].id) ?? []).filter(({ from }) => feedersOf(from).length > 0).length > 1;
    const quantity = takers[0].quantity ?? 1;
    const reason =
      feeders.length > 1
        ? "several stations fill the buffer, and the estimate knows one before it"
        : takers.length > 1
          ? "the buffer has several takers, and the estimate knows one behind it"
          : quantity > 1
            ? `a unit takes ${quantity} from the buffer, and the estimate one for one`
            : null;
    if (reason !== null) {
      const stations = [...feeders, ...to].map((station) => station.id);
      refused.push({ stations, buffers: [id], estimate: { applies: false, reason } });
    } else if (isAssembly) {
      const { stations, buffers } = assemblies.get(to[0].id) ?? { stations: [to[0].id], buffers: [] };
      assemblies.set(to[0].id, {
        stations: [...stations.slice(0, -1), feeders[0].id, to[0].id],
        buffers: [...buffers, id],
      });
    } else joints.set(feeders[0].id, { from: feeders[0], buffer: id, to: to[0] });
  }
  const reason = "the last one assembles what several stations make, and the estimate knows one row only";
  const assembled = [...assemblies.values()].map((one) => ({ ...one, estimate: { applies: false as const, reason } }));
  return { joints, refused: [...refused, ...assembled] };
}

const isStation = (node: LineNode | undefined): node is Station => node?.kind === "station";

function groupBy(links: readonly Link[], end: "from" | "to"): Map<string, Link[]> {
  const groups = new Map<string, Link[]>();
  for (const link of links) {
    const group = groups.get(link[end]);
    if (group) group.push(link);
    else groups.set(link[end], [link]);
  }
  return groups;
}

function estimate(line: Line, stations: Station[], bufferIds: readonly string[]): SerialEstimate["estimate"] {
  const reason = refuse(line, stations);
  if (reason !== null) return { applies: false, reason };
  const sizes = bufferIds.map((id) => {
    const node = line.nodes.find((one) => one.id === id);
    return node?.kind === "buffer" ? node.size : 1;
  });
  const { tickMinutes } = line.calendar;
  const row = {
    up: stations.map((station) => stopsOf(station, tickMinutes).up),
    good: stations.map(({ scrapRate }) => 1 - scrapRate),
  };
  const cyclesAnHour = 60 / cycleOf(stations[0]);
  const lean = leanPlacesEach(row, leanShare);
  return {
    applies: true,
    perHour: rowRate(row, sizes) * cyclesAnHour,
    perHourEndless: endlessRowRate(row) * cyclesAnHour,
    leanPlaces: leanPlacesAlike(row, leanShare),
    lean: bufferIds.map((id, i) => ({ id, size: sizes[i], lean: lean[i] })),
  };
}

const cycleOf = ({ cycleMinutes, parallel }: Station): number => cycleMinutes / parallel;

/** The rounds of the aggregation grow with the square of the stations, and beyond this hold up the page. */
const mostStations = 40;
/** Stoppages beyond this many cycles are not single lost cycles. */
const mostCycles = 3;
/** Against exact chains and runs of three stations the estimate is then within about six per cent of the rate. */
const mostUnlike = 0.08;

/**
 * Why a row of stations is no Bernoulli line, or null. With cycles of broken ticks, unlike cycles or cycle times that
 * vary, a unit waits for the next tick or holds its place longer: at one place that costs half of the output and more.
 */
function refuse({ calendar: { tickMinutes } }: Line, stations: readonly Station[]): string | null {
  if (stations.length > mostStations) return `it has more than ${mostStations} stations`;
  const cycle = cycleOf(stations[0]);
  if (stations.some((station) => Math.abs(cycleOf(station) - cycle) > 1e-9 * cycle))
    return "its stations have different cycle times";
  const ticks = cycle / tickMinutes;
  if (ticks < 1 - 1e-9) return `its stations make more than one unit in a tick of ${tickMinutes} minutes`;
  if (Math.abs(ticks - Math.round(ticks)) > 1e-9 * ticks) return "its cycle time is not a whole number of ticks";
  if (stations.some(({ cycleCv }) => cycleCv > 0)) return "its cycle times vary from unit to unit";
  for (const station of stations) {
    const { up, minutes } = stopsOf(station, tickMinutes);
    // A station up in each cycle by itself is down for 1 / up cycles on end.
    const unlike = (minutes / cycle) * up - 1;
    if (up === 1 || (minutes <= mostCycles * cycle && (1 - up) * Math.abs(unlike) <= mostUnlike)) continue;
    return unlike > 0
      ? "its stoppages last many cycles, which the estimate takes for single lost ones"
      : "its stoppages are much shorter than a cycle, and the estimate takes each for a whole one";
  }
  return null;
}

/** Share of time up, and the mean minutes that a stoppage lasts; no up- or down-time is shorter than a tick. */
function stopsOf({ stoppages }: Station, tickMinutes: number): { up: number; minutes: number } {
  if (stoppages === null) return { up: 1, minutes: 0 };
  if (stoppages.pattern === "perTick")
    return { up: stoppages.upProbability, minutes: tickMinutes / stoppages.upProbability };
  const upMinutes = Math.max(tickMinutes, stoppages.meanUpHours * 60);
  const minutes = Math.max(tickMinutes, stoppages.meanDownHours * 60);
  return { up: upMinutes / (upMinutes + minutes), minutes };
}
