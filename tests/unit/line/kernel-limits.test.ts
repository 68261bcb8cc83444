import { expect, it } from "vitest";
import { parseLine } from "@/lib/line";
import { differences } from "@/lib/line/diff";
import { setPath } from "@/lib/line/edits/edit";
import example from "@/lib/line/example.json";
import type { DraftLine, Fault } from "@/lib/line/types";

const line = example as unknown as DraftLine;
const station = line.nodes.findIndex(({ kind }) => kind === "station");
const faultsOf = (document: unknown): Fault[] => {
  const outcome = parseLine(document);
  return "faults" in outcome ? outcome.faults : [];
};

it.each([
  [`nodes.${station}.cycleMinutes`, 1e-300, "cycleMinutes"],
  [`nodes.${station}.cycleCv`, 1e9, "cycleCv"],
])("finds what the run would refuse: %s of %d", (path, value, field) =>
  expect(faultsOf(setPath(line, path, value)).map((fault) => fault.path)).toEqual([field]),
);

it("counts the ticks of overtime against the limit, in a sentence", () => {
  const short = setPath(line, "calendar", { tickMinutes: 0.25, hoursPerDay: 8, daysPerWeek: 5, weeksPerYear: 48 });
  const [fault, ...more] = faultsOf(setPath(short, "overtime.hoursPerWeek", 100));
  expect(more).toEqual([]);
  expect(fault.path).toBe("overtime.hoursPerWeek");
  expect(fault.message).toContain("24\u202f000 ticks");
});

it("says a missing block of a node in the trade's words", () => {
  const old = setPath(line, `nodes.${station}.stoppages`, null);
  const next = setPath(line, `nodes.${station}.stoppages`, { pattern: "perTick", upProbability: 0.95 });
  const [{ text }] = differences(old, next);
  expect(text).toContain("none → each tick on its own, share of ticks up 95\u202f%");
});
