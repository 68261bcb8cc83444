import type { Figure } from "@/lib/simulation/types";
import { formatPercent } from "./numbers";

/** "9 of 10" for an accepted risk of 10 %; the smallest whole numbers that say it, else of 100 or of 1 000. */
export function weeksOf(acceptedRisk: number): { reached: number; of: number } {
  for (const total of [2, 3, 4, 5, 10, 20, 40, 50, 100, 200, 1_000]) {
    const missed = acceptedRisk * total;
    if (Math.round(missed) >= 1 && Math.abs(missed - Math.round(missed)) < 1e-6)
      return { reached: total - Math.round(missed), of: total };
  }
  return { reached: Math.round((1 - acceptedRisk) * 1_000), of: 1_000 };
}

/** The percentile that belongs to an accepted risk: "P10" for 10 %. */
export function percentileName(acceptedRisk: number): string {
  return `P${Number((acceptedRisk * 100).toFixed(1))}`;
}

/** "1 in 10" weeks fall below: how often a percentile is missed. */
export function oneIn(share: number): string {
  const n = 1 / share;
  return Math.abs(n - Math.round(n)) < 1e-6 ? `1 in ${Math.round(n)}` : `${Number((share * 100).toFixed(1))} in 100`;
}

/**
 * The headline in three parts, so that the number can be set in bold.
 * @param figure - Fill rate at the accepted risk, a share.
 */
export function headlineSentence(
  figure: Figure,
  acceptedRisk: number,
): { before: string; value: string; after: string } {
  const { reached, of } = weeksOf(acceptedRisk);
  if (!Number.isFinite(figure.value))
    return { before: "Nothing is due in these weeks, so there is", value: "no fill rate", after: "to read." };
  return {
    before: `In ${reached} of ${of} weeks we ship at least`,
    value: formatPercent(figure.value, 1),
    after: "of what is due.",
  };
}

/** One or many: "1 week", "3 weeks". */
export function plural(n: number, one: string, many = `${one}s`): string {
  return n === 1 ? one : many;
}
