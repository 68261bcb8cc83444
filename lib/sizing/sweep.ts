import { limits, sayCount } from "@/lib/line/limits";
import type { Figure } from "@/lib/simulation/types";
import { nearestRound } from "./bounds";

/** Values of one quantity, values of a second one beside it, and runs of both together at most. */
export const mostSizes = 24;
export const mostSeconds = 6;
export const mostRuns = 48;

/** What values of a quantity have to be, apart from what its line allows, and what one of them is called. */
export type ValueKind = { isWhole: boolean; unit: string; least: number; word: "size" | "value" };

/** The size of a buffer. */
export const sizeKind: ValueKind = { isWhole: true, unit: "units", least: 1, word: "size" };

/** Shares are shown and typed in per cent. */
export const factorOf = ({ unit }: Pick<ValueKind, "unit">): number => (unit === "%" ? 100 : 1);

type Listed = { sizes: number[] } | { refusal: string };

/**
 * Values from `from` to `to` in equal steps, both ends included.
 * @returns The values ascending, or why the range is refused.
 */
export function listRange(
  from: number | null,
  to: number | null,
  step: number | null,
  kind: ValueKind = sizeKind,
): Listed {
  if (from === null || to === null || step === null)
    return { refusal: "Type where the range begins, where it ends and the step." };
  if (![from, to].every((value) => fits(value, kind)) || (kind.isWhole && !Number.isInteger(step)))
    return { refusal: ruleOf(kind) };
  if (!(step > 0)) return { refusal: "The step has to be above 0." };
  if (to < from) return { refusal: "The range has to end at or above where it begins." };
  const n = Math.floor((to - from) / step + 1e-9) + 1;
  if (n > mostSizes)
    return { refusal: `${sayCount(n)} ${kind.word}s are too many: at most ${mostSizes}. Use a larger step.` };
  const sizes = Array.from({ length: n }, (_, i) => tidy(from + i * step));
  if (sizes[n - 1] < to && n < mostSizes) sizes.push(to);
  return { sizes };
}

/**
 * Values typed by hand, parted by commas, semicolons or spaces; doubles count once.
 * @param most - Values at most.
 */
export function readSizes(text: string, kind: ValueKind = sizeKind, most = mostSizes): Listed {
  const parts = text
    .replaceAll("%", " ")
    .split(/[\s,;]+/)
    .filter(Boolean);
  if (parts.length === 0) return { refusal: `Type at least one ${kind.word}.` };
  const typed = parts.map((part) => tidy(Number(part) / factorOf(kind)));
  const sizes = [...new Set(typed)].sort((a, b) => a - b);
  if (!sizes.every((value) => fits(value, kind))) return { refusal: ruleOf(kind) };
  if (sizes.length > most) return { refusal: `${sayCount(sizes.length)} ${kind.word}s are too many: at most ${most}.` };
  return { sizes };
}

function fits(value: number, { isWhole, least }: ValueKind): boolean {
  return Number.isFinite(value) && value >= least && (!isWhole || (Number.isInteger(value) && value < limits.count));
}

const tidy = (value: number) => Number(value.toPrecision(12));

function ruleOf({ isWhole, least, word }: ValueKind): string {
  const what = word === "size" ? "Sizes" : "Values";
  if (!isWhole) return `${what} are numbers, with a decimal point.`;
  return `${what} are whole numbers, ${least} or more and below ${sayCount(limits.count)}.`;
}

/** A range around a value: four round steps of about a tenth of it to either side; shares stay shares. */
export function suggestRange(value: number, kind: ValueKind = sizeKind): { from: number; to: number; step: number } {
  if (kind.isWhole) {
    const { least } = kind;
    const step = nearestRound(Math.max(1, value / 10));
    const from = Math.max(least, value - Math.min(4, Math.floor((value - least) / step)) * step);
    return { from, to: value + 4 * step, step };
  }
  const share = kind.unit === "%";
  const step = value === 0 ? (share ? 0.01 : 1) : roundStep(Math.abs(value) / 10);
  const from = tidy(Math.max(0, value - 4 * step));
  const to = tidy(share && value <= 1 ? Math.min(1, value + 4 * step) : value + 4 * step);
  return { from, to, step };
}

/** The 1, 2 or 5 of a power of ten closest to a value in ratio. */
function roundStep(value: number): number {
  const power = 10 ** Math.floor(Math.log10(value));
  const distance = (step: number) => Math.max(step / value, value / step);
  return tidy(
    [1, 2, 5, 10].map((m) => m * power).reduce((best, step) => (distance(step) < distance(best) ? step : best)),
  );
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
