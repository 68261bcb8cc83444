import { describe, expect, it } from "vitest";
import { simulate } from "@/lib/simulation";
import {
  type BernoulliRow,
  emptyProbability,
  endlessRowRate,
  leanPlacesAlike,
  leanPlacesEach,
  rowRate,
} from "@/lib/statistics/bernoulli-row";
import { bernoulliMachine, solveSerialLine } from "@/tests/helpers/chains";
import { bernoulli, millionTicks, serialLine } from "@/tests/helpers/small-lines";

const rowOf = (up: number[], good = up.map(() => 1)): BernoulliRow => ({ up, good });
const chainRate = (up: number[], places: number[]) => solveSerialLine(up.map(bernoulliMachine), places).rate;
const repeat = (n: number, value: number) => new Array<number>(n).fill(value);

// J. Li and S. M. Meerkov, Production Systems Engineering (Springer, 2009); citations from memory, digits computed again.
describe("rowRate", () => {
  it.each([
    ["A01", [0.9, 0.9], 2, 0.8571428571428572],
    ["A02", [0.9, 0.8], 3, 0.7915357910398413],
    ["A03", [0.8, 0.9], 3, 0.7915357910398414],
    ["A04", [0.6, 0.7], 4, 0.5828504961968408],
  ])("%s: two stations, exact [Li & Meerkov, section 4.2]", (_, up, places, exact) => {
    expect(rowRate(rowOf(up), [places])).toBeCloseTo(exact, 12);
    expect(up[1] * (1 - emptyProbability(up[0], up[1], places))).toBeCloseTo(exact, 12);
  });

  it("A02: the first finds no room, the second no part, as often as the chain has it", () => {
    expect(0.9 * emptyProbability(0.8, 0.9, 3)).toBeCloseTo(0.10846420896015871, 12);
    expect(0.8 * emptyProbability(0.9, 0.8, 3)).toBeCloseTo(0.00846420896015868, 12);
  });

  it.each([
    [[0.9, 0.9, 0.9], [2, 2], 0.8320155014293409, 0.0154],
    [[0.9, 0.9, 0.9, 0.9, 0.9], [2, 2, 2, 2], 0.8049569909055576, 0.1674],
    [[0.8, 0.7, 0.9, 0.75], [2, 3, 2], 0.6475016584146963, 0.933],
    [[0.9, 0.8, 0.85, 0.75, 0.95], [3, 2, 3, 2], 0.7057930323344128, 0.3772],
  ])(
    "A13: aggregation of %j, as far from the chain as it is known to be [section 4.3]",
    (up, places, rate, percentOff) => {
      expect(rowRate(rowOf(up), places)).toBeCloseTo(rate, 9);
      const exact = chainRate(up, places);
      expect((100 * Math.abs(rate - exact)) / exact).toBeCloseTo(percentOff, 3);
    },
  );

  it("A11: a row turned round makes as much [reversibility]", () => {
    const [up, places] = [
      [0.95, 0.75, 0.85, 0.8, 0.9],
      [2, 3, 2, 3],
    ];
    const rate = rowRate(rowOf(up), places);
    expect(rowRate(rowOf(up.toReversed()), places.toReversed())).toBeCloseTo(rate, 9);
    expect(Math.abs(rate / 0.7031407646882661 - 1)).toBeLessThan(0.01);
  });

  it("keeps its digits where stations are nearly alike, and settles in long balanced rows", () => {
    for (const apart of [1e-7, 1e-10, 1e-13]) {
      const between = (emptyProbability(0.9, 0.9 - apart, 10) - 0.1 / 10.1) / apart;
      expect(Math.abs(between)).toBeLessThan(10);
    }
    // Of one balanced row, the parts that pass its first and its last station are the same.
    const up = repeat(40, 0.9);
    const rate = rowRate(rowOf(up), repeat(39, 5));
    expect(rowRate(rowOf(up.toReversed()), repeat(39, 5))).toBeCloseTo(rate, 10);
    expect(rowRate(rowOf(up), repeat(39, 2 ** 29))).toBeCloseTo(0.9, 6);
  });

  it.each([
    [[0.9, 0.8], [0.9, 0.95], [2]],
    [
      [0.9, 0.8, 0.85],
      [0.9, 0.92, 0.95],
      [2, 2],
    ],
  ])("%j with good shares %j: as simulated", (up, good, places) => {
    const stations = up.map((p, i) => ({ ...bernoulli(p), scrapRate: 1 - good[i] }));
    const { value, halfWidth } = simulate(serialLine(stations, places), millionTicks).stations[`m${up.length}`]
      .goodPerWeek;
    const beside = up.length === 2 ? 0 : 0.005 * value;
    expect(halfWidth!).toBeLessThan(0.002 * value);
    expect(Math.abs(168 * rowRate(rowOf(up, good), places) - value)).toBeLessThan(2 * halfWidth! + beside);
  });

  it("refuses what is no row", () => {
    expect(() => rowRate(rowOf([0.9, 0.9]), [])).toThrow(/need 1 buffers, got 0/);
    expect(() => rowRate(rowOf([0.9, 0]), [1])).toThrow(/got 0/);
    expect(() => rowRate(rowOf([0.9, 0.9]), [1.5])).toThrow(/got 1.5/);
    expect(() => rowRate(rowOf([0.9, 0.9], [1]), [1])).toThrow(/one length/);
    expect(() => leanPlacesAlike(rowOf([0.9, 0.9]), 1)).toThrow(/got 1/);
  });
});

