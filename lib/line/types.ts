/** The line document, format "forebay.line/1". All counts are whole units; ids are unique over all nodes. */
export type Line = {
  format: "forebay.line/1";
  name: string;
  calendar: Calendar;
  money: Money;
  overtime: Overtime | null;
  nodes: LineNode[];
  links: Link[];
};

/** Working time only: ticks make days, days make weeks. */
export type Calendar = { tickMinutes: number; hoursPerDay: number; daysPerWeek: number; weeksPerYear: number };

/** `currency` is an ISO 4217 code; `carryingRate` the carrying cost per year as a share of value. */
export type Money = { currency: string; carryingRate: number };

/** A week that starts with more than `backlogTrigger` units owed gets `hoursPerWeek` of overtime. */
export type Overtime = { backlogTrigger: number; hoursPerWeek: number; costPerHour: number };

/** `quantity`: units per unit made, on a link from a buffer to a station only; absent means 1. */
export type Link = { from: string; to: string; quantity?: number };

export type LineNode = Supplier | Buffer | Station | Customer;
export type NodeKind = LineNode["kind"];

export type Supplier = {
  kind: "supplier";
  id: string;
  name: string;
  /** Quoted, in working days, >= 0. */
  leadTimeDays: number;
  /** Of a delivery that is not on time: working days added to the quoted lead time; negative is early. */
  lateness: Distribution | null;
  /** 0..1: with this probability the lateness is 0. */
  onTimeShare: number;
  /** 0 <= c < 1: lag-1 correlation of the normal scores of successive orders' lateness. */
  correlation: number;
  /** True: a later order never arrives before an earlier one. */
  keepsSequence: boolean;
  disruption: Disruption | null;
  /** 0..1: each delivered unit fails incoming inspection with this probability. */
  rejectRate: number;
  /** 0..1: a whole delivery is refused with this probability. */
  lotRejectRate: number;
  /** 0..1: this supplier's part of each order; the shares on one buffer sum to 1. */
  share: number;
};

export type Disruption = { meanDaysBetween: number; meanDaysLasting: number };

export type Buffer = {
  kind: "buffer";
  id: string;
  name: string;
  /** Station-fed: number of places. Purchased: order-up-to level or reorder point, as the rule says. */
  size: number;
  /** Null means `size`. */
  startLevel: number | null;
  /** Money per unit held. */
  unitValue: number;
  /** Set exactly where suppliers feed the buffer. */
  replenishment: Replenishment | null;
};

export type Replenishment = {
  rule: "orderUpTo" | "reorderPoint";
  reviewDays: number;
  lot: number | null;
  minimumOrder: number;
  orderMultiple: number;
};

export type Station = {
  kind: "station";
  id: string;
  name: string;
  /** Mean work per unit. */
  cycleMinutes: number;
  /** Coefficient of variation of the work per unit. */
  cycleCv: number;
  /** Workplaces, modelled as one workplace of `parallel`-fold speed. */
  parallel: number;
  /** 0..1 per finished unit. */
  scrapRate: number;
  stoppages: Stoppages | null;
};

export type Stoppages =
  | { pattern: "perTick"; upProbability: number }
  | {
      pattern: "upDown";
      meanUpHours: number;
      meanDownHours: number;
      downCv: number | null;
      clock: "running" | "always";
    };

export type Customer = {
  kind: "customer";
  id: string;
  name: string;
  weeklyDemand: Distribution;
  /** -1 < c < 1: lag-1 correlation of the normal scores, week to week. */
  correlation: number;
  callOff: "daily" | "weekly";
  unmet: "backorder" | "lost";
  /** Money per unit and week late. */
  lateFine: number;
};

/** `mean` and `sd` are those of the quantity itself, also for the lognormal. */
export type Distribution =
  | { type: "fixed"; value: number }
  | { type: "normal"; mean: number; sd: number }
  | { type: "lognormal"; mean: number; sd: number }
  | { type: "gamma"; mean: number; sd: number }
  | { type: "weibull"; shape: number; scale: number }
  | { type: "exponential"; mean: number }
  | { type: "uniform"; min: number; max: number }
  | { type: "triangular"; min: number; mode: number; max: number }
  | { type: "poisson"; mean: number }
  | { type: "negativeBinomial"; mean: number; sd: number }
  | { type: "empirical"; values: number[] };

type Gaps<T> = T extends number
  ? number | null
  : T extends (infer U)[]
    ? Gaps<U>[]
    : T extends object
      ? { [K in keyof T]: Gaps<T[K]> }
      : T;

/** A line being drawn: the same shape, in which any number may still be missing (`null`). Only `parseLine` decides whether it runs. */
export type DraftLine = Gaps<Line>;
export type DraftNode = DraftLine["nodes"][number];
export type DraftOf<K extends NodeKind> = Extract<DraftNode, { kind: K }>;
export type DraftDistribution = Gaps<Distribution>;

/** One thing that keeps a line from running; `node` or `link` says where, `path` which field ("stoppages.meanUpHours"). */
export type Fault = { message: string; node?: string; link?: { from: string; to: string }; path?: string };

/** Where nodes stand on the sheet (top left corner, px at 100 %); kept beside the document. Missing nodes are placed automatically. */
export type Layout = { positions: Record<string, { x: number; y: number }> };

/** A remark on the sheet, kept beside the document. `at` is an ISO 8601 instant. */
export type Note = { id: string; x: number; y: number; text: string; author: string; at: string };

/** The exchange file. Import takes this or a bare line document. */
export type LineFile = { line: DraftLine; layout: Layout; notes: Note[] };
