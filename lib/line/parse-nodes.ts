import { checkDistribution } from "./parse-distribution";
import { limits, sayCount } from "./limits";
import { type Checker, isRecord, type NumberRule, type Place, rule } from "./parse-fields";
import type { NodeKind } from "./types";

type Fields = Record<string, unknown>;

const keysOf: Record<NodeKind, readonly string[]> = {
  supplier: [
    "leadTimeDays",
    "lateness",
    "onTimeShare",
    "correlation",
    "keepsSequence",
    "disruption",
    "rejectRate",
    "lotRejectRate",
    "share",
  ],
  buffer: ["size", "startLevel", "unitValue", "replenishment"],
  station: ["cycleMinutes", "cycleCv", "parallel", "scrapRate", "stoppages"],
  customer: ["weeklyDemand", "correlation", "callOff", "unmet", "lateFine"],
};

export const nodeKinds = Object.keys(keysOf) as NodeKind[];

const kindWords: Record<NodeKind, string> = {
  supplier: "Supplier",
  buffer: "Buffer",
  station: "Station",
  customer: "Customer",
};

/** Checks the fields of one node whose kind and id are sound. Links are looked at elsewhere. */
export function checkNode(check: Checker, node: Fields & { kind: NodeKind; id: string }): void {
  const place = { node: node.id };
  check.text(node.name, place, "name", "The name");
  check.keys(node, place, "", kindWords[node.kind], ["kind", "id", "name", ...keysOf[node.kind]]);
  checkers[node.kind](check, node, place);
}

const cycleRule: NumberRule = {
  allows: (v) => v >= limits.cycleMinutes,
  sentence: `Cycle in minutes has to be more than 0: at least ${limits.cycleMinutes.toFixed(9)}.`,
};
const leadTimeRule: NumberRule = {
  allows: (v) => v >= 0 && v < limits.count,
  sentence: `Lead time in working days has to be 0 or more and below ${sayCount(limits.count)}.`,
};
const variationRule: NumberRule = {
  allows: (v) => v >= 0 && v <= limits.cycleCv,
  sentence: `Variation of the cycle has to be 0 or more, up to ${sayCount(limits.cycleCv)}.`,
};

const checkers: Record<NodeKind, (check: Checker, node: Fields, place: Place) => void> = {
  supplier(check, node, place) {
    check.number(node.leadTimeDays, place, "leadTimeDays", "Lead time", leadTimeRule);
    if (node.lateness !== null) checkDistribution(check, node.lateness, place, "lateness", "Lateness");
    check.number(node.onTimeShare, place, "onTimeShare", "The share on time", rule.share("On time"));
    check.number(node.correlation, place, "correlation", "Correlation", rule.correlation(false));
    check.yesNo(node.keepsSequence, place, "keepsSequence", "Keeps sequence");
    if (
      node.disruption !== null &&
      check.keys(node.disruption, place, "disruption", "Disruption", ["meanDaysBetween", "meanDaysLasting"])
    ) {
      const days = node.disruption;
      check.number(
        days.meanDaysBetween,
        place,
        "disruption.meanDaysBetween",
        "Days between disruptions",
        rule.atLeastOne("Days between disruptions"),
      );
      check.number(
        days.meanDaysLasting,
        place,
        "disruption.meanDaysLasting",
        "Days a disruption lasts",
        rule.atLeastOne("Days a disruption lasts"),
      );
    }
    check.number(node.rejectRate, place, "rejectRate", "Rejects", rule.shareBelowOne("Rejected at inspection"));
    check.number(
      node.lotRejectRate,
      place,
      "lotRejectRate",
      "Refused deliveries",
      rule.shareBelowOne("Refused deliveries"),
    );
    check.number(node.share, place, "share", "The share of each order", rule.share("Share of each order"));
  },

  buffer(check, node, place) {
    check.number(node.size, place, "size", "The size", rule.wholeFromOne("Size"));
    if (node.startLevel !== null)
      check.number(node.startLevel, place, "startLevel", "The start level", rule.wholeFromZero("Start level"));
    check.number(node.unitValue, place, "unitValue", "The value of a unit", rule.money("Value of a unit"));
    if (node.replenishment !== null) checkReplenishment(check, node.replenishment, place);
  },

  station(check, node, place) {
    check.number(node.cycleMinutes, place, "cycleMinutes", "The cycle", cycleRule);
    check.number(node.cycleCv, place, "cycleCv", "The cycle's variation", variationRule);
    check.number(node.parallel, place, "parallel", "Workplaces", rule.wholeFromOne("Number of workplaces"));
    check.number(node.scrapRate, place, "scrapRate", "Scrap", rule.shareBelowOne("Scrap"));
    if (node.stoppages !== null) checkStoppages(check, node.stoppages, place);
  },

  customer(check, node, place) {
    checkDistribution(check, node.weeklyDemand, place, "weeklyDemand", "Weekly demand");
    check.number(node.correlation, place, "correlation", "Correlation", rule.correlation(true));
    check.oneOf(node.callOff, place, "callOff", "Call-off", ["daily", "weekly"]);
    check.oneOf(node.unmet, place, "unmet", "Unmet demand", ["backorder", "lost"]);
    check.number(node.lateFine, place, "lateFine", "The late fine", rule.money("Late fine"));
  },
};

