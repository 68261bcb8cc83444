import { describe, expect, it } from "vitest";
import type { Reading } from "@/lib/client/line-state";
import { areSameRun, chooseReading, toLiveOptions, toRunOptions } from "@/lib/client/readings";
import { defaultOptions, type ScenarioOptions } from "@/lib/schema/lines";

const reading = (digest: string, options: ScenarioOptions = defaultOptions): Reading => ({
  result: {} as Reading["result"],
  digest,
  options,
  ranAt: "2026-11-24T14:02:00Z",
  engine: "test",
});

describe("areSameRun", () => {
  it("looks at what the figures depend on, not at the accepted risk", () => {
    expect(areSameRun(defaultOptions, { ...defaultOptions, acceptedRisk: 0.2 })).toBe(true);
    const others: Partial<ScenarioOptions>[] = [
      { seed: "2" },
      { replications: 201 },
      { weeks: 51 },
      { warmupWeeks: 0 },
      { targetFillRate: 0.9 },
    ];
    expect(others.filter((other) => areSameRun(defaultOptions, { ...defaultOptions, ...other }))).toEqual([]);
  });
});

describe("toRunOptions and toLiveOptions", () => {
  it("makes the live run the first 1 000 weeks of the full one", () => {
    expect(toRunOptions(toLiveOptions(defaultOptions))).toEqual({
      seed: "1",
      replications: 20,
      weeks: 50,
      warmupWeeks: 12,
      targetFillRate: 0.95,
    });
    expect(toLiveOptions({ ...defaultOptions, replications: 3, weeks: 10 })).toMatchObject({
      replications: 3,
      weeks: 10,
    });
  });
});

describe("chooseReading", () => {
  it("finds an older reading again after an undo", () => {
    const found = chooseReading([reading("edited"), reading("before")], "before", defaultOptions);
    expect(found).toMatchObject({ digest: "before", isCurrent: true });
  });

  it("falls back to the newest, marked as not current", () => {
    const readings = [reading("newer"), reading("older")];
    expect(chooseReading(readings, "edited", defaultOptions)).toMatchObject({ digest: "newer", isCurrent: false });
    expect(chooseReading(readings, "newer", { ...defaultOptions, seed: "2" })).toMatchObject({ isCurrent: false });
    expect(chooseReading([], "edited", defaultOptions)).toBeNull();
  });

  it("reads a current result at the accepted risk on screen", () => {
    const options = { ...defaultOptions, acceptedRisk: 0.05 };
    expect(chooseReading([reading("now")], "now", options)?.options.acceptedRisk).toBe(0.05);
  });
});
