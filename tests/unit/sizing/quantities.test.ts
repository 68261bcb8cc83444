import { describe, expect, it } from "vitest";
import { meanOf, sdOf } from "@/lib/line/distribution-mean";
import { exampleLine } from "@/lib/line/example";
import type { Distribution } from "@/lib/line/types";
import { quantitiesOf, readQuantity, scaleDistribution, variedNodes, withQuantity } from "@/lib/sizing/quantities";
import { listRange, mostSizes, readSizes, sizeKind, suggestRange } from "@/lib/sizing/sweep";
import { kindOf } from "@/components/compare/sweep-values";

const find = (node: string | null, path: string) => {
  const found = quantitiesOf(exampleLine, node).find((quantity) => quantity.path === path);
  if (!found) throw new Error(`no ${path}`);
  return found;
};

describe("quantitiesOf", () => {
  it("lists every number of a node in the trade's words", () => {
    expect(quantitiesOf(exampleLine, "lam").map(({ path }) => path)).toEqual(
      expect.arrayContaining(["size", "unitValue", "replenishment.reviewDays"]),
    );
    expect(find("lam", "size")).toEqual({ node: "lam", path: "size", name: "size", unit: "units", isWhole: true });
    expect(find("sup-lam", "leadTimeDays")).toMatchObject({ unit: "days", isWhole: false });
    expect(find("sup-lam", "onTimeShare")).toMatchObject({ unit: "%" });
    expect(find("wind", "scrapRate")).toMatchObject({ unit: "%" });
    expect(find("wind", "cycleMinutes")).toMatchObject({ unit: "min" });
    expect(find(null, "demand").name).toMatch(/demand of all customers/);
  });

  it("reads and changes each of them on a line that still runs, and nothing else", () => {
    for (const { id } of variedNodes(exampleLine))
      for (const quantity of quantitiesOf(exampleLine, id)) {
        const value = readQuantity(exampleLine, quantity);
        expect(Number.isFinite(value)).toBe(true);
        if (quantity.path === "share") continue;
        const near = quantity.isWhole ? value + 1 : quantity.unit === "%" ? value * 0.999 : value * 1.001;
        const changed = withQuantity(exampleLine, quantity, near);
        expect(readQuantity(withQuantity(exampleLine, quantity, value), quantity)).toBe(value);
        if (quantity.path !== "demand") expect(readQuantity(changed, quantity)).toBe(near);
        const others = changed.nodes.filter(
          (node, i) => node !== exampleLine.nodes[i] && JSON.stringify(node) !== JSON.stringify(exampleLine.nodes[i]),
        );
        if (quantity.node !== null && near !== value) expect(others.map((node) => node.id)).toEqual([quantity.node]);
      }
  });

  it("refuses a value that the line cannot run with, in the words of its rules", () => {
    expect(() => withQuantity(exampleLine, find("wind", "scrapRate"), 1)).toThrow(RangeError);
    expect(() => withQuantity(exampleLine, find("wind", "cycleMinutes"), 0)).toThrow(/cycle/i);
    expect(() => withQuantity(exampleLine, find("lam", "size"), 0.5)).toThrow(RangeError);
  });
});

describe("scaleDistribution", () => {
  const all: Distribution[] = [
    { type: "fixed", value: 8 },
    { type: "normal", mean: 8, sd: 2 },
    { type: "lognormal", mean: 8, sd: 2 },
    { type: "gamma", mean: 8, sd: 2 },
    { type: "weibull", shape: 2, scale: 8 },
    { type: "exponential", mean: 8 },
    { type: "uniform", min: 4, max: 12 },
    { type: "triangular", min: 4, mode: 5, max: 12 },
    { type: "poisson", mean: 8 },
    { type: "negativeBinomial", mean: 8, sd: 4 },
    { type: "empirical", values: [4, 8, 12] },
  ];
  it.each(all)("scales the mean of $type, and its spread but for a Poisson count", (d) => {
    const scaled = scaleDistribution(d, 1.5);
    expect(meanOf(scaled)).toBeCloseTo(1.5 * meanOf(d)!, 9);
    const factor = d.type === "poisson" ? Math.sqrt(1.5) : 1.5;
    expect(sdOf(scaled)).toBeCloseTo(factor * sdOf(d)!, 9);
  });
});

describe("ranges of values", () => {
  it("steps through shares without a trace of binary fractions", () => {
    const share = kindOf(find("wind", "scrapRate"));
    expect(listRange(0.01, 0.05, 0.01, share)).toEqual({ sizes: [0.01, 0.02, 0.03, 0.04, 0.05] });
    expect(readSizes("1%, 2.5; 4 %", share)).toEqual({ sizes: [0.01, 0.025, 0.04] });
    expect(readSizes("1, two", share)).toEqual({ refusal: expect.stringMatching(/^Values are numbers/) });
    expect(readSizes("1 2 3", share, 2)).toEqual({ refusal: expect.stringMatching(/at most 2/) });
  });

  it("keeps to the rules of sizes for sizes", () => {
    expect(listRange(1.5, 3, 1)).toEqual({ refusal: expect.stringMatching(/^Sizes are whole/) });
    const days = kindOf(find("sup-lam", "leadTimeDays"));
    expect(listRange(5, 3, 1, days)).toEqual({
      refusal: expect.stringMatching(/end at or above/),
    });
    expect(listRange(0, 3, 0, days)).toEqual({ refusal: expect.stringMatching(/above 0/) });
    expect(listRange(0, 1, 0.01, kindOf(find("wind", "scrapRate")))).toEqual({
      refusal: expect.stringMatching(/too many/),
    });
  });

  it("suggests a range that holds the value and is not too long", () => {
    for (const { id } of variedNodes(exampleLine))
      for (const quantity of quantitiesOf(exampleLine, id)) {
        const kind = kindOf(quantity);
        const value = readQuantity(exampleLine, quantity);
        const { from, to, step } = suggestRange(value, kind);
        const read = listRange(from, to, step, kind);
        if (!("sizes" in read)) throw new Error(`${quantity.path}: ${read.refusal}`);
        expect(read.sizes.length).toBeLessThanOrEqual(mostSizes);
        expect(read.sizes.length).toBeGreaterThan(2);
        expect(from).toBeLessThanOrEqual(value);
        expect(to).toBeGreaterThanOrEqual(value);
        expect(read.sizes).toContain(value);
        if (kind === sizeKind) expect(from).toBeGreaterThanOrEqual(1);
      }
  });
});
