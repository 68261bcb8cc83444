"use client";

import { useMemo, useState } from "react";
import { Running } from "@/components/readings/running";
import { NeedChart } from "@/components/charts/need-chart";
import { TakeOutFigures } from "@/components/charts/take-out-figures";
import { Button } from "@/components/ui/button";
import { ErrorLine } from "@/components/ui/error-line";
import { Pick } from "@/components/ui/pick";
import { SwitchTwo } from "@/components/ui/switch-two";
import { useLine } from "@/lib/client/line-state";
import { toRunOptions } from "@/lib/client/readings";
import { useJob } from "@/lib/client/use-job";
import { useMediaQuery } from "@/lib/client/use-media-query";
import { useSimulation } from "@/lib/client/use-simulation";
import { useSizing } from "@/lib/client/use-sizing";
import { formatCount, percentileName, weeksOf } from "@/lib/format";
import { type BufferNeed, findNeeds } from "@/lib/sizing/needs";

const dayNames = ["Mon", "Tue", "Wed", "Thu", "Fri", "Sat", "Sun"];

type Worked = { key: string; risk: number; needs: BufferNeed[] };

/** What the week needs of each buffer at the accepted risk: over the week and over the year, as a table and a chart. */
export function WeekNeeds() {
  const { parsed, digest, options } = useLine();
  const { question } = useSizing();
  const client = useSimulation();
  const { state, start, cancel } = useJob<number, Worked>();
  const [wanted, setWanted] = useState<string | null>(null);
  const [span, setSpan] = useState<"week" | "year">("week");
  const isNarrow = useMediaQuery("(max-width: 639px)");
  const { acceptedRisk } = question;
  const key = JSON.stringify([digest, toRunOptions(options), acceptedRisk]);
  const worked = state.status === "done" ? state.value : null;
  const names = useMemo(() => new Map(parsed?.nodes.map(({ id, name }) => [id, name])), [parsed]);
  if (!parsed) return null;

  const run = () =>
    start(0, async (signal, onProgress) => {
      const needs = await findNeeds(parsed, toRunOptions(options), acceptedRisk, (line, how) =>
        client.stockNeeds(line, how, {
          signal,
          onProgress: ({ replications, total }) => onProgress(replications / total),
        }),
      );
      return { key, risk: acceptedRisk, needs };
    });

  const { reached, of } = weeksOf(worked?.risk ?? acceptedRisk);
  const times = `${formatCount(reached)} of ${formatCount(of)}`;
  const chosen = worked?.needs.find(({ id }) => id === wanted) ?? worked?.needs[0];
  return (
    <section className="mt-6 border-t border-ink pt-4">
      <div className="flex flex-wrap items-baseline gap-x-3 gap-y-1">
        <h2 className="text-xl font-title tracking-[-.01em]">What the week needs</h2>
        <span className="text-s text-ink-3">
          the stock that covers each buffer’s need, not its average; units at the ends of days
        </span>
        {worked && (
          <span className="ml-auto">
            <TakeOutFigures name={`${parsed.name} needs`} rows={() => needRows(worked, names)} />
          </span>
        )}
      </div>
      {worked?.key !== key && state.status !== "running" && (
        <p className={worked ? "caution mt-2 flex flex-wrap items-center gap-3 text-ink-2" : "mt-2"}>
          {worked && "The line, its run settings or the accepted risk have changed since."}
          <Button size="small" onClick={() => void run()}>
            {worked ? "Work out again" : `Work out the needs for ${times} weeks`}
          </Button>
        </p>
      )}
      {state.status === "running" && (
        <Running className="mt-2" share={state.progress} replications={options.replications} onCancel={cancel} />
      )}
      {state.status === "failed" && (
        <ErrorLine className="mt-2">The needs could not be worked out: {state.message}</ErrorLine>
      )}
      {worked && chosen && (
        <div className="mt-2 grid gap-x-6 gap-y-4 xl:grid-cols-2">
          <div className="overflow-x-auto" tabIndex={0} role="group" aria-label="Needs of all buffers">
            <table className="sheet-table">
              <thead>
                <tr>
                  <th scope="col">Buffer</th>
                  <th scope="col" className="text-right!">
                    Size now
                  </th>
                  <th scope="col" className="text-right!">
                    Half the weeks
                  </th>
                  <th scope="col" className="text-right!">
                    {times} weeks
                  </th>
                  <th scope="col" className="text-right!">
                    {times} years
                  </th>
                </tr>
              </thead>
              <tbody>
                {worked.needs.map(({ id, size, week, year, isOpenEnded }) => (
                  <tr key={id} data-selected={id === chosen.id}>
                    <th scope="row" className="text-left font-text!">
                      <button type="button" className="text-left hover:underline" onClick={() => setWanted(id)}>
                        {names.get(id) ?? id}
                      </button>
                    </th>
                    <td className="text-right text-ink-2">{formatCount(size)}</td>
                    <td className="text-right">{sayNeed(week.p50, size, isOpenEnded)}</td>
                    <td className="text-right">
                      <b className={week.covered > size ? "font-[640] text-silt-700" : "font-[640]"}>
                        {sayNeed(week.covered, size, isOpenEnded)}
                      </b>
                    </td>
                    <td className="text-right">{sayNeed(year.covered, size, isOpenEnded)}</td>
                  </tr>
                ))}
              </tbody>
            </table>
          </div>
          <figure>
            <div className="flex flex-wrap items-center gap-x-3 gap-y-1">
              <Pick
                label="Need of"
                value={chosen.id}
                options={worked.needs.map(({ id }) => ({ value: id, label: names.get(id) ?? id }))}
                onChange={setWanted}
              />
              <SwitchTwo<"week" | "year">
                label="Span of the chart"
                value={span}
                onChange={setSpan}
                options={[
                  { value: "week", label: "Over the week" },
                  { value: "year", label: "Over the year" },
                ]}
              />
            </div>
            <NeedChart
              needs={span === "week" ? chosen.days : chosen.weeks}
              names={
                span === "week"
                  ? chosen.days.map((_, d) => dayNames[d] ?? `day ${d + 1}`)
                  : chosen.weeks.map((_, w) => String(w + 1))
              }
              size={chosen.size}
              coverName={percentileName(1 - worked.risk)}
              width={isNarrow ? 420 : 620}
              label={sayChart(chosen, span, names.get(chosen.id) ?? chosen.id, times)}
            />
            <figcaption className="text-s text-ink-3">
              Solid: half of the {span === "week" ? "days" : "weeks"} need no more; ruled: {times} need no more.
              {chosen.isOpenEnded
                ? " Purchased stock is run ample here, so the need is that of a line never short of it."
                : " More than its size cannot be seen of it, but for what customers are owed on top."}
            </figcaption>
          </figure>
        </div>
      )}
    </section>
  );
}

