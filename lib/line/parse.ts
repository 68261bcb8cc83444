import { limits, sayCount } from "./limits";
import { Checker, isRecord, rule, shorten } from "./parse-fields";
import { checkLinks, checkStructure, type NamedNode } from "./parse-links";
import { checkNode, nodeKinds } from "./parse-nodes";
import type { Fault, Line, Link, NodeKind } from "./types";

/**
 * Checks a line document.
 * @param json - Anything that JSON can hold; it is not changed.
 * @returns The line, or every fault at once, each with its node or link and a sentence that says how to mend it. Sizes
 * beyond `limits` are refused first and alone. Never throws.
 */
export function parseLine(json: unknown): { line: Line } | { faults: Fault[] } {
  const check = new Checker();
  if (!isRecord(json)) {
    check.add({}, undefined, "This is not a line document: it has to be a set of named fields.");
    return { faults: check.faults };
  }
  refuseSizes(check, json);
  if (check.faults.length > 0) return { faults: check.faults };

  check.keys(json, {}, "", "The line", ["format", "name", "calendar", "money", "overtime", "nodes", "links"]);
  if (json.format !== "forebay.line/1") check.add({}, "format", 'The format has to read "forebay.line/1".');
  check.text(json.name, {}, "name", "The line's name");
  checkCalendar(check, json.calendar);
  checkMoney(check, json.money);
  checkOvertime(check, json.overtime, json.calendar);
  checkNodesAndLinks(check, json.nodes, json.links);
  return check.faults.length > 0 ? { faults: check.faults } : { line: json as Line };
}

function refuseSizes(check: Checker, json: Record<string, unknown>) {
  if (Array.isArray(json.nodes) && json.nodes.length > limits.nodes)
    check.add(
      {},
      "nodes",
      `The line has ${sayCount(json.nodes.length)} nodes; the limit is ${sayCount(limits.nodes)}.`,
    );
  if (Array.isArray(json.links) && json.links.length > limits.links)
    check.add(
      {},
      "links",
      `The line has ${sayCount(json.links.length)} links; the limit is ${sayCount(limits.links)}.`,
    );
  const ticks = countTicksPerWeek(json.calendar);
  if (ticks !== null && ticks > limits.ticksPerWeek)
    check.add(
      {},
      "calendar.tickMinutes",
      `A week of this calendar has ${sayCount(Math.round(ticks))} ticks; the limit is ${sayCount(limits.ticksPerWeek)}. Use longer ticks.`,
    );
}

function countTicksPerWeek(calendar: unknown): number | null {
  if (!isRecord(calendar)) return null;
  const { tickMinutes, hoursPerDay, daysPerWeek } = calendar;
  if (typeof tickMinutes !== "number" || typeof hoursPerDay !== "number" || typeof daysPerWeek !== "number")
    return null;
  if (!(tickMinutes > 0)) return null;
  return (hoursPerDay * 60 * daysPerWeek) / tickMinutes;
}

function checkCalendar(check: Checker, value: unknown) {
  if (!check.keys(value, {}, "calendar", "The calendar", ["tickMinutes", "hoursPerDay", "daysPerWeek", "weeksPerYear"]))
    return;
  const isTick = check.number(
    value.tickMinutes,
    {},
    "calendar.tickMinutes",
    "The tick",
    rule.aboveZero("Tick in minutes"),
  );
  const isDay = check.number(value.hoursPerDay, {}, "calendar.hoursPerDay", "Hours a day", {
    allows: (v) => v > 0 && v <= 24,
    sentence: "Hours a day have to be more than 0, up to 24.",
  });
  check.number(value.daysPerWeek, {}, "calendar.daysPerWeek", "Days a week", {
    allows: (v) => Number.isInteger(v) && v >= 1 && v <= 7,
    sentence: "Days a week have to be a whole number from 1 to 7.",
  });
  check.number(value.weeksPerYear, {}, "calendar.weeksPerYear", "Weeks a year", {
    allows: (v) => v > 0 && v <= 53,
    sentence: "Weeks a year have to be more than 0, up to 53.",
  });
  if (!isTick || !isDay) return;
  const ticks = ((value.hoursPerDay as number) * 60) / (value.tickMinutes as number);
  if (Math.abs(ticks - Math.round(ticks)) > 1e-9 || Math.round(ticks) < 1)
    check.add(
      {},
      "calendar.tickMinutes",
      `A day of ${value.hoursPerDay} h is not a whole number of ticks of ${value.tickMinutes} min. Choose a tick that divides the day.`,
    );
}

function checkMoney(check: Checker, value: unknown) {
  if (!check.keys(value, {}, "money", "Money", ["currency", "carryingRate"])) return;
  if (typeof value.currency !== "string" || !/^[A-Z]{3}$/.test(value.currency))
    check.add({}, "money.currency", "The currency is a code of three capital letters (ISO 4217), such as EUR.");
  check.number(value.carryingRate, {}, "money.carryingRate", "The carrying cost", {
    allows: (v) => v >= 0 && v <= limits.carryingRate,
    sentence: `Carrying cost a year is a share of value: 0 to ${sayCount(100 * limits.carryingRate)}\u202f%.`,
  });
}

