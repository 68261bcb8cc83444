import { describe, expect, it } from "vitest";
import type { Distribution } from "@/lib/line/types";
import { type Figure, type RunOptions, type RunResult, simulate } from "@/lib/simulation";
import { addLaws, baseStock, expect as mean, poissonLaw, roundedNormalLaw, sumLaw } from "@/tests/helpers/demand-law";
import { customer, line, periodic, purchased, supplier } from "@/tests/helpers/small-lines";
import { exactOf, nameOf } from "./cases";

// A week of one day of one tick is a period: receive, order up to the size, then demand, as the cases have it.

const options: RunOptions = { seed: "truth", replications: 100, weeks: 4_000, warmupWeeks: 20, targetFillRate: 1 };

type Stock = {
  size: number;
  lead: number;
  demand: Distribution;
  replenishment?: Partial<NonNullable<ReturnType<typeof purchased>["replenishment"]>>;
  more?: Parameters<typeof supplier>[2];
  unmet?: "backorder" | "lost";
};

/** A customer who draws on a purchased buffer, and nothing else. */
function stock({ size, lead, demand, replenishment, more, unmet = "backorder" }: Stock) {
  const store = purchased("store", size);
  return line(
    [
      supplier("s", lead, more),
      { ...store, replenishment: { ...store.replenishment!, ...replenishment } },
      customer("c", demand, { unmet }),
    ],
    [
      ["s", "store"],
      ["store", "c"],
    ],
    { calendar: periodic },
  );
}

/** Within twice the 95 % half-width, about four standard errors, and the little that is given beside it. */
function near({ value, halfWidth }: Figure, exact: number, beside = 0): void {
  expect(halfWidth).not.toBeNull();
  // The interval is the product's own: one that came out wide would let anything pass.
  expect(halfWidth!).toBeLessThan(0.04 * Math.max(Math.abs(exact), 0.5));
  expect(Math.abs(value - exact)).toBeLessThan(2 * halfWidth! + beside);
}

/** Share of all units that ship in the period they are due in, which is what the texts call fill rate. */
function shareOfUnits({ tallies, options: { replications } }: RunResult): Figure {
  const width = tallies.demand.length / replications;
  const shares = Array.from({ length: replications }, (_, r) => {
    const sum = (units: Int32Array) => units.subarray(r * width, (r + 1) * width).reduce((a, b) => a + b, 0);
    return sum(tallies.onTime) / sum(tallies.demand);
  });
  const value = shares.reduce((a, b) => a + b, 0) / replications;
  const variance = shares.reduce((a, b) => a + (b - value) ** 2, 0) / (replications - 1);
  return { value, halfWidth: 1.96 * Math.sqrt(variance / replications) };
}

type Exact = { periodService: number; avgBackorderEnd: number; avgOnHandEnd: number; fillRate: number };

