import type { Model } from "./model";
import type { State } from "./state";
import type { TickTrace } from "./trace-ticks";
import type { TracedWeek, TraceEvent } from "./trace-types";

/** Keeps the accounts of each traced week. */
export function createWeekTrace(model: Model, ticks: TickTrace, tell: (event: TraceEvent) => void) {
  const list: TracedWeek[] = [];
  const nCustomers = model.customers.length;
  const owedBefore = new Float64Array(nCustomers);
  const owedOld = new Float64Array(nCustomers);
  const owedNew = new Float64Array(nCustomers);
  const causes = new Float64Array(model.shape.causes.length);
  let firstTick = 0;
  let overtimeTicks = 0;
  const lastDay = (): number => (list.length + 1) * model.daysPerWeek - 1;

  return {
    list,
    /** Before the week's first tick, when what is counted has been set to 0 if it is the first recorded one. */
    start(s: State): void {
      owedBefore.set(s.owedOld);
      causes.set(s.causes);
      firstTick = ticks.count;
      overtimeTicks = 0;
    },
    noteOvertime(n: number): void {
      overtimeTicks = n;
      tell({ kind: "overtime", node: null, tick: ticks.count, day: lastDay(), ticks: n });
    },
    /** The last such look of a week comes before its accounts are closed. */
    noteOwed(s: State): void {
      owedOld.set(s.owedOld);
      owedNew.set(s.owedNew);
    },
    close(s: State, week: number): void {
      const { shape } = model;
      const customers = model.customers.map(({ isLost }, i) => ({
        id: shape.customers[i].id,
        demand: s.demand[i],
        onTime: s.demand[i] - owedNew[i],
        owedBefore: owedBefore[i],
        owed: owedOld[i] + owedNew[i],
        isLost,
      }));
      for (const { id, owed, isLost } of customers) {
        if (owed > 0) tell({ kind: "backlog", node: id, tick: ticks.count - 1, day: lastDay(), units: owed, isLost });
      }
      const hours = ticks.takeHours();
      list.push({
        week,
        firstTick,
        nTicks: ticks.count - firstTick,
        overtimeTicks,
        customers,
        stations: shape.stations.map(({ id }, i) => ({ id, hours: hours[i] })),
        causes: shape.causes
          .map((cause, i) => ({ ...cause, hours: ((s.causes[i] - causes[i]) * shape.tickMinutes) / 60 }))
          .filter((cause) => cause.hours > 0)
          .sort((a, b) => b.hours - a.hours),
      });
    },
  };
}
