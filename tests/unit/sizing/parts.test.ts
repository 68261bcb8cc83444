import { describe, expect, it } from "vitest";
import { composeSizes } from "@/lib/sizing/compose";
import { combineMoves, describeMoves, type Move } from "@/lib/sizing/moves";
import type { Need, Needs } from "@/lib/sizing/needs";
import type { Reading } from "@/lib/sizing/runs";
import { codeWeeks, countBad, countDue, isBad, rateOf } from "@/lib/sizing/week-rates";
import type { RunResult } from "@/lib/simulation";

const resultOf = (rates: number[]) => ({ fillRates: Float32Array.from(rates) }) as unknown as RunResult;
const readingOf = (levels: number[], value: number, rates: number[]): Reading => ({
  levels,
  value,
  risk: 0,
  codes: codeWeeks(resultOf(rates), 0.9),
  lows: [],
});

describe("codes of weeks", () => {
  it("keep exactly whether the target was met, and the rate to a hundredth", () => {
    const rates = [0, 0.2, 0.5, 0.899, 0.9, 0.95, 1, Number.NaN];
    const codes = codeWeeks(resultOf(rates), 0.9);
    expect([...codes].map(isBad)).toEqual([true, true, true, true, false, false, false, false]);
    expect(countBad(codes)).toBe(4);
    expect(countDue(codes)).toBe(7);
    rates.slice(0, 7).forEach((rate, w) => expect(Math.abs(rateOf(codes[w], 0.9) - rate)).toBeLessThan(0.01));
  });

  it("count a week on the target as good where single precision rounds it down", () => {
    expect(Math.fround(0.95)).toBeLessThan(0.95);
    expect(countBad(codeWeeks(resultOf([0.95]), 0.95))).toBe(0);
  });
});

/** Two buffers of levels 0..4 at 10 and 3 a level; what each of 12 weeks needs of them. */
function needsOf(first: number[], second: number[]): Needs {
  const need = (levels: number[], price: number): Need => ({
    floor: 0,
    top: 4,
    levels: Int32Array.from(levels),
    savings: Float64Array.from([4, 3, 2, 1, 0], (steps) => steps * price),
  });
  const ample = readingOf([4, 4], 52, new Array<number>(first.length).fill(1));
  return {
    ample,
    byBuffer: [need(first, 10), need(second, 3)],
  };
}

describe("composeSizes", () => {
  const first = [0, 0, 0, 0, 1, 1, 1, 2, 2, 3, 4, 4];
  const second = [4, 3, 2, 2, 1, 1, 0, 0, 1, 0, 4, 0];
  const nBad = (levels: readonly number[]) =>
    first.filter((need, w) => need > levels[0] || second[w] > levels[1]).length;
  const money = ([a, b]: readonly number[]) => 10 * a + 3 * b;

  it.each([0, 1, 2, 3, 4, 6, 9, 12])("keeps to %d bad weeks at the least money, as enumerated", (most) => {
    const levels = composeSizes(needsOf(first, second), most);
    expect(nBad(levels)).toBeLessThanOrEqual(most);
    const all = [0, 1, 2, 3, 4].flatMap((a) => [0, 1, 2, 3, 4].map((b) => [a, b]));
    const least = Math.min(...all.filter((set) => nBad(set) <= most).map(money));
    // Marginal analysis takes the best step each time; with two buffers it is at most one step of the cheap one off.
    expect(money(levels)).toBeLessThanOrEqual(least + 3);
  });
});

describe("moves", () => {
  it("read off where on the way a week turns", () => {
    const from = readingOf([6, 2], 100, [1, 0.99, 0.5, Number.NaN]);
    const to = readingOf([0, 2], 40, [0.45, 0.89, 0.95, 0.2]);
    const moves = describeMoves(from, to, 0, 0.9);
    expect(moves.map(({ by, gain }) => [by, Math.round(gain)])).toEqual([
      [-6, 60],
      [-4, 40],
      [-2, 20],
    ]);
    // The first week crosses 0.9 after a fifth of the way, the second only near its end, the third gets better.
    expect(moves.map(({ lost }) => lost)).toEqual([[0, 1], [0], [0]]);
    expect(moves[0].won).toEqual([2]);
  });

  const move = (b: number, by: number, gain: number, lost: number[], won: number[] = []): Move => ({
    b,
    by,
    gain,
    lost,
    won,
  });

  it("join so that the objective falls and no more weeks are lost than there is room for", () => {
    const moves = [
      move(0, -1, 50, [1, 2, 3]),
      move(1, -1, 20, [3, 4]),
      move(2, 1, -10, [], [8, 9]),
      move(3, -1, 5, [5, 6, 7]),
    ];
    const { joint, single } = combineMoves(moves, 10, 2);
    const last = joint.at(-1)!;
    expect(new Set(last.moves.map(({ b }) => b))).toEqual(new Set([0, 1, 2]));
    // Weeks 1 to 4 are lost, 3 once for both, 8 and 9 are won.
    expect(last.change).toBe(2);
    expect(single[0].moves.map(({ b }) => b)).toEqual([0, 2]);
  });

  it("mend where too many weeks are bad, at the least cost", () => {
    const moves = [move(0, 1, -30, [], [1, 2]), move(1, 1, -5, [], [2, 3]), move(2, -1, 40, [4])];
    const gainOf = (most: number) => {
      const { joint } = combineMoves(moves, 5, most);
      expect(joint.every(({ change }) => change <= most)).toBe(true);
      return joint[0].moves.reduce((sum, { gain }) => sum + gain, 0);
    };
    expect(gainOf(-1)).toBe(35);
    expect(gainOf(-2)).toBe(5);
    expect(gainOf(-3)).toBe(-35);
  });
});
