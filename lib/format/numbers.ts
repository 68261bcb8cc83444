/** Parts thousands, and a number from its percent sign or unit. */
export const thinSpace = "\u202f";
const minus = "\u2212";

/** A number with so many decimals, thousands parted, a true minus, no minus on zero; "–" for what is no number. */
export function formatNumber(value: number, decimals = 0): string {
  if (!Number.isFinite(value)) return "–";
  const [whole, fraction] = Math.abs(value).toFixed(decimals).split(".");
  const grouped = whole.replace(/\B(?=(\d{3})+$)/g, thinSpace);
  const text = fraction ? `${grouped}.${fraction}` : grouped;
  return value < 0 && /[1-9]/.test(text) ? `${minus}${text}` : text;
}

/** A count of units, weeks or hours: whole from 100 up, one decimal below where it is not whole. */
export function formatCount(value: number): string {
  return formatNumber(value, Math.abs(value) >= 100 || Number.isInteger(value) ? 0 : 1);
}

/** A share as percent: 0.871 is "87.1 %". */
export function formatPercent(share: number, decimals = 1): string {
  return Number.isFinite(share) ? `${formatNumber(share * 100, decimals)}${thinSpace}%` : "–";
}

/** A share someone chose, with no more decimals than it has: 0.95 is "95 %", 0.975 is "97.5 %". */
export function formatChosenPercent(share: number): string {
  return `${Math.round(share * 1000) / 10}${thinSpace}%`;
}

/** Money rounded to hundreds, to tens below 1 000 and to units below 100; with the currency before it where given. */
export function formatMoney(value: number, currency?: string): string {
  const size = Math.abs(value);
  const step = size >= 1_000 ? 100 : size >= 100 ? 10 : 1;
  const text = formatNumber(Math.round(value / step) * step);
  return currency ? `${currency}\u00a0${text}` : text;
}

/** Money to the cent, as a unit's value is typed. */
export function formatUnitMoney(value: number, currency?: string): string {
  const text = formatNumber(value, 2);
  return currency ? `${currency}\u00a0${text}` : text;
}

/** Puts a plus before what is not below zero: differences carry their sign. */
export function withSign(text: string): string {
  return text.startsWith(minus) || text === "–" ? text : `+${text}`;
}

/** A difference of two shares in points: "+4.4". */
export function formatPoints(difference: number, decimals = 1): string {
  return withSign(formatNumber(difference * 100, decimals));
}

/** Decimals to which a figure may be shown, so that it is not finer than its half-width; both in the unit shown. */
export function decimalsFor(halfWidth: number | null, most = 1): number {
  if (halfWidth === null || !(halfWidth > 0)) return most;
  return Math.max(0, Math.min(most, Math.ceil(-Math.log10(halfWidth))));
}
