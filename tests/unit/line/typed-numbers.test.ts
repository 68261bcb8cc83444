import { expect, it } from "vitest";
import { explainNumber, readCells, readNumber } from "@/lib/line/clipboard";

it.each([
  ["1,5", 1.5],
  ["1.234,56", 1234.56],
  ["1,234.56", 1234.56],
  ["1\u202f234,5", 1234.5],
  ["1'234", 1234],
  ["\u22125", -5],
  ["12 %", 0.12],
  ["0,125", 0.125],
  [".5", 0.5],
  ["5.", 5],
  ["1e5", 100_000],
])("reads %s", (text, value) => expect(readNumber(text)).toBe(value));

it.each(["abc", "-", "0x10", "Infinity", "1e400", "1.2.3,4", "1,23.5", "1,23,456", "5-", "--5"])(
  "does not guess at %s",
  (text) => expect(readNumber(text)).toBeNaN(),
);

it.each(["1,250", "12,500", "\u22121,250", "1,250 %"])("asks which is meant by %s, and takes it as a count", (text) => {
  expect(readNumber(text)).toBeNaN();
  expect(explainNumber(text)).toMatch(/thousands mark or a decimal comma/);
  expect(explainNumber("abc")).toBe("“abc” is not a number");
});

it("takes a mark before three digits of a count as one of thousands", () => {
  expect(readNumber("1,250", true)).toBe(1250);
  expect(readNumber("1.250", true)).toBe(1250);
  expect(readNumber("1.250")).toBe(1.25);
  expect(readNumber("1,250,000")).toBe(1_250_000);
});

it("leaves an empty cell empty", () => expect(readNumber(" ")).toBeNull());

it("reads quoted cells and the last line end of a spreadsheet", () =>
  expect(readCells('"a\tb"\t"q""q"\r\n1\t2\r\n')).toEqual([
    ["a\tb", 'q"q'],
    ["1", "2"],
  ]));
