import fc from "fast-check";
import { expect, it } from "vitest";
import { parseLine } from "@/lib/line";
import { setPath } from "@/lib/line/edits/edit";
import type { Line } from "@/lib/line/types";
import { simulate } from "@/lib/simulation";
import { arbitraryLine } from "@/tests/helpers/line-arbitrary";
import { options, settings } from "./settings";

function checkAnswer(json: unknown): void {
  const answer = parseLine(json);
  if ("line" in answer) {
    // What is accepted can be run.
    expect(simulate(answer.line, { ...options, replications: 1, weeks: 1 }).fillRates).toHaveLength(1);
    return;
  }
  expect(answer.faults.length).toBeGreaterThan(0);
  for (const { message } of answer.faults) expect(message).toMatch(/^\S.*\.$/s);
}

it("answers anything that JSON can hold with a line or with faults in sentences", () => {
  fc.assert(fc.property(fc.jsonValue(), checkAnswer), settings(500));
});

const odd = fc.oneof(
  fc.constantFrom<unknown>(null, undefined, "", "x", true, [], {}, -1, 0, 1.5, 2 ** 31, 1e300, Number.NaN, -Infinity),
  fc.jsonValue(),
);

/** Paths of everything in a document. */
function pathsOf(value: unknown, path = ""): string[] {
  if (typeof value !== "object" || value === null) return [path];
  const inner = Object.entries(value).flatMap(([key, part]) => pathsOf(part, path ? `${path}.${key}` : key));
  return path ? [path, ...inner] : inner;
}

it("answers a sound line with one thing changed: a line that can run, or faults", () => {
  fc.assert(
    fc.property(arbitraryLine, fc.nat(), odd, (line, pick, value) => {
      const paths = pathsOf(line);
      checkAnswer(setPath(structuredClone(line) as unknown as Line, paths[pick % paths.length], value));
    }),
    settings(500),
  );
});
