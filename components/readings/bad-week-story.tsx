import { TakeOutFigures } from "@/components/charts/take-out-figures";
import { formatCount } from "@/lib/format";
import type { Line } from "@/lib/line/types";
import type { WeekTrace } from "@/lib/simulation/trace-types";
import { sayWeek } from "./bad-week-choices";
import { writeHours } from "./bad-week-moments";
import { BadWeekEvents } from "./bad-week-events";
import { traceRows } from "./bad-week-rows";
import { explainWeek, type Why } from "./bad-week-sentence";
import { BadWeekTraces } from "./bad-week-traces";
import { nameIn } from "./bad-week-words";
import { causeLabel } from "./cause-words";

const mostLosses = 3;

/** One opened week: the sentence, what happened on an axis of time, and in words. */
export function BadWeekStory({ trace, line }: { trace: WeekTrace; line: Line }) {
  const why = explainWeek(trace, line);
  const { customers } = trace.weeks[trace.weeks.length - 1];
  return (
    <>
      <p className="max-w-[78ch] py-3 text-[16px] leading-[1.45]">{why.sentence}</p>
      <p className="max-w-[110ch] pb-3 text-s text-ink-2">
        {sayLosses(why, line)}
        {customers.map(({ id, demand, onTime, owed }) => (
          <span key={id}>
            {" "}
            {nameIn(line, id)}: {formatCount(onTime)} of {formatCount(demand)} units on time, {formatCount(owed)} owed
            at the end.
          </span>
        ))}
      </p>
      <div className="grid gap-x-6 gap-y-6 lg:grid-cols-[minmax(0,1.9fr)_minmax(0,1fr)]">
        <BadWeekTraces trace={trace} line={line} first={why.buffer} />
        <BadWeekEvents trace={trace} line={line} />
      </div>
      <div className="mt-3 flex flex-wrap items-center gap-3">
        <p className="text-s text-ink-3">
          Hours beside the names are those of week {trace.week + 1}. Water: units at the end of each tick. Silt under
          the bed: dry. Triangle: a delivery; dashed: late, from the day it was due; cross: refused.
        </p>
        <TakeOutFigures
          name={`${line.name} ${sayWeek(trace.replication, trace.week)}`}
          rows={() => traceRows(trace, line)}
        />
      </div>
    </>
  );
}

function sayLosses({ losses, isOlder }: Why, line: Line): string {
  if (losses.length === 0) return "";
  const parts = losses
    .slice(0, mostLosses)
    .map(({ node, reason, hours }) => `${causeLabel(line, node, reason)} ${writeHours(hours)}`);
  const all = losses.reduce((sum, { hours }) => sum + hours, 0);
  const most = losses.length > mostLosses ? ", most of it " : ", ";
  return `Root causes of the ${writeHours(all)} lost in ${isOlder ? "these weeks" : "this week"}${most}${parts.join("; ")}.`;
}
