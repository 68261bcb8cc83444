import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { exampleLine } from "@/lib/line/example";
import type { Line, Station, Supplier } from "@/lib/line/types";
import { lowestLevels, simulate, type RunOptions } from "@/lib/simulation";
import { stationStates, traceWeek, type TraceEvent, type WeekTrace } from "@/lib/simulation/trace";
import { listSpells } from "@/lib/simulation/trace-spells";
import { arbitraryLine } from "@/tests/helpers/line-arbitrary";
import { ReferenceRun } from "@/tests/helpers/reference-simulator";
import { figuresOf } from "@/tests/helpers/reference-totals";
import { buffer, customer, line, purchased, station, supplier } from "@/tests/helpers/small-lines";
import { settings } from "../properties/settings";

const options: RunOptions = { seed: "1", replications: 6, weeks: 9, warmupWeeks: 3, targetFillRate: 0.95 };
/** All weeks of the run are traced with its last one. */
const short: RunOptions = { seed: "larkfield", replications: 1, weeks: 3, warmupWeeks: 0, targetFillRate: 0.9 };

const sum = (values: Iterable<number>) => [...values].reduce((a, b) => a + b, 0);
const fillRate = (trace: WeekTrace) => {
  const { customers } = trace.weeks[trace.weeks.length - 1];
  return Math.fround(sum(customers.map(({ onTime }) => onTime)) / sum(customers.map(({ demand }) => demand)));
};
const of = <K extends TraceEvent["kind"]>(trace: WeekTrace, kind: K) =>
  trace.events.filter((event): event is Extract<TraceEvent, { kind: K }> => event.kind === kind);

