import { describe, expect, it } from "vitest";
import { parseLine } from "@/lib/line";
import { setPath } from "@/lib/line/edits/edit";
import { exampleLine } from "@/lib/line/example";
import type { Fault } from "@/lib/line/types";

const faultsOf = (json: unknown): Fault[] => {
  const answer = parseLine(json);
  return "faults" in answer ? answer.faults : [];
};
const at = (id: string) => `nodes.${exampleLine.nodes.findIndex((node) => node.id === id)}`;
const without = (path: string, key: string) => {
  const parts = path === "" ? [] : path.split(".");
  const old = parts.reduce<unknown>((part, name) => (part as Record<string, unknown>)[name], exampleLine);
  const rest = Object.fromEntries(Object.entries(old as object).filter(([name]) => name !== key));
  return path === "" ? rest : setPath(exampleLine, path, rest);
};

const lateness = `${at("sup-lam")}.lateness`;
const demand = `${at("cus-a")}.weeklyDemand`;
const stoppages = `${at("wind")}.stoppages`;
const nothing = [null, undefined, "5", true, {}, [], Number.NaN, Number.POSITIVE_INFINITY];
const noShare = [-0.01, 1.01, ...nothing];
const noShareBelowOne = [1, ...noShare];
const negative = [-1, ...nothing];
const notWholeFromOne = [0, -1, 1.5, 2 ** 30, ...nothing];
const notAboveZero = [0, -1, ...nothing];

/** Every number of the document: where it stands, what it may not be, what it may be. */
const numbers: [path: string, refused: unknown[], taken: unknown[]][] = [
  ["calendar.tickMinutes", notAboveZero, [6, 1.5]],
  // Endless days and weeks are refused for their ticks before anything else.
  ["calendar.hoursPerDay", [25, 0, -1, null, "8", Number.NaN], [8, 16]],
  ["calendar.daysPerWeek", [8, 0, 1.5, null, "5", Number.NaN], [1, 7]],
  ["calendar.weeksPerYear", [54, ...notAboveZero], [48, 52.14]],
  ["money.carryingRate", [101, ...negative], [0, 0.25]],
  ["overtime.backlogTrigger", negative, [0, 12.5]],
  ["overtime.hoursPerWeek", [169, ...notAboveZero], [0.5, 12]],
  ["overtime.costPerHour", [1e13, ...negative], [0, 95.5]],
  [`${at("sup-lam")}.leadTimeDays`, [2 ** 30, ...negative], [0, 2.5]],
  [`${at("sup-lam")}.onTimeShare`, noShare, [0, 1]],
  [`${at("sup-lam")}.correlation`, [-0.1, 1, ...nothing], [0, 0.99]],
  [`${at("sup-lam")}.rejectRate`, noShareBelowOne, [0, 0.99]],
  [`${at("sup-lam")}.lotRejectRate`, noShareBelowOne, [0, 0.99]],
  [`${at("sup-lam")}.share`, noShare, [1]],
  [`${at("lam")}.size`, notWholeFromOne, [1, 2 ** 30 - 1]],
  [`${at("lam")}.startLevel`, [-1, 0.5, ...nothing.slice(1)], [null, 0, 9_000]],
  [`${at("stator")}.startLevel`, [49, -1, 0.5], [null, 0, 48]],
  [`${at("lam")}.unitValue`, [1e308, ...negative], [0, 0.01, 1e12]],
  [`${at("lam")}.replenishment.reviewDays`, notWholeFromOne, [1, 400]],
  [`${at("lam")}.replenishment.minimumOrder`, [-1, 0.5, ...nothing], [0, 40]],
  [`${at("lam")}.replenishment.orderMultiple`, notWholeFromOne, [1, 40]],
  [`${at("wind")}.cycleMinutes`, [1e-12, ...notAboveZero], [0.01, 60]],
  [`${at("wind")}.cycleCv`, [1_001, ...negative], [0, 3]],
  [`${at("wind")}.parallel`, notWholeFromOne, [1, 12]],
  [`${at("wind")}.scrapRate`, noShareBelowOne, [0, 0.5]],
  [`${stoppages}.meanUpHours`, notAboveZero, [0.1]],
  [`${stoppages}.meanDownHours`, notAboveZero, [0.1]],
  [`${stoppages}.downCv`, [-0.1, "1"], [null, 0, 2]],
  [`${at("cus-a")}.correlation`, [-1, 1, ...nothing], [-0.9, 0, 0.9]],
  [`${at("cus-a")}.lateFine`, [1e13, ...negative], [0, 14]],
  [`${demand}.mean`, [0, -1, 2 ** 30, ...nothing], [1]],
  [`${demand}.sd`, [-1, ...nothing], [0, 1]],
];

