import { percentileName } from "@/lib/format";
import type { Figure } from "@/lib/simulation/types";
import type { Compared } from "./compared";

type Cell = string | number | null;

/** The comparison as a table to take out: figures with half-widths, and paired differences to the base. */
export function comparisonRows(rows: readonly Compared[], acceptedRisk: number, baseName: string): Cell[][] {
  const name = percentileName(acceptedRisk);
  const pair = (figure: Figure | undefined): Cell[] => [figure?.value ?? null, figure?.halfWidth ?? null];
  const figures: [string, (row: Compared) => Figure | undefined][] = [
    ["P5", ({ result }) => result?.summary.p05],
    [name, ({ atRisk }) => atRisk ?? undefined],
    ["P50", ({ result }) => result?.summary.p50],
    ["risk", ({ result }) => result?.summary.risk],
    ["capital tied up", ({ result }) => result?.summary.moneyTiedUp],
    ["cost a year", ({ result }) => result?.summary.costPerYear.total],
    [`${name} against ${baseName}`, ({ differences }) => differences?.atRisk],
    [`risk against ${baseName}`, ({ differences }) => differences?.risk],
    [`capital against ${baseName}`, ({ differences }) => differences?.moneyTiedUp],
    [`cost a year against ${baseName}`, ({ differences }) => differences?.costPerYear],
  ];
  return [
    ["scenario", ...figures.flatMap(([label]) => [label, `${label} half-width`])],
    ...rows.map((row) => [row.detail.name, ...figures.flatMap(([, read]) => pair(read(row)))]),
  ];
}