describe("traceWeek", () => {
  // Lamination stacks are counted in kits of the one station that takes them.
  it.each(["stator", "lam"])("has the fill rates of the run itself, and the lowest levels of %s", (id) => {
    const run = simulate(exampleLine, options);
    const lowest = lowestLevels(exampleLine, options, id);
    for (const [replication, week] of [
      [0, 0],
      [2, 1],
      [5, 8],
    ]) {
      const trace = traceWeek(exampleLine, options, replication, week);
      expect(fillRate(trace)).toBe(run.fillRates[replication * options.weeks + week]);
      const { levels } = trace.buffers.find((one) => one.id === id)!;
      for (const { week: w, firstTick, nTicks } of trace.weeks) {
        const least = Math.min(...levels.subarray(firstTick, firstTick + nTicks));
        expect(least).toBe(lowest.lowest[replication * lowest.nWeeks + options.warmupWeeks + w]);
      }
      expect(trace.weeks.map(({ week: w }) => w)).toEqual([week - 2, week - 1, week]);
    }
  });

  it("starts with the run where fewer than two weeks come before", () => {
    const trace = traceWeek(exampleLine, { ...options, warmupWeeks: 1 }, 0, 0);
    expect(trace.weeks.map(({ week }) => week)).toEqual([-1, 0]);
  });

  it("does not depend on the other replications and weeks of the run", () => {
    const alone = { ...options, firstReplication: 4, replications: 1, weeks: 6 };
    expect(traceWeek(exampleLine, alone, 4, 5)).toEqual(traceWeek(exampleLine, options, 4, 5));
  });

  it("refuses replications and weeks that are not of the run", () => {
    const part = { ...options, firstReplication: 2, replications: 2 };
    for (const [replication, week] of [
      [1, 0],
      [4, 0],
      [2, -1],
      [2, 9],
      [2.5, 0],
    ]) {
      expect(() => traceWeek(exampleLine, part, replication, week)).toThrow(RangeError);
    }
  });

  it("adds up to the figures of the run on any line", () => {
    fc.assert(
      fc.property(arbitraryLine, (any) => {
        const run = simulate(any, short);
        const figures = figuresOf(run);
        const trace = traceWeek(any, short, 0, 2);
        const nTicks = sum(trace.weeks.map((week) => week.nTicks));
        const near = (name: string, value: number) => {
          if (!Number.isNaN(figures[name])) expect(value, name).toBeCloseTo(figures[name] ?? 0, 6);
        };
        trace.weeks.forEach(({ customers }, w) => {
          const due = sum(customers.map(({ demand }) => demand));
          if (due === 0) return;
          expect(Math.fround(sum(customers.map(({ onTime }) => onTime)) / due)).toBe(run.fillRates[w]);
        });
        for (const { id, levels } of trace.buffers) {
          expect(levels).toHaveLength(nTicks);
          near(`${id} mean`, sum(levels) / nTicks);
          near(`${id} empty`, levels.filter((level) => level === 0).length / nTicks);
        }
        trace.stations.forEach(({ id, states, lacking }, k) => {
          const hours = stationStates.map((_, i) => sum(trace.weeks.map((week) => week.stations[k].hours[i])));
          const all = (nTicks * trace.tickMinutes) / 60;
          expect(sum(hours)).toBeCloseTo(all, 6);
          near(`${id} down`, hours[3] / all);
          near(`${id} blocked`, hours[2] / all);
          const starved = Object.keys(figures).filter((name) => name.startsWith(`${id} starved by `));
          expect(hours[1] / all).toBeCloseTo(sum(starved.map((name) => figures[name])), 6);
          states.forEach((state, t) => expect(lacking[t] >= 0).toBe(stationStates[state] === "short"));
        });
        const hoursOf = new Map<string, number>();
        for (const { node, reason, hours } of trace.weeks.flatMap(({ causes }) => causes))
          hoursOf.set(`cause ${node} ${reason}`, (hoursOf.get(`cause ${node} ${reason}`) ?? 0) + hours / 3);
        for (const [name, hours] of hoursOf) near(name, hours);
        expect(hoursOf.size).toBe(run.causes.length);
        for (const id of Object.keys(run.suppliers)) {
          const own = <E extends { node: string | null }>(events: E[]) => events.filter(({ node }) => node === id);
          const refused = own(of(trace, "refused"));
          const arrived = own(of(trace, "delivery"));
          near(`${id} refused`, sum(refused.map(({ units }) => units)) / 3);
          near(`${id} rejected`, sum(arrived.map(({ rejected }) => rejected)) / 3);
          const late = [...refused, ...arrived].map(({ lateDays }) => lateDays);
          if (late.length > 0) near(`${id} lateness`, sum(late) / late.length);
          expect(late.length > 0).toBe(!Number.isNaN(figures[`${id} late`]));
          if (late.length > 0) near(`${id} late`, late.filter((days) => days > 0).length / late.length);
        }
        const ticks = trace.events.map(({ tick }) => tick);
        expect(ticks).toEqual([...ticks].sort((a, b) => a - b));
      }),
      settings(60),
    );
  });
});

/** Two days of four hours a week, an hour a tick: boards are bought in, final assembly makes one unit an hour of them. */
const calendar = { tickMinutes: 60, hoursPerDay: 4, daysPerWeek: 2, weeksPerYear: 48 };
function smallPlant(source: Partial<Supplier> = {}, maker: Partial<Station> = {}, more: Partial<Line> = {}): Line {
  const rule = { rule: "orderUpTo" as const, reviewDays: 2, lot: null, minimumOrder: 0, orderMultiple: 1 };
  return line(
    [
      supplier("sup", 2, source),
      purchased("boards", 6, { replenishment: rule }),
      station("final", maker),
      buffer("units", 1000),
      customer("north", { type: "fixed", value: 8 }),
    ],
    [
      ["sup", "boards"],
      ["boards", "final"],
      ["final", "units"],
      ["units", "north"],
    ],
    { calendar, ...more },
  );
}
const late: Partial<Supplier> = { lateness: { type: "fixed", value: 1 }, onTimeShare: 0 };

