import { describe, expect, it } from "vitest";
import { simulate } from "@/lib/simulation";
import type { RunOptions, RunResult } from "@/lib/simulation/types";
import { bernoulliMachine, solveSerialLine, upDownMachine } from "../../helpers/chains";
import {
  bernoulli,
  buffer,
  customer,
  endless,
  line,
  millionTicks,
  purchased,
  serialLine,
  station,
  supplier,
  ticksOf,
  upDown,
} from "../../helpers/small-lines";
import { exactOf, nameOf } from "./cases";

// The cases' convention is the model's own: slotted time, downstream served first, blocked before service, a part stays
// upstream while worked on (a unit of one tick starts and ends within its tick), levels read at the ends of ticks.

const perTick = (result: RunResult, id: string) => result.stations[id].goodPerWeek.value / 168;
const standardError = (variance: number, options: RunOptions) => Math.sqrt(variance / ticksOf(options));

type Serial = { PR: number; WIP1: number; asympVarRate: number };

describe("Bernoulli lines", () => {
  it.each([
    ["A01", [0.9, 0.9], [2]],
    ["A02", [0.9, 0.8], [3]],
    ["A03", [0.8, 0.9], [3]],
    ["A04", [0.6, 0.7], [4]],
    ["A05", [0.9, 0.9, 0.9], [2, 2]],
    ["A06", [0.9, 0.85, 0.8], [2, 3]],
    ["A08", [0.9, 0.9, 0.9, 0.9, 0.9], [2, 2, 2, 2]],
  ])("%s: chain and simulation give the exact output and stock", (id, p, sizes) => {
    const exact = exactOf<Serial>(id);
    const chain = solveSerialLine(p.map(bernoulliMachine), sizes);
    expect(chain.rate, nameOf(id)).toBeCloseTo(exact.PR, 9);
    expect(chain.levels[0], nameOf(id)).toBeCloseTo(exact.WIP1, 8);
    const result = simulate(serialLine(p.map(bernoulli), sizes), millionTicks);
    const last = `m${p.length}`;
    expect(Math.abs(perTick(result, last) - exact.PR), nameOf(id)).toBeLessThan(
      4 * standardError(exact.asympVarRate, millionTicks),
    );
    const { value, halfWidth } = result.buffers.b1.mean;
    expect(Math.abs(value - exact.WIP1), nameOf(id)).toBeLessThan(2 * (halfWidth ?? 0) + 0.002);
  });

  it("C11: a part held upstream while worked on is not the line of exponential stations", () => {
    const exact = exactOf<{ K3N2: number; K3N1: number }>("C11");
    const rate = (p: number, size: number) =>
      solveSerialLine(
        [p, p, p].map((up) => bernoulliMachine(up)),
        [size, size],
      ).rate / p;
    // The chain mixes the slower the smaller p is, so that the limit is drawn out from two values.
    const limit = (size: number) => 2 * rate(0.01, size) - rate(0.02, size);
    expect(limit(2), nameOf("C11")).toBeCloseTo(exact.K3N2, 4);
    expect(limit(1)).toBeCloseTo(exact.K3N1, 4);
    const p = 0.05;
    const result = simulate(serialLine([bernoulli(p), bernoulli(p), bernoulli(p)], [2, 2]), millionTicks);
    // Output of a Bernoulli station a tick varies by less than p (1 - p).
    expect(Math.abs(perTick(result, "m3") - p * rate(p, 2))).toBeLessThan(4 * standardError(p * (1 - p), millionTicks));
  });

  it("A02: idle time of the first is lack of room, of the second lack of parts", () => {
    const exact = exactOf<{ BL1: number; ST2: number }>("A02");
    const { stations } = simulate(serialLine([bernoulli(0.9), bernoulli(0.8)], [3]), millionTicks);
    expect(stations.m1.blocked.value).toBeCloseTo(exact.BL1, 2);
    expect(stations.m2.starved.value).toBeCloseTo(exact.ST2, 2);
    expect(stations.m2.starvedBy.b1.value).toBe(stations.m2.starved.value);
    expect(stations.m2.blocked.value).toBe(0);
    expect(stations.m1.down.value).toBeCloseTo(0.1, 2);
  });

  it("A12: a place that is freed in a tick can be filled in it, unlike under symmetric blocking", () => {
    const exact = exactOf<Record<string, number>>("A12");
    for (const [p, right, wrong] of [
      [0.95, exact.PR_bbs_095, exact.PR_sym_095],
      [0.55, exact.PR_bbs_055, exact.PR_sym_055],
    ]) {
      const options = { ...millionTicks, weeks: 600 };
      const rate = perTick(simulate(serialLine([bernoulli(p), bernoulli(p)], [5]), options), "m2");
      expect(Math.abs(rate - right), nameOf("A12")).toBeLessThan(Math.abs(right - wrong) / 2);
    }
  });

  it.each([
    ["G05", 7],
    ["G05", 8],
    ["G05", 10],
  ])("%s: enumerating all splits of %i places over four stations finds the published best", (id, total) => {
    const { best, PR } = exactOf<{ best: number[][][]; PR: number[] }>(id);
    const at = [7, 8, 10].indexOf(total);
    const splits: number[][] = [];
    for (let a = 1; a <= total - 2; a++) for (let b = 1; b <= total - a - 1; b++) splits.push([a, b, total - a - b]);
    const rates = splits.map((sizes) => solveSerialLine([0.9, 0.9, 0.9, 0.9].map(bernoulliMachine), sizes).rate);
    const most = Math.max(...rates);
    expect(most, nameOf(id)).toBeCloseTo(PR[at], 8);
    const found = splits.filter((_, i) => most - rates[i] < 1e-9);
    expect(found).toEqual(expect.arrayContaining(best[at]));
    expect(found).toHaveLength(best[at].length);
  });

  it("G05: simulated with the same draws, the best split of 7 places beats its neighbours", () => {
    const rateOf = (sizes: number[]) =>
      perTick(simulate(serialLine([0.9, 0.9, 0.9, 0.9].map(bernoulli), sizes), millionTicks), "m4");
    const best = rateOf([2, 3, 2]);
    for (const other of [
      [3, 2, 2],
      [2, 2, 3],
      [1, 4, 2],
      [2, 4, 1],
    ])
      expect(best).toBeGreaterThan(rateOf(other));
  });
});

