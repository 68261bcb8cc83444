import type { Buffer, Customer, Distribution, Line, Link, Station, Stoppages, Supplier } from "@/lib/line/types";
import type { RunOptions } from "@/lib/simulation/types";

/** Stock that no run here can use up, and room that none can fill. */
export const endless = 2 ** 29;

/** One tick an hour, 24 ticks a day, 7 days: 168 ticks a week. */
export const hourly = { tickMinutes: 60, hoursPerDay: 24, daysPerWeek: 7, weeksPerYear: 52 };

/** One tick a day and one day a week: a week is one period of inventory theory. */
export const periodic = { tickMinutes: 60, hoursPerDay: 1, daysPerWeek: 1, weeksPerYear: 52 };

export const station = (id: string, more: Partial<Station> = {}): Station => ({
  kind: "station",
  id,
  name: id,
  cycleMinutes: 60,
  cycleCv: 0,
  parallel: 1,
  scrapRate: 0,
  stoppages: null,
  ...more,
});

export const buffer = (id: string, size: number, more: Partial<Buffer> = {}): Buffer => ({
  kind: "buffer",
  id,
  name: id,
  size,
  startLevel: 0,
  unitValue: 1,
  replenishment: null,
  ...more,
});

/** Bought in, up to `size`, looked at every day. */
export const purchased = (id: string, size: number, more: Partial<Buffer> = {}): Buffer =>
  buffer(id, size, {
    startLevel: null,
    replenishment: { rule: "orderUpTo", reviewDays: 1, lot: null, minimumOrder: 0, orderMultiple: 1 },
    ...more,
  });

export const supplier = (id: string, leadTimeDays: number, more: Partial<Supplier> = {}): Supplier => ({
  kind: "supplier",
  id,
  name: id,
  leadTimeDays,
  lateness: null,
  onTimeShare: 1,
  correlation: 0,
  keepsSequence: false,
  disruption: null,
  rejectRate: 0,
  lotRejectRate: 0,
  share: 1,
  ...more,
});

export const customer = (id: string, weeklyDemand: Distribution, more: Partial<Customer> = {}): Customer => ({
  kind: "customer",
  id,
  name: id,
  weeklyDemand,
  correlation: 0,
  callOff: "weekly",
  unmet: "backorder",
  lateFine: 0,
  ...more,
});

export const line = (nodes: Line["nodes"], links: [string, string, number?][], more: Partial<Line> = {}): Line => ({
  format: "forebay.line/1",
  name: "test line",
  calendar: hourly,
  money: { currency: "EUR", carryingRate: 0 },
  overtime: null,
  nodes,
  links: links.map(([from, to, quantity]): Link => (quantity === undefined ? { from, to } : { from, to, quantity })),
  ...more,
});

/** Stations m1, m2, ... in a row with buffers b1, b2, ... between, never short of parts at the head nor of room at the end. */
export function serialLine(
  stations: readonly Partial<Station>[],
  sizes: readonly number[],
  more: Partial<Line> = {},
): Line {
  const machines = stations.map((fields, i) => station(`m${i + 1}`, fields));
  const between = sizes.map((size, i) => buffer(`b${i + 1}`, size));
  const last = `m${stations.length}`;
  return line(
    [
      supplier("s", 1),
      purchased("in", endless),
      ...machines,
      ...between,
      buffer("out", endless),
      customer("c", { type: "fixed", value: 1 }),
    ],
    [
      ["s", "in"],
      ["in", "m1"],
      ...between.flatMap((_, i): [string, string][] => [
        [`m${i + 1}`, `b${i + 1}`],
        [`b${i + 1}`, `m${i + 2}`],
      ]),
      [last, "out"],
      ["out", "c"],
    ],
    more,
  );
}

export const bernoulli = (upProbability: number): Partial<Station> => ({
  stoppages: { pattern: "perTick", upProbability },
});

/** Geometric up and down times of a station whose cycle is one tick of an hour. */
export const upDown = (fail: number, repair: number, clock: "running" | "always"): Partial<Station> => ({
  stoppages: {
    pattern: "upDown",
    meanUpHours: 1 / fail,
    meanDownHours: 1 / repair,
    downCv: null,
    clock,
  } satisfies Stoppages,
});

/** About a million ticks of an hourly line. */
export const millionTicks: RunOptions = {
  seed: "truth",
  replications: 40,
  weeks: 150,
  warmupWeeks: 4,
  targetFillRate: 1,
};
export const ticksOf = ({ replications, weeks }: RunOptions) => replications * weeks * 168;
