import { describe, expect, it } from "vitest";
import { moveFigure, readStrip } from "@/components/line/strip-reading";
import { describePoints, describeTime, sayFigures } from "@/components/line/strip-text";
import type { LineState, Reading } from "@/lib/client/line-state";
import example from "@/lib/line/example.json";
import type { Line } from "@/lib/line/types";
import { defaultOptions, type ReadingSummary } from "@/lib/schema/lines";
import { pairedDifference, percentile, simulate, type RunResult } from "@/lib/simulation";

const { acceptedRisk: _, ...runOptions } = { ...defaultOptions, replications: 20, weeks: 10, warmupWeeks: 2 };
const result = simulate(example as unknown as Line, runOptions);
const options = { ...runOptions, acceptedRisk: 0.1 };
const reading: Reading = { result, digest: "kept", options, ranAt: "2026-11-24T14:02:00Z", engine: result.engine };
const keptReading = { acceptedRisk: 0.1, atRisk: { value: 0.5, halfWidth: 0.01 }, weeks: 10_000 } as ReadingSummary;
const shown = (changed: Partial<Parameters<typeof readStrip>[0]>) =>
  readStrip({
    full: null,
    live: null,
    liveBase: null,
    keptReading: null,
    options,
    scenario: { kept: { digest: "kept" } } as LineState["scenario"],
    ...changed,
  });

describe("readStrip", () => {
  it("says whose figures it shows", () => {
    expect(shown({}).settled).toBeNull();
    expect(shown({ full: { ...reading, isCurrent: true } }).settled?.of).toBe("now");
    expect(shown({ full: { ...reading, isCurrent: false } }).settled?.of).toBe("kept");
    expect(shown({ full: { ...reading, digest: "other", isCurrent: false } }).settled?.of).toBe("before");
  });

  it("shows the kept figures until the whole result is read", () => {
    expect(shown({ keptReading }).settled).toMatchObject({ of: "kept", atRisk: { value: 0.5 } });
  });

  it("shows no live figures beside a full run of the same", () => {
    const full = { ...reading, isCurrent: true };
    expect(shown({ full, live: reading }).live).toBeNull();
    expect(shown({ full: { ...full, isCurrent: false }, live: reading }).live?.weeks).toBe(200);
  });

  it("reads the percentile of the accepted risk", () => {
    const at = (acceptedRisk: number) =>
      shown({ full: { ...reading, isCurrent: true }, options: { ...options, acceptedRisk } }).settled?.atRisk;
    expect(at(0.1)).toEqual(result.summary.p10);
    expect(at(0.25)).toEqual(percentile(result, 0.25));
    expect(at(0.25)!.value).toBeGreaterThanOrEqual(at(0.1)!.value);
  });
});

describe("the words of the strip", () => {
  it("gives the half-width in points, or the bound of a share that came out 0 or 1", () => {
    expect(describePoints({ value: 0.871, halfWidth: 0.0071 })).toBe("±\u202f0.7");
    expect(describePoints({ value: 1, halfWidth: null, bound: 0.985 })).toBe("above 98.5\u202f%");
    expect(describePoints({ value: 0.9, halfWidth: null })).toBeNull();
  });

  it("guesses the time left only once a twentieth is done", () => {
    expect(describeTime(400, 10_000, 300)).toBe("0.3\u202fs gone");
    expect(describeTime(4_380, 10_000, 2_100)).toBe("2.1\u202fs gone, about 2.7\u202fs left");
  });

  it("says about for a live reading, but not where nothing is due", () => {
    const figures = shown({ full: { ...reading, isCurrent: true } }).settled!;
    expect(sayFigures(figures, true).before).toBe("In 9 of 10 weeks we ship at least about");
    const nothing = sayFigures({ ...figures, atRisk: { value: NaN, halfWidth: null } }, true);
    expect(nothing.before).not.toMatch(/about/);
  });
});

describe("pairedDifference", () => {
  /** A hundred times the units, so that a point of fill rate is a whole number of them. */
  const shifted = (points: number): RunResult => {
    const { demand, onTime } = result.tallies;
    const tallies = {
      ...result.tallies,
      demand: demand.map((units) => units * 100),
      onTime: onTime.map((units, i) => units * 100 + points * demand[i]),
    };
    return { ...result, tallies };
  };

  it("is nothing, with certainty, between a run and itself", () => {
    expect(pairedDifference(result, result, 0.1)).toEqual({ value: 0, halfWidth: 0 });
  });

  it("finds a shift of all weeks at once, without the luck that both runs share", () => {
    const { value, halfWidth } = pairedDifference(shifted(2), result, 0.1);
    expect(value).toBeCloseTo(0.02, 6);
    expect(halfWidth).toBeLessThan(1e-6);
    expect(result.summary.p10.halfWidth).toBeGreaterThan(0.01);
  });

  it("refuses runs that are no pair", () => {
    const shorter = simulate(example as unknown as Line, { ...runOptions, replications: 3 });
    expect(() => pairedDifference(result, shorter, 0.1)).toThrow(RangeError);
  });

  it("moves the settled figure and keeps it a share", () => {
    const settled = { value: 0.99, halfWidth: 0.003 };
    expect(moveFigure(settled, { value: 0.05, halfWidth: 0.004 })).toEqual({ value: 1, halfWidth: 0.005 });
  });

  it("shows no edit where the edit changes nothing, whatever the quick run came to", () => {
    const full = { ...reading, result: shifted(-7), isCurrent: false };
    const { edited, settled } = shown({ full, live: reading, liveBase: reading });
    expect(edited?.atRisk.value).toBeCloseTo(settled!.atRisk.value, 12);
    expect(edited).toMatchObject({ moneyTiedUp: 0, costPerYear: 0 });
  });
});
