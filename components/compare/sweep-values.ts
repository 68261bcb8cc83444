import { formatCount, formatNumber } from "@/lib/format";
import type { Sweep } from "@/lib/schema/lines";
import type { Quantity } from "@/lib/sizing/quantities";
import { factorOf, sizeKind, type ValueKind } from "@/lib/sizing/sweep";

/** The kind of a quantity's values; a buffer's size has rules of its own. */
export function kindOf({ path, isWhole, unit }: Quantity): ValueKind {
  return path === "size" ? sizeKind : { isWhole, unit, least: isWhole ? 0 : -Infinity, word: "value" };
}

/** A value with its unit, as tables and sentences show it: "3 900", "2.5 %", "25 days". */
export function showValue(value: number, unit: string): string {
  const text = showBare(value, unit);
  if (unit === "%") return `${text}\u202f%`;
  return unit === "" || unit === "units" ? text : `${text}\u202f${unit}`;
}

/** The same without its unit, for axes and columns that name it. */
export function showBare(value: number, unit: string): string {
  const shown = Number((value * factorOf({ unit })).toPrecision(6));
  if (Number.isInteger(shown)) return formatCount(shown);
  const decimals = String(shown).split(".")[1]?.length ?? 0;
  return formatNumber(shown, Math.min(4, decimals));
}

/** What is varied, in words: "Controller boards", "Magnet sets: lead time, days". */
export function sayQuantity({ bufferName, quantity }: Pick<Sweep, "bufferName" | "quantity">): string {
  return quantity === undefined ? bufferName : `${bufferName}: ${quantity}`;
}

/** Head of the column of values: "Size, units", "lead time, days", "scrap, %". */
export function valueHead({ quantity, unit }: Pick<Sweep, "quantity" | "unit">): string {
  if (quantity === undefined) return "Size, units";
  return unit === "" || quantity.includes(`, ${unit}`) ? quantity : `${quantity}, ${unit}`;
}
