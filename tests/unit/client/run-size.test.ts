import { describe, expect, it } from "vitest";
import { isRunSizeAllowed, mostTotalWeeks, replicationsFor, totalWeeks } from "@/lib/client/run-size";
import { checkOptions, mostWeeks } from "@/lib/simulation/options";

const size = { replications: 200, weeks: 50, warmupWeeks: 12 };

describe("replicationsFor", () => {
  it("rounds weeks up to whole replications", () => {
    expect([1, 50, 51, 10_000].map((weeks) => replicationsFor(weeks, size))).toEqual([1, 1, 2, 200]);
  });

  it("never goes beyond what one run may have", () => {
    const replications = replicationsFor(10_000_000, size);
    const options = { ...size, replications, seed: "1", targetFillRate: 0.95 };
    expect(() => checkOptions(options)).not.toThrow();
    expect(() => checkOptions({ ...options, replications: replications + 1 })).toThrow(String(mostWeeks));
    expect(totalWeeks(options)).toBe(mostTotalWeeks(size));
  });
});

describe("isRunSizeAllowed", () => {
  it("counts warm-up weeks and replications", () => {
    expect(isRunSizeAllowed(size)).toBe(true);
    expect(isRunSizeAllowed({ replications: 16_129, weeks: 50, warmupWeeks: 12 })).toBe(true);
    expect(isRunSizeAllowed({ replications: 16_130, weeks: 50, warmupWeeks: 12 })).toBe(false);
    expect(isRunSizeAllowed({ replications: 20_001, weeks: 1, warmupWeeks: 0 })).toBe(false);
  });
});
