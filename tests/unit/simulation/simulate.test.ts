import { describe, expect, it } from "vitest";
import { exampleLine } from "@/lib/line/example";
import type { Line } from "@/lib/line/types";
import { lowestLevels, mergeRuns, percentile, simulate, type RunOptions, type RunResult } from "@/lib/simulation";

const options: RunOptions = { seed: "1", replications: 6, weeks: 12, warmupWeeks: 3, targetFillRate: 0.95 };
const part = (firstReplication: number, replications: number) =>
  simulate(exampleLine, { ...options, firstReplication, replications });
const change = (edit: (line: Line) => void): Line => {
  const line = structuredClone(exampleLine);
  edit(line);
  return line;
};

describe("simulate", () => {
  const whole = simulate(exampleLine, options);

  it("gives the same bits for a replication run alone", () => {
    const { tallies } = whole;
    const alone = part(4, 1).tallies;
    const nColumns = alone.sums.length;
    const nCells = alone.demand.length;
    expect(alone.sums).toEqual(tallies.sums.slice(4 * nColumns, 5 * nColumns));
    expect(alone.onTime).toEqual(tallies.onTime.slice(4 * nCells, 5 * nCells));
  });

  it("extends a shorter run", () => {
    const longer = simulate(exampleLine, { ...options, weeks: 20 });
    for (let r = 0; r < options.replications; r++) {
      expect(longer.fillRates.slice(r * 20, r * 20 + 12)).toEqual(whole.fillRates.slice(r * 12, r * 12 + 12));
    }
  });

  it("leaves demand and lateness as they were when a buffer is resized", () => {
    const resized = change((line) => {
      for (const node of line.nodes) if (node.kind === "buffer" && node.id === "mag") node.size = 9000;
    });
    const other = simulate(resized, options);
    expect(other.tallies.demand).toEqual(whole.tallies.demand);
    expect(other.suppliers["sup-lam"].lateShare).toEqual(whole.suppliers["sup-lam"].lateShare);
    expect(other.suppliers["sup-mag"].disruptedShare).toEqual(whole.suppliers["sup-mag"].disruptedShare);
  });

  it("does not depend on names or on the order of unrelated nodes", () => {
    const renamed = change((line) => {
      for (const node of line.nodes) node.name = `Renamed ${node.name}`;
    });
    expect(simulate(renamed, options).tallies).toEqual(whole.tallies);
  });

  it("shares out the work time of every station", () => {
    for (const { working, down, starved, blocked, starvedBy } of Object.values(whole.stations)) {
      expect(working.value + down.value + starved.value + blocked.value).toBeCloseTo(1, 12);
      const byInput = Object.values(starvedBy).reduce((sum, figure) => sum + figure.value, 0);
      expect(byInput).toBeCloseTo(starved.value, 12);
    }
  });

  it("charges to causes what stations before the customers lose by being down or short of parts", () => {
    const { down, starved } = whole.stations.eol;
    const { tickMinutes } = exampleLine.calendar;
    const ticks = whole.tallies.sums.reduce((sum, value, i) => (i % rowLength(whole) === 0 ? sum + value : sum), 0);
    const lost = ((down.value + starved.value) * ticks * tickMinutes) / 60 / (options.replications * options.weeks);
    const charged = whole.causes.reduce((sum, cause) => sum + cause.hoursPerWeek.value, 0);
    expect(charged).toBeCloseTo(lost, 8);
  });

  it.each<[string, Partial<RunOptions>]>([
    ["replications", { replications: 0 }],
    ["weeks", { weeks: 1.5 }],
    ["warmupWeeks", { warmupWeeks: -1 }],
    ["targetFillRate", { targetFillRate: 1.01 }],
    ["replications", { replications: 1_000_000 }],
    ["firstReplication", { firstReplication: NaN }],
  ])("refuses bad %s", (name, bad) => {
    expect(() => simulate(exampleLine, { ...options, ...bad })).toThrow(new RegExp(name));
    expect(() => simulate(exampleLine, { ...options, ...bad })).toThrow(RangeError);
  });

  it("refuses a line that cannot run", () => {
    const cyclic = change((line) => line.links.push({ from: "fg", to: "wind" }));
    expect(() => simulate(cyclic, options)).toThrow(RangeError);
  });
});

const rowLength = (result: RunResult) => result.tallies.sums.length / result.tallies.replications.length;

describe("mergeRuns", () => {
  const whole = simulate(exampleLine, options);

  it("gives the bits of the whole run for any split and any order", () => {
    expect(mergeRuns([part(4, 2), part(0, 1), part(1, 3)])).toEqual(whole);
    expect(mergeRuns([mergeRuns([part(3, 3), part(0, 2)]), part(2, 1)])).toEqual(whole);
    expect(mergeRuns([whole])).toEqual(whole);
  });

  it("counts the replications present", () => {
    const merged = mergeRuns([part(9, 1), part(5, 2)]);
    expect(merged.options).toEqual({ ...options, replications: 3, firstReplication: 5 });
    expect([...merged.tallies.replications]).toEqual([5, 6, 9]);
  });

  it("refuses replications that occur twice, other options and nothing at all", () => {
    expect(() => mergeRuns([part(0, 3), part(2, 2)])).toThrow("replication 2");
    expect(() => mergeRuns([part(0, 1), simulate(exampleLine, { ...options, seed: "2" })])).toThrow(RangeError);
    expect(() => mergeRuns([])).toThrow(RangeError);
  });
});

describe("percentile", () => {
  const whole = simulate(exampleLine, options);

  it("agrees with the summary and with the sorted rates", () => {
    expect(percentile(whole, 0.1)).toEqual(whole.summary.p10);
    expect(percentile(whole, 0.1, "cus-a")).toEqual(whole.customers["cus-a"].p10);
    const sorted = whole.fillRates.slice().sort();
    expect(Math.fround(percentile(whole, 0.5).value)).toBe(sorted[36]);
    expect(Math.fround(percentile(whole, 1).value)).toBe(sorted[71]);
  });

  it("refuses shares outside 0 to 1 and unknown customers", () => {
    expect(() => percentile(whole, 1.1)).toThrow(RangeError);
    expect(() => percentile(whole, 0.1, "nobody")).toThrow("nobody");
  });
});

describe("lowestLevels", () => {
  it("reads 0 in weeks in which the buffer ran empty, and never more than its places", () => {
    const { lowest, nWeeks, nReplications } = lowestLevels(exampleLine, options, "unit");
    expect([nReplications, nWeeks, lowest.length]).toEqual([6, 15, 90]);
    expect(lowest.every((level) => level >= 0 && level <= 30)).toBe(true);
    const neverEmpty = lowestLevels(exampleLine, options, "mag").lowest.every((level) => level > 0);
    expect(neverEmpty).toBe(
      simulate(exampleLine, { ...options, warmupWeeks: 0, weeks: 15 }).buffers.mag.empty.value === 0,
    );
    expect(() => lowestLevels(exampleLine, options, "nothing")).toThrow(RangeError);
  });
});
