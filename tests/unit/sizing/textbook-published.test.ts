import { describe, expect, it } from "vitest";
import { exampleLine } from "@/lib/line/example";
import type { Distribution, Line } from "@/lib/line/types";
import { simulate } from "@/lib/simulation";
import { withSizes } from "@/lib/sizing/problem";
import { averageSizes, safetyStock, textbookSizes } from "@/lib/sizing/textbook";
import { daily, normal, reorderPoint, sizeOf, stock } from "@/tests/helpers/one-stock";
import { buffer, customer, line, periodic, purchased, station, supplier } from "@/tests/helpers/small-lines";

// A week of one day is a period of the texts. Citations from memory, digits computed again, unless it says otherwise.
describe("textbookSizes against published cases", () => {
  it("z: quantiles of the standard normal table", () => {
    const of = stock({ calendar: periodic, lead: 1, demand: normal(10, 1) });
    for (const [risk, z] of [
      [0.5, 0],
      [0.25, 0.6745],
      [0.1, 1.2816],
      [0.05, 1.6449],
      [0.01, 2.3263],
      [0.001, 3.0902],
    ])
      expect(sizeOf(of, risk).z).toBeCloseTo(z, 4);
  });

  it("E08: order up to, weekly N(2500, 500), lead 2, review 4, 90 %: 1 570 and 16 570 [Chopra & Meindl, safety inventory]", () => {
    const of = stock({ calendar: periodic, lead: 2, demand: normal(2500, 500), rule: { reviewDays: 4 } });
    const found = sizeOf(of, 0.1);
    expect(found).toMatchObject({ meanUse: 2500, sdUse: 500, leadDays: 6, reviewDays: 4, cycleStock: 15_000 });
    expect(found.safetyStock).toBeCloseTo(1569.5737073246112, 6);
    expect(found.size).toBe(16_570);
  });

  it("E07: reorder point, weekly N(2500, 500), lead 2: 6 000 for 92 % [Chopra & Meindl]; the review is no part of it", () => {
    for (const reviewDays of [1, 4]) {
      const rule = { ...reorderPoint, reviewDays };
      const found = sizeOf(stock({ calendar: periodic, lead: 2, demand: normal(2500, 500), rule }), 1 - 0.92135);
      expect(found).toMatchObject({ leadDays: 2, reviewDays: 0, cycleStock: 5000, size: 6000 });
      expect(found.safetyStock).toBeCloseTo(1000, 1);
    }
  });

  it("E09: D 2500, s_D 500, L 7, s_L 7, 90 %: 22 491 [Chopra & Meindl]", () => {
    expect(safetyStock(1.2815515655446004, 7, 2500, 500, 7)).toBeCloseTo(22491.138696520975, 6);
    const more = { lateness: { type: "gamma", mean: 5, sd: 7 }, onTimeShare: 0 } as const;
    const of = stock({ calendar: periodic, lead: 2, demand: normal(2500, 500), rule: reorderPoint, more });
    expect(sizeOf(of, 0.1)).toMatchObject({ leadDays: 7, sdLeadDays: 7 });
    expect(sizeOf(of, 0.1).safetyStock).toBeCloseTo(22491.138696520975, 6);
  });

  it.each([
    ["E04, [Cachon & Terwiesch, order-up-to exercise]", normal(40, 20), 2, 1, 0.02, 191.143949184071],
    ["E05, [Cachon & Terwiesch, order-up-to exercise]", normal(100, 65), 5, 1, 0.01, 970.393741614552],
    ["E18, [closed form, not from memory]", normal(100, 20), 2, 2, 1 - 0.9772498680518208, 480],
  ])("%s", (_, demand, lead, reviewDays, risk, exact) => {
    const found = sizeOf(stock({ calendar: periodic, lead, demand, rule: { reviewDays } }), risk);
    expect(found.cycleStock + found.safetyStock).toBeCloseTo(exact, 6);
    expect(found.size).toBe(Math.ceil(exact - 1e-6));
  });

  it("E17: lead 1, 2 or 3, Poisson 3: variance 13.5, above the 12.375 there is when orders cross [computed]", () => {
    const lateness: Distribution = { type: "empirical", values: [-1, 0, 0, 1] };
    const more = { lateness, onTimeShare: 0 };
    const of = stock({ calendar: periodic, lead: 2, demand: { type: "poisson", mean: 3 }, more });
    // 14 units keep 93.1 % of periods in full; the formula asks for one more.
    const found = sizeOf(of, 1 - 0.9310755800425948);
    expect((found.safetyStock / found.z) ** 2).toBeCloseTo(13.5, 9);
    expect(found).toMatchObject({ cycleStock: 9, size: 15 });
  });
});

