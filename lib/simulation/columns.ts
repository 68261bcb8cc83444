import type { Shape } from "./tallies";

/** Where each sum stands in a row of `Tallies.sums`. */
export type Columns = {
  count: number;
  ticks: number;
  overtimeWeeks: number;
  /** First column of each node; the offsets below count from it. */
  suppliers: number[];
  buffers: number[];
  stations: number[];
  customers: number[];
  causes: number;
};

export const supplierColumn = {
  orders: 0,
  ordered: 1,
  arrived: 2,
  late: 3,
  /** Days, summed over deliveries. */
  lateness: 4,
  rejected: 5,
  refused: 6,
  disruptedDays: 7,
} as const;
export const supplierWidth = 8;

/** Unit-ticks, ticks, ticks, unit-days. */
export const bufferColumn = { level: 0, empty: 1, full: 2, onOrder: 3 } as const;
export const bufferWidth = 4;

/** Idle times in ticks of one workplace; from `starvedBy` on one column an input. */
export const stationColumn = { down: 0, blocked: 1, good: 2, scrap: 3, starvedBy: 4 } as const;

/** Unit-weeks: owed at week end before lost demand is cancelled, and after. */
export const customerColumn = { owed: 0, backlog: 1 } as const;
export const customerWidth = 2;

export function layoutColumns(shape: Shape): Columns {
  let count = 2;
  const reserve = (width: number): number => {
    count += width;
    return count - width;
  };
  return {
    ticks: 0,
    overtimeWeeks: 1,
    suppliers: shape.suppliers.map(() => reserve(supplierWidth)),
    buffers: shape.buffers.map(() => reserve(bufferWidth)),
    stations: shape.stations.map((station) => reserve(stationColumn.starvedBy + station.inputs.length)),
    customers: shape.customers.map(() => reserve(customerWidth)),
    causes: reserve(shape.causes.length),
    count,
  };
}
