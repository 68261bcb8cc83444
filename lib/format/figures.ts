import type { Figure } from "@/lib/simulation/types";
import { decimalsFor, formatMoney, formatNumber, formatPercent, thinSpace } from "./numbers";

/** A figure in words of its own: value and, in the same unit, what it may be off by. */
export type FigureText = { value: string; spread: string | null };

/**
 * A share as percent, to a tenth of a point unless its half-width reaches ten, with that half-width in points. A share that came out 0 or 1 reads "at most" or "at least" its
 * bound and has no spread.
 */
export function formatShare(figure: Figure, most = 1): FigureText {
  const { value, halfWidth, bound } = figure;
  if (bound !== undefined)
    return { value: `at ${value === 0 ? "most" : "least"} ${formatPercent(bound, most)}`, spread: null };
  const points = halfWidth === null ? null : halfWidth * 100;
  const decimals = decimalsFor(points === null ? null : points / 10, most);
  return {
    value: formatPercent(value, decimals),
    spread: points === null ? null : spreadText(formatNumber(points, Math.max(1, decimals))),
  };
}

/** An amount, such as hours a week or units, with its half-width. */
export function formatAmount(figure: Figure, most = 1): FigureText {
  const decimals = decimalsFor(figure.halfWidth, most);
  const spread =
    figure.halfWidth === null ? null : spreadText(formatNumber(figure.halfWidth, Math.max(decimals, most)));
  return { value: formatNumber(figure.value, decimals), spread };
}

export function formatMoneyFigure(figure: Figure, currency?: string): FigureText {
  return {
    value: formatMoney(figure.value, currency),
    spread: figure.halfWidth === null ? null : spreadText(formatMoney(figure.halfWidth)),
  };
}

export function spreadText(amount: string): string {
  return `±${thinSpace}${amount}`;
}
