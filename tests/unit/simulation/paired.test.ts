import { describe, expect, it } from "vitest";
import { exampleLine } from "@/lib/line/example";
import { arePaired, pairedDifference, pairedDifferences, percentile, simulate } from "@/lib/simulation";
import { withSizes } from "@/lib/sizing/problem";
import { t975 } from "@/lib/statistics/student";

const options = { seed: "pair", replications: 10, weeks: 12, warmupWeeks: 4, targetFillRate: 0.95 };
const more = withSizes(exampleLine, { pcb: 6000, fg: 160 });
const base = simulate(exampleLine, options);
const edited = simulate(more, options);

/** The same from runs of one replication each, which know nothing of one another. */
function byHand(read: (result: typeof base) => number): { value: number; halfWidth: number } {
  const values = Array.from({ length: 10 }, (_, r) => {
    const own = { ...options, replications: 1, firstReplication: r };
    return read(simulate(more, own)) - read(simulate(exampleLine, own));
  });
  const mean = values.reduce((sum, value) => sum + value, 0) / 10;
  const sd = Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / 9);
  return { value: read(edited) - read(base), halfWidth: (t975(9) * sd) / Math.sqrt(10) };
}

describe("pairedDifferences", () => {
  const found = pairedDifferences(edited, base, 0.1);

  it.each([
    ["atRisk", (result: typeof base) => percentile(result, 0.1).value],
    ["mean", (result: typeof base) => result.summary.mean.value],
    ["risk", (result: typeof base) => result.summary.risk.value],
    ["moneyTiedUp", (result: typeof base) => result.summary.moneyTiedUp.value],
    ["costPerYear", (result: typeof base) => result.summary.costPerYear.total.value],
  ] as const)(
    "%s is the difference of the figures, with the interval of differences of single replications",
    (key, read) => {
      const { value, halfWidth } = byHand(read);
      expect(found[key].value).toBeCloseTo(value, 9);
      expect(found[key].halfWidth! / halfWidth).toBeCloseTo(1, 9);
    },
  );

  it("is tighter than the figures themselves, since both face the same luck", () => {
    expect(found.moneyTiedUp.halfWidth!).toBeLessThan(base.summary.moneyTiedUp.halfWidth! / 2);
    expect(found.costPerYear.halfWidth!).toBeLessThan(base.summary.costPerYear.total.halfWidth!);
  });

  it("turns its sign with its order, and agrees with the difference of one percentile", () => {
    const turned = pairedDifferences(base, edited, 0.1);
    expect(turned.mean.value).toBe(-found.mean.value);
    expect(turned.mean.value).not.toBe(0);
    expect(turned.mean.halfWidth).toBeCloseTo(found.mean.halfWidth!, 12);
    expect(pairedDifference(edited, base, 0.1)).toEqual(found.atRisk);
  });

  it.each([{ seed: "other" }, { replications: 9 }, { weeks: 11 }, { warmupWeeks: 3 }, { firstReplication: 1 }])(
    "refuses runs of other weeks: %o",
    (change) => {
      const other = simulate(exampleLine, { ...options, ...change });
      expect(arePaired(edited, other)).toBe(false);
      expect(() => pairedDifferences(edited, other, 0.1)).toThrow(RangeError);
    },
  );

  it("pairs runs at different targets, each with its own risk", () => {
    const strict = simulate(exampleLine, { ...options, targetFillRate: 1 });
    expect(pairedDifferences(strict, base, 0.1).risk.value).toBeGreaterThan(0);
    expect(pairedDifferences(strict, base, 0.1).atRisk.value).toBe(0);
  });
});
