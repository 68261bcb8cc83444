import type { Customer, Distribution, Line, Replenishment, Supplier } from "@/lib/line/types";
import { type TextbookSize, textbookSizes } from "@/lib/sizing/textbook";
import { customer, line, purchased, supplier } from "./small-lines";

/** Eight hours of one tick each, five days. */
export const daily = { tickMinutes: 60, hoursPerDay: 8, daysPerWeek: 5, weeksPerYear: 48 };

export type Stock = {
  calendar: Line["calendar"];
  lead: number;
  demand: Distribution;
  rule?: Partial<Replenishment>;
  more?: Partial<Supplier>;
  takes?: Partial<Customer>;
};

/** A customer who draws on a purchased buffer, and nothing else. */
export function stock({ calendar, lead, demand, rule, more, takes }: Stock): Line {
  const store = purchased("store", 1);
  return line(
    [
      supplier("s", lead, more),
      { ...store, replenishment: { ...store.replenishment!, ...rule } },
      customer("c", demand, takes),
    ],
    [
      ["s", "store"],
      ["store", "c"],
    ],
    { calendar },
  );
}

export function sizeOf(of: Line, risk: number, id = "store"): Extract<TextbookSize, { applies: true }> {
  const found = textbookSizes(of, risk).find((one) => one.id === id);
  if (!found?.applies) throw new Error(`no size for ${id}: ${found?.reason ?? "not there"}`);
  return found;
}

export const normal = (mean: number, sd: number): Distribution => ({ type: "normal", mean, sd });
export const reorderPoint = { rule: "reorderPoint", lot: 10_000 } as const;