function checkReplenishment(check: Checker, value: unknown, place: Place) {
  if (
    !check.keys(value, place, "replenishment", "Replenishment", [
      "rule",
      "reviewDays",
      "lot",
      "minimumOrder",
      "orderMultiple",
    ])
  )
    return;
  const at = (key: string) => `replenishment.${key}`;
  const isKnown = check.oneOf(value.rule, place, at("rule"), "The replenishment rule", ["orderUpTo", "reorderPoint"]);
  check.number(
    value.reviewDays,
    place,
    at("reviewDays"),
    "Days between reviews",
    rule.wholeFromOne("Days between reviews"),
  );
  check.number(value.minimumOrder, place, at("minimumOrder"), "The minimum order", rule.wholeFromZero("Minimum order"));
  check.number(
    value.orderMultiple,
    place,
    at("orderMultiple"),
    "The order multiple",
    rule.wholeFromOne("Order multiple"),
  );
  if (!isKnown) return;
  if (value.rule === "reorderPoint") check.number(value.lot, place, at("lot"), "The lot", rule.wholeFromOne("Lot"));
  else if (value.lot !== null)
    check.add(
      place,
      at("lot"),
      "An order-up-to level orders what is missing, so it has no lot. Empty the lot, or choose a reorder point.",
    );
}

function checkStoppages(check: Checker, value: unknown, place: Place) {
  if (!isRecord(value)) {
    check.add(place, "stoppages", "Stoppages have to be described by a pattern, or be absent (null).");
    return;
  }
  const at = (key: string) => `stoppages.${key}`;
  if (!check.oneOf(value.pattern, place, at("pattern"), "The pattern of stoppages", ["perTick", "upDown"])) return;
  if (value.pattern === "perTick") {
    check.keys(value, place, "stoppages", "Stoppages", ["pattern", "upProbability"]);
    check.number(
      value.upProbability,
      place,
      at("upProbability"),
      "The share of ticks up",
      rule.shareAboveZero("Ticks up"),
    );
    return;
  }
  check.keys(value, place, "stoppages", "Stoppages", ["pattern", "meanUpHours", "meanDownHours", "downCv", "clock"]);
  check.number(
    value.meanUpHours,
    place,
    at("meanUpHours"),
    "Hours between stoppages",
    rule.aboveZero("Hours between stoppages"),
  );
  check.number(
    value.meanDownHours,
    place,
    at("meanDownHours"),
    "Hours a stoppage lasts",
    rule.aboveZero("Hours a stoppage lasts"),
  );
  if (value.downCv !== null)
    check.number(
      value.downCv,
      place,
      at("downCv"),
      "The variation of stoppages",
      rule.atLeastZero("Variation of a stoppage's length"),
    );
  check.oneOf(value.clock, place, at("clock"), "What uses up the time between stoppages", ["running", "always"]);
}
