import type { FanWeek } from "@/components/charts/fan-chart";
import type { LowestLevels } from "@/lib/client/simulation-client";

/** Percentiles over replications of each week's lowest level, by the rule of the readings: `x[floor(n p)]` upward. */
export function fanOf({ nReplications, nWeeks, lowest }: LowestLevels): FanWeek[] {
  const column = new Int32Array(nReplications);
  return Array.from({ length: nWeeks }, (_, week) => {
    for (let r = 0; r < nReplications; r++) column[r] = lowest[r * nWeeks + week];
    const sorted = column.slice().sort();
    const at = (p: number) => sorted[Math.min(nReplications - 1, Math.floor(nReplications * p + 1e-9))];
    return { p05: at(0.05), p10: at(0.1), p25: at(0.25), p50: at(0.5), p75: at(0.75), p90: at(0.9), p95: at(0.95) };
  });
}
