import { formatMoney, formatNumber, formatPoints } from "@/lib/format";
import type { PairedDifferences } from "@/lib/simulation";
import type { Figure } from "@/lib/simulation/types";

const parts: Record<string, string> = {
  "0.5": "half",
  "0.25": "quarter",
  "0.2": "fifth",
  "0.1": "tenth",
  "0.05": "twentieth",
  "0.02": "fiftieth",
  "0.01": "hundredth",
};

/** The weeks that an accepted risk gives up: "the worst tenth of weeks". */
export function worstWeeks(acceptedRisk: number): string {
  const part = parts[String(Number(acceptedRisk.toFixed(4)))];
  return part ? `the worst ${part} of weeks` : `the worst ${formatNumber(acceptedRisk * 100, 1)}\u202f% of weeks`;
}

/** Whether the interval of a difference leaves its sign open. */
export function isOpen({ value, halfWidth }: Figure): boolean {
  return !(Math.abs(value) > (halfWidth ?? 0)) || Math.abs(value) < 5e-5;
}

/**
 * What one scenario does against the base, in a sentence: fill rate at the edge of the accepted risk with its interval,
 * then money.
 */
export function sayDifference(
  name: string,
  baseName: string,
  { atRisk, moneyTiedUp, costPerYear }: PairedDifferences,
  acceptedRisk: number,
  currency: string,
): string {
  const where = `At the edge of ${worstWeeks(acceptedRisk)}`;
  const [least, most] = [atRisk.value - (atRisk.halfWidth ?? 0), atRisk.value + (atRisk.halfWidth ?? 0)];
  const ships = isOpen(atRisk)
    ? `${where} these weeks do not tell ${name} from ${baseName} (${formatPoints(least)} to ${formatPoints(most)} points)`
    : `${where} ${name} ships ${points(atRisk.value)} points ${atRisk.value > 0 ? "more" : "less"} than ${baseName}${
        atRisk.halfWidth === null
          ? ""
          : `, between ${points(Math.min(Math.abs(least), Math.abs(most)))} and ${points(Math.max(Math.abs(least), Math.abs(most)))}`
      }`;
  return `${ships}; it ties up ${money(moneyTiedUp, currency)} and costs ${money(costPerYear, currency)} a year.`;
}

const points = (share: number) => formatNumber(Math.abs(share) * 100, 1);

function money(difference: Figure, currency: string): string {
  if (isOpen(difference)) return "about as much";
  return `${formatMoney(Math.abs(difference.value), currency)} ${difference.value > 0 ? "more" : "less"}`;
}
