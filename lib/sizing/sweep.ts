import { limits, sayCount } from "@/lib/line/limits";
import type { Figure } from "@/lib/simulation/types";

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

/** The round whole number closest to a value in ratio. */
function nearestRound(value: number): number {
  const power = 10 ** (String(Math.max(1, Math.floor(value))).length - 1);
  const round = [1, 2, 2.5, 5, 10].map((m) => m * power).filter(Number.isInteger);
  const distance = (step: number) => Math.max(step / value, value / step);
  return round.reduce((best, step) => (distance(step) < distance(best) ? step : best));
}

export type SizeFigures = { size: number; atRisk: Figure; moneyTiedUp: Figure };

/** What one step to a row brings against the row before. `gain` in share; `pricePerPoint` money for each point, null where nothing is gained. */
export type Step = { gain: number | null; pricePerPoint: number | null };

export function stepsOf(rows: readonly SizeFigures[]): Step[] {
  return rows.map((row, i) => {
    const before = rows[i - 1];
    if (!before) return { gain: null, pricePerPoint: null };
    const gain = row.atRisk.value - before.atRisk.value;
    const money = row.moneyTiedUp.value - before.moneyTiedUp.value;
    return { gain, pricePerPoint: gain > 0.0005 ? money / (gain * 100) : null };
  });
}

/** A gain of less than half a point, or within the half-width of the reading, is no help that can be read. */
const leastGain = 0.005;

/**
 * The size past which more stock stops helping: the smallest from which no later size is better by half a point and by
 * more than its half-width.
 * @returns Null where even the largest still helps, or with fewer than three sizes.
 */
export function findRest(rows: readonly SizeFigures[]): number | null {
  if (rows.length < 3) return null;
  const index = rows.findIndex((row, i) =>
    rows.slice(i + 1).every((later) => {
      const gain = later.atRisk.value - row.atRisk.value;
      return gain < leastGain || gain <= (later.atRisk.halfWidth ?? 0);
    }),
  );
  return index < 0 || index >= rows.length - 1 ? null : rows[index].size;
}
