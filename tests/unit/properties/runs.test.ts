import fc from "fast-check";
import { expect, it } from "vitest";
import { parseLine } from "@/lib/line";
import type { Line } from "@/lib/line/types";
import { decodeResult, encodeResult, mergeRuns, percentile, type RunResult, simulate } from "@/lib/simulation";
import { compileModel } from "@/lib/simulation/compile";
import { createLevelTally } from "@/lib/simulation/level-tally";
import { createRecorder, runReplication, runStretch } from "@/lib/simulation/replication";
import { createState } from "@/lib/simulation/state";
import { wordsPerStream } from "@/lib/random/sfc32";
import { withSize } from "@/lib/sizing/with-size";
import { arbitraryLine } from "@/tests/helpers/line-arbitrary";
import { options, settings } from "./settings";

const buffersOf = (line: Line) => line.nodes.filter((node) => node.kind === "buffer");

it("random lines are free of faults", () => {
  fc.assert(
    fc.property(arbitraryLine, (line) => {
      expect(parseLine(line)).toEqual({ line });
    }),
    settings(300),
  );
});

it("gives the same bits for any split of the replications and any order of merging", () => {
  const cuts = [[5], [2, 3], [1, 1, 1, 1, 1], [4, 1], [1, 3, 1]];
  fc.assert(
    fc.property(arbitraryLine, fc.constantFrom(...cuts), fc.infiniteStream(fc.nat()), (line, cut, order) => {
      const whole = simulate(line, options);
      let first = 0;
      const parts = cut.map((replications) => {
        const part = simulate(line, { ...options, replications, firstReplication: first });
        first += replications;
        return part;
      });
      const shuffled = parts.map((part) => ({ part, at: order.next().value ?? 0 })).sort((a, b) => a.at - b.at);
      expect(mergeRuns(shuffled.map(({ part }) => part))).toEqual(whole);
      const alone = simulate(line, { ...options, replications: 1, firstReplication: 3 });
      expect(alone.fillRates).toEqual(whole.fillRates.slice(3 * options.weeks, 4 * options.weeks));
      expect(() => mergeRuns([whole, alone])).toThrow(RangeError);
    }),
    settings(40),
  );
});

it("a longer run extends a shorter one, in weeks and in replications", () => {
  fc.assert(
    fc.property(arbitraryLine, (line) => {
      const short = simulate(line, { ...options, replications: 2, weeks: 3 });
      const long = simulate(line, { ...options, replications: 4, weeks: 6 });
      for (let r = 0; r < 2; r++)
        expect(short.fillRates.slice(r * 3, r * 3 + 3)).toEqual(long.fillRates.slice(r * 6, r * 6 + 3));
    }),
    settings(40),
  );
});

/** Words of the streams whose draws must not depend on the line's state, once a replication is over. */
function drawnStreams(line: Line): Record<string, number[]> {
  const single = { ...options, replications: 1 };
  const state = createState(compileModel(line), options.seed);
  runReplication(state, single, 0, 0, createRecorder(state.model, single, createLevelTally), runStretch);
  return Object.fromEntries(
    state.model.streams.flatMap(({ node, purpose }, i) =>
      ["demand", "lateness", "disruption"].includes(purpose)
        ? [[`${node} ${purpose}`, [...state.streams.subarray(i * wordsPerStream, (i + 1) * wordsPerStream)]]]
        : [],
    ),
  );
}

it("resizing one buffer leaves every demand, lateness and disruption draw as it was", () => {
  fc.assert(
    fc.property(arbitraryLine, fc.nat(), fc.integer({ min: 1, max: 60 }), (line, pick, size) => {
      const buffers = buffersOf(line);
      const resized = withSize(line, buffers[pick % buffers.length].id, size);
      expect(simulate(resized, options).tallies.demand).toEqual(simulate(line, options).tallies.demand);
      expect(drawnStreams(resized)).toEqual(drawnStreams(line));
    }),
    settings(60),
  );
});

it("names, values and another chain beside it change nothing that ships", () => {
  fc.assert(
    fc.property(arbitraryLine, arbitraryLine, (line, other) => {
      const alone = { ...line, overtime: null };
      const renamed = alone.nodes.map((node) =>
        node.kind === "buffer"
          ? { ...node, name: `x ${node.name}`, unitValue: 99 }
          : { ...node, name: `x ${node.name}` },
      );
      const plain = simulate(alone, options);
      expect(simulate({ ...alone, nodes: renamed }, options).fillRates).toEqual(plain.fillRates);
      const second = {
        nodes: other.nodes.map((node) => ({ ...node, id: `second-${node.id}` })),
        links: other.links.map((link) => ({ ...link, from: `second-${link.from}`, to: `second-${link.to}` })),
      };
      const both = simulate(
        { ...alone, nodes: [...second.nodes, ...alone.nodes], links: [...alone.links, ...second.links] },
        options,
      );
      for (const [id, customer] of Object.entries(plain.customers)) expect(both.customers[id]).toEqual(customer);
    }),
    settings(40),
  );
});