/** The node that a fault of this path has to point at, and the path within it. */
function placeOf(path: string): { node?: string; path: string } {
  const found = /^nodes\.(\d+)\.(.*)$/.exec(path);
  return found ? { node: exampleLine.nodes[Number(found[1])].id, path: found[2] } : { path };
}

describe("numbers", () => {
  it.each(numbers)("%s", (path, refused, taken) => {
    for (const value of refused) {
      const faults = faultsOf(setPath(exampleLine, path, value));
      expect(faults, String(value)).toEqual(
        expect.arrayContaining([expect.objectContaining({ ...placeOf(path), message: expect.stringMatching(/\.$/) })]),
      );
    }
    for (const value of taken) expect(faultsOf(setPath(exampleLine, path, value)), String(value)).toEqual([]);
  });

  it("says a missing number as missing, with what it has to be", () => {
    const [fault] = faultsOf(setPath(exampleLine, `${at("wind")}.scrapRate`, null));
    expect(fault.message).toBe("Scrap is missing. Scrap is a share: 0 to less than 100\u202f%.");
  });
});

describe("distributions", () => {
  it.each<[unknown, string | null]>([
    [{ type: "fixed", value: 400 }, null],
    [{ type: "fixed" }, "value"],
    [{ type: "normal", mean: -3, sd: 0 }, null],
    [{ type: "normal", mean: 3, sd: -1 }, "sd"],
    [{ type: "lognormal", mean: 3, sd: 0 }, null],
    [{ type: "lognormal", mean: 0, sd: 1 }, "mean"],
    [{ type: "gamma", mean: -1, sd: 1 }, "mean"],
    [{ type: "weibull", shape: 2, scale: 3 }, null],
    [{ type: "weibull", shape: 0, scale: 3 }, "shape"],
    [{ type: "weibull", shape: 1, scale: 0 }, "scale"],
    [{ type: "exponential", mean: 0 }, "mean"],
    [{ type: "uniform", min: -1, max: 2 }, null],
    [{ type: "uniform", min: 2, max: 2 }, "max"],
    [{ type: "triangular", min: 0, mode: 0, max: 1 }, null],
    [{ type: "triangular", min: 0, mode: 2, max: 1 }, "mode"],
    [{ type: "triangular", min: 1, mode: 0, max: 2 }, "mode"],
    [{ type: "triangular", min: 1, mode: 1, max: 1 }, "max"],
    [{ type: "poisson", mean: 4 }, null],
    [{ type: "poisson", mean: 0 }, "mean"],
    [{ type: "negativeBinomial", mean: 4, sd: 2.1 }, null],
    [{ type: "negativeBinomial", mean: 4, sd: 2 }, "sd"],
    [{ type: "empirical", values: [3, -1] }, null],
    [{ type: "empirical", values: [] }, "values"],
    [{ type: "empirical", values: [1, "2"] }, "values"],
    [{ type: "empirical", values: new Array(20_001).fill(1) }, "values"],
    [{ type: "bell", mean: 3 }, "type"],
    [{ mean: 3 }, "type"],
    [{ type: "normal", mean: 3, sd: 1, skew: 2 }, "skew"],
    [7, ""],
  ])("%j", (distribution, field) => {
    for (const [path, node] of [
      [demand, "cus-a"],
      [lateness, "sup-lam"],
    ]) {
      const faults = faultsOf(setPath(exampleLine, path, distribution));
      const place = placeOf(path).path;
      if (field === null) expect(faults).toEqual([]);
      else expect(faults).toMatchObject([{ node, path: field ? `${place}.${field}` : place }]);
    }
  });

  it("lets a supplier have no lateness, and a customer not have no demand", () => {
    expect(faultsOf(setPath(exampleLine, lateness, null))).toEqual([]);
    expect(faultsOf(setPath(exampleLine, demand, null))).toMatchObject([{ node: "cus-a", path: "weeklyDemand" }]);
  });
});

