import type { Cell } from "@/components/charts/take-out-figures";
import type { Line } from "@/lib/line/types";
import { stationStates, type WeekTrace } from "@/lib/simulation/trace-types";
import { sayTime, sayTracedWeek, weekOf } from "./bad-week-moments";
import { nameIn } from "./bad-week-words";

const words = { working: "working", short: "short of parts", noRoom: "no room", stopped: "stopped" } as const;

/** The trace as a table: a row a tick, with the level of each buffer at its end and what each station did. */
export function traceRows(trace: WeekTrace, line: Line): Cell[][] {
  const { buffers, stations } = trace;
  const head = [
    "week",
    "time",
    ...buffers.map(({ id }) => nameIn(line, id)),
    ...stations.map(({ id }) => nameIn(line, id)),
  ];
  const rows = Array.from(stations[0]?.states ?? buffers[0].levels, (_, tick): Cell[] => [
    sayTracedWeek(trace, weekOf(trace, tick)),
    sayTime(trace, tick),
    ...buffers.map(({ levels }) => levels[tick]),
    ...stations.map(({ states }) => words[stationStates[states[tick]]]),
  ]);
  return [head, ...rows];
}
