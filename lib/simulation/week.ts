import { normalCdf } from "@/lib/random/normal";
import { nextUniform, wordsPerStream } from "@/lib/random/sfc32";
import { wholeQuantile } from "@/lib/random/whole-quantile";
import { customerColumn } from "./columns";
import { moveScore } from "./review";
import type { State } from "./state";

/** Draws each customer's demand of the week; model.md, 2.2. */
export function drawDemand(s: State): void {
  const { customers } = s.model;
  for (let i = 0; i < customers.length; i++) {
    const { demand, correlation, stream } = customers[i];
    const u = nextUniform(s.streams, stream * wordsPerStream);
    if (correlation === 0) s.demand[i] = wholeQuantile(demand, u, 1 - u);
    else {
      const z = moveScore(s.demandScores, i, correlation, u);
      s.demand[i] = wholeQuantile(demand, normalCdf(z), normalCdf(-z));
    }
  }
}

/**
 * Closes the week's accounts; model.md, 2.5. What is still owed counts as owed from earlier weeks from now on.
 * @param at - Index of the week's first entry in `demand` and `onTime`, -1 in a warm-up week.
 * @param weekSums - On time, demand and backlog are added at `weekAt`.
 */
export function closeWeek(
  s: State,
  at: number,
  demand: Int32Array,
  onTime: Int32Array,
  weekAt: number,
  weekSums: Float64Array,
): void {
  const { customers, columns } = s.model;
  s.groupOld.fill(0);
  s.groupNew.fill(0);
  s.owedTotal = 0;
  for (let i = 0; i < customers.length; i++) {
    const onTimeUnits = s.demand[i] - s.owedNew[i];
    const owed = s.owedOld[i] + s.owedNew[i];
    const backlog = customers[i].isLost ? 0 : owed;
    if (at >= 0) {
      demand[at + i] = s.demand[i];
      onTime[at + i] = onTimeUnits;
    }
    weekSums[weekAt] += onTimeUnits;
    weekSums[weekAt + 1] += s.demand[i];
    weekSums[weekAt + 2] += backlog;
    s.row[columns.customers[i] + customerColumn.owed] += owed;
    s.row[columns.customers[i] + customerColumn.backlog] += backlog;
    s.owedOld[i] = backlog;
    s.owedNew[i] = 0;
    s.groupOld[customers[i].group] += backlog;
    s.owedTotal += backlog;
  }
}
