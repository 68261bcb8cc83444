"use client";

import { useState } from "react";
import { SwitchTwo } from "@/components/ui/switch-two";
import { formatCount, plural } from "@/lib/format";
import type { Line } from "@/lib/line/types";
import type { TraceEvent, WeekTrace } from "@/lib/simulation/trace-types";
import { sayTime, sayTracedWeek, weekOf } from "./bad-week-moments";
import { isGrave, isMain, mainHours, sayEvent } from "./bad-week-words";

/** What happened, in order, week by week; the weeks before the one in question are folded away. */
export function BadWeekEvents({ trace, line }: { trace: WeekTrace; line: Line }) {
  const [which, setWhich] = useState<"main" | "all">("main");
  const events = which === "all" ? trace.events : trace.events.filter((event) => isMain(trace, event));
  const byWeek = trace.weeks.map((_, at) => events.filter(({ tick }) => weekOf(trace, tick) === at));
  const last = byWeek.length - 1;
  return (
    <div>
      <div className="mb-2 flex flex-wrap items-center justify-between gap-2">
        <h3 className="font-[620]">In order of events</h3>
        <SwitchTwo<"main" | "all">
          label="Events"
          value={which}
          onChange={setWhich}
          options={[
            { value: "main", label: "Main" },
            { value: "all", label: "All" },
          ]}
        />
      </div>
      {byWeek.slice(0, last).map((own, at) => (
        <details key={at} className="border-t border-rule py-1">
          <summary className="cursor-pointer text-s text-ink-2 first-letter:uppercase">
            {sayTracedWeek(trace, at)}: {formatCount(own.length)} {plural(own.length, "event")}
          </summary>
          <EventList trace={trace} line={line} events={own} />
        </details>
      ))}
      <p className="border-t border-ink pt-1 text-s font-[620] first-letter:uppercase">{sayTracedWeek(trace, last)}</p>
      <EventList trace={trace} line={line} events={byWeek[last]} />
      <p className="mt-2 text-s text-ink-3">
        {which === "main"
          ? `Main: what lasts ${mainHours} h or more, late and refused deliveries, disruptions, overtime, backlog.`
          : "Spells of an hour or more; shorter ones are left out and short gaps joined."}{" "}
        Times count the hours worked: Tuesday 10:00 is ten hours into Tuesday.
      </p>
    </div>
  );
}

function EventList({ trace, line, events }: { trace: WeekTrace; line: Line; events: readonly TraceEvent[] }) {
  if (events.length === 0) return <p className="py-1 text-s text-ink-3">Nothing of note.</p>;
  return (
    <ol className="text-s">
      {events.map((event, i) => (
        <li
          key={i}
          className="grid grid-cols-[7.5rem_minmax(0,1fr)] gap-x-2 border-t border-rule py-[3px] first:border-t-0"
        >
          <span className="text-ink-3 tabular-nums">{sayTime(trace, event.tick)}</span>
          <span className={isGrave(event) ? "text-silt-700" : undefined}>{sayEvent(trace, line, event)}</span>
        </li>
      ))}
    </ol>
  );
}
