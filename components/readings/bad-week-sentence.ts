import { formatPercent } from "@/lib/format";
import type { Buffer, Line } from "@/lib/line/types";
import { stationStates, type TracedWeek, type TraceEvent, type WeekTrace } from "@/lib/simulation/trace-types";
import { sayWeek } from "./bad-week-choices";
import { countTicks, sayDay, sayHours, sayMoment, writeHours } from "./bad-week-moments";
import { nameIn, sayDays, sayUnits } from "./bad-week-words";

const stopped = stationStates.indexOf("stopped");

export type Loss = TracedWeek["causes"][number];
type Of<K extends TraceEvent["kind"]> = Extract<TraceEvent, { kind: K }>;
type Spell = { tick: number; ticks: number };
/** Day on which what explains a shortage began; null where it names none. */
type Because = { day: number | null; words: string };

/** What a bad week came of. `losses` are the causes of its lost hours, or of all traced weeks' where `isOlder`: most of what was short was owed from before. */
export type Why = { sentence: string; losses: Loss[]; isOlder: boolean; buffer: string | null };

/** Units of all customers in the week asked for: due, shipped on time, and owed from before. */
export function sumWeek({ weeks }: WeekTrace): { due: number; onTime: number; before: number } {
  const { customers } = weeks[weeks.length - 1];
  const total = (of: "demand" | "onTime" | "owedBefore"): number =>
    customers.reduce((sum, customer) => sum + customer[of], 0);
  return { due: total("demand"), onTime: total("onTime"), before: total("owedBefore") };
}

export function explainWeek(trace: WeekTrace, line: Line): Why {
  const chosen = trace.weeks[trace.weeks.length - 1];
  const { due, onTime, before } = sumWeek(trace);
  const isOlder = trace.weeks.length > 1 && before >= (due - onTime) / 2 && before > 0;
  const losses = isOlder ? addCauses(trace.weeks) : chosen.causes;
  const week = sayWeek(trace.replication, trace.week);
  if (onTime === due)
    return { sentence: `In ${week} all that was due shipped on time.`, losses, isOlder, buffer: null };
  const head = `In ${week} we shipped ${formatPercent(onTime / due)} of what was due`;
  const owed = isOlder ? `${sayUnits(before)} owed from earlier weeks went out first` : "";
  const [main] = losses;
  if (!main) {
    const reason = "no hour was lost to a shortage or a stoppage, so more was due than the line makes in a week";
    return { sentence: `${head}: ${isOlder ? `${owed}; ` : ""}${reason}.`, losses, isOlder, buffer: null };
  }
  const cause = sayCause(trace, line, main, isOlder);
  const reason = isOlder ? `${owed}. The most hours of these weeks were lost when ${cause}` : cause;
  return { sentence: `${head}: ${reason}.`, losses, isOlder, buffer: bufferOf(line, main) };
}

function addCauses(weeks: TracedWeek[]): Loss[] {
  const sums = new Map<string, Loss>();
  for (const cause of weeks.flatMap(({ causes }) => causes)) {
    const key = `${cause.node} ${cause.reason}`;
    sums.set(key, { ...cause, hours: cause.hours + (sums.get(key)?.hours ?? 0) });
  }
  return [...sums.values()].sort((a, b) => b.hours - a.hours);
}

function bufferOf(line: Line, { node, reason }: Loss): string | null {
  if (reason === "size") return node;
  return reason === "down" || reason === "pace" ? null : line.links.find(({ from }) => from === node)!.to;
}

function sayCause(trace: WeekTrace, line: Line, main: Loss, isOlder: boolean): string {
  const name = nameIn(line, main.node);
  if (main.reason === "pace") return `${name} could not keep up with what comes after it`;
  if (main.reason === "down") return sayStop(trace, line, main.node, isOlder);
  const buffer = bufferOf(line, main)!;
  const from = isOlder ? 0 : trace.weeks[trace.weeks.length - 1].firstTick;
  const spell = findSpell(trace, buffer, from);
  const say = (because: Because): string =>
    `${nameIn(line, buffer)} ${sayDry(trace, spell, because.day)}, ${because.words}`;
  if (main.reason === "size") return say(saySize(trace, line, buffer, spell));
  return say((main.reason === "disrupted" ? sayDisruption : sayLate)(trace, name, main.node, spell));
}

