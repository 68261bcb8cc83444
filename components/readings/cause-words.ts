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

/** Root causes in words, the longest first; "late" and "disrupted" are the supplier's, "size" the buffer's. */
export function causeRows({ causes }: RunResult, document: DraftLine): CauseRow[] {
  const names = new Map(document.nodes.map((node) => [node.id, node.name]));
  const rows = causes.map(({ node, reason, hoursPerWeek }, i) => ({
    key: `${node} ${reason}`,
    label: `${names.get(node) ?? node}: ${words[reason]}`,
    hours: hoursPerWeek,
    isGrave: i < 2,
  }));
  if (rows.length <= mostRows + 1) return rows;
  const rest = rows.slice(mostRows);
  const hours: Figure = { value: rest.reduce((sum, row) => sum + row.hours.value, 0), halfWidth: null };
  return [...rows.slice(0, mostRows), { key: "rest", label: `${rest.length} smaller causes`, hours, isGrave: false }];
}
