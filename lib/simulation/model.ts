import type { Key, Purpose } from "@/lib/random/streams";
import type { WholeQuantile } from "@/lib/random/whole-quantile";
import type { WorkTable } from "@/lib/random/work-table";
import type { Columns } from "./columns";
import type { Shape } from "./tallies";

/** Whole-number record of a buffer in `State.buffers`: where each field stands. */
export const buf = {
  level: 0,
  /** Station-fed: places neither filled nor reserved. Purchased: size - 1 - level, so negative while it is full. */
  free: 1,
  /** Purchased: tick of this stretch since whose end the level has been 0; means nothing while it is not. */
  emptySince: 2,
  /** The same for no free place. */
  fullSince: 3,
  /** Purchased: ticks of this stretch that ended full and are over. */
  full: 4,
  /** Purchased: today's cause of a shortage; -1: station-fed. */
  cause: 5,
  /** Station-fed: record of the first feeding station. */
  feeder: 6,
} as const;
export const bufStride = 7;

/** Whole-number record of a station in `State.stations`, in the order of service. */
export const sta = {
  /** Down ticks left; 0: not drawn yet, if the station is down. */
  down: 0,
  /** Last tick of this stretch in which the station is up; in later ones it is down. */
  lastUp: 1,
  /** What `next` is when a unit that turns out scrap has been started; may lie beyond the block. */
  scrapAt: 2,
  /** Next work amount, an index of `State.reals`, and the end of the station's block there. */
  next: 3,
  end: 4,
  /** Record of the output buffer. */
  out: 5,
  /** Inputs: from and to in `Model.inputs`. */
  inputs: 6,
  inputsEnd: 7,
  /** Tick of this stretch last lost by being down or by a missing input, -1 for the stretch's eve, less for none. */
  lostTick: 8,
  /** What was lost by: -1 down, else the record of the buffer that lacked. */
  lostBy: 9,
  /** By how much a wholly idle tick moves `lastUp`: 0 where the clock runs always, else 1. */
  idleStep: 10,
  /** 1: feeds a buffer that customers draw on, so its losses are charged to causes. */
  isCharged: 11,
  /** Cause "down"; "pace" is the next. */
  cause: 12,
  /** Ends of ticks of this stretch with the output buffer empty, plus 2^16 times those with no free place. */
  outEnds: 13,
  /** 1: served last of the stations that feed its output, so that `outEnds` is what the tick ended with. */
  closesOut: 14,
  /** Kits left until `turnKits` has to look at the purchased parts that this station alone takes; 0: one is missing. */
  kits: 15,
  /** `kits` as it was when their levels were last brought up to date. */
  kitsFrom: 16,
  /** Those parts: from and to in `Model.inputs`, past the inputs of all stations. */
  kit: 17,
  kitEnd: 18,
  /** The station's other inputs: from and to in `State.ints`. */
  open: 19,
  openEnd: 20,
  /** 1: some of the other inputs are purchased. */
  sharesStock: 21,
} as const;
export const staStride = 22;

/** Fractional record of a station in `State.amounts`. Areas are sums of tick numbers of this stretch. */
export const amt = {
  speed: 0,
  /** Ticks of work left on the unit in work; 0: none in work. */
  left: 1,
  startArea: 2,
  goodArea: 3,
  blocked: 4,
  down: 5,
  scrapped: 6,
  /** Units started are this plus `next`. */
  startedBefore: 7,
} as const;
export const amtStride = 8;

/** Work amounts drawn at a time. */
export const blockLength = 128;

export type StationModel = {
  /** Index in the document's stations. */
  index: number;
  /** Mean work of a unit, ticks. */
  work: number;
  /** Null: every unit takes the mean. */
  table: WorkTable | null;
  /** `lnFailure` of the scrap rate; null: no scrap. */
  scrap: number | null;
  /** Geometric times by `lnFailure` of a tick's being the last; `startsDown`: chance of the very first tick. */
  stoppages: null | {
    startsDown: number;
    upEnds: number;
    down: { ends: number } | { mean: number; cv: number };
  };
  streams: { work: number; scrap: number; stoppage: number };
};

export type BufferModel = {
  size: number;
  startLevel: number;
  isPurchased: boolean;
  /** Of `reviewDays` etc. see the document; `lot` 0 means order up to. */
  reviewDays: number;
  lot: number;
  minimumOrder: number;
  orderMultiple: number;
  /** Indices, in link order. */
  suppliers: number[];
  /** Record of the first feeding station in link order, -1 where suppliers feed the buffer. */
  feeder: number;
  /** Index in `Model.groups`, -1 where no customer draws. */
  group: number;
  sizeCause: number;
};

export type SupplierModel = {
  buffer: number;
  quotedDays: number;
  /** Days from order to arrival of a delivery that is not on time; null: every delivery is on time. */
  days: WholeQuantile | null;
  onTimeShare: number;
  correlation: number;
  keepsSequence: boolean;
  /** `lnFailure` of a day's chance. */
  disruption: null | { begins: number; ends: number };
  rejectRate: number;
  lotRejectRate: number;
  share: number;
  /** Cause "disrupted"; "late" is the next. */
  cause: number;
  streams: { lateness: number; disruption: number; reject: number; lot: number };
};

export type CustomerModel = {
  group: number;
  demand: WholeQuantile;
  correlation: number;
  isWeekly: boolean;
  isLost: boolean;
  stream: number;
};

/** Customers of one buffer, in document order. */
export type Group = { buffer: number; customers: Int32Array; isPurchased: boolean };

/** A line made ready to run. Nothing in it changes during a run. */
export type Model = {
  shape: Shape;
  columns: Columns;
  ticksPerDay: number;
  daysPerWeek: number;
  overtimeTicks: number;
  /** Units owed above which the next week has overtime; Infinity: never. */
  overtimeTrigger: number;
  suppliers: SupplierModel[];
  buffers: BufferModel[];
  /** In the order of service, downstream first. */
  stations: StationModel[];
  customers: CustomerModel[];
  groups: Group[];
  /** Pairs (record of the buffer, quantity), station after station in link order; then again, kit and other inputs apart. */
  inputs: Int32Array;
  /** `State.stations` and `State.amounts` at the start. */
  stationStart: Int32Array;
  amountStart: Float64Array;
  /** One for each (node id, purpose), without the seed phrase. */
  streams: { node: string; purpose: Purpose }[];
};

export type StreamKeys = Key[];
