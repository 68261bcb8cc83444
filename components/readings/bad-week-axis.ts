import type { DeliveryMark } from "@/components/charts/level-trace";
import type { TimeAxis } from "@/components/charts/week-axis";
import type { WeekTrace } from "@/lib/simulation/trace-types";
import { countTicks, sayTracedWeek } from "./bad-week-moments";
import { findArrival } from "./bad-week-sentence";

/** First tick of a working day of the trace; negative for days before it. */
function tickOfDay({ weeks, ticksPerDay, daysPerWeek }: WeekTrace, day: number): number {
  if (day < 0) return day * ticksPerDay;
  const at = Math.floor(day / daysPerWeek);
  return weeks[at].firstTick + (day - at * daysPerWeek) * ticksPerDay;
}

export function timeAxisOf(trace: WeekTrace, width: number): TimeAxis {
  const days = Array.from({ length: trace.weeks.length * trace.daysPerWeek }, (_, day) => day);
  return {
    nTicks: countTicks(trace),
    dayStarts: days.map((day) => tickOfDay(trace, day)),
    weeks: trace.weeks.map(({ firstTick, nTicks }, i) => ({ firstTick, nTicks, label: sayTracedWeek(trace, i) })),
    width,
  };
}

/** The deliveries to a buffer that came, were refused or are waited for. */
export function deliveriesTo(trace: WeekTrace, buffer: string): DeliveryMark[] {
  return trace.events.flatMap((event): DeliveryMark[] => {
    if (event.kind === "overdue" && event.buffer === buffer && !findArrival(trace, event))
      return [{ due: tickOfDay(trace, event.expectedDay), arrived: null, isLate: true, isRefused: false }];
    if ((event.kind !== "delivery" && event.kind !== "refused") || event.buffer !== buffer) return [];
    const isLate = event.lateDays > 0;
    const due = isLate ? tickOfDay(trace, event.expectedDay) : event.tick;
    return [{ due, arrived: event.tick, isLate, isRefused: event.kind === "refused" }];
  });
}

/**
 * Buffers in the order in which they ran dry for the week in question, then those dry only before it.
 * @param first - Put before all others.
 */
export function buffersByDryness(trace: WeekTrace, first: string | null): string[] {
  const { firstTick } = trace.weeks[trace.weeks.length - 1];
  const spells = trace.events.filter((event) => event.kind === "dry");
  const reaching = spells.filter(({ tick, ticks }) => tick + ticks > firstTick);
  return [...new Set([...(first ? [first] : []), ...[...reaching, ...spells].map(({ node }) => node)])];
}
