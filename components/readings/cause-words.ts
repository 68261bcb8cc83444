import type { CauseRow } from "@/components/charts/cause-bars";
import type { DraftLine } from "@/lib/line/types";
import type { CauseReason, Figure, RunResult } from "@/lib/simulation/types";

const words: Record<CauseReason, string> = {
  down: "stopped",
  late: "late",
  disrupted: "disrupted",
  size: "size too small",
  pace: "pace",
};

/** A few long bars, and one for all the short ones together. */
const mostRows = 8;

/** A root cause in words: "Controller boards: late". */
export function causeLabel(document: DraftLine, node: string, reason: CauseReason): string {
  return `${document.nodes.find(({ id }) => id === node)?.name ?? node}: ${words[reason]}`;
}

/** Root causes in words, the longest first; "late" and "disrupted" are the supplier's, "size" the buffer's. */
export function causeRows({ causes }: RunResult, document: DraftLine): CauseRow[] {
  const rows = causes.map(({ node, reason, hoursPerWeek }, i) => ({
    key: `${node} ${reason}`,
    label: causeLabel(document, node, reason),
    hours: hoursPerWeek,
    isGrave: i < 2,
  }));
  if (rows.length <= mostRows + 1) return rows;
  const rest = rows.slice(mostRows);
  const hours: Figure = { value: rest.reduce((sum, row) => sum + row.hours.value, 0), halfWidth: null };
  return [...rows.slice(0, mostRows), { key: "rest", label: `${rest.length} smaller causes`, hours, isGrave: false }];
}
