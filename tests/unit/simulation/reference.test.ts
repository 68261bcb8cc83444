import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { exampleLine } from "@/lib/line/example";
import type { Distribution, Line, LineNode } from "@/lib/line/types";
import { simulate } from "@/lib/simulation";
import { arbitraryLine } from "@/tests/helpers/line-arbitrary";
import { ReferenceRun } from "@/tests/helpers/reference-simulator";
import { figuresOf, ReferenceTotals } from "@/tests/helpers/reference-totals";

const targetFillRate = 0.9;

/** A value that a distribution might take, for good. */
function settle(d: Distribution): Distribution {
  if (d.type === "empirical") return { type: "fixed", value: d.values[0] };
  if (d.type === "fixed") return d;
  return { type: "fixed", value: "mean" in d ? d.mean : "min" in d ? d.min : d.scale };
}

/** The line without chance: up-times of one tick, stoppages and disruptions of fixed length, everything else fixed. */
function withoutChance(line: Line): Line {
  const settleNode = (node: LineNode): LineNode => {
    switch (node.kind) {
      case "supplier":
        return {
          ...node,
          lateness: node.lateness && settle(node.lateness),
          onTimeShare: node.onTimeShare < 0.5 ? 0 : 1,
          disruption: node.disruption && { meanDaysBetween: 1, meanDaysLasting: 1 },
          rejectRate: 0,
          lotRejectRate: 0,
        };
      case "station":
        return {
          ...node,
          cycleCv: 0,
          scrapRate: 0,
          stoppages: node.stoppages?.pattern === "upDown" ? { ...node.stoppages, meanUpHours: 0.1, downCv: 0 } : null,
        };
      case "customer":
        return { ...node, weeklyDemand: settle(node.weeklyDemand) };
      case "buffer":
        return node;
    }
  };
  return { ...line, nodes: line.nodes.map(settleNode) };
}

describe("against a second simulator, written from the model alone", () => {
  it("gives the same figures where nothing is left to chance", () => {
    fc.assert(
      fc.property(arbitraryLine, (random) => {
        const line = withoutChance(random);
        const own = figuresOf(simulate(line, { seed: "x", replications: 1, weeks: 6, warmupWeeks: 1, targetFillRate }));
        const other = new ReferenceRun(line, "y", targetFillRate).run(1, 6).figures(line);
        for (const name of new Set([...Object.keys(own), ...Object.keys(other)])) {
          const [a, b] = [own[name] ?? 0, other[name] ?? 0];
          if (Number.isNaN(a) && Number.isNaN(b)) continue;
          expect(Math.abs(a - b), `${name}: ${a}, not ${b}`).toBeLessThan(1e-6 * Math.max(1, Math.abs(b)));
        }
      }),
      { seed: 7, numRuns: 250 },
    );
  });

  const nBlocks = 40;

  /** Figures of so many blocks of replications of each simulator, and where their means lie too far apart. */
  function disagreements(line: Line, replications: number, weeks: number): string[] {
    const blocks = Array.from({ length: nBlocks }, (_, i) => {
      const totals = new ReferenceTotals();
      for (let r = 0; r < replications; r++)
        totals.join(new ReferenceRun(line, `reference ${i} ${r}`, targetFillRate).run(1, weeks));
      const options = { seed: "law", replications, weeks, warmupWeeks: 1, targetFillRate };
      return {
        other: totals.figures(line),
        own: figuresOf(simulate(line, { ...options, firstReplication: i * replications })),
      };
    });
    const names = new Set(blocks.flatMap(({ own, other }) => [...Object.keys(own), ...Object.keys(other)]));
    return [...names].flatMap((name) => {
      const isCause = name.startsWith("cause ");
      const values = (figures: Record<string, number>[]) =>
        figures.map((one) => (isCause ? (one[name] ?? 0) : one[name])).filter((value) => !Number.isNaN(value));
      const [a, b] = [values(blocks.map(({ own }) => own)), values(blocks.map(({ other }) => other))].map(
        describeSample,
      );
      if (a.n < nBlocks / 2 || b.n < nBlocks / 2) return [];
      const apart = Math.abs(a.mean - b.mean);
      // Some 1 500 figures are looked at: 5 standard errors are passed by chance once in a thousand such tests.
      const most = 5 * Math.sqrt(a.variance / a.n + b.variance / b.n) + 1e-9 * Math.abs(b.mean) + 1e-12;
      return apart <= most
        ? []
        : [`${name}: ${a.mean}, not ${b.mean}; ${(apart / (most / 5)).toFixed(1)} standard errors`];
    });
  }

  it.each(fc.sample(arbitraryLine, { seed: 11, numRuns: 24 }).map((line, i) => [i, line] as const))(
    "agrees in law on random line %i",
    (_, line) => expect(disagreements(line, 10, 6)).toEqual([]),
  );

  it("agrees in law on the drive unit line", { timeout: 120_000 }, () => {
    expect(disagreements(exampleLine, 1, 6)).toEqual([]);
  });
});

function describeSample(values: number[]): { n: number; mean: number; variance: number } {
  const n = values.length;
  const mean = values.reduce((a, b) => a + b, 0) / n;
  return { n, mean, variance: values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (n - 1) };
}
