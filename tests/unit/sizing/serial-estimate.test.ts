import { describe, expect, it } from "vitest";
import { exampleLine } from "@/lib/line/example";
import type { Line, Station } from "@/lib/line/types";
import { type RunOptions, simulate } from "@/lib/simulation";
import { estimateSerialParts, leanShare, type SerialEstimate } from "@/lib/sizing/serial-estimate";
import { withSizes } from "@/lib/sizing/problem";
import {
  type BernoulliRow,
  emptyProbability,
  endlessRowRate,
  leanPlacesAlike,
  leanPlacesEach,
  rowRate,
} from "@/lib/statistics/bernoulli-row";
import { bernoulliMachine, solveSerialLine } from "@/tests/helpers/chains";
import {
  bernoulli,
  buffer,
  customer,
  hourly,
  line,
  millionTicks,
  purchased,
  serialLine,
  station,
  supplier,
  upDown,
} from "@/tests/helpers/small-lines";

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

const applied = ({ estimate }: SerialEstimate) => {
  if (!estimate.applies) throw new Error(`no estimate: ${estimate.reason}`);
  return estimate;
};

describe("estimateSerialParts", () => {
  const options: RunOptions = { ...millionTicks, weeks: 60 };
  const perHour = (of: Line, last: string) => {
    const { hoursPerDay, daysPerWeek } = of.calendar;
    return simulate(of, options).stations[last].goodPerWeek.value / (hoursPerDay * daysPerWeek);
  };
  const alike = (n: number, more: Partial<Station>) => repeat(n, 0).map(() => more);

  it("finds a row and estimates good units an hour at its sizes; a book's N is a size", () => {
    const found = estimateSerialParts(serialLine([0.9, 0.85, 0.8].map(bernoulli), [2, 3]));
    expect(found).toHaveLength(1);
    expect(found[0]).toMatchObject({ stations: ["m1", "m2", "m3"], buffers: ["b1", "b2"] });
    // A06 [exact chain 0.7657000822834048, aggregation 0.7657368208319597; computed].
    expect(applied(found[0]).perHour).toBeCloseTo(0.7657368208319597, 9);
    expect(applied(found[0]).perHourEndless).toBeCloseTo(0.8, 12);
  });

  it("is as simulated, in units an hour, for cycles of several ticks, workplaces and scrap", () => {
    const calendar = { ...hourly, tickMinutes: 6 };
    // Twelve minutes of work at two workplaces, one tick; three stations, one of them never stopped.
    const work = { cycleMinutes: 12, parallel: 2, scrapRate: 0.05 };
    const one = serialLine([{ ...work, ...bernoulli(0.9) }, work, { ...work, ...bernoulli(0.85) }], [2, 3], {
      calendar,
    });
    expect(Math.abs(perHour(one, "m3") / applied(estimateSerialParts(one)[0]).perHour - 1)).toBeLessThan(0.02);
    const slow = serialLine(alike(3, { ...bernoulli(0.95), cycleMinutes: 18 }), [2, 2], { calendar });
    expect(Math.abs(perHour(slow, "m3") / applied(estimateSerialParts(slow)[0]).perHour - 1)).toBeLessThan(0.03);
    const byClock = serialLine(alike(3, upDown(1 / 18, 1 / 2, "always")), [2, 2]);
    expect(Math.abs(perHour(byClock, "m3") / applied(estimateSerialParts(byClock)[0]).perHour - 1)).toBeLessThan(0.06);
  });

  it("its lean places reach the share of the endless rate in the simulated line, fewer do not", () => {
    const of = serialLine(alike(4, bernoulli(0.85)), [1, 1, 1]);
    const { lean, leanPlaces, perHourEndless } = applied(estimateSerialParts(of)[0]);
    expect(lean.map(({ id, size }) => [id, size])).toEqual([
      ["b1", 1],
      ["b2", 1],
      ["b3", 1],
    ]);
    const rateWith = (sizes: readonly number[]) =>
      perHour(withSizes(of, Object.fromEntries(lean.map(({ id }, i) => [id, sizes[i]]))), "m4");
    const wanted = leanShare * perHourEndless;
    // Aggregation is off by a good half per cent in a row of four.
    expect(rateWith(lean.map((one) => one.lean))).toBeGreaterThan(wanted * 0.993);
    expect(rateWith(lean.map((one) => one.lean - 1))).toBeLessThan(wanted);
    expect(Math.max(...lean.map((one) => one.lean))).toBeLessThanOrEqual(leanPlaces);
  });

  const reasonFor = (stations: Partial<Station>[], calendar = hourly) => {
    const [{ estimate }] = estimateSerialParts(serialLine(stations, repeat(stations.length - 1, 2), { calendar }));
    return estimate.applies ? null : estimate.reason;
  };

  it.each<[string, Partial<Station>[], RegExp | null]>([
    ["unlike cycles", [{}, { cycleMinutes: 120 }], /different cycle times/],
    ["like cycles by more workplaces", [{}, { cycleMinutes: 120, parallel: 2 }], null],
    ["cycles that vary", [{}, { cycleCv: 0.2 }], /vary from unit to unit/],
    ["several units a tick", alike(2, { cycleMinutes: 20 }), /more than one unit in a tick of 60 minutes/],
    ["broken ticks", alike(2, { cycleMinutes: 63 }), /not a whole number of ticks/],
    ["long stoppages", alike(2, upDown(0.01, 0.1, "always")), /last many cycles/],
    ["stoppages of about a cycle", alike(2, upDown(0.1, 0.9, "always")), null],
    [
      "stoppages of a small part of a cycle",
      alike(2, { cycleMinutes: 600, ...bernoulli(0.8) }),
      /shorter than a cycle/,
    ],
    ["no stoppages", alike(2, { cycleMinutes: 600 }), null],
  ])("says whether %s can be put as a Bernoulli line", (_, stations, reason) => {
    const found = reasonFor(stations);
    if (reason === null) expect(found).toBeNull();
    else expect(found).toMatch(reason);
  });

  it("refuses cycles for a cause: at one place they cost a third of the output and more", () => {
    const rate = (more: Partial<Station>) =>
      perHour(serialLine(alike(3, { ...bernoulli(0.95), ...more }), [1, 1]), "m3");
    expect(rate({ cycleMinutes: 63 }) * 1.05).toBeLessThan(0.66 * rate({}));
    expect(rate({ cycleCv: 0.1 })).toBeLessThan(0.66 * rate({}));
  });

  /** Larkfield's rotors: two cells fill one rack; housings go to two takers; drives take two bearings. */
  const plant = line(
    [
      supplier("s", 1),
      purchased("steel", 500),
      ...["cell1", "cell2", "balance", "bore", "press", "drive", "test", "spares"].map((id) => station(id)),
      ...["rack", "balanced", "housing", "bearing", "unit", "out", "spare"].map((id) => buffer(id, 4)),
      customer("c", { type: "fixed", value: 10 }),
      customer("d", { type: "fixed", value: 1 }),
    ],
    [
      ["s", "steel"],
      ...["cell1", "cell2", "bore", "press"].map((id): [string, string] => ["steel", id]),
      ["cell1", "rack"],
      ["cell2", "rack"],
      ["rack", "balance"],
      ["balance", "balanced"],
      ["bore", "housing"],
      ["press", "bearing"],
      ["balanced", "drive"],
      ["housing", "drive"],
      ["housing", "spares"],
      ["bearing", "drive", 2],
      ["drive", "unit"],
      ["unit", "test"],
      ["test", "out"],
      ["out", "c"],
      ["spares", "spare"],
      ["spare", "d"],
    ],
  );

  it("gives every buffer between stations once, with a reason where the line is no row", () => {
    const found = estimateSerialParts(plant);
    const said = found.map(({ stations, buffers, estimate }) => [
      stations.join(" "),
      buffers.join(" "),
      estimate.applies ? null : estimate.reason,
    ]);
    expect(said).toEqual([
      ["drive test", "unit", null],
      ["cell1 cell2 balance", "rack", expect.stringMatching(/^several stations fill/)],
      ["bore drive spares", "housing", expect.stringMatching(/several takers/)],
      ["press drive", "bearing", expect.stringMatching(/takes 2 from the buffer/)],
      ["balance drive", "balanced", expect.stringMatching(/assembles/)],
    ]);
  });

  it("has no estimate for the example plant, and says why of each buffer between its stations", () => {
    const found = estimateSerialParts(exampleLine);
    expect(found.flatMap(({ buffers }) => buffers).sort()).toEqual(["cb", "gb", "rot", "stator", "unit"]);
    expect(found.map(({ stations }) => stations)).toEqual([
      ["final", "eol"],
      ["wind", "rotor", "gbox", "ctrl", "final"],
    ]);
    expect(found.map(({ estimate }) => (estimate.applies ? null : estimate.reason))).toEqual([
      expect.stringMatching(/different cycle times/),
      expect.stringMatching(/assembles/),
    ]);
  });
});