describe("events of traceWeek", () => {
  it("tells of a late delivery, what ran dry of it and what was owed, in order", () => {
    const trace = traceWeek(smallPlant(late), short, 0, 2);
    const dry = { ticks: 15, isCarried: false };
    const short14 = { ticks: 14, isCarried: false };
    const boards = { node: "sup", buffer: "boards", units: 6, expectedDay: 4 };
    expect(trace.events).toEqual([
      { kind: "dry", node: "boards", tick: 5, day: 1, ...dry },
      { kind: "dry", node: "units", tick: 6, day: 1, ...short14 },
      { kind: "short", node: "final", buffer: "boards", tick: 6, day: 1, ...short14 },
      { kind: "backlog", node: "north", tick: 7, day: 1, units: 2, isLost: false },
      { kind: "backlog", node: "north", tick: 15, day: 3, units: 10, isLost: false },
      { kind: "overdue", tick: 16, day: 4, plannedDay: 5, ...boards },
      { kind: "delivery", tick: 20, day: 5, rejected: 0, lateDays: 1, ...boards },
      { kind: "restocked", node: "boards", tick: 20, day: 5, ...dry },
      { kind: "restocked", node: "units", tick: 20, day: 5, ...short14 },
      { kind: "supplied", node: "final", buffer: "boards", tick: 20, day: 5, ...short14 },
      { kind: "backlog", node: "north", tick: 23, day: 5, units: 15, isLost: false },
    ]);
    expect([...trace.buffers[0].levels]).toEqual([5, 4, 3, 2, 1, ...Array(15).fill(0), 5, 4, 3, 2]);
    expect([...trace.stations[0].states]).toEqual([...Array(6).fill(0), ...Array(14).fill(1), 0, 0, 0, 0]);
    expect(trace.weeks.map(({ causes }) => causes)).toEqual([
      [{ node: "boards", reason: "size", hours: 2 }],
      [{ node: "boards", reason: "size", hours: 8 }],
      [{ node: "sup", reason: "late", hours: 4 }],
    ]);
    expect(trace.weeks[2].customers).toEqual([
      { id: "north", demand: 8, onTime: 0, owedBefore: 10, owed: 15, isLost: false },
    ]);
    expect(trace.weeks[2].stations).toEqual([{ id: "final", hours: [4, 4, 0, 0] }]);
  });

  it("carries in what was so before the traced weeks", () => {
    const trace = traceWeek(
      smallPlant({ ...late, lateness: { type: "fixed", value: 40 } }),
      { ...short, weeks: 6 },
      0,
      5,
    );
    expect(of(trace, "dry").map(({ node, tick, isCarried }) => [node, tick, isCarried])).toEqual([
      ["boards", 0, true],
      ["units", 0, true],
    ]);
    expect(of(trace, "short")).toMatchObject([
      { node: "final", buffer: "boards", tick: 0, ticks: 24, isCarried: true },
    ]);
    // Ordered on day 2 for day 4; the trace begins on day 6.
    expect(of(trace, "overdue")).toMatchObject([{ tick: 0, units: 6, expectedDay: -2, plannedDay: 38 }]);
  });

  it("tells of disruptions and of the delivery that one holds up", () => {
    // Disrupted every other day, beginning with the first.
    const trace = traceWeek(smallPlant({ disruption: { meanDaysBetween: 1, meanDaysLasting: 1 } }), short, 0, 2);
    expect(of(trace, "disrupted").map(({ tick }) => tick)).toEqual([0, 8, 16]);
    expect(of(trace, "recovered").map(({ tick }) => tick)).toEqual([4, 12, 20]);
    expect(of(trace, "overdue")).toMatchObject([{ tick: 16, expectedDay: 4, plannedDay: 4 }]);
    expect(of(trace, "delivery")).toMatchObject([{ tick: 20, lateDays: 1 }]);
  });

  it("tells of a lot refused, and of units rejected", () => {
    const refused = traceWeek(smallPlant({ lotRejectRate: 1 - 1e-9 }), short, 0, 2);
    expect(of(refused, "refused")).toMatchObject([{ tick: 16, day: 4, units: 6, expectedDay: 4, lateDays: 0 }]);
    expect([of(refused, "delivery"), of(refused, "restocked")]).toEqual([[], []]);
    const rejected = traceWeek(smallPlant({ rejectRate: 1 - 1e-9 }), short, 0, 2);
    expect(of(rejected, "delivery")).toMatchObject([{ tick: 16, units: 6, rejected: 6 }]);
  });

  it("tells when a station stops and runs again", () => {
    const stoppages = { pattern: "upDown", meanUpHours: 1, meanDownHours: 3, downCv: 0, clock: "always" } as const;
    const trace = traceWeek(smallPlant({}, { stoppages }), short, 0, 2);
    expect(of(trace, "stopped").map(({ tick, ticks }) => [tick, ticks])).toEqual(
      [1, 5, 9, 13, 17, 21].map((t) => [t, 3]),
    );
    expect(of(trace, "running").map(({ tick }) => tick)).toEqual([4, 8, 12, 16, 20]);
    expect(trace.weeks[0].stations[0].hours).toEqual([2, 0, 0, 6]);
  });

  it("counts overtime to the last day before it", () => {
    const overtime = { backlogTrigger: 0, hoursPerWeek: 2, costPerHour: 1 };
    const trace = traceWeek(smallPlant(late, {}, { overtime }), short, 0, 2);
    expect(trace.weeks.map(({ firstTick, nTicks, overtimeTicks }) => [firstTick, nTicks, overtimeTicks])).toEqual([
      [0, 8, 0],
      [8, 10, 2],
      [18, 10, 2],
    ]);
    expect(of(trace, "overtime")).toEqual([
      { kind: "overtime", node: null, tick: 16, day: 3, ticks: 2 },
      { kind: "overtime", node: null, tick: 26, day: 5, ticks: 2 },
    ]);
    expect(of(trace, "delivery")).toMatchObject([{ tick: 22, day: 5 }]);
    expect(of(trace, "backlog").map(({ tick, day }) => [tick, day])).toEqual([
      [7, 1],
      [17, 3],
      [27, 5],
    ]);
  });

  it("says which backlog is lost, and parts a tick between work and want of room", () => {
    const plant = smallPlant({}, { cycleMinutes: 15 });
    const lost = { ...plant, nodes: plant.nodes.map((one) => (one.id === "north" ? { ...one, unmet: "lost" } : one)) };
    const trace = traceWeek(lost as Line, short, 0, 2);
    expect(of(trace, "backlog")[0]).toMatchObject({ units: 2, isLost: true });
    // Six boards at four an hour: an hour and a half of work.
    expect(trace.weeks[0].stations[0].hours).toEqual([1.5, 6.5, 0, 0]);
    expect([...trace.stations[0].states].slice(0, 4)).toEqual([0, 0, 1, 1]);
  });

  it("agrees with the second simulator where nothing is left to chance", () => {
    for (const plant of [smallPlant(late), smallPlant({}, { cycleMinutes: 50, parallel: 2 })]) {
      const other = new ReferenceRun(plant, "x", short.targetFillRate).run(0, 3).figures(plant);
      const trace = traceWeek(plant, short, 0, 2);
      const nTicks = trace.stations[0].states.length;
      for (const { id, levels } of trace.buffers) {
        expect(sum(levels) / nTicks).toBeCloseTo(other[`${id} mean`], 9);
        expect(levels.filter((level) => level === 0).length / nTicks).toBeCloseTo(other[`${id} empty`], 9);
      }
      const starved = sum(trace.weeks.map(({ stations }) => stations[0].hours[1]));
      expect(starved / nTicks).toBeCloseTo(other["final starved by boards"], 9);
      expect(sum(trace.weeks.map(({ customers }) => customers[0].owed)) / 3).toBeCloseTo(other.backlog, 9);
    }
  });
});

describe("listSpells", () => {
  const spellsOf = (text: string, nLeast: number) =>
    listSpells(text.length, nLeast, (t) => text[t] === "#").map(({ from, to }) => [from, to]);

  it("finds every spell where one tick is long enough", () => {
    expect(spellsOf("##.#..#", 1)).toEqual([
      [0, 2],
      [3, 4],
      [6, 7],
    ]);
  });

  it("joins short gaps and leaves short spells out", () => {
    expect(spellsOf("####.####...##", 3)).toEqual([[0, 9]]);
    expect(spellsOf("#.#..##", 3)).toEqual([[0, 7]]);
    expect(spellsOf("#..#..#", 3)).toEqual([]);
  });
});
