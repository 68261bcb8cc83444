import { limits } from "@/lib/line/limits";
import type { Line } from "@/lib/line/types";
import { type Place, placesOf, type SizeRange } from "./problem";

/** Least and largest size tried, in sizes of today, and about how many steps lie between. */
const reach: Record<Place, { from: number; to: number; nSteps: number }> = {
  bought: { from: 0.5, to: 1.6, nSteps: 70 },
  between: { from: 0.125, to: 2, nSteps: 48 },
  last: { from: 0.2, to: 3.4, nSteps: 80 },
};

/**
 * Ranges in which a search may look for each buffer, from the sizes of today: round steps, both ends on a step.
 * @remarks Purchased stock is seldom far off what it has to be; stock between stations and finished stock can stand in
 * for one another, so that theirs are wide.
 */
export function suggestBounds(line: Line): SizeRange[] {
  const buffers = line.nodes.flatMap((node) => (node.kind === "buffer" ? [node] : []));
  const places = placesOf(
    line,
    buffers.map(({ id }) => id),
  );
  return buffers.map(({ id, size }, i) => {
    const { from, to, nSteps } = reach[places[i]];
    const step = nearestRound(((to - from) * size) / nSteps);
    const min = Math.max(1, Math.round((from * size) / step) * step);
    const max = Math.max(min, Math.round((Math.max(to * size, size + 2) - min) / step) * step + min);
    return { id, min, max: Math.min(max, limits.count - 1), step };
  });
}

/** What is wrong with a range, or null. */
export function refuseRange({ min, max, step }: { min: number | null; max: number | null; step: number | null }) {
  if (min === null || max === null || step === null) return "Type the least size, the largest and the step.";
  if (![min, max, step].every((value) => Number.isInteger(value) && value >= 1 && value < limits.count))
    return "Sizes and steps are whole numbers, 1 or more.";
  if (min > max) return "The least size is above the largest.";
  return null;
}

/** The round whole number closest to a value in ratio, 1 or more. */
export function nearestRound(value: number): number {
  const power = 10 ** (String(Math.max(1, Math.floor(value))).length - 1);
  const round = [1, 2, 2.5, 5, 10].map((m) => m * power).filter(Number.isInteger);
  const distance = (step: number) => Math.max(step / value, value / step);
  return round.reduce((best, step) => (distance(step) < distance(best) ? step : best));
}
