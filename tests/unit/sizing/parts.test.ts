import { describe, expect, it } from "vitest";
import { exampleLine } from "@/lib/line/example";
import { nearestRound, refuseRange, suggestBounds } from "@/lib/sizing/bounds";
import { changeAt, type Choice, chooseLevels } from "@/lib/sizing/choose-levels";
import { curveThrough, fitCurve, observe, type Observation, shareAt } from "@/lib/sizing/curve";
import { isBetter } from "@/lib/sizing/is-better";
import { placesOf, withSizes } from "@/lib/sizing/problem";
import type { Reading } from "@/lib/sizing/runs";
import { packBits, readBadWeeks, unpackBits } from "@/lib/sizing/week-bits";
import type { RunResult } from "@/lib/simulation";

const resultOf = (rates: number[]) => ({ fillRates: Float32Array.from(rates) }) as unknown as RunResult;
const readingOf = (levels: number[], bad: number[], value = 0): Reading => ({
  levels,
  value,
  risk: bad.reduce((sum, bit) => sum + bit, 0) / bad.length,
  bad: Uint8Array.from(bad),
  nDue: bad.length,
  lows: [],
});

describe("bad weeks", () => {
  it("are those below the target; weeks without demand are neither", () => {
    const { bad, nDue } = readBadWeeks(resultOf([0, 0.5, 0.899, 0.9, 0.95, 1, Number.NaN]), 0.9);
    expect([...bad]).toEqual([1, 1, 1, 0, 0, 0, 0]);
    expect(nDue).toBe(6);
  });

  it("do not count a week on the target where single precision rounds it down", () => {
    expect(Math.fround(0.95)).toBeLessThan(0.95);
    expect([...readBadWeeks(resultOf([0.95]), 0.95).bad]).toEqual([0]);
  });

  it.each([0, 1, 7, 8, 9, 1000])("survive packing, %d of them", (n) => {
    const bits = Uint8Array.from({ length: n }, (_, i) => ((i * 7919) % 3) & 1);
    expect([...unpackBits(packBits(bits), n)]).toEqual([...bits]);
  });
});

describe("observe", () => {
  it("counts weeks lost and won over all weeks with demand", () => {
    const seen = observe(
      readingOf([5, 3], [0, 0, 0, 1, 1, 0, 0, 0, 0, 0]),
      readingOf([5, 1], [1, 1, 0, 0, 1, 1, 0, 0, 0, 0]),
      1,
    );
    expect(seen).toEqual({ level: 3, by: -2, change: 0.2, variance: expect.closeTo(0.05, 12) });
  });
});

describe("fitCurve", () => {
  const truth = curveThrough(10, 0.02, 0.3);
  const lookAt = (level: number, by: number): Observation => ({
    level,
    by,
    change: shareAt(truth, level + by) - shareAt(truth, level),
    variance: 1e-8,
  });

  it("finds the curve that made exact observations, whatever was likely", () => {
    for (const likely of [0.15, 0.3, 0.6]) {
      const curve = fitCurve([lookAt(10, -3), lookAt(14, -4), lookAt(6, 2)], likely);
      expect(curve.k / 0.3).toBeGreaterThan(0.9);
      expect(curve.k / 0.3).toBeLessThan(1.1);
      expect(shareAt(curve, 8) / shareAt(truth, 8)).toBeCloseTo(1, 1);
    }
  });

  it("keeps to what is likely where observations say nothing of the rate, and meets what they say of the share", () => {
    const curve = fitCurve([lookAt(10, -1)], 0.2);
    expect(curve.k).toBeCloseTo(0.2, 6);
    expect(shareAt(curve, 9) - shareAt(curve, 10)).toBeCloseTo(lookAt(10, -1).change, 9);
  });

  it("takes a move that did nothing, or good, for one without risk", () => {
    for (const change of [0, -0.01]) {
      const curve = fitCurve([{ level: 10, by: -2, change, variance: 1e-6 }], 0.2);
      expect(shareAt(curve, 10)).toBeLessThan(1e-9);
    }
  });
});