/** The longest time in which a buffer was dry, else in which a station was short of it, that reaches past a tick. */
function findSpell({ events }: WeekTrace, buffer: string, from: number): Of<"dry" | "short"> | null {
  const reaching = events
    .filter((event) => event.kind === "dry" || event.kind === "short")
    .filter(({ tick, ticks }) => tick + ticks > from);
  const longest = (spells: Of<"dry" | "short">[]) => [...spells].sort((a, b) => b.ticks - a.ticks)[0];
  return (
    longest(reaching.filter(({ kind, node }) => kind === "dry" && node === buffer)) ??
    longest(reaching.filter((event) => event.kind === "short" && event.buffer === buffer)) ??
    null
  );
}

/** A shortage that began before what explains it only lasted because of it. */
function sayDry(trace: WeekTrace, spell: Of<"dry" | "short"> | null, becauseDay: number | null): string {
  if (!spell) return "ran short";
  const what = spell.kind === "dry" ? "ran dry" : "ran short";
  if (spell.isCarried) return `${what} before these weeks began, for ${sayHours(trace, spell.ticks)} of them`;
  const lasted = becauseDay !== null && becauseDay > spell.day ? "and stayed so, in all" : "for";
  return `${what} ${sayMoment(trace, spell.tick)} ${lasted} ${sayHours(trace, spell.ticks)}`;
}

function sayStop(trace: WeekTrace, line: Line, node: string, isOlder: boolean): string {
  const weeks = isOlder ? trace.weeks : trace.weeks.slice(-1);
  const hours = weeks.reduce((sum, { stations }) => sum + stations.find(({ id }) => id === node)!.hours[stopped], 0);
  const scope = isOlder ? ` in ${weeks.length === 2 ? "two" : "three"} weeks` : "";
  return `${nameIn(line, node)} was stopped for ${writeHours(hours)}${scope}`;
}

/** Nobody was late: a lot sent back explains it, else the size does. */
function saySize(trace: WeekTrace, line: Line, buffer: string, spell: Spell | null): Because {
  const until = spell ? spell.tick + spell.ticks : countTicks(trace);
  const refused = trace.events.findLast(
    (event): event is Of<"refused"> => event.kind === "refused" && event.buffer === buffer && event.tick < until,
  );
  if (refused) {
    const lot = `a delivery of ${sayUnits(refused.units)} on ${sayDay(trace, refused.day)}`;
    return { day: refused.day, words: `because ${lot} was refused` };
  }
  const node = line.nodes.find((one): one is Buffer => one.kind === "buffer" && one.id === buffer)!;
  return { day: null, words: `although no delivery was late: a size of ${sayUnits(node.size)} was too small` };
}

function sayDisruption(trace: WeekTrace, name: string, node: string, spell: Spell | null): Because {
  const until = spell ? spell.tick + spell.ticks : countTicks(trace);
  const began = trace.events.findLast(
    (event): event is Of<"disrupted"> => event.kind === "disrupted" && event.node === node && event.tick < until,
  );
  if (!began || began.isCarried) return { day: null, words: `because of ${name}, disrupted since before these weeks` };
  return { day: began.day, words: `because of ${name}, disrupted from ${sayDay(trace, began.day)}` };
}

function sayLate(trace: WeekTrace, name: string, node: string, spell: Spell | null): Because {
  const from = spell?.tick ?? 0;
  const until = spell ? from + spell.ticks : countTicks(trace);
  const overdue = trace.events
    .filter((event): event is Of<"overdue"> => event.kind === "overdue" && event.node === node && event.tick < until)
    .map((order) => ({ order, came: findArrival(trace, order) }))
    .filter(({ came }) => !came || came.tick >= from);
  const [first] = overdue;
  if (!first) return { day: null, words: `because of ${name}, who delivered late` };
  const { order, came } = first;
  const words = `because the delivery due on ${sayDay(trace, order.expectedDay)}`;
  if (came) {
    const refused = came.kind === "refused" ? " and was refused" : "";
    return { day: order.expectedDay, words: `${words} came ${sayDays(came.lateDays)} late${refused}` };
  }
  const late = order.plannedDay - order.expectedDay;
  const planned = late > 0 ? `, planned ${sayDays(late)} late` : "";
  return { day: order.expectedDay, words: `${words} had not come by the week’s end${planned}` };
}

/** When an order that was not there on its day arrived; null: not within the trace. */
export function findArrival({ events }: WeekTrace, order: Of<"overdue">): Of<"delivery" | "refused"> | null {
  const came = events.find(
    (event): event is Of<"delivery" | "refused"> =>
      (event.kind === "delivery" || event.kind === "refused") &&
      event.node === order.node &&
      event.expectedDay === order.expectedDay &&
      event.units === order.units,
  );
  return came ?? null;
}
