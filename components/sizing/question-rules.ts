import type { SizingQuestion, SizingSearch } from "@/lib/client/use-sizing";
import type { Line } from "@/lib/line/types";
import { refuseRange } from "@/lib/sizing";

/** Why nothing can be searched for, or null. */
export function refuseQuestion({ ranges }: SizingQuestion, line: Line | null): string | null {
  if (!line) return "The line has faults and cannot run, so no sizes can be searched for yet.";
  const free = ranges.filter(({ isFixed }) => !isFixed);
  if (free.length === 0) return "All sizes are held fixed. Let at least one change.";
  for (const range of free) {
    const fault = refuseRange(range);
    const name = line.nodes.find(({ id }) => id === range.id)?.name ?? range.id;
    if (fault) return `${name}: ${fault}`;
  }
  return null;
}

/** The accepted risk only chooses a point of the frontier, as long as it is one of them. */
export function asksSame(
  { problem }: SizingSearch,
  { targetFillRate, objective, ranges, acceptedRisk }: SizingQuestion,
): boolean {
  const free = ranges.filter(({ isFixed }) => !isFixed);
  return (
    problem.targetFillRate === targetFillRate &&
    problem.objective === objective &&
    problem.acceptedRisks.some((risk) => Math.abs(risk - acceptedRisk) < 1e-9) &&
    problem.buffers.length === free.length &&
    problem.buffers.every(({ id, min, max, step }, i) => {
      const range = free[i];
      return range.id === id && range.min === min && range.max === max && range.step === step;
    })
  );
}
