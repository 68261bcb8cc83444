import driveUnit from "./example.json";
import type { DraftLine, Line } from "./types";

/** The drive unit line of Larkfield Drives, an invented plant. */
export const exampleLine = driveUnit as Line;

/** A line with nothing drawn yet, on a plain two-shift calendar. */
export function emptyLine(name: string): DraftLine {
  return {
    format: "forebay.line/1",
    name,
    calendar: { tickMinutes: 6, hoursPerDay: 16, daysPerWeek: 5, weeksPerYear: 48 },
    money: { currency: "EUR", carryingRate: 0.2 },
    overtime: null,
    nodes: [],
    links: [],
  };
}
