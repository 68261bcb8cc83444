import type { CauseReason } from "./types";

/** What a station did in most of a tick; the codes of `StationTrace.states` are indices of this list. */
export const stationStates = ["working", "short", "noRoom", "stopped"] as const;
export type StationState = (typeof stationStates)[number];

/** Level at the end of each traced tick, units. `startLevel` is the level when tracing began. */
export type BufferTrace = { id: string; startLevel: number; levels: Int32Array };

/** By traced tick: code of the state, and index in `WeekTrace.buffers` of the buffer that lacked, -1 where the station was not short. */
export type StationTrace = { id: string; states: Uint8Array; lacking: Int16Array };

/** Units. `owedBefore` is from earlier weeks; `owed` is what stands open at the week's end, before lost demand is cancelled. */
export type CustomerWeek = {
  id: string;
  demand: number;
  onTime: number;
  owedBefore: number;
  owed: number;
  isLost: boolean;
};

export type TracedWeek = {
  /** 0-based among recorded weeks; negative in warm-up. */
  week: number;
  /** Index of the week's first tick, and its ticks, overtime included. */
  firstTick: number;
  nTicks: number;
  overtimeTicks: number;
  customers: CustomerWeek[];
  /** Exact hours of each station in each of `stationStates`; a tick may be parted. */
  stations: { id: string; hours: number[] }[];
  /** Hours charged to each root cause in this week, the largest first; causes of no hours are left out. */
  causes: { node: string; reason: CauseReason; hours: number }[];
};

/** One type for each kind, so that a kind picks out its own. */
type Kinds<K, Fields> = K extends string ? { kind: K } & Fields : never;

/**
 * Something that happened. `node` is whom it happened to, null for the whole line.
 * `tick`: index of the traced tick in which it happened; what happens at a day's start has the day's first tick.
 * `day`: regular working day from the first traced one; overtime counts to the day before it.
 */
export type TraceEvent = { tick: number; day: number } & (
  | Kinds<"disrupted" | "recovered", { node: string; isCarried: boolean }>
  /** Not there on its expected day. `plannedDay` may be that day where a disruption holds the delivery up. */
  | { kind: "overdue"; node: string; buffer: string; units: number; expectedDay: number; plannedDay: number }
  /** `units` of which `rejected` failed inspection; `lateDays` < 0 is early. */
  | {
      kind: "delivery";
      node: string;
      buffer: string;
      units: number;
      rejected: number;
      expectedDay: number;
      lateDays: number;
    }
  /** A whole lot turned away. */
  | { kind: "refused"; node: string; buffer: string; units: number; expectedDay: number; lateDays: number }
  /** `dry`, `stopped` and `short` begin a spell of so many ticks, the others end one; a spell that lasts to the end of the trace has no end. */
  | Kinds<"dry" | "restocked" | "stopped" | "running", { node: string; ticks: number; isCarried: boolean }>
  | Kinds<"short" | "supplied", { node: string; buffer: string; ticks: number; isCarried: boolean }>
  | { kind: "overtime"; node: null; ticks: number }
  /** Units owed at the week's end, in the week's last tick. `isLost`: cancelled there. */
  | { kind: "backlog"; node: string; units: number; isLost: boolean }
);

/** One week of one replication and up to two weeks before it, looked at tick by tick. Days and ticks count from the first traced one. */
export type WeekTrace = {
  replication: number;
  week: number;
  tickMinutes: number;
  ticksPerDay: number;
  daysPerWeek: number;
  /** In order; the last one is the week asked for. */
  weeks: TracedWeek[];
  buffers: BufferTrace[];
  stations: StationTrace[];
  /** In order of time; in one tick suppliers come first, then buffers, stations, overtime and backlog. */
  events: TraceEvent[];
};