describe("choices, texts and blocks", () => {
  it.each<[string, unknown]>([
    ["format", "forebay.line/2"],
    ["name", ""],
    ["name", "x".repeat(201)],
    ["money.currency", "eur"],
    ["money.currency", "EURO"],
    ["money", null],
    ["calendar", []],
    ["overtime", "none"],
    [`${at("wind")}.name`, "  "],
    [`${at("sup-lam")}.keepsSequence`, "yes"],
    [`${at("sup-lam")}.disruption`, { meanDaysBetween: 0.5, meanDaysLasting: 2 }],
    [`${at("sup-lam")}.disruption`, { meanDaysBetween: 30, meanDaysLasting: 0 }],
    [`${at("cus-a")}.callOff`, "hourly"],
    [`${at("cus-a")}.unmet`, "ignored"],
    [`${at("lam")}.replenishment.rule`, "guess"],
    [`${at("lam")}.replenishment.lot`, 5],
    [stoppages, "often"],
    [`${stoppages}.pattern`, "weekly"],
    [`${stoppages}.clock`, "sometimes"],
    [stoppages, { pattern: "perTick", upProbability: 0 }],
    [stoppages, { pattern: "perTick", upProbability: 0.9, clock: "always" }],
  ])("%s cannot be %j", (path, value) => {
    const faults = faultsOf(setPath(exampleLine, path, value));
    expect(faults.length).toBeGreaterThan(0);
    const { node, path: place } = placeOf(path);
    for (const fault of faults) {
      expect(fault.node).toBe(node);
      expect(fault.path?.startsWith(place)).toBe(true);
    }
  });

  it("has a lot exactly with a reorder point", () => {
    const point = setPath(exampleLine, `${at("lam")}.replenishment.rule`, "reorderPoint");
    expect(faultsOf(point)).toMatchObject([{ node: "lam", path: "replenishment.lot" }]);
    expect(faultsOf(setPath(point, `${at("lam")}.replenishment.lot`, 50))).toEqual([]);
  });

  it("names a field that nobody knows, wherever it stands", () => {
    for (const path of [
      "",
      "calendar",
      "money",
      "overtime",
      at("wind"),
      `${at("lam")}.replenishment`,
      demand,
      "links.0",
    ]) {
      const faults = faultsOf(setPath(exampleLine, path ? `${path}.colour` : "colour", "red"));
      expect(faults, path).toHaveLength(1);
      expect(faults[0].message).toContain("“colour”".replace(/[“”]/g, '"'));
    }
    const polluted = JSON.parse(JSON.stringify(exampleLine).replace(/^\{/, '{"__proto__":{"x":1},')) as unknown;
    expect(faultsOf(polluted)).toMatchObject([{ path: "__proto__" }]);
    expect({}).not.toHaveProperty("x");
  });

  it.each([
    ["", ["format", "name", "calendar", "money", "nodes", "links"]],
    ["calendar", ["tickMinutes", "hoursPerDay", "daysPerWeek", "weeksPerYear"]],
    [
      at("sup-lam"),
      ["leadTimeDays", "onTimeShare", "correlation", "keepsSequence", "rejectRate", "lotRejectRate", "share"],
    ],
    [at("wind"), ["name", "cycleMinutes", "cycleCv", "parallel", "scrapRate"]],
    [at("cus-a"), ["weeklyDemand", "correlation", "callOff", "unmet", "lateFine"]],
  ])("misses what is not there: %s", (path, keys) => {
    for (const key of keys) expect(faultsOf(without(path, key)).length, key).toBeGreaterThan(0);
  });
});

describe("documents that are none", () => {
  it("answers even where fields lie 100 000 deep", () => {
    const depth = 100_000;
    const deep = JSON.parse(`${'{"a":'.repeat(depth)}1${"}".repeat(depth)}`) as unknown;
    expect(faultsOf(deep).length).toBeGreaterThan(0);
    expect(faultsOf({ ...exampleLine, money: deep }).length).toBeGreaterThan(0);
  });

  it("takes names of the language for ids and kinds like any other", () => {
    for (const name of ["__proto__", "constructor", "toString"]) {
      expect(faultsOf(setPath(exampleLine, `${at("wind")}.kind`, name))).toContainEqual(
        expect.objectContaining({ node: "wind", path: "kind" }),
      );
      expect(faultsOf(setPath(exampleLine, `${demand}.type`, name))).toMatchObject([{ path: "weeklyDemand.type" }]);
    }
  });

  it.each([null, 7, "line", true, [], [exampleLine], {}])("%j", (json) =>
    expect(faultsOf(json).length).toBeGreaterThan(0),
  );

  it("finds all faults at once", () => {
    let bad = setPath(exampleLine, `${at("wind")}.scrapRate`, 2);
    bad = setPath(bad, `${at("lam")}.size`, 0);
    bad = setPath(bad, "money.currency", "?");
    expect(faultsOf(bad).map(({ node, path }) => [node, path])).toEqual([
      [undefined, "money.currency"],
      ["lam", "size"],
      ["wind", "scrapRate"],
    ]);
  });
});

describe("sizes beyond the limits are refused first, alone and at once", () => {
  const node = exampleLine.nodes[0];
  it.each<[string, unknown, string]>([
    ["a million ticks a week", setPath(exampleLine, "calendar.tickMinutes", (80 * 60) / 1e6), "20\u202f000"],
    ["5 000 nodes", { ...exampleLine, nodes: new Array(5_000).fill(node) }, "500"],
    ["2 000 links", { ...exampleLine, links: new Array(2_000).fill({ from: "a", to: "b" }) }, "1\u202f000"],
  ])("%s", (_, json, limit) => {
    const start = performance.now();
    const faults = faultsOf(json);
    expect(performance.now() - start).toBeLessThan(100);
    expect(faults).toHaveLength(1);
    expect(faults[0].message).toContain(limit);
  });

  it("a billion units are refused at the field, with the limit", () => {
    const [fault] = faultsOf(setPath(exampleLine, `${at("lam")}.size`, 2e9));
    expect(fault).toMatchObject({ node: "lam", path: "size" });
    expect(fault.message).toContain("1\u202f073\u202f741\u202f824");
  });

  it("a day has to be a whole number of ticks", () => {
    expect(faultsOf(setPath(exampleLine, "calendar.tickMinutes", 7))).toMatchObject([{ path: "calendar.tickMinutes" }]);
    // So long a tick that a day is none of it, within rounding.
    expect(faultsOf(setPath(exampleLine, "calendar.tickMinutes", 1e13))).toMatchObject([
      { path: "calendar.tickMinutes" },
    ]);
    expect(faultsOf(setPath(exampleLine, "calendar.tickMinutes", 3_000))).toMatchObject([
      { path: "calendar.tickMinutes" },
    ]);
  });
});
