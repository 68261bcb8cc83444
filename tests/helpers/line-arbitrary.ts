import fc from "fast-check";
import type {
  Buffer,
  Customer,
  Distribution,
  Line,
  LineNode,
  Link,
  Replenishment,
  Station,
  Stoppages,
  Supplier,
} from "@/lib/line/types";

/** Even over the range; fast-check's doubles are mostly near 0. */
const between = (least: number, most: number) => fc.nat(1000).map((part) => least + ((most - least) * part) / 1000);
const share = () => between(0, 1);

const one = fc.constantFrom;

/** A distribution of any type, around `scale`; `least` is -1 for a lateness that may be early. */
function arbitraryDistribution(scale: number, least: 0 | -1): fc.Arbitrary<Distribution> {
  const mean = between(0.1 * scale, scale);
  const sd = fc.oneof(fc.constant(0), between(0.05 * scale, scale));
  const low = between(least * scale, scale);
  const spread = between(0.01 * scale, scale);
  return fc.oneof(
    fc.record({ type: one("fixed" as const), value: low }),
    fc.record({ type: one("normal" as const), mean: low, sd }),
    fc.record({ type: one("lognormal" as const, "gamma" as const), mean, sd }),
    fc.record({ type: one("weibull" as const), shape: between(0.6, 4), scale: mean }),
    fc.record({ type: one("exponential" as const, "poisson" as const), mean }),
    fc.tuple(low, spread).map(([min, by]) => ({ type: "uniform" as const, min, max: min + by })),
    fc
      .tuple(low, spread, share())
      .map(([min, by, part]) => ({ type: "triangular" as const, min, mode: min + part * by, max: min + by })),
    mean.map((value) => ({ type: "negativeBinomial" as const, mean: value, sd: Math.sqrt(value) * 1.3 })),
    fc.array(low, { minLength: 1, maxLength: 5 }).map((values) => ({ type: "empirical" as const, values })),
  );
}

const arbitraryStoppages: fc.Arbitrary<Stoppages | null> = fc.oneof(
  fc.constant(null),
  fc.record({ pattern: one("perTick" as const), upProbability: between(0.3, 1) }),
  fc.record({
    pattern: one("upDown" as const),
    meanUpHours: between(0.1, 10),
    meanDownHours: between(0.1, 3),
    downCv: one(null, 0, 0.5, 1.2),
    clock: one("running" as const, "always" as const),
  }),
);

const arbitraryStation: fc.Arbitrary<Omit<Station, "id" | "name">> = fc.record({
  kind: one("station" as const),
  cycleMinutes: between(5, 90),
  cycleCv: one(0, 0, 0.3, 1),
  parallel: fc.integer({ min: 1, max: 3 }),
  scrapRate: one(0, 0.05, 0.4),
  stoppages: arbitraryStoppages,
});

const arbitraryReplenishment: fc.Arbitrary<Replenishment> = fc
  .record({ reviewDays: fc.integer({ min: 1, max: 8 }), lot: fc.integer({ min: 1, max: 12 }), isLot: fc.boolean() })
  .chain(({ reviewDays, lot, isLot }) =>
    fc.record({
      rule: fc.constant(isLot ? ("reorderPoint" as const) : ("orderUpTo" as const)),
      reviewDays: fc.constant(reviewDays),
      lot: fc.constant(isLot ? lot : null),
      minimumOrder: one(0, 3, 10),
      orderMultiple: one(1, 1, 4),
    }),
  );

const arbitrarySupplier: fc.Arbitrary<Omit<Supplier, "id" | "name" | "share">> = fc.record({
  kind: one("supplier" as const),
  leadTimeDays: fc.oneof(fc.integer({ min: 0, max: 6 }), between(0, 6)),
  lateness: fc.option(arbitraryDistribution(4, -1), { nil: null }),
  onTimeShare: one(0, 0.4, 0.9, 1),
  correlation: one(0, 0, 0.6),
  keepsSequence: fc.boolean(),
  disruption: fc.option(fc.record({ meanDaysBetween: between(1, 20), meanDaysLasting: between(1, 6) }), {
    nil: null,
  }),
  rejectRate: one(0, 0.1),
  lotRejectRate: one(0, 0.1),
});

const arbitraryCustomer: fc.Arbitrary<Omit<Customer, "id" | "name">> = fc.record({
  kind: one("customer" as const),
  weeklyDemand: arbitraryDistribution(30, 0),
  correlation: one(0, 0, 0.5, -0.5),
  callOff: one("daily" as const, "weekly" as const),
  unmet: one("backorder" as const, "lost" as const),
  lateFine: one(0, 7),
});

/** What a line hangs together like; numbers are indices. */
type Plan = {
  nPurchased: number;
  /** By station-fed buffer, in the order of the flow. */
  nFed: number;
  /** The first `nFed` stations feed one buffer each, the others any. */
  stations: { output: number; inputs: number[] }[];
  customers: number[];
};

