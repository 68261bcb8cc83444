import { formatNumber } from "@/lib/format";
import type { WeekTrace } from "@/lib/simulation/trace-types";

const weekdays = ["Monday", "Tuesday", "Wednesday", "Thursday", "Friday", "Saturday", "Sunday"];

/** Which of the traced weeks: "" for the one asked for, "the week before", "two weeks before". */
function sayWeeksBack(n: number): string {
  return n === 0 ? "" : n === 1 ? "the week before" : n === 2 ? "two weeks before" : `${n} weeks before`;
}

/** A working day of the trace, which may lie before it: "Monday", "Monday of the week before". */
export function sayDay({ weeks, daysPerWeek }: WeekTrace, day: number): string {
  const at = Math.floor(day / daysPerWeek);
  const back = weeks.length - 1 - at;
  const name = weekdays[day - at * daysPerWeek];
  return back === 0 ? name : back === 1 ? `${name} of the week before` : `${name} ${sayWeeksBack(back)}`;
}

/** Index of the traced week that a tick is in. */
export function weekOf({ weeks }: WeekTrace, tick: number): number {
  return weeks.findIndex(({ firstTick, nTicks }) => tick < firstTick + nTicks);
}

/** "Tuesday 10:00" when ten hours of Tuesday have been worked, "overtime 02:06"; says nothing of the week. */
export function sayTime(trace: WeekTrace, tick: number): string {
  const { weeks, ticksPerDay, daysPerWeek, tickMinutes } = trace;
  const within = tick - weeks[weekOf(trace, tick)].firstTick;
  const day = Math.min(Math.floor(within / ticksPerDay), daysPerWeek);
  const minutes = Math.floor((within - day * ticksPerDay) * tickMinutes + 1e-6);
  const two = (n: number): string => String(n).padStart(2, "0");
  return `${day < daysPerWeek ? weekdays[day] : "overtime"} ${two(Math.floor(minutes / 60))}:${two(minutes % 60)}`;
}

/** "on Tuesday 10:00", "on Tuesday 10:00 of the week before", "in overtime 02:06": for a sentence. */
export function sayMoment(trace: WeekTrace, tick: number): string {
  const back = trace.weeks.length - 1 - weekOf(trace, tick);
  const time = sayTime(trace, tick);
  const at = `${time.startsWith("overtime") ? "in" : "on"} ${time}`;
  return back === 0 ? at : `${at} ${back === 1 ? "of " : ""}${sayWeeksBack(back)}`;
}

/** "18.8 h", not to be parted at a line's end. */
export function writeHours(hours: number): string {
  return `${formatNumber(hours, 1)}\u00a0h`;
}

export function sayHours({ tickMinutes }: WeekTrace, ticks: number): string {
  return writeHours((ticks * tickMinutes) / 60);
}

/** Heading of a traced week. */
export function sayTracedWeek({ weeks, week }: WeekTrace, at: number): string {
  const back = sayWeeksBack(weeks.length - 1 - at);
  return back === "" ? `week ${week + 1}` : back;
}

export function countTicks({ weeks }: WeekTrace): number {
  const last = weeks[weeks.length - 1];
  return last.firstTick + last.nTicks;
}
