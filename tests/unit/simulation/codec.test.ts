import { describe, expect, it } from "vitest";
import { exampleLine } from "@/lib/line/example";
import { decodeResult, encodeResult, judgeRuns, judgeWarmup, mergeRuns, simulate } from "@/lib/simulation";

const options = { seed: "1", replications: 4, weeks: 10, warmupWeeks: 2, targetFillRate: 0.95 };

describe("decodeResult", () => {
  const result = simulate(exampleLine, options);
  const bytes = encodeResult(result);

  it("gives back every figure and array, and merges like the original", () => {
    const back = decodeResult(bytes);
    expect(back).toEqual(result);
    const rest = simulate(exampleLine, { ...options, firstReplication: 4 });
    expect(mergeRuns([back, rest])).toEqual(mergeRuns([result, rest]));
  });

  it("keeps figures that are not there", () => {
    const idle = structuredClone(exampleLine);
    for (const node of idle.nodes) if (node.kind === "customer") node.weeklyDemand = { type: "fixed", value: 0 };
    const empty = simulate(idle, options);
    expect(empty.summary.mean.value).toBeNaN();
    expect(decodeResult(encodeResult(empty))).toEqual(empty);
  });

  it("reads from the middle of a larger buffer", () => {
    const larger = new Uint8Array(bytes.length + 3);
    larger.set(bytes, 3);
    expect(decodeResult(larger.subarray(3))).toEqual(result);
  });

  it("refuses damaged bytes", () => {
    expect(() => decodeResult(new Uint8Array(4))).toThrow(RangeError);
    expect(() => decodeResult(bytes.slice(0, bytes.length - 8))).toThrow(RangeError);
    const other = bytes.slice();
    other[0] ^= 1;
    expect(() => decodeResult(other)).toThrow(RangeError);
    const broken = bytes.slice();
    broken[20] = 0;
    expect(() => decodeResult(broken)).toThrow(RangeError);
  });
});

describe("judgeRuns", () => {
  it("asks for ten weeks beyond the percentile and ten replications", () => {
    const few = simulate(exampleLine, options);
    expect(judgeRuns(few, 0.1, few.summary.p10)).toMatchObject({
      nBeyond: 4,
      tooFewBeyond: true,
      tooFewReplications: true,
    });
    const more = simulate(exampleLine, { ...options, replications: 12 });
    expect(judgeRuns(more, 0.1, { value: 0.9, halfWidth: 0.019 })).toEqual({
      nBeyond: 12,
      tooFewBeyond: false,
      tooFewReplications: false,
      tooWide: false,
    });
  });
});

describe("judgeWarmup", () => {
  it("finds a start with empty stock too short, and cuts a settled run in its first half at most", () => {
    const cold = structuredClone(exampleLine);
    for (const node of cold.nodes) if (node.kind === "buffer") node.startLevel = 0;
    const started = simulate(cold, { ...options, replications: 10, weeks: 40, warmupWeeks: 0 });
    expect(judgeWarmup(started).isEnough).toBe(false);
    const warm = simulate(exampleLine, { ...options, replications: 10, weeks: 40, warmupWeeks: 30 });
    expect(judgeWarmup(warm).suggestedWeeks ?? Infinity).toBeLessThanOrEqual(35);
  });
});