describe("base stock under periodic review", () => {
  it("E08: weekly N(2500, 500), lead 2, review 4", () => {
    const exact = exactOf<Exact & { OUL: number }>("E08");
    const size = Math.round(exact.OUL);
    const demand = { type: "normal" as const, mean: 2500, sd: 500 };
    const result = simulate(stock({ size, lead: 2, demand, replenishment: { reviewDays: 4 } }), options);
    near(result.summary.weeksInFull, exact.periodService, 1e-4);
    near(result.summary.backlog, exact.avgBackorderEnd, 0.05);
    near(result.buffers.store.mean, exact.avgOnHandEnd, 0.5);
    near(shareOfUnits(result), exact.fillRate, 1e-5);
  });

  it("E06: Poisson 1.5 a day, lead 3: short at 8, 90 % of units at 9", () => {
    const exact = exactOf<{ pShort_S8: number; fill8: number; fill9: number; backorder8: number; backorder9: number }>(
      "E06",
    );
    const law = poissonLaw(1.5);
    const demand = { type: "poisson" as const, mean: 1.5 };
    for (const [size, fillRate, backlog] of [
      [8, exact.fill8, exact.backorder8],
      [9, exact.fill9, exact.backorder9],
    ]) {
      const own = baseStock(law, size, 3, 1);
      expect(own.fillRate, nameOf("E06")).toBeCloseTo(fillRate, 8);
      expect(own.backlog).toBeCloseTo(backlog, 8);
      const result = simulate(stock({ size, lead: 3, demand }), options);
      near(result.summary.backlog, backlog);
      near(result.buffers.store.mean, own.onHand);
      near(shareOfUnits(result), fillRate);
      // Weeks without demand are left out of the share in full, so that it is told of the others.
      const due = 1 - law[0];
      const inFullAndDue = own.inFull - law[0] * mean(sumLaw(law, 3), (units) => (units <= size ? 1 : 0));
      near(result.summary.weeksInFull, inFullAndDue / due);
    }
    expect(1 - baseStock(law, 8, 3, 1).inFull).toBeCloseTo(exact.pShort_S8, 8);
  });

  it("E04: weekly N(40, 20), lead 2: half of the periods are short at the mean of 120", () => {
    const exact = exactOf<{ onHand_S120: number; fillRate_S120: number; periodService_S120: number }>("E04");
    const result = simulate(stock({ size: 120, lead: 2, demand: { type: "normal", mean: 40, sd: 20 } }), options);
    // The line draws whole units, none below 0, where the text has any real number: its own law differs a little.
    const own = baseStock(roundedNormalLaw(40, 20), 120, 2, 1);
    // Its mean is 0.17 above 40, so that three periods need half a unit more.
    expect(Math.abs(own.onHand - exact.onHand_S120), nameOf("E04")).toBeLessThan(0.5);
    expect(Math.abs(own.inFull - exact.periodService_S120)).toBeLessThan(0.01);
    expect(Math.abs(own.fillRate - exact.fillRate_S120)).toBeLessThan(0.01);
    near(result.buffers.store.mean, own.onHand);
    near(result.summary.backlog, own.backlog);
    near(shareOfUnits(result), own.fillRate);
  });

  it("E17: orders that overtake one another", () => {
    const exact = exactOf<{ periodService: number; avgBackorderEnd: number; constL2_service: number }>("E17");
    const demand = { type: "poisson" as const, mean: 3 };
    const lateness: Distribution = { type: "empirical", values: [-1, 0, 0, 1] };
    const run = (keepsSequence: boolean) =>
      simulate(stock({ size: 14, lead: 2, demand, more: { lateness, onTimeShare: 0, keepsSequence } }), options);
    const overtaking = run(false);
    near(overtaking.summary.backlog, exact.avgBackorderEnd);
    // Not there yet at a period's end: its own demand, that of the last period, and with the chance that the order for
    // it takes longer the two before. A period counts as in full only if it has demand.
    const law = poissonLaw(3);
    const open = (chance: number) => law.map((p, k) => chance * p + (k === 0 ? 1 - chance : 0));
    const before = addLaws(law, open(0.75), open(0.25));
    const within = (units: number) => (units <= 14 ? 1 : 0);
    const inFull = mean(addLaws(law, before), within);
    expect(inFull, nameOf("E17")).toBeCloseTo(exact.periodService, 8);
    near(overtaking.summary.weeksInFull, (inFull - law[0] * mean(before, within)) / (1 - law[0]));
    // In sequence, lead times only grow: more is owed; without variation, less.
    expect(run(true).summary.backlog.value).toBeGreaterThan(exact.avgBackorderEnd * 1.1);
    const fixed = simulate(stock({ size: 14, lead: 2, demand }), options);
    const own = baseStock(poissonLaw(3), 14, 2, 1);
    expect(own.inFull).toBeCloseTo(exact.constL2_service, 8);
    near(fixed.summary.backlog, own.backlog);
  });
});

describe("reorder point with lots", () => {
  it("E13: Poisson 2 a period, point 6, lots of 10, lead 2; at the point counts as below", () => {
    const exact = exactOf<Exact & { orderFreq: number; fill_strict: number }>("E13");
    const replenishment = { rule: "reorderPoint" as const, lot: 10 };
    const result = simulate(stock({ size: 6, lead: 2, demand: { type: "poisson", mean: 2 }, replenishment }), options);
    near(result.summary.backlog, exact.avgBackorderEnd);
    near(result.buffers.store.mean, exact.avgOnHandEnd);
    near(result.suppliers.s.ordersPerWeek, exact.orderFreq, 1e-4);
    // A period without demand is in full where the two before it left anything owed or not: the position after an
    // order is even over 7..16, and the lead time's demand is Poisson 4.
    const even = Array.from({ length: 10 }, (_, i) => 7 + i);
    const inFull = (periods: number) =>
      even.reduce((sum, size) => sum + mean(sumLaw(poissonLaw(2), periods), (units) => (units <= size ? 0.1 : 0)), 0);
    expect(inFull(3)).toBeCloseTo(exact.periodService, 8);
    const idle = Math.exp(-2);
    near(result.summary.weeksInFull, (inFull(3) - idle * inFull(2)) / (1 - idle));
    near(shareOfUnits(result), exact.fillRate);
    expect(shareOfUnits(result).value, nameOf("E13")).toBeGreaterThan((exact.fillRate + exact.fill_strict) / 2);
  });
});