function checkOvertime(check: Checker, value: unknown, calendar: unknown) {
  if (value === null) return;
  if (!check.keys(value, {}, "overtime", "Overtime", ["backlogTrigger", "hoursPerWeek", "costPerHour"])) return;
  check.number(
    value.backlogTrigger,
    {},
    "overtime.backlogTrigger",
    "The backlog that calls overtime",
    rule.atLeastZero("Backlog that calls overtime"),
  );
  const isHours = check.number(value.hoursPerWeek, {}, "overtime.hoursPerWeek", "Overtime hours a week", {
    allows: (v) => v > 0 && v <= 168,
    sentence: "Overtime hours a week have to be more than 0, up to 168.",
  });
  check.number(
    value.costPerHour,
    {},
    "overtime.costPerHour",
    "The cost of an overtime hour",
    rule.money("Cost of an overtime hour"),
  );
  const tick = isRecord(calendar) ? calendar.tickMinutes : null;
  if (!isHours || typeof tick !== "number" || !(tick > 0)) return;
  const ticks = ((value.hoursPerWeek as number) * 60) / tick;
  if (ticks > limits.ticksPerWeek)
    check.add(
      {},
      "overtime.hoursPerWeek",
      `Overtime adds ${sayCount(Math.round(ticks))} ticks to a week; the limit is ${sayCount(limits.ticksPerWeek)}. Use longer ticks or fewer hours.`,
    );
}

function checkNodesAndLinks(check: Checker, nodes: unknown, links: unknown) {
  if (!Array.isArray(nodes)) check.add({}, "nodes", "The line has to list its nodes.");
  if (!Array.isArray(links)) check.add({}, "links", "The line has to list its links.");
  if (!Array.isArray(nodes)) return;
  const named = new Map<string, NamedNode>();
  nodes.forEach((node, index) => checkNodeAt(check, node, index, named));
  if (!Array.isArray(links)) return;
  const sound = checkLinks(check, links, named);
  checkStructure(check, [...named.values()], sound);
  const byId = new Map(nodes.filter(isRecord).map((node) => [node.id as string, node]));
  checkFeeds(check, named, sound, byId);
}

function checkNodeAt(check: Checker, node: unknown, index: number, named: Map<string, NamedNode>) {
  if (!isRecord(node)) {
    check.add({}, `nodes.${index}`, `Node ${index + 1} has to be a set of named fields.`);
    return;
  }
  const { id, kind, name } = node;
  if (typeof id !== "string" || id === "" || id.length > limits.textLength) {
    check.add(
      {},
      `nodes.${index}.id`,
      `Node ${index + 1} needs an id: a text of 1 to ${limits.textLength} characters.`,
    );
    return;
  }
  if (named.has(id)) {
    check.add({ node: id }, "id", `The id "${shorten(id)}" is used twice. Give each node its own.`);
    return;
  }
  if (typeof kind !== "string" || !(nodeKinds as string[]).includes(kind)) {
    check.add({ node: id }, "kind", `Node "${shorten(id)}" has to be a supplier, buffer, station or customer.`);
    return;
  }
  named.set(id, { id, kind: kind as NodeKind, name: typeof name === "string" && name.trim() ? shorten(name) : id });
  checkNode(check, node as Record<string, unknown> & { kind: NodeKind; id: string });
}

/** What depends on who feeds a buffer: replenishment, room for the start level, shares of its suppliers. */
function checkFeeds(
  check: Checker,
  named: ReadonlyMap<string, NamedNode>,
  links: readonly Link[],
  byId: ReadonlyMap<string, Record<string, unknown>>,
) {
  for (const buffer of named.values()) {
    if (buffer.kind !== "buffer") continue;
    const feeders = links.filter((link) => link.to === buffer.id).map((link) => named.get(link.from)!);
    const suppliers = feeders.filter((node) => node.kind === "supplier");
    const fields = byId.get(buffer.id)!;
    const place = { node: buffer.id };
    if (suppliers.length > 0 && fields.replenishment === null)
      check.add(place, "replenishment", `${buffer.name} is bought in, so it needs a replenishment rule.`);
    if (suppliers.length === 0 && feeders.length > 0) {
      if (isRecord(fields.replenishment))
        check.add(
          place,
          "replenishment",
          `${buffer.name} is filled by a station, so it has no replenishment rule. Take it out.`,
        );
      if (typeof fields.startLevel === "number" && typeof fields.size === "number" && fields.startLevel > fields.size)
        check.add(
          place,
          "startLevel",
          `Start level is at most the size where stations feed the buffer: 0 to ${sayCount(fields.size)}.`,
        );
    }
    const shares = suppliers.map((node) => byId.get(node.id)!.share);
    if (shares.length > 0 && shares.every(Number.isFinite)) {
      const sum = (shares as number[]).reduce((total, share) => total + share, 0);
      if (!(Math.abs(sum - 1) <= 1e-6))
        check.add(
          place,
          undefined,
          `The shares of ${buffer.name}'s suppliers add up to ${Number((sum * 100).toFixed(4))}\u202f%. They have to make 100\u202f%.`,
        );
    }
  }
}
