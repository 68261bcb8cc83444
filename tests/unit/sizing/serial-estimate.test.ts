import { describe, expect, it } from "vitest";
import { exampleLine } from "@/lib/line/example";
import type { Line, Station } from "@/lib/line/types";
import { type RunOptions, simulate } from "@/lib/simulation";
import { estimateSerialParts, leanShare, type SerialEstimate } from "@/lib/sizing/serial-estimate";
import { withSizes } from "@/lib/sizing/problem";
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

const repeat = (n: number, value: number) => new Array<number>(n).fill(value);

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
    ["a row of forty stations", alike(40, bernoulli(0.95)), null],
    ["a longer row", alike(41, bernoulli(0.95)), /more than 40 stations/],
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