const sum = (values: number[]) => values.reduce((a, b) => a + b, 0);
const valuesOf = (figures: Record<string, { value: number }>) => Object.values(figures).map(({ value }) => value);

function checkFigures(line: Line, result: RunResult): void {
  const { summary, stations, buffers, causes, fillRates } = result;
  for (const [id, { working, down, starved, blocked, starvedBy }] of Object.entries(stations)) {
    expect(sum([working, down, starved, blocked].map(({ value }) => value)), id).toBeCloseTo(1, 9);
    expect(sum(valuesOf(starvedBy)), id).toBeCloseTo(starved.value, 9);
    for (const { value } of [working, down, starved, blocked]) expect(value, id).toBeGreaterThanOrEqual(-1e-9);
  }
  for (const { p10, p50, p90, empty, full } of Object.values(buffers)) {
    expect(p10 <= p50 && p50 <= p90).toBe(true);
    for (const { value } of [empty, full]) expect(value >= 0 && value <= 1 + 1e-12).toBe(true);
  }
  for (const [i, { hoursPerWeek }] of causes.entries()) {
    expect(hoursPerWeek.value).toBeGreaterThan(0);
    if (i > 0) expect(hoursPerWeek.value).toBeLessThanOrEqual(causes[i - 1].hoursPerWeek.value);
  }
  const { total, ...parts } = summary.costPerYear;
  expect(total.value).toBeCloseTo(sum(valuesOf(parts)), 6);
  expect(parts.carrying.value).toBeCloseTo(line.money.carryingRate * summary.moneyTiedUp.value, 6);
  const due = [...fillRates].filter((rate) => !Number.isNaN(rate));
  if (due.length === 0) {
    expect(summary.mean.value).toBeNaN();
    return;
  }
  const { p01, p05, p10, p25, p50 } = summary;
  const ascending = [p01, p05, p10, p25, p50].map(({ value }) => value);
  expect(ascending).toEqual([...ascending].sort((a, b) => a - b));
  expect(percentile(result, 0.1).value).toBe(p10.value);
  for (const rate of due) expect(rate >= 0 && rate <= 1).toBe(true);
  expect(summary.mean.value).toBeCloseTo(sum(due) / due.length, 5);
  const full = due.filter((rate) => rate === 1).length;
  expect(summary.weeksInFull.value).toBeCloseTo(full / due.length, 9);
  // Single precision may round a rate onto the target from either side.
  const under = due.filter((rate) => rate < options.targetFillRate - 1e-6).length;
  const near = due.filter((rate) => Math.abs(rate - options.targetFillRate) <= 1e-6).length;
  expect(summary.risk.value * due.length).toBeGreaterThanOrEqual(under - 1e-6);
  expect(summary.risk.value * due.length).toBeLessThanOrEqual(under + near + 1e-6);
}

it("figures hang together: shares, causes, costs, percentiles, risk", () => {
  fc.assert(
    fc.property(arbitraryLine, (line) => {
      checkFigures(line, simulate(line, options));
    }),
    settings(100),
  );
});

it("a stored result comes back to the bit; a damaged one is refused", () => {
  fc.assert(
    fc.property(arbitraryLine, fc.nat(), fc.integer({ min: 1, max: 255 }), (line, at, flip) => {
      const result = simulate(line, options);
      const bytes = encodeResult(result);
      expect(decodeResult(bytes)).toEqual(result);
      expect(() => decodeResult(bytes.subarray(0, at % bytes.length))).toThrow(RangeError);
      const damaged = bytes.slice();
      damaged[at % bytes.length] ^= flip;
      expect(() => decodeResult(damaged)).toThrow(RangeError);
    }),
    settings(60),
  );
});

it("bytes without a checksum, as stored before there was one, are read or refused, and nothing else", () => {
  fc.assert(
    fc.property(arbitraryLine, fc.nat(), fc.integer({ min: 1, max: 255 }), (line, at, flip) => {
      const bytes = encodeResult(simulate(line, { ...options, replications: 2, weeks: 2 }));
      bytes.fill(0, 12, 16);
      expect(decodeResult(bytes).format).toBe("forebay.result/1");
      // The figures stand first, so that most hits fall into their text.
      const textEnd = 16 + new DataView(bytes.buffer).getUint32(4);
      bytes[at % textEnd] ^= flip;
      try {
        decodeResult(bytes);
      } catch (error) {
        expect(error).toBeInstanceOf(RangeError);
      }
    }),
    settings(300),
  );
});

it("bad options are refused before any work", () => {
  const bad = fc.constantFrom(0, -1, 1.5, Number.NaN, Number.POSITIVE_INFINITY, 2 ** 31);
  const key = fc.constantFrom("replications", "weeks", "warmupWeeks", "firstReplication", "targetFillRate");
  fc.assert(
    fc.property(arbitraryLine, key, bad, (line, name, value) => {
      fc.pre(name !== "targetFillRate" || !(value >= 0 && value <= 1));
      fc.pre(value !== 0 || (name !== "warmupWeeks" && name !== "firstReplication"));
      expect(() => simulate(line, { ...options, [name]: value })).toThrow(RangeError);
    }),
    settings(60),
  );
});
