"use client";

import { useMemo, useState } from "react";
import { Button } from "@/components/ui/button";
import { ErrorLine } from "@/components/ui/error-line";
import { Pick } from "@/components/ui/pick";
import { type Reading, useLine } from "@/lib/client/line-state";
import { useJob } from "@/lib/client/use-job";
import { useSimulation } from "@/lib/client/use-simulation";
import { formatPercent } from "@/lib/format";
import type { Line } from "@/lib/line/types";
import type { WeekTrace } from "@/lib/simulation/trace-types";
import { listWeekChoices, sayWeek } from "./bad-week-choices";
import { sumWeek } from "./bad-week-sentence";
import { BadWeekStory } from "./bad-week-story";

type Opened = { key: string; line: Line; trace: WeekTrace };

/** A stored run of another engine need not come out the same; its weeks must not be told from other ones. */
function checkRate(trace: WeekTrace, rate: number, engine: string): void {
  const { due, onTime } = sumWeek(trace);
  if (Math.fround(onTime / due) === rate) return;
  const found = `it came out at ${formatPercent(onTime / due)}, not at ${formatPercent(rate)}`;
  throw new Error(`${found} as in the run, which engine ${engine} made. Run all weeks again.`);
}

/** One week of the run opened: its replication is run again from the seed when asked for, and told as what happened. */
export function BadWeek({ reading }: { reading: Reading }) {
  const { parsed, digest, options } = useLine();
  const client = useSimulation();
  const { result } = reading;
  const choices = useMemo(() => listWeekChoices(result, options.acceptedRisk), [result, options.acceptedRisk]);
  const [wanted, setWanted] = useState<string | null>(null);
  const { state, start, cancel } = useJob<string, Opened>();
  const choice = choices.find(({ value }) => value === wanted) ?? choices[0];
  if (!choice) return null;
  // Only the very line of the run gives its weeks again.
  const line = digest === reading.digest ? parsed : null;
  const key = JSON.stringify([reading.digest, result.options, choice.value]);
  const isOther = state.status === "done" && state.value.key !== key;
  const isStale = state.status === "done" && line === null;

  const open = (own: Line) =>
    start(sayWeek(choice.replication, choice.week), async (signal) => {
      const trace = await client.traceWeek(own, result.options, choice.replication, choice.week, { signal });
      checkRate(trace, choice.rate, reading.engine);
      return { key, line: own, trace };
    });

  return (
    <section>
      <div className="flex flex-wrap items-center gap-x-3 gap-y-2">
        <h2 className="figure-title">Why a week went wrong</h2>
        <Pick
          label="Week"
          value={choice.value}
          options={choices}
          onChange={(value) => {
            setWanted(value);
            if (state.status === "running") cancel();
          }}
        />
        {state.status !== "running" && (state.status !== "done" || isOther) && (
          <Button size="small" className="max-sm:h-11" disabled={!line} onClick={() => line && void open(line)}>
            Open this week
          </Button>
        )}
      </div>
      {state.status === "running" && (
        <p role="status" className="py-3 text-ink-2">
          Running up to {state.progress}{" "}
          <Button size="small" kind="stop" onClick={cancel}>
            Cancel
          </Button>
        </p>
      )}
      {state.status === "failed" && (
        <ErrorLine className="py-2">The week could not be opened: {state.message}</ErrorLine>
      )}
      {line === null && (
        <p className="py-2 text-s text-ink-3">
          {isStale ? "The line has changed since this week was opened." : "The line has changed since this run."} Run it
          again to open its weeks.
        </p>
      )}
      {state.status === "idle" && line !== null && (
        <p className="py-2 text-s text-ink-3">
          Run again from the seed phrase when asked for, looked at tick by tick: nothing of it is stored.
        </p>
      )}
      {state.status === "done" && (
        <>
          {isOther && !isStale && (
            <p className="pt-2 text-s text-ink-3">
              Shown is {sayWeek(state.value.trace.replication, state.value.trace.week)}.
            </p>
          )}
          <BadWeekStory key={state.value.key} trace={state.value.trace} line={state.value.line} />
        </>
      )}
    </section>
  );
}