describe("textbookSizes: what goes into them", () => {
  it("spreads a week's variance over its days", () => {
    const found = sizeOf(stock({ calendar: daily, lead: 1, demand: normal(500, 50) }), 0.1);
    expect(found.meanUse).toBeCloseTo(100, 12);
    expect(found.sdUse).toBeCloseTo(50 / Math.sqrt(5), 12);
  });

  /** Rotor shafts, two to a drive, beside one more in a spare set; 10 % of drives are scrap. */
  const twoWays = line(
    [
      supplier("s", 3),
      purchased("shafts", 1),
      station("drives", { scrapRate: 0.1 }),
      station("sets"),
      buffer("drive", 50),
      buffer("set", 50),
      station("pack"),
      buffer("packed", 50),
      customer("north", normal(300, 30)),
      customer("south", { type: "negativeBinomial", mean: 200, sd: 40 }, { correlation: 0.5 }),
    ],
    [
      ["s", "shafts"],
      ["shafts", "drives", 2],
      ["shafts", "sets"],
      ["drives", "drive"],
      ["sets", "set"],
      ["drive", "pack"],
      ["set", "pack"],
      ["pack", "packed"],
      ["packed", "north"],
      ["packed", "south"],
    ],
    { calendar: daily },
  );

  it("carries demand through quantities and scrap; two ways from one product vary together, customers apart", () => {
    const each = 2 / 0.9 + 1;
    const found = sizeOf(twoWays, 0.1, "shafts");
    expect(found.meanUse).toBeCloseTo((each * 500) / 5, 9);
    expect(found.sdUse).toBeCloseTo((each * 50) / Math.sqrt(5), 9);
  });

  it("agrees with the units that a simulated line orders", () => {
    const roomy = { ...twoWays, calendar: { ...daily, tickMinutes: 6 } };
    const fast = roomy.nodes.map((node) => (node.kind === "station" ? { ...node, cycleMinutes: 2 } : node));
    const options = { seed: "use", replications: 20, weeks: 400, warmupWeeks: 10, targetFillRate: 1 };
    const sized = withSizes({ ...roomy, nodes: fast }, { shafts: 3000, drive: 600, set: 600, packed: 900 });
    const { unitsOrderedPerWeek } = simulate(sized, options).suppliers.s;
    expect(unitsOrderedPerWeek.halfWidth!).toBeLessThan(10);
    const expected = sizeOf(twoWays, 0.1, "shafts").meanUse * 5;
    expect(Math.abs(unitsOrderedPerWeek.value - expected)).toBeLessThan(2 * unitsOrderedPerWeek.halfWidth!);
  });

  it("mixes deliveries on time with late ones, and suppliers by their shares", () => {
    // Triangular(8, 10, 18): mean 12, variance 14/3 (F19, standard identities).
    const lateness: Distribution = { type: "triangular", min: 8, mode: 10, max: 18 };
    const store = purchased("store", 1);
    const of = line(
      [
        supplier("near", 2, { share: 0.75, lateness, onTimeShare: 0.5 }),
        supplier("far", 20, { share: 0.25 }),
        { ...store, replenishment: { ...store.replenishment!, reviewDays: 5 } },
        customer("c", normal(100, 10)),
      ],
      [
        ["near", "store"],
        ["far", "store"],
        ["store", "c"],
      ],
      { calendar: daily },
    );
    // 2 days in 3/8 of the cases, about 14 in 3/8, 20 in 1/4: E and E of the square by hand.
    const mean = 0.375 * 2 + 0.375 * 14 + 0.25 * 20;
    const square = 0.375 * 4 + 0.375 * (196 + 14 / 3) + 0.25 * 400;
    expect(sizeOf(of, 0.1).leadDays).toBeCloseTo(mean + 5, 12);
    expect(sizeOf(of, 0.1).sdLeadDays).toBeCloseTo(Math.sqrt(square - mean * mean), 12);
  });

  it("refuses with a reason where it has no meaning", () => {
    const reasonOf = (of: Line) => textbookSizes(of, 0.1).map((one) => (one.applies ? null : one.reason));
    const of = { calendar: daily, lead: 2, demand: normal(100, 10) };
    const wild: Distribution = { type: "weibull", shape: 0.004, scale: 1 };
    expect(reasonOf(stock({ ...of, demand: { type: "fixed", value: 0 } }))).toEqual([
      expect.stringMatching(/draws on it/),
    ]);
    expect(reasonOf(stock({ ...of, demand: wild }))).toEqual([expect.stringMatching(/^demand .* no mean/)]);
    expect(reasonOf(stock({ ...of, more: { lateness: wild, onTimeShare: 0.9 } }))).toEqual([
      expect.stringMatching(/^its lateness has no mean/),
    ]);
    expect(reasonOf(stock({ ...of, more: { lateness: wild, onTimeShare: 1 } }))).toEqual([null]);
    expect(reasonOf(stock({ ...of, more: { lateness: normal(-5, 1), onTimeShare: 0 } }))).toEqual([
      expect.stringMatching(/early/),
    ]);
    expect(reasonOf(stock({ ...of, demand: normal(1e10, 10) }))).toEqual([expect.stringMatching(/more units/)]);
    expect(averageSizes(stock({ ...of, demand: wild }))).toEqual({});
  });

  it("is not touched by a customer without moments who draws on another buffer", () => {
    const alone = stock({ calendar: daily, lead: 2, demand: normal(100, 10) });
    const wild: Distribution = { type: "weibull", shape: 0.004, scale: 1 };
    const beside = {
      ...alone,
      nodes: [...alone.nodes, supplier("s2", 2), purchased("other", 1), customer("c2", wild)],
      links: [...alone.links, { from: "s2", to: "other" }, { from: "other", to: "c2" }],
    };
    expect(textbookSizes(beside, 0.1)[0]).toEqual(textbookSizes(alone, 0.1)[0]);
    expect(textbookSizes(beside, 0.1)[1].applies).toBe(false);
  });

  it.each([0, 1, -0.1, Number.NaN])("takes no accepted risk of %d", (risk) => {
    expect(() => textbookSizes(exampleLine, risk)).toThrow(RangeError);
  });

  it("sizes every purchased part of the plant, none that stations feed", () => {
    const ids = exampleLine.nodes.flatMap((node) => (node.kind === "buffer" && node.replenishment ? [node.id] : []));
    const sizes = textbookSizes(exampleLine, 0.1);
    expect(sizes.map(({ id }) => id)).toEqual(ids);
    expect(Object.keys(averageSizes(exampleLine))).toEqual(ids);
    for (const { id } of sizes)
      expect(sizeOf(exampleLine, 0.1, id).size).toBeGreaterThan(averageSizes(exampleLine)[id]);
  });
});