describe("chooseLevels", () => {
  const choices: Choice[] = [
    { curve: curveThrough(10, 0.03, 0.4), cost: 10, from: 10, lowest: 4, highest: 16 },
    { curve: curveThrough(8, 0.01, 0.2), cost: 3, from: 8, lowest: 2, highest: 14 },
    { curve: curveThrough(5, 0.02, 0.7), cost: 7, from: 5, lowest: 1, highest: 9 },
  ];
  const costOf = (levels: readonly number[]) => levels.reduce((sum, level, i) => sum + choices[i].cost * level, 0);
  const range = ({ lowest, highest }: Choice) => Array.from({ length: highest - lowest + 1 }, (_, i) => lowest + i);
  const all = range(choices[0]).flatMap((a) =>
    range(choices[1]).flatMap((b) => range(choices[2]).map((c) => [a, b, c])),
  );

  it.each([-0.04, -0.02, 0, 0.03, 0.1])("is the cheapest set at its own risk, as enumerated, with room %d", (room) => {
    const { levels, price } = chooseLevels(choices, room);
    const change = changeAt(choices, levels);
    expect(change).toBeLessThanOrEqual(room);
    const least = Math.min(...all.filter((set) => changeAt(choices, set) <= change + 1e-12).map(costOf));
    expect(costOf(levels)).toBeCloseTo(least, 9);
    // What whole levels leave of the room is less than one more step of any buffer would take.
    const best = Math.min(...all.filter((set) => changeAt(choices, set) <= room).map(costOf));
    expect(costOf(levels) - best).toBeLessThanOrEqual(Math.max(...choices.map(({ cost }) => cost)));
    expect(price).toBeGreaterThan(0);
  });

  it("puts each buffer where it costs least at the price, whatever the room", () => {
    for (let room = -0.04; room < 0.06; room += 0.002) {
      const { levels, price } = chooseLevels(choices, room);
      choices.forEach((choice, i) => {
        const merit = (level: number) => choice.cost * level + price * shareAt(choice.curve, level);
        expect(merit(levels[i])).toBeCloseTo(Math.min(...range(choice).map(merit)), 6);
      });
    }
  });

  it("goes to the levels of least risk where there is not room enough, and down to the lowest where there is plenty", () => {
    expect(chooseLevels(choices, -1).levels).toEqual([16, 14, 9]);
    expect(chooseLevels(choices, 1).levels).toEqual([4, 2, 1]);
  });

  it("raises a buffer that costs nothing or less", () => {
    expect(chooseLevels([{ ...choices[0], cost: -1 }], 1).levels).toEqual([16]);
  });
});

describe("isBetter", () => {
  const at = (risk: number, value: number) => ({ ...readingOf([], [0]), risk, value });
  it("puts the accepted risk first, then the objective; beyond the risk, the less risky", () => {
    expect(isBetter(at(0.1, 90), at(0.05, 100), 0.1)).toBe(true);
    expect(isBetter(at(0.11, 50), at(0.05, 100), 0.1)).toBe(false);
    expect(isBetter(at(0.11, 100), at(0.2, 50), 0.1)).toBe(true);
  });
});

describe("ranges", () => {
  it("tell purchased stock, stock between stations and the stock customers draw on apart", () => {
    expect(placesOf(exampleLine, ["lam", "stator", "unit", "fg"])).toEqual(["bought", "between", "between", "last"]);
  });

  it("are suggested about today's sizes in round steps, with both ends on a step", () => {
    const bounds = suggestBounds(exampleLine);
    expect(bounds).toHaveLength(14);
    for (const { id, min, max, step } of bounds) {
      const node = exampleLine.nodes.find((one) => one.id === id);
      const size = node?.kind === "buffer" ? node.size : NaN;
      expect(min).toBeGreaterThanOrEqual(1);
      expect(min).toBeLessThan(size);
      expect(max).toBeGreaterThan(size);
      expect((max - min) % step).toBe(0);
      expect(nearestRound(step)).toBe(step);
      expect((max - min) / step).toBeGreaterThan(30);
      expect((max - min) / step).toBeLessThan(130);
      expect(refuseRange({ min, max, step })).toBeNull();
    }
  });

  it("hold for a buffer of one place", () => {
    const [range] = suggestBounds({
      ...withSizes(exampleLine, { stator: 1 }),
      nodes: withSizes(exampleLine, { stator: 1 }).nodes.filter(({ id }) => id === "stator"),
    });
    expect(range).toEqual({ id: "stator", min: 1, max: 3, step: 1 });
  });

  it.each([
    [{ min: null, max: 5, step: 1 }, /^Type/],
    [{ min: 0, max: 5, step: 1 }, /^Sizes and steps are whole/],
    [{ min: 1, max: 5, step: 1.5 }, /^Sizes and steps are whole/],
    [{ min: 6, max: 5, step: 1 }, /above the largest/],
  ])("are refused with a reason: %o", (range, reason) => {
    expect(refuseRange(range)).toMatch(reason);
  });
});
