import { expect, it } from "vitest";
import { autoLayout } from "@/lib/line/auto-layout";
import { setPath } from "@/lib/line/edits/edit";
import { exampleLine } from "@/lib/line/example";
import { readLineFile, writeLineFile } from "@/lib/line/file";
import type { DraftLine, LineFile } from "@/lib/line/types";

const file: LineFile = {
  line: exampleLine as DraftLine,
  layout: autoLayout(exampleLine as DraftLine),
  notes: [{ id: "n1", x: 10, y: 20, text: "Boards wait.", author: "Ines Kallweit", at: "2026-11-24T14:02:00Z" }],
};
const plain = () => JSON.parse(writeLineFile(file)) as LineFile;

it("reads back what it wrote, layout and notes too", () => expect(readLineFile(plain())).toEqual(file));

it("opens a bare line document, and one with gaps", () => {
  expect(readLineFile(exampleLine)).toEqual({ line: exampleLine, layout: { positions: {} }, notes: [] });
  const gap = setPath(exampleLine as DraftLine, "nodes.0.leadTimeDays", null);
  expect(readLineFile(gap).line.nodes[0]).toMatchObject({ leadTimeDays: null });
});

it.each([
  ["no document", [1, 2]],
  ["a text", "line"],
  ["another format", { ...exampleLine, format: "forebay.line/9" }],
  ["nothing in it", {}],
  ["a kind that nobody knows", setPath(exampleLine, "nodes.0.kind", "robot")],
  ["a text for a number", setPath(exampleLine, "nodes.0.leadTimeDays", "ten")],
  ["a place that is none", { ...plain(), layout: { positions: { lam: { x: "left", y: 0 } } } }],
  ["a note without an author", { ...plain(), notes: [{ id: "n", x: 0, y: 0, text: "", at: "2026-11-24T14:02:00Z" }] }],
])("refuses a file with %s in a sentence", (_, json) => {
  expect(() => readLineFile(json)).toThrow(/^This file .*\.$/s);
});

it("refuses fields that it would lose, and names where they stand", () => {
  const odd = setPath(setPath(exampleLine, "nodes.1.colour", "red"), "calendar.shifts", 2);
  expect(() => readLineFile(odd)).toThrow(
    /line\.calendar\.shifts: unknown field.*line\.nodes\.1\.colour: unknown field/s,
  );
  for (const [path, value] of [
    ["size", 3],
    ["layout.zoom", 2],
    ["layout.positions.lam.z", 1],
    ["notes.0.colour", "red"],
  ] as const)
    expect(() => readLineFile(setPath(plain(), path, value))).toThrow(`${path}: unknown field`);
  // Also where a limit would refuse the line's numbers first.
  expect(() => readLineFile(setPath(odd, "calendar.tickMinutes", 0.001))).toThrow(/unknown field/);
});

it("refuses sizes beyond the limits by name", () => {
  const many = { ...exampleLine, nodes: new Array(501).fill(exampleLine.nodes[0]) };
  expect(() => readLineFile(many)).toThrow(/501 nodes; the limit is 500/);
  const links = { ...exampleLine, links: new Array(1_001).fill(exampleLine.links[0]) };
  expect(() => readLineFile(links)).toThrow(/1\u202f001 links; the limit is 1\u202f000/);
});