describe("stations with up and down times", () => {
  it("B04: worn while running, drawn after the tick's work", () => {
    const exact = exactOf<{ PR_after: number; PR_before: number; WIP_after: number }>("B04");
    const chain = solveSerialLine([upDownMachine(0.01, 0.1, true), upDownMachine(0.01, 0.1, true)], [10]);
    expect(chain.rate, nameOf("B04")).toBeCloseTo(exact.PR_after, 8);
    const result = simulate(serialLine([upDown(0.01, 0.1, "running"), upDown(0.01, 0.1, "running")], [10]), {
      ...millionTicks,
      weeks: 300,
    });
    const { value, halfWidth } = result.stations.m2.goodPerWeek;
    expect(Math.abs(value / 168 - exact.PR_after)).toBeLessThan((2 * (halfWidth ?? 0)) / 168);
  });

  it("B05: the two clocks differ by 2.9 %, and each is met", () => {
    const exact = exactOf<{ PR_TDF: number; PR_ODFafter: number }>("B05");
    for (const [clock, right] of [
      ["always", exact.PR_TDF],
      ["running", exact.PR_ODFafter],
    ] as const) {
      const chain = solveSerialLine(
        [upDownMachine(0.05, 0.2, clock === "running"), upDownMachine(0.05, 0.15, clock === "running")],
        [4],
      );
      expect(chain.rate, nameOf("B05")).toBeCloseTo(right, 8);
      const result = simulate(serialLine([upDown(0.05, 0.2, clock), upDown(0.05, 0.15, clock)], [4]), {
        ...millionTicks,
        weeks: 300,
      });
      const { value, halfWidth } = result.stations.m2.goodPerWeek;
      expect(Math.abs(value / 168 - right), nameOf("B05")).toBeLessThan((2 * (halfWidth ?? 0)) / 168);
    }
  });

  it("B07: up-times that fail with 1 - p and are mended with p are a Bernoulli line", () => {
    const exact = exactOf<{ PR: number; WIP: number }>("B07");
    const result = simulate(serialLine([upDown(0.1, 0.9, "always"), upDown(0.2, 0.8, "always")], [3]), millionTicks);
    expect(Math.abs(perTick(result, "m2") - exact.PR), nameOf("B07")).toBeLessThan(
      4 * standardError(0.145, millionTicks),
    );
    expect(result.buffers.b1.mean.value).toBeCloseTo(exact.WIP, 1);
  });

  it("B09: one station alone is up the share of time that its up and down times say", () => {
    const exact = exactOf<{ e: number; varRate: number }>("B09");
    const options = { ...millionTicks, weeks: 300 };
    const result = simulate(serialLine([upDown(0.01, 0.1, "always")], []), options);
    expect(Math.abs(perTick(result, "m1") - exact.e), nameOf("B09")).toBeLessThan(
      4 * standardError(exact.varRate, options),
    );
  });
});

