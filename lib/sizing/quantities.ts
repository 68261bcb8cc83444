import { parseLine } from "@/lib/line";
import { fieldName } from "@/lib/line/field-names";
import type { Distribution, Line, LineNode } from "@/lib/line/types";
import { withSize } from "./with-size";

/** A number of a line that can be varied. */
export type Quantity = {
  /** Of the node, or null for one of the whole line. */
  node: string | null;
  /** Dotted path of the field, or "demand" for all customers' demand at once. */
  path: string;
  /** "lead time, days". */
  name: string;
  /** What it is counted in, for fields and axes: shares are typed in per cent. */
  unit: "units" | "%" | "days" | "h" | "min" | "";
  isWhole: boolean;
};

const demand: Quantity = {
  node: null,
  path: "demand",
  name: "demand of all customers, of today",
  unit: "%",
  isWhole: false,
};

/** Numbers of one node that can be varied, or with null those of the whole line. */
export function quantitiesOf(line: Line, nodeId: string | null): Quantity[] {
  if (nodeId === null) {
    const { overtime, money } = line;
    return [
      ...(line.nodes.some((node) => node.kind === "customer") ? [demand] : []),
      ...listNumbers({ money: { carryingRate: money.carryingRate }, overtime }, null, "line"),
    ];
  }
  const node = line.nodes.find(({ id }) => id === nodeId);
  return node ? listNumbers(node, nodeId, node.kind) : [];
}

/** Nodes that have at least one such number, those of one kind together; the whole line first. */
export function variedNodes(line: Line): { id: string | null; name: string }[] {
  const order: LineNode["kind"][] = ["buffer", "supplier", "station", "customer"];
  return [
    ...order.flatMap((kind) => line.nodes.filter((node) => node.kind === kind).map(({ id, name }) => ({ id, name }))),
    { id: null, name: "Whole line" },
  ];
}

/** Its value as the line stands; 1 for the demand of all customers. */
export function readQuantity(line: Line, { node, path }: Quantity): number {
  if (path === demand.path) return 1;
  const from: unknown = node === null ? line : line.nodes.find(({ id }) => id === node);
  const value = path.split(".").reduce<unknown>((at, key) => (at as Record<string, unknown> | undefined)?.[key], from);
  if (typeof value !== "number") throw new RangeError(`the line has no number "${path}"`);
  return value;
}

/**
 * The line with one of its numbers changed.
 * @throws RangeError where the line cannot run with it, with the reason.
 */
export function withQuantity(line: Line, { node, path }: Quantity, value: number): Line {
  if (path === demand.path) return checkLine(withDemand(line, value));
  if (node !== null && path === "size") return checkLine(withSize(line, node, value));
  if (node === null) return checkLine(setAt(line, path.split("."), value) as Line);
  const nodes = line.nodes.map((one) => (one.id === node ? (setAt(one, path.split("."), value) as LineNode) : one));
  return checkLine({ ...line, nodes });
}

function checkLine(line: Line): Line {
  const read = parseLine(line);
  if ("line" in read) return read.line;
  throw new RangeError(read.faults[0].message);
}

function withDemand(line: Line, factor: number): Line {
  const nodes = line.nodes.map((node) =>
    node.kind === "customer" ? { ...node, weeklyDemand: scaleDistribution(node.weeklyDemand, factor) } : node,
  );
  return { ...line, nodes };
}

/** The distribution of a multiple of what it describes; a count's mean and standard deviation are scaled alike. */
export function scaleDistribution(d: Distribution, factor: number): Distribution {
  switch (d.type) {
    case "fixed":
      return { ...d, value: d.value * factor };
    case "weibull":
      return { ...d, scale: d.scale * factor };
    case "uniform":
      return { ...d, min: d.min * factor, max: d.max * factor };
    case "triangular":
      return { ...d, min: d.min * factor, mode: d.mode * factor, max: d.max * factor };
    case "empirical":
      return { ...d, values: d.values.map((value) => value * factor) };
    case "exponential":
    case "poisson":
      return { ...d, mean: d.mean * factor };
    default:
      return { ...d, mean: d.mean * factor, sd: d.sd * factor };
  }
}

type Fields = Record<string, unknown>;

function listNumbers(from: Fields, node: string | null, kind: string, prefix = ""): Quantity[] {
  return Object.entries(from).flatMap(([key, value]): Quantity[] => {
    const path = prefix ? `${prefix}.${key}` : key;
    if (typeof value === "number") return [{ node, path, name: fieldName(kind, path), ...measureOf(path) }];
    if (typeof value !== "object" || value === null || Array.isArray(value)) return [];
    return listNumbers(value as Fields, node, kind, path);
  });
}

const shares = ["onTimeShare", "rejectRate", "lotRejectRate", "share", "scrapRate", "upProbability", "carryingRate"];
const whole = [
  "size",
  "startLevel",
  "reviewDays",
  "lot",
  "minimumOrder",
  "orderMultiple",
  "parallel",
  "backlogTrigger",
];
const units: [Quantity["unit"], string[]][] = [
  ["%", shares],
  ["units", ["size", "startLevel", "lot", "minimumOrder", "orderMultiple", "backlogTrigger"]],
  ["days", ["leadTimeDays", "reviewDays", "meanDaysBetween", "meanDaysLasting"]],
  ["min", ["cycleMinutes"]],
  ["h", ["meanUpHours", "meanDownHours", "hoursPerWeek"]],
];

function measureOf(path: string): Pick<Quantity, "unit" | "isWhole"> {
  const [head, last] = [path.split(".")[0], path.slice(path.lastIndexOf(".") + 1)];
  const isSpan = last !== "shape" && path.includes(".");
  const unit = units.find(([, keys]) => keys.includes(last))?.[0];
  const isWhole = whole.includes(last);
  if (unit) return { unit, isWhole };
  if (head === "lateness" && isSpan) return { unit: "days", isWhole: false };
  if (head === "weeklyDemand" && isSpan) return { unit: "units", isWhole: false };
  return { unit: "", isWhole };
}

function setAt(from: unknown, [key, ...rest]: string[], value: number): unknown {
  const fields = from as Fields;
  return { ...fields, [key]: rest.length === 0 ? value : setAt(fields[key], rest, value) };
}