/** Inputs below `nPurchased` are purchased buffers, from there on station-fed ones; those lie before the output. */
const arbitraryPlan: fc.Arbitrary<Plan> = fc
  .record({ nPurchased: fc.integer({ min: 1, max: 3 }), nFed: fc.integer({ min: 1, max: 3 }), nMore: fc.nat(1) })
  .chain(({ nPurchased, nFed, nMore }) => {
    const station = (output: fc.Arbitrary<number>) =>
      output.chain((out) =>
        fc.record({
          output: fc.constant(out),
          inputs: fc.uniqueArray(fc.nat(nPurchased + out - 1), { minLength: 1, maxLength: 3 }),
        }),
      );
    return fc.record({
      nPurchased: fc.constant(nPurchased),
      nFed: fc.constant(nFed),
      stations: fc.tuple(
        ...Array.from({ length: nFed }, (_, i) => station(fc.constant(i))),
        ...Array.from({ length: nMore }, () => station(fc.nat(nFed - 1))),
      ),
      customers: fc.array(fc.nat(nPurchased + nFed - 1), { minLength: 1, maxLength: 3 }),
    });
  });

function arbitraryParts(plan: Plan): fc.Arbitrary<Line> {
  const nBuffers = plan.nPurchased + plan.nFed;
  const taken = new Set([...plan.stations.flatMap(({ inputs }) => inputs), ...plan.customers]);
  // Whatever nobody takes goes to a customer.
  const customers = [...plan.customers, ...Array.from({ length: nBuffers }, (_, b) => b).filter((b) => !taken.has(b))];
  return fc
    .record({
      suppliers: fc.tuple(
        ...Array.from({ length: plan.nPurchased }, () => fc.array(arbitrarySupplier, { minLength: 1, maxLength: 2 })),
      ),
      split: share(),
      replenishments: fc.tuple(...Array.from({ length: plan.nPurchased }, () => arbitraryReplenishment)),
      buffers: fc.tuple(
        ...Array.from({ length: nBuffers }, () =>
          fc.record({
            size: fc.integer({ min: 1, max: 40 }),
            startLevel: fc.option(share(), { nil: null }),
            unitValue: one(0, 2.5),
          }),
        ),
      ),
      stations: fc.tuple(...plan.stations.map(() => arbitraryStation)),
      customers: fc.tuple(...customers.map(() => arbitraryCustomer)),
      quantities: fc.array(fc.integer({ min: 1, max: 3 }), { minLength: 9, maxLength: 9 }),
      calendar: fc.record({
        tickMinutes: fc.constant(30),
        hoursPerDay: one(1, 2, 3.5),
        daysPerWeek: fc.integer({ min: 1, max: 7 }),
        weeksPerYear: fc.constant(48),
      }),
      overtime: fc.option(
        fc.record({ backlogTrigger: one(0, 5), hoursPerWeek: between(0.2, 6), costPerHour: one(0, 40) }),
        { nil: null },
      ),
      order: fc.infiniteStream(share()),
    })
    .map(({ suppliers, split, replenishments, buffers, stations, quantities, calendar, overtime, order, ...parts }) => {
      const nodes: LineNode[] = [];
      const links: Link[] = [];
      const bufferId = (b: number) => `buffer-${b}`;
      buffers.forEach(({ size, startLevel, unitValue }, b) =>
        nodes.push({
          kind: "buffer",
          id: bufferId(b),
          name: `Stock ${b}`,
          size,
          startLevel: startLevel === null ? null : Math.floor(startLevel * size),
          unitValue,
          replenishment: replenishments[b] ?? null,
        } satisfies Buffer),
      );
      suppliers.forEach((own, b) =>
        own.forEach((supplier, k) => {
          const id = `supplier-${b}-${k}`;
          nodes.push({ ...supplier, id, name: id, share: own.length === 1 ? 1 : k === 0 ? split : 1 - split });
          links.push({ from: id, to: bufferId(b) });
        }),
      );
      stations.forEach((station, i) => {
        const id = `station-${i}`;
        nodes.push({ ...station, id, name: id });
        plan.stations[i].inputs.forEach((b, k) => {
          const quantity = quantities[(3 * i + k) % quantities.length];
          links.push({ from: bufferId(b), to: id, ...(quantity === 1 ? {} : { quantity }) });
        });
        links.push({ from: id, to: bufferId(plan.nPurchased + plan.stations[i].output) });
      });
      parts.customers.forEach((customer, i) => {
        const id = `customer-${i}`;
        nodes.push({ ...customer, id, name: id });
        links.push({ from: bufferId(customers[i]), to: id });
      });
      return {
        format: "forebay.line/1" as const,
        name: "Random line",
        calendar,
        money: { currency: "EUR", carryingRate: 0.2 },
        overtime,
        nodes: shuffle(nodes, order),
        links: shuffle(links, order),
      };
    });
}

function shuffle<T>(items: readonly T[], order: fc.Stream<number>): T[] {
  const keyed = items.map((item) => ({ item, at: order.next().value ?? 0 }));
  return keyed.sort((a, b) => a.at - b.at).map(({ item }) => item);
}

/** Small lines of every kind of node and setting, in any document order, free of faults. */
export const arbitraryLine: fc.Arbitrary<Line> = arbitraryPlan.chain(arbitraryParts);