describe("stations with varying cycles", () => {
  // Ticks are a hundredth of the mean cycle, so what a slotted line adds to the continuous one is within a percent.
  const fine = { tickMinutes: 0.6, hoursPerDay: 24, daysPerWeek: 4, weeksPerYear: 52 };
  const weekHours = 24 * 4;
  const options: RunOptions = { seed: "truth", replications: 100, weeks: 40, warmupWeeks: 4, targetFillRate: 1 };
  const rate = (nStations: number, size: number) => {
    const stations = Array.from({ length: nStations }, () => ({ cycleCv: 1 }));
    const sizes = Array.from({ length: nStations - 1 }, () => size);
    const result = simulate(serialLine(stations, sizes, { calendar: fine }), options);
    return result.stations[`m${nStations}`].goodPerWeek.value / weekHours;
  };

  it.each([
    ["C01", 2, "K2"],
    ["C01", 3, "K3"],
  ])("%s: %i exponential stations without buffers (one place is the slotted line's none)", (id, nStations, key) => {
    const exact = exactOf<Record<string, number>>(id)[key];
    expect(Math.abs(rate(nStations, 1) / exact - 1), nameOf(id)).toBeLessThan(0.015);
  });

  it("C07: two exponential stations with B places make (B + 2) / (B + 3)", () => {
    const exact = exactOf<Record<string, number>>("C07");
    for (const places of [1, 3])
      expect(Math.abs(rate(2, places + 1) / exact[`B${places}`] - 1), nameOf("C07")).toBeLessThan(0.015);
  });
});

describe("assembly and bought-in parts", () => {
  const assembly = (feeders: [number, number], final: number, sizes: [number, number]) =>
    line(
      [
        supplier("s1", 1),
        supplier("s2", 1),
        purchased("in1", endless),
        purchased("in2", endless),
        station("f1", bernoulli(feeders[0])),
        station("f2", bernoulli(feeders[1])),
        station("a", bernoulli(final)),
        buffer("b1", sizes[0]),
        buffer("b2", sizes[1]),
        buffer("out", endless),
        customer("c", { type: "fixed", value: 1 }),
      ],
      [
        ["s1", "in1"],
        ["s2", "in2"],
        ["in1", "f1"],
        ["in2", "f2"],
        ["f1", "b1"],
        ["f2", "b2"],
        ["b1", "a"],
        ["b2", "a"],
        ["a", "out"],
        ["out", "c"],
      ],
    );

  it("D01: two feeders into one equal the serial line of three", () => {
    const exact = exactOf<{ PR: number; WIP1: number }>("D01");
    const result = simulate(assembly([0.9, 0.9], 0.9, [2, 2]), millionTicks);
    expect(Math.abs(perTick(result, "a") - exact.PR), nameOf("D01")).toBeLessThan(
      4 * standardError(0.0945, millionTicks),
    );
    expect(result.buffers.b1.mean.value).toBeCloseTo(exact.WIP1, 1);
    expect(result.buffers.b2.mean.value).toBeCloseTo(exact.WIP1, 1);
  });

  it("D02: unequal feeders equal the serial line A06", () => {
    const exact = exactOf<{ PR: number }>("D02");
    const result = simulate(assembly([0.8, 0.9], 0.85, [3, 2]), millionTicks);
    expect(Math.abs(perTick(result, "a") - exact.PR), nameOf("D02")).toBeLessThan(
      4 * standardError(0.123, millionTicks),
    );
  });

  // A tick is a day here: received, reviewed and used in this order; what is ordered on day t is there on day t + L.
  const supplied = (size: number, lead: number, p: number) =>
    line(
      [
        supplier("s", lead),
        purchased("in", size),
        station("m", p < 1 ? bernoulli(p) : {}),
        buffer("out", endless),
        customer("c", { type: "fixed", value: 1 }),
      ],
      [
        ["s", "in"],
        ["in", "m"],
        ["m", "out"],
        ["out", "c"],
      ],
      { calendar: { tickMinutes: 60, hoursPerDay: 1, daysPerWeek: 7, weeksPerYear: 52 } },
    );
  const ratePerDay = (result: RunResult) => result.stations.m.goodPerWeek.value / 7;

  it("D07: a perfect station on a base stock S and lead time L makes S / (L + 1) a day", () => {
    const exact = exactOf<{ PR: number }>("D07");
    const result = simulate(supplied(3, 4, 1), {
      seed: "truth",
      replications: 2,
      weeks: 500,
      warmupWeeks: 10,
      targetFillRate: 1,
    });
    expect(ratePerDay(result), nameOf("D07")).toBeCloseTo(exact.PR, 10);
  });

  it("D10: S = L + 1 never leaves the station short; S = L does", () => {
    const exact = exactOf<{ PR: number; PR_S_equals_L: number }>("D10");
    const options: RunOptions = { seed: "truth", replications: 40, weeks: 1_000, warmupWeeks: 10, targetFillRate: 1 };
    const enough = simulate(supplied(5, 4, 0.9), options);
    expect(enough.stations.m.starved.value).toBe(0);
    expect(ratePerDay(enough), nameOf("D10")).toBeCloseTo(exact.PR, 2);
    const short = simulate(supplied(4, 4, 0.9), options).stations.m.goodPerWeek;
    expect(Math.abs(short.value / 7 - exact.PR_S_equals_L)).toBeLessThan((2 * (short.halfWidth ?? 0)) / 7);
  });
});