describe("lost sales", () => {
  it("base stock with lead 1: exact chain of the stock after receipt", () => {
    // The next period begins with the size less what this one sold.
    const [size, law] = [6, poissonLaw(4)];
    let at: number[] = Array.from({ length: size + 1 }, (_, level) => (level === size ? 1 : 0));
    for (let i = 0; i < 500; i++) {
      const next = new Array<number>(size + 1).fill(0);
      at.forEach((p, level) => law.forEach((q, units) => (next[size - Math.min(units, level)] += p * q)));
      at = next;
    }
    const sold = at.reduce((sum, p, level) => sum + p * mean(law, (units) => Math.min(units, level)), 0);
    const result = simulate(stock({ size, lead: 1, demand: { type: "poisson", mean: 4 }, unmet: "lost" }), options);
    near(result.buffers.store.mean, mean(at, (level) => level) - sold);
    near(shareOfUnits(result), sold / 4);
    expect(result.summary.backlog.value).toBe(0);
  });

  it("E01: newsvendor of a season a week, at the published quantity and at the critical ratio", () => {
    const exact = exactOf<{ leftover: number; expProfit: number; lost: number; Qopt: number }>("E01");
    // Five days a week, called off on the first, what is not met by the week's end is lost; the order up to Q of the
    // first day arrives on the second, so that each week ships the lesser of demand and Q.
    const season = (quantity: number) => {
      const store = purchased("store", quantity);
      return simulate(
        line(
          [
            supplier("s", 1),
            { ...store, replenishment: { ...store.replenishment!, reviewDays: 5 } },
            customer("c", { type: "normal", mean: 3192, sd: 1181 }, { unmet: "lost" }),
          ],
          [
            ["s", "store"],
            ["store", "c"],
          ],
          { calendar: { tickMinutes: 60, hoursPerDay: 1, daysPerWeek: 5, weeksPerYear: 52 } },
        ),
        { ...options, weeks: 1_000 },
      );
    };
    const soldOf = ({ tallies }: RunResult) => tallies.onTime.reduce((a, b) => a + b, 0) / tallies.onTime.length;
    const standardError = 1181 / Math.sqrt(100_000);
    const sold = soldOf(season(4196));
    // A line sells nothing below 0: the season's mean is 1.3 units more than the normal's.
    expect(Math.abs(4196 - sold - exact.leftover), nameOf("E01")).toBeLessThan(4 * standardError + 1.3);
    expect(Math.abs(80 * sold - 20 * (4196 - sold) - exact.expProfit)).toBeLessThan(100 * (4 * standardError + 1.3));
    near(season(Math.round(exact.Qopt)).summary.weeksInFull, 0.8, 2e-4);
  });
});

describe("rules of thumb (common practice; e.g. S. Nahmias, Production and Operations Analysis, ch. 5, from memory)", () => {
  const demand: Distribution = { type: "normal", mean: 400, sd: 60 };
  // Sizes and demand are whole: half a unit each, of a standard deviation of 120 over four weeks, where it is densest.
  const half = 0.5 * 0.3989 * (2 / 120);
  const sizeAt = (z: number) => Math.round(400 * 4 + z * 60 * Math.sqrt(4));

  it("stock at the mean of the need leaves about half of the weeks short", () => {
    const { weeksInFull } = simulate(stock({ size: sizeAt(0), lead: 3, demand }), options).summary;
    near({ ...weeksInFull, value: 1 - weeksInFull.value }, 0.5, half);
  });

  it("stock at the 90th percentile of the need leaves about one week in ten short, at the 95th one in twenty", () => {
    // 1.2816 and 1.6449: standard normal quantiles.
    for (const [z, risk] of [
      [1.2816, 0.1],
      [1.6449, 0.05],
    ]) {
      const { weeksInFull } = simulate(stock({ size: sizeAt(z), lead: 3, demand }), options).summary;
      near({ ...weeksInFull, value: 1 - weeksInFull.value }, risk, half);
    }
  });
});
