import { limits, sayCount } from "./limits";
import type { Fault } from "./types";

/** What is allowed in a number field; `sentence` says it to a planner. */
export type NumberRule = { allows(value: number): boolean; sentence: string };

export type Place = Pick<Fault, "node" | "link">;

/** Collects faults; every reader returns whether its field is sound. */
export class Checker {
  readonly faults: Fault[] = [];

  add(place: Place, path: string | undefined, message: string): false {
    this.faults.push(path === undefined ? { ...place, message } : { ...place, path, message });
    return false;
  }

  /** A JSON object with exactly these keys; unknown and missing keys are faults. */
  keys(
    value: unknown,
    place: Place,
    path: string,
    what: string,
    known: readonly string[],
    optional: readonly string[] = [],
  ): value is Record<string, unknown> {
    if (!isRecord(value)) return this.add(place, path || undefined, `${what} has to be a set of named fields.`);
    for (const key of Object.keys(value))
      if (!known.includes(key) && !optional.includes(key))
        this.add(place, join(path, key), `${what} has an unknown field "${shorten(key)}". Take it out.`);
    return true;
  }

  number(value: unknown, place: Place, path: string, name: string, rule: NumberRule): value is number {
    if (value === null || value === undefined) return this.add(place, path, `${name} is missing. ${rule.sentence}`);
    if (typeof value !== "number" || !Number.isFinite(value))
      return this.add(place, path, `${name} has to be a number. ${rule.sentence}`);
    if (!rule.allows(value)) return this.add(place, path, rule.sentence);
    return true;
  }

  text(value: unknown, place: Place, path: string, name: string): value is string {
    if (typeof value !== "string" || value.trim() === "")
      return this.add(place, path, `${name} is missing. Type a text.`);
    if (value.length > limits.textLength)
      return this.add(place, path, `${name} is longer than ${limits.textLength} characters. Shorten it.`);
    return true;
  }

  yesNo(value: unknown, place: Place, path: string, name: string): boolean {
    return typeof value === "boolean" || this.add(place, path, `${name} has to be yes or no (true or false).`);
  }

  oneOf(value: unknown, place: Place, path: string, name: string, allowed: readonly string[]): boolean {
    return (
      (typeof value === "string" && allowed.includes(value)) ||
      this.add(place, path, `${name} has to be one of: ${allowed.join(", ")}.`)
    );
  }
}

export function isRecord(value: unknown): value is Record<string, unknown> {
  return typeof value === "object" && value !== null && !Array.isArray(value);
}

export function shorten(text: string): string {
  return text.length > 40 ? `${text.slice(0, 39)}…` : text;
}

export const join = (path: string, key: string) => (path ? `${path}.${key}` : key);

const countLimit = `below ${sayCount(limits.count)}`;

/** Rules of the model page, section 1, each with a sentence about the field it is used for. */
export const rule = {
  share: (what: string): NumberRule => ({
    allows: (v) => v >= 0 && v <= 1,
    sentence: `${what} is a share: 0 to 100\u202f%.`,
  }),
  shareBelowOne: (what: string): NumberRule => ({
    allows: (v) => v >= 0 && v < 1,
    sentence: `${what} is a share: 0 to less than 100\u202f%.`,
  }),
  shareAboveZero: (what: string): NumberRule => ({
    allows: (v) => v > 0 && v <= 1,
    sentence: `${what} is a share: more than 0, up to 100\u202f%.`,
  }),
  correlation: (isSigned: boolean): NumberRule => ({
    allows: (v) => (isSigned ? v > -1 : v >= 0) && v < 1,
    sentence: `Correlation is a number from ${isSigned ? "more than \u22121" : "0"} to less than 1.`,
  }),
  atLeastZero: (what: string): NumberRule => ({ allows: (v) => v >= 0, sentence: `${what} has to be 0 or more.` }),
  money: (what: string): NumberRule => ({
    allows: (v) => v >= 0 && v <= limits.money,
    sentence: `${what} has to be 0 or more, up to ${sayCount(limits.money)}.`,
  }),
  aboveZero: (what: string): NumberRule => ({ allows: (v) => v > 0, sentence: `${what} has to be more than 0.` }),
  atLeastOne: (what: string): NumberRule => ({ allows: (v) => v >= 1, sentence: `${what} has to be 1 or more.` }),
  wholeFromOne: (what: string): NumberRule => ({
    allows: (v) => Number.isInteger(v) && v >= 1 && v < limits.count,
    sentence: `${what} has to be a whole number, 1 or more and ${countLimit}.`,
  }),
  wholeFromZero: (what: string): NumberRule => ({
    allows: (v) => Number.isInteger(v) && v >= 0 && v < limits.count,
    sentence: `${what} has to be a whole number, 0 or more and ${countLimit}.`,
  }),
  any: (what: string): NumberRule => ({ allows: () => true, sentence: `${what} has to be a number.` }),
};
