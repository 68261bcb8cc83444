import { formatCount, plural } from "@/lib/format";
import type { Line } from "@/lib/line/types";
import type { TraceEvent, WeekTrace } from "@/lib/simulation/trace-types";
import { countTicks, sayDay, sayHours } from "./bad-week-moments";

type Of<K extends TraceEvent["kind"]> = Extract<TraceEvent, { kind: K }>;

/** Spells shorter than this many hours, and deliveries that came as expected, are not among the main events. */
export const mainHours = 2;

export function nameIn(line: Line, id: string): string {
  return line.nodes.find((node) => node.id === id)?.name ?? id;
}

export const sayUnits = (n: number): string => `${formatCount(n)} ${plural(n, "unit")}`;
export const sayDays = (n: number): string => `${formatCount(n)} ${plural(n, "day")}`;

/** An event in plain words. */
export function sayEvent(trace: WeekTrace, line: Line, event: TraceEvent): string {
  const name = (id: string): string => nameIn(line, id);
  switch (event.kind) {
    case "disrupted":
      return event.isCarried
        ? `${name(event.node)}: disrupted since before`
        : `${name(event.node)}: disrupted from here`;
    case "recovered":
      return `${name(event.node)}: no longer disrupted`;
    case "overdue":
      return sayOverdue(trace, line, event);
    case "delivery": {
      const rejected = event.rejected > 0 ? `, ${formatCount(event.rejected)} of them rejected` : "";
      return `${sayUnits(event.units)} of ${name(event.buffer)} ${plural(event.units, "arrives", "arrive")}${rejected}, ${sayLateness(event.lateDays)}`;
    }
    case "refused":
      return `A delivery of ${sayUnits(event.units)} of ${name(event.buffer)} is refused whole`;
    case "dry":
      return `${name(event.node)} ${event.isCarried ? "still dry" : "ran dry"}, ${sayLength(trace, event)}`;
    case "restocked":
      return `${name(event.node)}: stock again`;
    case "stopped":
      return `${name(event.node)} stopped, ${sayLength(trace, event)}`;
    case "running":
      return `${name(event.node)} up again`;
    case "short":
      return `${name(event.node)} short of parts, ${sayLength(trace, event)}: ${name(event.buffer)}`;
    case "supplied":
      return `${name(event.node)} no longer short of ${name(event.buffer)}`;
    case "overtime":
      return `Overtime begins, ${sayHours(trace, event.ticks)}`;
    case "backlog":
      return event.isLost
        ? `${sayUnits(event.units)} for ${name(event.node)} ${plural(event.units, "is", "are")} lost`
        : `${sayUnits(event.units)} ${plural(event.units, "is", "are")} owed to ${name(event.node)} at the week’s end`;
  }
}

export function sayLateness(days: number): string {
  return days > 0 ? `${sayDays(days)} late` : days < 0 ? `${sayDays(-days)} early` : "on time";
}

function sayOverdue(trace: WeekTrace, line: Line, event: Of<"overdue">): string {
  const due = event.expectedDay === event.day ? "due today" : `due on ${sayDay(trace, event.expectedDay)}`;
  const why =
    event.plannedDay > event.expectedDay
      ? `planned ${sayLateness(event.plannedDay - event.expectedDay)}`
      : `held up, ${nameIn(line, event.node)} disrupted`;
  return `${sayUnits(event.units)} of ${nameIn(line, event.buffer)} ${due} ${plural(event.units, "is", "are")} not there: ${why}`;
}

function sayLength(trace: WeekTrace, { tick, ticks }: { tick: number; ticks: number }): string {
  const lasts = tick + ticks >= countTicks(trace);
  return lasts ? `to the week’s end, ${sayHours(trace, ticks)}` : `for ${sayHours(trace, ticks)}`;
}

/** Whether an event weighs: begun spells of some length, deliveries late or refused, disruptions, overtime, backlog. */
export function isMain({ tickMinutes }: WeekTrace, event: TraceEvent): boolean {
  switch (event.kind) {
    case "restocked":
    case "running":
    case "supplied":
      return false;
    case "dry":
    case "stopped":
    case "short":
      return event.ticks * tickMinutes >= mainHours * 60;
    case "delivery":
      return event.lateDays > 0;
    default:
      return true;
  }
}

/** Whether an event is a shortage or leads to one, to be set in silt. */
export function isGrave({ kind }: TraceEvent): boolean {
  return kind === "dry" || kind === "short" || kind === "overdue" || kind === "refused" || kind === "disrupted";
}
