import { expect, it } from "vitest";
import { parseLine } from "@/lib/line";
import { cautionsOf } from "@/lib/line/cautions";
import { meanUseADay, meanUsesAWeek } from "@/lib/line/mean-use";
import type { DraftLine, Line, LineNode } from "@/lib/line/types";

const place = (id: string): LineNode => ({
  kind: "buffer",
  id,
  name: id,
  size: 5,
  startLevel: 0,
  unitValue: 1,
  replenishment: null,
});

/** `depth` pairs of stations side by side, between which the ways through the line double at each step. */
function sideBySide(depth: number, scrapRate = 0, quantity = 1): Line {
  const replenishment = { rule: "orderUpTo", reviewDays: 5, lot: null, minimumOrder: 0, orderMultiple: 1 } as const;
  const nodes: LineNode[] = [
    {
      kind: "supplier",
      id: "s",
      name: "s",
      leadTimeDays: 1,
      lateness: null,
      onTimeShare: 1,
      correlation: 0,
      keepsSequence: true,
      disruption: null,
      rejectRate: 0,
      lotRejectRate: 0,
      share: 1,
    },
    { ...place("b0"), kind: "buffer", size: 50, startLevel: null, unitValue: 1, replenishment },
  ];
  const links: Line["links"] = [{ from: "s", to: "b0" }];
  for (let i = 0; i < depth; i++) {
    nodes.push(place(`b${i + 1}`));
    for (const id of [`m${i}a`, `m${i}b`]) {
      nodes.push({
        kind: "station",
        id,
        name: id,
        cycleMinutes: 5,
        cycleCv: 0,
        parallel: 1,
        scrapRate,
        stoppages: null,
      });
      links.push({ from: `b${i}`, to: id, quantity }, { from: id, to: `b${i + 1}` });
    }
  }
  const weeklyDemand = { type: "fixed", value: 100 } as const;
  nodes.push({
    kind: "customer",
    id: "c",
    name: "c",
    weeklyDemand,
    correlation: 0,
    callOff: "daily",
    unmet: "backorder",
    lateFine: 0,
  });
  links.push({ from: `b${depth}`, to: "c" });
  return {
    format: "forebay.line/1",
    name: "Side by side",
    calendar: { tickMinutes: 5, hoursPerDay: 8, daysPerWeek: 5, weeksPerYear: 48 },
    money: { currency: "EUR", carryingRate: 0.1 },
    overtime: null,
    nodes,
    links,
  };
}

it("carries demand upstream through quantities and scrap", () => {
  expect(meanUsesAWeek(sideBySide(1, 0.2, 3))("b0")).toBeCloseTo((100 * 3) / 0.8, 9);
  expect(meanUseADay(sideBySide(2, 0.5, 1), "b0")).toBeCloseTo(100 / 0.5 / 0.5 / 5, 9);
});

it("takes effort by links, not by ways: 2^150 ways through a sound line", () => {
  const line = sideBySide(150);
  expect(parseLine(line)).toEqual({ line });
  const from = performance.now();
  expect(meanUsesAWeek(line)("b0")).toBeCloseTo(100, 6);
  cautionsOf(line);
  expect(performance.now() - from).toBeLessThan(1_000);
});

it("knows no use where a demand is missing or a circle lies downstream", () => {
  const line = sideBySide(2);
  const gap: DraftLine = {
    ...line,
    nodes: line.nodes.map((node) =>
      node.kind === "customer" ? { ...node, weeklyDemand: { type: "poisson", mean: null } } : node,
    ),
  };
  expect(meanUsesAWeek(gap)("b0")).toBeNull();
  const circle = { ...line, links: [...line.links, { from: "b2", to: "m0a" }] };
  const useOf = meanUsesAWeek(circle);
  expect([useOf("b2"), useOf("b0"), useOf("b1")]).toEqual([null, null, null]);
});
