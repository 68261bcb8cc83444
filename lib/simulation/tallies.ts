import type { CauseReason } from "./types";

/** What the figures need to know of the line. Nodes are in document order, inputs in link order. */
export type Shape = {
  tickMinutes: number;
  daysPerWeek: number;
  weeksPerYear: number;
  carryingRate: number;
  overtimeCostPerWeek: number;
  suppliers: { id: string }[];
  buffers: { id: string; unitValue: number; isPurchased: boolean }[];
  /** `scrapValue`: money in one unit's inputs. */
  stations: { id: string; parallel: number; scrapValue: number; inputs: string[] }[];
  customers: { id: string; lateFine: number }[];
  causes: { node: string; reason: CauseReason }[];
};

/** How often each stock level stood at the end of a regular day; levels ascend. */
export type LevelCounts = { levels: Int32Array; counts: Float64Array };

/** Raw counts of a run, one row a replication, from which every figure follows; kept so that runs can be merged exactly. */
export type Tallies = {
  shape: Shape;
  /** Indices of the replications present, ascending. */
  replications: Int32Array;
  /** Sums over recorded weeks: replications x columns (see `layoutColumns`), row-major. */
  sums: Float64Array;
  /** Units: replications x weeks x customers, row-major. */
  demand: Int32Array;
  /** Units of that demand shipped by the week's end, laid out as `demand`. */
  onTime: Int32Array;
  /** Whole units summed over replications, warm-up included: weeks x (on time, demand, backlog, then the level of each buffer at week end). */
  weekSums: Float64Array;
  /** By buffer. */
  dayLevels: LevelCounts[];
};
