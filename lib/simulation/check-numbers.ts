import type { Line, LineNode } from "@/lib/line/types";

/** Ticks of one regular week. */
const mostTicks = 20_000;

/**
 * Refuses numbers with which a run would not end or would count wrongly.
 * @throws RangeError on the first; `parseLine` finds them all and says how to mend them.
 */
export function checkNumbers(line: Line): void {
  const { tickMinutes, hoursPerDay, daysPerWeek, weeksPerYear } = line.calendar;
  requireRange("tickMinutes", tickMinutes, Number.MIN_VALUE);
  requireRange("hoursPerDay", hoursPerDay, Number.MIN_VALUE);
  requireRange("weeksPerYear", weeksPerYear, Number.MIN_VALUE);
  requireCount("daysPerWeek", daysPerWeek, 1);
  requireRange("daysPerWeek", daysPerWeek, 1, 7);
  const ticks = (hoursPerDay * 60) / tickMinutes;
  if (ticks < 0.5 || Math.abs(ticks - Math.round(ticks)) > 1e-9) {
    throw new RangeError(`a day must be a whole number of ticks, got ${ticks}`);
  }
  if (ticks * daysPerWeek > mostTicks) {
    throw new RangeError(`a week may have at most ${mostTicks} ticks, got ${ticks * daysPerWeek}`);
  }
  requireRange("carryingRate", line.money.carryingRate, 0);
  if (line.overtime) {
    requireRange("backlogTrigger", line.overtime.backlogTrigger, 0);
    requireRange("overtime hoursPerWeek", line.overtime.hoursPerWeek, 0, (mostTicks * tickMinutes) / 60);
    requireRange("costPerHour", line.overtime.costPerHour, 0);
  }
  for (const node of line.nodes) checkNode(node);
  for (const link of line.links) requireCount("quantity", link.quantity ?? 1, 1);
}

function checkNode(node: LineNode): void {
  const at = (field: string): string => `${field} of "${node.id}"`;
  switch (node.kind) {
    case "supplier":
      requireRange(at("leadTimeDays"), node.leadTimeDays, 0);
      requireRange(at("onTimeShare"), node.onTimeShare, 0, 1);
      requireRange(at("correlation"), node.correlation, 0, 1 - 1e-12);
      requireRange(at("rejectRate"), node.rejectRate, 0, 1);
      requireRange(at("lotRejectRate"), node.lotRejectRate, 0, 1);
      requireRange(at("share"), node.share, 0, 1);
      if (node.disruption) {
        requireRange(at("meanDaysBetween"), node.disruption.meanDaysBetween, 1);
        requireRange(at("meanDaysLasting"), node.disruption.meanDaysLasting, 1);
      }
      break;
    case "buffer": {
      requireCount(at("size"), node.size, 1);
      requireRange(at("unitValue"), node.unitValue, 0);
      if (node.startLevel !== null) requireCount(at("startLevel"), node.startLevel, 0);
      const rule = node.replenishment;
      if (!rule) {
        if ((node.startLevel ?? 0) > node.size) throw new RangeError(`${at("startLevel")} is above its size`);
        break;
      }
      requireCount(at("reviewDays"), rule.reviewDays, 1);
      requireCount(at("minimumOrder"), rule.minimumOrder, 0);
      requireCount(at("orderMultiple"), rule.orderMultiple, 1);
      if (rule.rule === "reorderPoint") requireCount(at("lot"), rule.lot ?? NaN, 1);
      else if (rule.lot !== null) throw new RangeError(`${at("lot")} must be null for orderUpTo`);
      break;
    }
    case "station":
      requireRange(at("cycleMinutes"), node.cycleMinutes, 1e-9);
      requireRange(at("cycleCv"), node.cycleCv, 0, 1000);
      requireCount(at("parallel"), node.parallel, 1);
      requireRange(at("scrapRate"), node.scrapRate, 0, 1 - 1e-12);
      if (node.stoppages?.pattern === "perTick") {
        requireRange(at("upProbability"), node.stoppages.upProbability, Number.MIN_VALUE, 1);
      } else if (node.stoppages) {
        requireRange(at("meanUpHours"), node.stoppages.meanUpHours, Number.MIN_VALUE);
        requireRange(at("meanDownHours"), node.stoppages.meanDownHours, Number.MIN_VALUE);
        if (node.stoppages.downCv !== null) requireRange(at("downCv"), node.stoppages.downCv, 0);
      }
      break;
    case "customer":
      requireRange(at("correlation"), node.correlation, -1 + 1e-12, 1 - 1e-12);
      requireRange(at("lateFine"), node.lateFine, 0);
      break;
    default:
      throw new RangeError(`a node has the unknown kind "${(node as LineNode).kind}"`);
  }
}

function requireRange(name: string, value: number, least: number, most = Number.MAX_VALUE): void {
  if (!(value >= least && value <= most)) {
    const upper = most === Number.MAX_VALUE ? "finite" : `at most ${most}`;
    throw new RangeError(`${name} must be at least ${least} and ${upper}, got ${value}`);
  }
}

function requireCount(name: string, value: number, least: number): void {
  if (!Number.isInteger(value) || value < least || value >= 2 ** 30) {
    throw new RangeError(`${name} must be a whole number of at least ${least} and below 2^30, got ${value}`);
  }
}