describe("endlessRowRate", () => {
  it("is what the tightest station lets through, with the scrap behind it", () => {
    expect(endlessRowRate(rowOf([0.9, 0.8, 0.95]))).toBe(0.8);
    // The second is the slowest, but the first loses a quarter of what it makes: 0.9 x 0.75 x 1 < 0.8.
    expect(endlessRowRate(rowOf([0.9, 0.8], [0.75, 1]))).toBeCloseTo(0.675, 12);
    for (const good of [
      [0.75, 1],
      [1, 0.75],
      [0.9, 0.9],
    ])
      expect(rowRate(rowOf([0.9, 0.8], good), [5000])).toBeCloseTo(endlessRowRate(rowOf([0.9, 0.8], good)), 6);
  });
});

describe("lean places", () => {
  const ups = [0.95, 0.9, 0.85, 0.8, 0.7];
  const shares = [0.85, 0.9, 0.95];
  const cells = (n: number) => ups.flatMap((p) => shares.map((share) => leanPlacesAlike(rowOf(repeat(n, p)), share)));

  it("G01: two stations alike, N = ceil(E(1 - p)/(1 - E)) [Li & Meerkov, chapter 6]", () => {
    expect(cells(2)).toEqual([1, 1, 1, 1, 1, 2, 1, 2, 3, 2, 2, 4, 2, 3, 6]);
    // 0.95 x 0.2 / 0.05 is 3.8; 0.75 x 0.5 / 0.25 is 1.5; 0.8 x 0.5 / 0.2 is 2, met exactly.
    expect(leanPlacesAlike(rowOf([0.5, 0.5]), 0.8)).toBe(2);
  });

  it("G02: three stations alike, as enumerated with the exact chain [computed]", () => {
    expect(cells(3)).toEqual([1, 1, 2, 2, 2, 3, 2, 3, 5, 2, 3, 6, 3, 5, 9]);
  });

  it.each([
    [[0.9, 0.9, 0.9, 0.9], 0.95],
    [[0.6, 0.9, 0.9, 0.95], 0.95],
    [[0.85, 0.8, 0.8, 0.9], 0.97],
    [[0.7, 0.7, 0.7, 0.7], 0.9],
  ])("each for itself, %j to %d: enough, none to spare, at most one more in all than the least", (up, share) => {
    const row = rowOf(up);
    const wanted = share * endlessRowRate(row);
    const places = leanPlacesEach(row, share);
    expect(rowRate(row, places)).toBeGreaterThanOrEqual(wanted);
    places.forEach((n, i) => {
      if (n > 1)
        expect(
          rowRate(
            row,
            places.map((m, j) => (j === i ? m - 1 : m)),
          ),
        ).toBeLessThan(wanted);
    });
    const most = leanPlacesAlike(row, share) + 3;
    let least = Infinity;
    for (let a = 1; a <= most; a++)
      for (let b = 1; b <= most; b++)
        for (let c = 1; c <= most; c++) if (a + b + c < least && rowRate(row, [a, b, c]) >= wanted) least = a + b + c;
    const sum = places.reduce((total, n) => total + n, 0);
    expect(sum).toBeLessThanOrEqual(least + 1);
    expect(sum).toBeLessThanOrEqual(3 * leanPlacesAlike(row, share));
  });
});
