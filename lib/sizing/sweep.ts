import { limits, sayCount } from "@/lib/line/limits";
import type { Figure } from "@/lib/simulation/types";
import { nearestRound } from "./bounds";

export const mostSizes = 24;

/**
 * Sizes from `from` to `to` in equal steps, both ends included.
 * @returns The sizes ascending, or why the range is refused.
 */
export function listRange(
  from: number | null,
  to: number | null,
  step: number | null,
): { sizes: number[] } | { refusal: string } {
  if (from === null || to === null || step === null)
    return { refusal: "Type where the range begins, where it ends and the step." };
  if (![from, to, step].every(isSize)) return { refusal: sizeRule };
  if (to < from) return { refusal: "The range has to end at or above where it begins." };
  const n = Math.floor((to - from) / step) + 1;
  if (n > mostSizes) return { refusal: `${sayCount(n)} sizes are too many: at most ${mostSizes}. Use a larger step.` };
  const sizes = Array.from({ length: n }, (_, i) => from + i * step);
  if (sizes[n - 1] < to && n < mostSizes) sizes.push(to);
  return { sizes };
}

/** Sizes typed by hand, parted by commas, semicolons or spaces; doubles count once. */
export function readSizes(text: string): { sizes: number[] } | { refusal: string } {
  const parts = text.split(/[\s,;]+/).filter(Boolean);
  if (parts.length === 0) return { refusal: "Type at least one size." };
  const sizes = [...new Set(parts.map(Number))].sort((a, b) => a - b);
  if (!sizes.every(isSize)) return { refusal: sizeRule };
  if (sizes.length > mostSizes)
    return { refusal: `${sayCount(sizes.length)} sizes are too many: at most ${mostSizes}.` };
  return { sizes };
}

const isSize = (value: number) => Number.isInteger(value) && value >= 1 && value < limits.count;
const sizeRule = `Sizes are whole numbers, 1 or more and below ${sayCount(limits.count)}.`;

/** A range around a size: four round steps of about a tenth of it to either side. */
export function suggestRange(size: number): { from: number; to: number; step: number } {
  const step = nearestRound(size / 10);
  const from = Math.max(1, size - Math.min(4, Math.floor((size - 1) / step)) * step);
  return { from, to: size + 4 * step, step };
}

export type SizeFigures = { size: number; gain: Figure | null; moneyTiedUp: Figure };

/** Money for each point of fill rate that the step to a row gains; null for the first row and where nothing is gained. */
export function pricesOf(rows: readonly SizeFigures[]): (number | null)[] {
  return rows.map((row, i) => {
    const before = rows[i - 1];
    if (!before || !row.gain || row.gain.value <= 0.0005) return null;
    return (row.moneyTiedUp.value - before.moneyTiedUp.value) / (row.gain.value * 100);
  });
}

/** A step that gains less than half a point, or no more than its half-width, is no help that can be read. */
const leastGain = 0.005;

const helps = (gain: Figure | null) => gain !== null && gain.value >= leastGain && gain.value > (gain.halfWidth ?? 0);

/**
 * The size past which more stock stops helping: the last one to which a step helped.
 * @param rows - Ascending sizes with paired gains, so that common luck does not hide a step.
 * @returns Null where even the last step still helps, or with fewer than three sizes.
 */
export function findRest(rows: readonly SizeFigures[]): number | null {
  if (rows.length < 3 || helps(rows[rows.length - 1].gain)) return null;
  const last = rows.findLastIndex(({ gain }) => helps(gain));
  return rows[Math.max(0, last)].size;
}
