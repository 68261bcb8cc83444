/** How a run is made. The run is a function of the line, these options and nothing else. */
export type RunOptions = {
  /** Seed phrase: any text. */
  seed: string;
  replications: number;
  /** Recorded weeks of each replication, after `warmupWeeks` unrecorded ones. */
  weeks: number;
  warmupWeeks: number;
  /** 0..1; a week below it counts towards `summary.risk`. */
  targetFillRate: number;
  /** Index of the first replication, default 0; parts of one run differ in it. */
  firstReplication?: number;
};

/** A simulated figure. `halfWidth` is the 95 % half-width by sectioning, null where there is none; `bound` stands in its place for a share that came out 0 or 1. */
export type Figure = { value: number; halfWidth: number | null; bound?: number };

export type CauseReason = "down" | "late" | "disrupted" | "size" | "pace";

export type Summary = {
  mean: Figure;
  p01: Figure;
  p05: Figure;
  p10: Figure;
  p25: Figure;
  p50: Figure;
  /** Share of weeks below the target fill rate. */
  risk: Figure;
  /** Share of weeks in which all of the week's demand shipped on time. */
  weeksInFull: Figure;
  /** Mean units owed at week end. */
  backlog: Figure;
  moneyTiedUp: Figure;
  /** Share of weeks with overtime. */
  overtimeWeeks: Figure;
  costPerYear: { carrying: Figure; fines: Figure; overtime: Figure; scrap: Figure; total: Figure };
};

export type BufferReading = {
  mean: Figure;
  empty: Figure;
  full: Figure;
  p10: number;
  p50: number;
  p90: number;
  /** Units on order over day ends; null for a station-fed buffer. */
  meanOnOrder: number | null;
};

/** Shares of work time, overtime included. */
export type StationReading = {
  working: Figure;
  down: Figure;
  starved: Figure;
  blocked: Figure;
  /** By input buffer id. */
  starvedBy: Record<string, Figure>;
  goodPerWeek: Figure;
  scrapPerWeek: Figure;
};

export type SupplierReading = {
  ordersPerWeek: Figure;
  unitsOrderedPerWeek: Figure;
  lateShare: Figure;
  /** Working days. */
  meanLateness: Figure;
  rejectedPerWeek: Figure;
  refusedPerWeek: Figure;
  disruptedShare: Figure;
};

export type Cause = { node: string; reason: CauseReason; hoursPerWeek: Figure };

/** What a run found. `tallies` carries what merging and further figures need; screens read the rest. */
export type RunResult = {
  format: "forebay.result/1";
  engine: string;
  options: RunOptions;
  /** replications x weeks, row = replication; NaN = no demand. */
  fillRates: Float32Array;
  summary: Summary;
  buffers: Record<string, BufferReading>;
  stations: Record<string, StationReading>;
  suppliers: Record<string, SupplierReading>;
  customers: Record<string, { mean: Figure; p10: Figure; risk: Figure }>;
  causes: Cause[];
  tallies: Tallies;
};

/** Opaque outside `lib/simulation`. The kernel's author defines its fields in `tallies.ts`. */
export type { Tallies } from "./tallies";
import type { Tallies } from "./tallies";
