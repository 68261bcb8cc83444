import { describe, expect, it } from "vitest";
import { findTruncation } from "@/lib/statistics/mser";
import { pickCountedQuantile, pickQuantile } from "@/lib/statistics/quantile";
import { cutSections, sectionHalfWidth } from "@/lib/statistics/sections";
import { t975 } from "@/lib/statistics/student";
import { exactOf, nameOf } from "../truth/cases";

describe("pickQuantile", () => {
  it("takes x[floor(n p + 1e-9)], at most the last", () => {
    const sorted = [1, 2, 3, 4, 5, 6, 7, 8, 9, 10];
    expect(pickQuantile(sorted, 0.1)).toBe(2);
    expect(pickQuantile(sorted, 0.3)).toBe(4);
    expect(pickQuantile(sorted, 1)).toBe(10);
    expect(pickQuantile([], 0.5)).toBeNaN();
  });

  it("is the same over values with counts", () => {
    const [values, counts] = [
      [0, 3, 9],
      [4, 1, 5],
    ];
    const spread = values.flatMap((value, i) => new Array<number>(counts[i]).fill(value));
    for (const p of [0, 0.39, 0.4, 0.5, 0.9, 1]) {
      expect(pickCountedQuantile(values, counts, p)).toBe(pickQuantile(spread, p));
    }
  });
});

describe("the model's percentile beside the usual ones", () => {
  const cases = Object.entries(exactOf<Record<string, number[]>>("F07"));
  it.each(cases)("F07, %s: as far above type 2 as type 1 is below it", (name, [inverse, averaged]) => {
    // Where n p is whole, type 1 takes the lower neighbour, type 2 the mean of both and the model the upper one.
    const data = [1, 2, 3, 4, 5, 6, 7, 8, 9, 10];
    expect(pickQuantile(data, Number(name.slice(1))), nameOf("F07")).toBe(2 * averaged - inverse);
  });
});

describe("t975", () => {
  it("F15: has the digits of the reference", () => {
    const exact = exactOf<Record<string, number>>("F15");
    for (const df of [1, 2, 5, 9, 10, 19]) expect(t975(df), nameOf("F15")).toBeCloseTo(exact[`t${df}`], 10);
  });

  it("has the tabulated values", () => {
    // Abramowitz and Stegun (1964), table 26.10.
    expect(t975(1)).toBeCloseTo(12.706, 3);
    expect(t975(9)).toBeCloseTo(2.262, 3);
    expect(t975(19)).toBeCloseTo(2.093, 3);
    expect(() => t975(20)).toThrow(RangeError);
  });
});

describe("sectionHalfWidth", () => {
  it("is t s / sqrt(k) over the sections that have the figure", () => {
    expect(sectionHalfWidth([1, NaN, 3])).toBeCloseTo((12.7062047361747 * Math.SQRT2) / Math.SQRT2, 10);
    expect(sectionHalfWidth([4, NaN])).toBeNull();
  });

  it("cuts replications into at most 20 sections that cover them", () => {
    expect(cutSections(3)).toEqual([0, 1, 2, 3]);
    expect(cutSections(50).length).toBe(21);
    expect(cutSections(50).at(-1)).toBe(50);
  });
});

describe("findTruncation", () => {
  it("H05: cuts where the hand-checked series does, each value standing for a batch", () => {
    const series = [0, 4, 7, 9, 10, 11, 9, 10, 10, 11, 9, 10].flatMap((value) => new Array<number>(5).fill(value));
    expect(findTruncation(series), nameOf("H05")).toEqual({ cut: 5 * exactOf<{ d: number }>("H05").d, isFound: true });
  });

  it("cuts a start that is off, and nothing from a level series", () => {
    const level = Array.from({ length: 100 }, (_, i) => 10 + ((i * 7919) % 13) / 13);
    expect(findTruncation(level)).toMatchObject({ isFound: true });
    expect(findTruncation(level).cut).toBeLessThanOrEqual(25);
    const off = level.map((value, i) => (i < 15 ? value + 8 : value));
    expect(findTruncation(off).cut).toBeGreaterThanOrEqual(15);
    expect(findTruncation(Array.from({ length: 40 }, (_, i) => i)).isFound).toBe(false);
  });
});
