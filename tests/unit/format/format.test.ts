import { describe, expect, it } from "vitest";
import {
  decimalsFor,
  formatAmount,
  formatChosenPercent,
  formatCount,
  formatDateTime,
  formatMoney,
  formatMoneyFigure,
  formatNumber,
  formatPercent,
  formatPoints,
  formatShare,
  formatUnitMoney,
  headlineSentence,
  oneIn,
  percentileName,
  plural,
  weeksOf,
} from "@/lib/format";

describe("numbers", () => {
  it("parts thousands by a narrow no-break space and has a true minus", () => {
    expect(formatNumber(1_234_567.891, 2)).toBe("1\u202f234\u202f567.89");
    expect(formatNumber(-1_234)).toBe("\u22121\u202f234");
    expect(formatNumber(-0.04, 1)).toBe("0.0");
    expect(formatNumber(Number.NaN)).toBe("–");
    expect(formatCount(99.96)).toBe("100.0");
    expect(formatCount(1_500)).toBe("1\u202f500");
    expect(formatCount(12.34)).toBe("12.3");
  });

  it("writes shares as percent", () => {
    expect(formatPercent(0.8713)).toBe("87.1\u202f%");
    expect(formatPercent(Number.NaN)).toBe("–");
    expect(formatChosenPercent(0.95)).toBe("95\u202f%");
    expect(formatChosenPercent(0.025)).toBe("2.5\u202f%");
    expect(formatPoints(0.044)).toBe("+4.4");
    expect(formatPoints(-0.044)).toBe("\u22124.4");
  });

  it("rounds money as far as it is worth reading", () => {
    expect(formatMoney(168_249, "EUR")).toBe("EUR\u00a0168\u202f200");
    expect(formatMoney(944)).toBe("940");
    expect(formatMoney(94.4)).toBe("94");
    expect(formatUnitMoney(4.1, "EUR")).toBe("EUR\u00a04.10");
  });
});

describe("figures", () => {
  it("is never finer than its half-width says", () => {
    expect(formatShare({ value: 0.8713, halfWidth: 0.0071 })).toEqual({ value: "87.1\u202f%", spread: "±\u202f0.7" });
    expect(formatShare({ value: 0.3123, halfWidth: 0.124 })).toEqual({ value: "31\u202f%", spread: "±\u202f12.4" });
    expect(formatAmount({ value: 12.34, halfWidth: 3.2 }).value).toBe("12");
    expect(decimalsFor(0.004, 3)).toBe(3);
    expect(decimalsFor(null)).toBe(1);
  });

  it("says a bound where a share came out 0 or 1", () => {
    expect(formatShare({ value: 0, halfWidth: null, bound: 0.0149 }).value).toBe("at most 1.5\u202f%");
    expect(formatShare({ value: 1, halfWidth: null, bound: 0.985 }).value).toBe("at least 98.5\u202f%");
  });

  it("shows no half-width where there is none", () => {
    expect(formatMoneyFigure({ value: 155_699, halfWidth: null }, "EUR")).toEqual({
      value: "EUR\u00a0155\u202f700",
      spread: null,
    });
  });
});

describe("sentences", () => {
  it.each([
    [0.5, 1, 2],
    [0.2, 4, 5],
    [0.1, 9, 10],
    [0.05, 19, 20],
    [0.025, 39, 40],
    [0.01, 99, 100],
    [0.15, 17, 20],
    [0.123, 877, 1_000],
  ])("an accepted risk of %d is %d of %d weeks", (risk, reached, of) => expect(weeksOf(risk)).toEqual({ reached, of }));

  it("names the percentile and how often it is missed", () => {
    expect(percentileName(0.1)).toBe("P10");
    expect(percentileName(0.025)).toBe("P2.5");
    expect(oneIn(0.1)).toBe("1 in 10");
    expect(oneIn(0.15)).toBe("15 in 100");
    expect(plural(1, "week")).toBe("week");
    expect(plural(0, "week")).toBe("weeks");
  });

  it("says what ships, or that nothing is due", () => {
    expect(Object.values(headlineSentence({ value: 0.871, halfWidth: 0.007 }, 0.1)).join(" ")).toBe(
      "In 9 of 10 weeks we ship at least 87.1\u202f% of what is due.",
    );
    expect(headlineSentence({ value: Number.NaN, halfWidth: null }, 0.1).value).toBe("no fill rate");
  });

  it("writes dates in the reader's time", () => {
    const instant = new Date(2026, 10, 24, 14, 2);
    expect(formatDateTime(instant)).toBe("24 Nov 2026, 14:02");
    expect(formatDateTime("no date")).toBe("–, –");
  });
});
