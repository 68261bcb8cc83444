import { differences } from "./diff";
import type { DraftLine } from "./types";

/** What differs between two lines, in at most so many lines of text; the last counts those left out. */
export function fewDifferences(from: DraftLine, to: DraftLine, most = 4): string[] {
  const found = differences(from, to).map(({ text }) => text);
  if (found.length === 0) return ["the same line"];
  return found.length > most ? [...found.slice(0, most - 1), `and ${found.length - most + 1} more`] : found;
}
