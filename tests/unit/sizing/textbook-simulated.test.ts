import { describe, expect, it } from "vitest";
import { exampleLine } from "@/lib/line/example";
import type { Replenishment } from "@/lib/line/types";
import { type Figure, type RunOptions, simulate } from "@/lib/simulation";
import { averageSizes, differencesFrom } from "@/lib/sizing/textbook";
import { withSize } from "@/lib/sizing/with-size";
import { daily, normal, reorderPoint, sizeOf, stock } from "@/tests/helpers/one-stock";

describe("sizes in a simulated line that is as the formula has it", () => {
  // Reviewed on a week's first day, two weeks of lead time: what is ordered lasts exactly three weeks, to a week's end.
  const demand = normal(400, 60);
  const of = stock({ calendar: daily, lead: 10, demand, rule: { reviewDays: 5 }, takes: { callOff: "daily" } });
  const options: RunOptions = { seed: "textbook", replications: 40, weeks: 1_000, warmupWeeks: 20, targetFillRate: 1 };
  const riskAt = (size: number): Figure => simulate(withSize(of, "store", size), options).summary.risk;
  // Sizes and weeks' demands are whole: a unit and a half, of a standard deviation of 104, where it is densest.
  const whole = 1.5 * (0.3989 / (60 * Math.sqrt(3)));

  it.each([0.2, 0.1, 0.05])(
    "the textbook size leaves the accepted risk of %d, and is the need within a few units",
    (risk) => {
      const { size, leadDays } = sizeOf(of, risk);
      expect(leadDays).toBe(15);
      const { value, halfWidth } = riskAt(size);
      expect(halfWidth!).toBeLessThan(0.01);
      expect(Math.abs(value - risk)).toBeLessThan(2 * halfWidth! + whole);
      // 12 units are 0.12 standard deviations.
      expect(riskAt(size - 12).value).toBeGreaterThan(risk);
      expect(riskAt(size + 12).value).toBeLessThan(risk);
    },
  );

  it("the plan on averages leaves about half of the weeks short (common practice)", () => {
    const { store } = averageSizes(of);
    expect(store).toBe(1200);
    const { value, halfWidth } = riskAt(store);
    expect(Math.abs(value - 0.5)).toBeLessThan(2 * halfWidth! + whole);
  });

  it("averageSizes: quoted lead time only, review for an order-up-to level only", () => {
    const late = { lateness: normal(3, 1), onTimeShare: 0 };
    const base = { calendar: daily, lead: 2.6, demand, more: late };
    expect(averageSizes(stock({ ...base, rule: { reviewDays: 5 } }))).toEqual({ store: 80 * 8 });
    expect(averageSizes(stock({ ...base, rule: { ...reorderPoint, reviewDays: 5 } }))).toEqual({ store: 80 * 3 });
  });
});

describe("differencesFrom", () => {
  const calm = { calendar: daily, lead: 2, demand: normal(100, 10) };

  it("says that a reorder point is looked at now and then only, and nothing of a line that is as the formula has it", () => {
    const saidOf = (rule: Partial<Replenishment>) => differencesFrom(stock({ ...calm, rule }), "store");
    expect(saidOf({})).toEqual([]);
    expect(saidOf(reorderPoint)).toEqual(["its stock is looked at once a day, and by then may be below the point"]);
    expect(saidOf({ ...reorderPoint, reviewDays: 5 })[0]).toMatch(/every 5 days/);
  });

  it("names what the line has and the formula has not", () => {
    const more = {
      lateness: { type: "gamma", mean: 1, sd: 1 },
      onTimeShare: 0.5,
      correlation: 0.3,
      rejectRate: 0.01,
    } as const;
    const disruption = { meanDaysBetween: 100, meanDaysLasting: 2 };
    const rule = { minimumOrder: 5, orderMultiple: 10 };
    expect(differencesFrom(stock({ ...calm, rule, more: { ...more, disruption } }), "store")).toEqual([
      "its supplier is disrupted at times",
      "late deliveries follow one another",
      "its lead time does not follow the normal curve",
      "units or lots are rejected",
      "orders are rounded up to multiples",
      "orders have a minimum",
    ]);
    const evenly = { lateness: normal(1, 1), onTimeShare: 0 };
    expect(differencesFrom(stock({ ...calm, more: evenly }), "store")).toEqual([]);
    expect(differencesFrom(exampleLine, "lam")).toContain(
      "the stations even out demand, and stock further down covers for it",
    );
  });
});
