const names: Record<string, string> = {
  name: "name",
  "calendar.tickMinutes": "tick, minutes",
  "calendar.hoursPerDay": "hours a day",
  "calendar.daysPerWeek": "days a week",
  "calendar.weeksPerYear": "weeks a year",
  "money.currency": "currency",
  "money.carryingRate": "carrying cost a year",
  overtime: "overtime",
  "overtime.backlogTrigger": "backlog that calls overtime",
  "overtime.hoursPerWeek": "overtime hours a week",
  "overtime.costPerHour": "cost of an overtime hour",
  leadTimeDays: "lead time, days",
  lateness: "lateness",
  onTimeShare: "share on time",
  correlation: "correlation",
  keepsSequence: "keeps sequence",
  disruption: "disruption",
  "disruption.meanDaysBetween": "days between disruptions",
  "disruption.meanDaysLasting": "days a disruption lasts",
  rejectRate: "rejected at inspection",
  lotRejectRate: "refused deliveries",
  share: "share of each order",
  size: "size",
  startLevel: "start level",
  unitValue: "value of a unit",
  replenishment: "replenishment",
  "replenishment.rule": "replenishment rule",
  "replenishment.reviewDays": "review every, days",
  "replenishment.lot": "lot",
  "replenishment.minimumOrder": "minimum order",
  "replenishment.orderMultiple": "order multiple",
  cycleMinutes: "cycle, minutes",
  cycleCv: "variation of the cycle",
  parallel: "workplaces",
  scrapRate: "scrap",
  stoppages: "stoppages",
  "stoppages.upProbability": "share of ticks up",
  "stoppages.meanUpHours": "hours between stoppages",
  "stoppages.meanDownHours": "hours a stoppage lasts",
  "stoppages.downCv": "variation of a stoppage's length",
  "stoppages.clock": "time between stoppages runs",
  weeklyDemand: "weekly demand",
  callOff: "call-off",
  unmet: "unmet demand",
  lateFine: "late fine",
};

const parts: Record<string, string> = {
  mean: "mean",
  sd: "standard deviation",
  value: "value",
  shape: "shape",
  scale: "scale",
  min: "least",
  mode: "most likely",
  max: "largest",
  values: "observed values",
  type: "distribution",
};

/** A field in the trade's words; `path` is dotted, `kind` the node's kind or "line". */
export function fieldName(kind: string, path: string): string {
  if (names[path]) return names[path];
  const [head, tail] = [path.slice(0, path.lastIndexOf(".")), path.slice(path.lastIndexOf(".") + 1)];
  if (names[head] && parts[tail]) return `${names[head]}, ${parts[tail]}`;
  return path;
}

const shares = new Set([
  "onTimeShare",
  "rejectRate",
  "lotRejectRate",
  "share",
  "scrapRate",
  "money.carryingRate",
  "stoppages.upProbability",
]);
const words: Record<string, string> = {
  orderUpTo: "order-up-to level",
  reorderPoint: "reorder point",
  negativeBinomial: "negative binomial",
  upDown: "up and down times",
  perTick: "each tick on its own",
};

/** A field's value as text. */
export function describeField(path: string, value: unknown): string {
  if (value === null || value === undefined) return path === "startLevel" ? "full" : "none";
  if (typeof value === "number") {
    if (shares.has(path)) return `${tidy(value * 100)}\u202f%`;
    return tidy(value);
  }
  if (typeof value === "boolean") return value ? "yes" : "no";
  if (typeof value === "string") return words[value] ?? value;
  if (Array.isArray(value)) return `${value.length} values`;
  return describeObject(path, value as Record<string, unknown>);
}

function describeObject(path: string, value: Record<string, unknown>): string {
  const { type, pattern, rule, ...rest } = value;
  const head = [type, pattern, rule]
    .filter((part): part is string => typeof part === "string")
    .map((part) => words[part] ?? part);
  const fields = Object.entries(rest).map(
    ([key, field]) => `${parts[key] ?? names[`${path}.${key}`] ?? key} ${describeField(`${path}.${key}`, field)}`,
  );
  return [...head, ...fields].join(", ");
}

function tidy(value: number): string {
  const [whole, fraction] = String(Number(value.toPrecision(10))).split(".");
  const grouped = whole.replace("-", "\u2212").replace(/\B(?=(\d{3})+$)/g, "\u202f");
  return fraction ? `${grouped}.${fraction}` : grouped;
}