/** A need of the whole size may be more where the size bounds what can be seen; what is owed on top is seen. */
function sayNeed(units: number, size: number, isOpenEnded: boolean): string {
  return !isOpenEnded && units === size ? `${formatCount(units)} or more` : formatCount(units);
}

function sayChart({ days, weeks }: BufferNeed, span: "week" | "year", name: string, times: string): string {
  const shown = span === "week" ? days : weeks;
  const most = Math.max(...shown.map(({ covered }) => covered));
  return `Need of ${name} over the ${span}: up to ${formatCount(most)} units cover ${times}`;
}

function needRows({ needs, risk }: Worked, names: ReadonlyMap<string, string>) {
  const cover = percentileName(1 - risk);
  return [
    ["buffer", "span", "place", "P50", cover, "size now"],
    ...needs.flatMap(({ id, size, week, year, days, weeks }) => {
      const name = names.get(id) ?? id;
      const row = (span: string, place: number | null, { p50, covered }: { p50: number; covered: number }) => [
        name,
        span,
        place,
        p50,
        covered,
        size,
      ];
      return [
        row("any week", null, week),
        row("highest of a year", null, year),
        ...days.map((cover, d) => row("day of the week", d + 1, cover)),
        ...weeks.map((cover, w) => row("week of the year", w + 1, cover)),
      ];
    }),
  ];
}
