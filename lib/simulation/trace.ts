import type { Line } from "@/lib/line/types";
import { compileModel } from "./compile";
import { createLevelTally } from "./level-tally";
import { checkOptions } from "./options";
import { createRecorder, runReplication, runStretch } from "./replication";
import { createState } from "./state";
import { listSpellEvents } from "./trace-spells";
import { createSupplyTrace } from "./trace-supply";
import { createTickTrace } from "./trace-ticks";
import type { TraceEvent, WeekTrace } from "./trace-types";
import { createWeekTrace } from "./trace-weeks";
import type { RunOptions } from "./types";

export type * from "./trace-types";
export { stationStates } from "./trace-types";

/** Weeks before the one asked for that are traced too, since shortages come from before. */
const weeksBefore = 2;

/**
 * Runs one replication of a run again, to the same bits, and tells what happened in one of its weeks.
 * @param replication - One of `options`: `firstReplication` .. `firstReplication + replications - 1`.
 * @param week - 0-based among the recorded weeks.
 * @throws RangeError on another replication or week, bad options and a line that cannot run.
 */
export function traceWeek(line: Line, options: RunOptions, replication: number, week: number): WeekTrace {
  const checked = checkOptions(options);
  const { firstReplication: first = 0, warmupWeeks } = checked;
  requireIndex("replication", replication, first, first + checked.replications - 1);
  requireIndex("week", week, 0, checked.weeks - 1);
  const model = compileModel(line);
  const state = createState(model, checked.seed);
  // A longer run starts like a shorter one, so nothing after the week has to be run.
  const upTo = { ...checked, replications: 1, weeks: week + 1 };
  const from = Math.max(0, warmupWeeks + week - weeksBefore);
  const events: TraceEvent[] = [];
  const nWeeks = warmupWeeks + week + 1 - from;
  const ticks = createTickTrace(model, nWeeks);
  const supply = createSupplyTrace(model, (event) => events.push(event));
  const weeks = createWeekTrace(model, ticks, (event) => events.push(event));
  let now = 0;
  let nStretches = 0;

  runReplication(
    state,
    upTo,
    replication,
    0,
    createRecorder(model, upTo, createLevelTally),
    (s, n) => {
      if (now < from) return runStretch(s, n);
      if (nStretches === 0) weeks.start(s);
      if (nStretches < model.daysPerWeek) supply.startDay(s, ticks.count);
      else weeks.noteOvertime(n);
      if (ticks.count === 0) ticks.start(s);
      nStretches++;
      for (let t = 0; t < n; t++) {
        ticks.remember(s);
        runStretch(s, 1);
        ticks.note(s);
      }
      supply.remember(s);
      weeks.noteOwed(s);
    },
    (done) => {
      if (done >= from) weeks.close(state, done - warmupWeeks);
      else if (done === from - 1) supply.remember(state);
      now = done + 1;
      nStretches = 0;
    },
  );
  const { tickMinutes, daysPerWeek } = model.shape;
  const { buffers, stations } = ticks.cut();
  const trace = {
    replication,
    week,
    tickMinutes,
    ticksPerDay: model.ticksPerDay,
    daysPerWeek,
    weeks: weeks.list,
    buffers,
    stations,
  };
  return { ...trace, events: sortEvents([...events, ...listSpellEvents(trace)]) };
}

const ranks: Record<TraceEvent["kind"], number> = {
  recovered: 0,
  disrupted: 0,
  delivery: 1,
  refused: 1,
  overdue: 2,
  restocked: 3,
  dry: 4,
  running: 5,
  supplied: 5,
  stopped: 6,
  short: 6,
  overtime: 7,
  backlog: 8,
};

function sortEvents(events: TraceEvent[]): TraceEvent[] {
  return events.sort((a, b) => a.tick - b.tick || ranks[a.kind] - ranks[b.kind]);
}

function requireIndex(name: string, value: number, least: number, most: number): void {
  if (!Number.isInteger(value) || value < least || value > most) {
    throw new RangeError(`${name} must be a whole number from ${least} to ${most}, got ${value}`);
  }
}
