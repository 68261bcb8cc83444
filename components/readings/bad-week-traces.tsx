"use client";

import { useState } from "react";
import { LevelTrace } from "@/components/charts/level-trace";
import { StateStrip } from "@/components/charts/state-strip";
import { TimeKey, timeParts } from "@/components/charts/time-bar";
import { WeekAxis } from "@/components/charts/week-axis";
import { Button } from "@/components/ui/button";
import { useMediaQuery } from "@/lib/client/use-media-query";
import { formatCount } from "@/lib/format";
import type { Line } from "@/lib/line/types";
import type { WeekTrace } from "@/lib/simulation/trace-types";
import { buffersByDryness, deliveriesTo, timeAxisOf } from "./bad-week-axis";
import { sayHours, writeHours } from "./bad-week-moments";
import { nameIn } from "./bad-week-words";

const mostTraces = 4;

/** Levels of the buffers that ran dry first above what every station did, all on one axis of time. */
export function BadWeekTraces({ trace, line, first }: { trace: WeekTrace; line: Line; first: string | null }) {
  const isNarrow = useMediaQuery("(max-width: 639px)");
  const [showsAll, setShowsAll] = useState(false);
  const axis = timeAxisOf(trace, isNarrow ? 400 : 860);
  const order = buffersByDryness(trace, first);
  const others = trace.buffers.map(({ id }) => id).filter((id) => !order.includes(id));
  const shown = showsAll ? [...order, ...others] : order.slice(0, mostTraces);
  const chosen = trace.weeks[trace.weeks.length - 1];
  return (
    <div>
      {shown.map((id) => {
        const { levels } = trace.buffers.find((buffer) => buffer.id === id)!;
        const own = levels.subarray(chosen.firstTick);
        const dry = own.filter((level) => level === 0).length;
        const note = dry > 0 ? `dry ${sayHours(trace, dry)}` : "not dry";
        const lowest = `lowest ${formatCount(own.reduce((a, b) => Math.min(a, b)))}`;
        return (
          <Row key={id} name={nameIn(line, id)} note={note} isGrave={dry > 0}>
            <LevelTrace
              axis={axis}
              levels={levels}
              deliveries={deliveriesTo(trace, id)}
              label={`Level of ${nameIn(line, id)}: in this week ${note}, ${lowest}`}
            />
          </Row>
        );
      })}
      {order.length === 0 && !showsAll && (
        <p className="py-1 text-s text-ink-2">No buffer was dry for an hour or more.</p>
      )}
      {trace.buffers.length > (showsAll ? 0 : shown.length) && (
        <Button size="small" className="mb-2" onClick={() => setShowsAll(!showsAll)}>
          {showsAll ? "Show the driest buffers only" : `Show all ${formatCount(trace.buffers.length)} buffers`}
        </Button>
      )}
      {trace.stations.map(({ id, states }) => {
        const { hours } = chosen.stations.find((station) => station.id === id)!;
        const parts = timeParts
          .map(({ label }, i) => ({ label, hours: hours[i] }))
          .filter((part) => part.hours >= 0.05);
        const said = parts.map((part) => `${part.label} ${writeHours(part.hours)}`).join(", ");
        return (
          <Row key={id} name={nameIn(line, id)} note={said}>
            <StateStrip axis={axis} states={states} label={`${nameIn(line, id)} in this week: ${said}`} />
          </Row>
        );
      })}
      <WeekAxis axis={axis} />
      <div className="mt-1 flex flex-wrap gap-x-4 gap-y-1">
        <TimeKey />
      </div>
    </div>
  );
}

type RowProps = { name: string; note: string; isGrave?: boolean; children: React.ReactNode };

function Row({ name, note, isGrave = false, children }: RowProps) {
  return (
    <div className="mb-0.5">
      <p className="flex flex-wrap items-baseline gap-x-3 text-s">
        <span className="font-[620]">{name}</span>
        <span className={isGrave ? "text-silt-700" : "text-ink-3"}>{note}</span>
      </p>
      {children}
    </div>
  );
}
