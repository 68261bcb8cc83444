import type { Cell } from "@/components/charts/take-out-figures";
import { percentileName } from "@/lib/format";
import type { DraftLine } from "@/lib/line/types";
import { percentile } from "@/lib/simulation";
import type { Figure, RunResult } from "@/lib/simulation/types";
import { causeRows } from "./cause-words";

const row = (group: string, name: string, figure: Figure): Cell[] => [group, name, figure.value, figure.halfWidth];

/** All figures of a run as rows of a table: group, figure, value, half-width. */
export function readingRows(result: RunResult, document: DraftLine): Cell[][] {
  const { summary } = result;
  const nameOf = (id: string) => document.nodes.find((node) => node.id === id)?.name ?? id;
  return [
    ["group", "figure", "value", "half-width at 95 %"],
    ...[0.01, 0.05, 0.1, 0.2, 0.25, 0.5].map((p) => row("weekly fill rate", percentileName(p), percentile(result, p))),
    row("weekly fill rate", "mean", summary.mean),
    row("weekly fill rate", "share of weeks below target", summary.risk),
    row("weekly fill rate", "share of weeks in full", summary.weeksInFull),
    row("money", `capital tied up, ${document.money.currency}`, summary.moneyTiedUp),
    ...Object.entries(summary.costPerYear).map(([part, figure]) => row("money", `cost a year: ${part}`, figure)),
    ...Object.entries(result.buffers).flatMap(([id, { mean, empty, p10, p50, p90 }]): Cell[][] => {
      const group = `buffer ${nameOf(id)}`;
      return [
        row(group, "mean level", mean),
        [group, "level P10", p10, null],
        [group, "level P50", p50, null],
        [group, "level P90", p90, null],
        row(group, "share of time dry", empty),
      ];
    }),
    ...Object.entries(result.stations).flatMap(([id, reading]) => [
      row(`station ${nameOf(id)}`, "working", reading.working),
      row(`station ${nameOf(id)}`, "short of parts", reading.starved),
      row(`station ${nameOf(id)}`, "no room", reading.blocked),
      row(`station ${nameOf(id)}`, "stopped", reading.down),
    ]),
    ...causeRows(result, document).map(({ label, hours }) => row("cause, hours a week", label, hours)),
  ];
}
