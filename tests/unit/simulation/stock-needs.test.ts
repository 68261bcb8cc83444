import { describe, expect, it } from "vitest";
import { exampleLine } from "@/lib/line/example";
import { simulate, stockNeeds } from "@/lib/simulation";
import { levelPercentile } from "@/lib/simulation/percentile";
import { findNeeds } from "@/lib/sizing/needs";
import { withSizes } from "@/lib/sizing/problem";
import { poissonLaw, sumLaw } from "@/tests/helpers/demand-law";
import { customer, line, periodic, purchased, supplier } from "@/tests/helpers/small-lines";

const options = { seed: "needs", replications: 6, weeks: 8, warmupWeeks: 2, targetFillRate: 0.95 };

describe("stockNeeds", () => {
  const found = stockNeeds(exampleLine, options);

  it("has a need for every replication, week, day and buffer", () => {
    expect(found.needs).toHaveLength(6 * 8 * 5 * 14);
    expect(found).toMatchObject({ nReplications: 6, nWeeks: 8, daysPerWeek: 5 });
  });

  it("is the size less the level at each day's end, as the run itself counts levels", () => {
    const result = simulate(exampleLine, options);
    const owed = new Set(exampleLine.links.flatMap(({ from, to }) => (to.startsWith("cus") ? [from] : [])));
    found.bufferIds.forEach((id, b) => {
      const node = exampleLine.nodes.find((one) => one.id === id);
      if (node?.kind !== "buffer" || owed.has(id)) return;
      const levels = Array.from({ length: found.needs.length / 14 }, (_, i) => node.size - found.needs[i * 14 + b]);
      levels.sort((x, y) => x - y);
      for (const p of [0, 0.1, 0.5, 0.9])
        expect(levels[Math.floor(levels.length * p + 1e-9)], id).toBe(levelPercentile(result, id, p));
    });
  });

  it("gives the same needs for a replication run on its own", () => {
    const own = stockNeeds(exampleLine, { ...options, replications: 1, firstReplication: 4 });
    const width = own.needs.length;
    expect([...own.needs]).toEqual([...found.needs.subarray(4 * width, 5 * width)]);
  });
});

/** A customer who draws on a purchased buffer: Poisson 4 a period of one day, lead 2, looked at every period. */
const store = line(
  [supplier("s", 2), purchased("store", 6), customer("c", { type: "poisson", mean: 4 })],
  [
    ["s", "store"],
    ["store", "c"],
  ],
  { calendar: periodic },
);
const long = { seed: "store", replications: 40, weeks: 500, warmupWeeks: 20, targetFillRate: 1 };

describe("findNeeds", () => {
  it("finds the base stock that covers the demand of lead time and period, whatever the size of today", async () => {
    // What is out at a period's end is the demand of lead time and period, three periods of Poisson 4: exact law.
    const law = sumLaw(poissonLaw(4), 3);
    const exact = (risk: number) => {
      let [sum, units] = [0, -1];
      while (sum < 1 - risk) sum += law[++units];
      return units;
    };
    for (const risk of [0.05, 0.1, 0.3]) {
      const [need] = await findNeeds(store, long, risk, async (one, how) => stockNeeds(one, how));
      expect(Math.abs(need.week.covered - exact(risk))).toBeLessThanOrEqual(1);
      expect(need.isOpenEnded).toBe(true);
      expect(need.size).toBe(6);
      expect(need.year.covered).toBeGreaterThan(need.week.covered);
      expect(need.days).toHaveLength(1);
      expect(need.weeks).toHaveLength(500);
    }
  });

  it("agrees with the run: at the size found, the buffer is not dry in all but the accepted share of days", async () => {
    const [need] = await findNeeds(store, long, 0.1, async (one, how) => stockNeeds(one, how));
    const dry = (size: number) => {
      const { needs } = stockNeeds(withSizes(store, { store: size }), long);
      return needs.filter((units) => units > size).length / needs.length;
    };
    expect(dry(need.week.covered)).toBeLessThanOrEqual(0.1);
    expect(dry(need.week.covered - 1)).toBeGreaterThan(0.1);
  });

  it("keeps stock that stations fill at its size and does not claim to see beyond it", async () => {
    const needs = await findNeeds(exampleLine, options, 0.1, async (one, how) => stockNeeds(one, how));
    const stator = needs.find(({ id }) => id === "stator")!;
    expect(stator.isOpenEnded).toBe(false);
    expect(stator.week.covered).toBeLessThanOrEqual(48);
    expect(needs.filter(({ isOpenEnded }) => isOpenEnded)).toHaveLength(8);
  });

  it("runs again with more where even ample stock ran dry, and says so where it still did", async () => {
    const asked: number[] = [];
    const far = {
      ...store,
      nodes: store.nodes.map((node) => (node.kind === "supplier" ? { ...node, leadTimeDays: 30 } : node)),
    };
    const [need] = await findNeeds(far, { ...long, replications: 4, weeks: 100 }, 0.1, async (one, how) => {
      const node = one.nodes.find(({ id }) => id === "store");
      if (node?.kind === "buffer") asked.push(node.size);
      return stockNeeds(one, how);
    });
    expect(asked).toEqual([12, 24, 48, 96]);
    expect(need.isOpenEnded).toBe(false);
  });
});
