import { explainNumber, readNumber } from "@/lib/line/clipboard";
import type { DraftNode, NodeKind } from "@/lib/line/types";

/** One column of a table of nodes: a field, how it is typed, and which nodes have it. */
export type Column = {
  path: string;
  label: string;
  unit?: string;
  /** 100 for a share typed in percent. */
  factor?: number;
  isWhole?: boolean;
  isText?: boolean;
  has?(node: DraftNode): boolean;
};

const isPurchased = (node: DraftNode) => node.kind === "buffer" && node.replenishment !== null;
const hasUpDown = (node: DraftNode) => node.kind === "station" && node.stoppages?.pattern === "upDown";

export const columnsOf: Record<NodeKind, readonly Column[]> = {
  buffer: [
    { path: "name", label: "Buffer", isText: true },
    { path: "size", label: "Size", unit: "units", isWhole: true },
    { path: "startLevel", label: "Start level", unit: "units", isWhole: true },
    { path: "unitValue", label: "Value", unit: "a unit" },
    { path: "replenishment.reviewDays", label: "Review", unit: "days", isWhole: true, has: isPurchased },
    { path: "replenishment.orderMultiple", label: "Multiple", unit: "units", isWhole: true, has: isPurchased },
    { path: "replenishment.minimumOrder", label: "Minimum", unit: "units", isWhole: true, has: isPurchased },
  ],
  supplier: [
    { path: "name", label: "Supplier", isText: true },
    { path: "leadTimeDays", label: "Lead time", unit: "days" },
    { path: "onTimeShare", label: "On time", unit: "%", factor: 100 },
    { path: "correlation", label: "Late follows late" },
    { path: "rejectRate", label: "Rejected", unit: "%", factor: 100 },
    { path: "lotRejectRate", label: "Refused", unit: "%", factor: 100 },
    { path: "share", label: "Share of orders", unit: "%", factor: 100 },
  ],
  station: [
    { path: "name", label: "Station", isText: true },
    { path: "cycleMinutes", label: "Cycle", unit: "min" },
    { path: "cycleCv", label: "Variation" },
    { path: "parallel", label: "Workplaces", isWhole: true },
    { path: "scrapRate", label: "Scrap", unit: "%", factor: 100 },
    { path: "stoppages.meanUpHours", label: "Between stops", unit: "h", has: hasUpDown },
    { path: "stoppages.meanDownHours", label: "Stop lasts", unit: "h", has: hasUpDown },
  ],
  customer: [
    { path: "name", label: "Customer", isText: true },
    { path: "weeklyDemand.mean", label: "Demand, mean", unit: "a week", has: hasParameter("mean") },
    { path: "weeklyDemand.sd", label: "Its deviation", unit: "a week", has: hasParameter("sd") },
    { path: "correlation", label: "Week follows week" },
    { path: "lateFine", label: "Late fine", unit: "a unit, week" },
  ],
};

function hasParameter(key: "mean" | "sd") {
  return (node: DraftNode) => node.kind === "customer" && key in node.weeklyDemand;
}

/** What a typed or pasted cell means, or why it cannot be used. */
export function readCell(column: Column, text: string): { value: unknown } | { refusal: string } {
  if (column.isText) return text.trim() ? { value: text.trim() } : { refusal: "a name is missing" };
  const read = readNumber(text, column.isWhole);
  if (read === null) return { value: null };
  if (Number.isNaN(read)) return { refusal: explainNumber(text, column.isWhole) };
  return { value: Number((text.includes("%") ? read : read / (column.factor ?? 1)).toPrecision(12)) };
}

/** A value as it stands in its cell. */
export function showCell(column: Column, value: unknown): string {
  if (typeof value === "number") return String(Number((value * (column.factor ?? 1)).toPrecision(12)));
  return typeof value === "string" ? value : "";
}
