"use client";

import { useState } from "react";
import { SweepChart } from "@/components/charts/sweep-chart";
import { TakeOutFigures } from "@/components/charts/take-out-figures";
import { ShareDialog } from "@/components/share/share-dialog";
import { Button } from "@/components/ui/button";
import { Empty } from "@/components/ui/empty";
import { ErrorBox } from "@/components/ui/error-box";
import { Progress } from "@/components/ui/progress";
import { toast } from "@/components/ui/toast";
import { useLine } from "@/lib/client/line-state";
import { formatCount } from "@/lib/format";
import type { Sweep, SweepRow } from "@/lib/schema/lines";
import { KeepValueDialog } from "./keep-value-dialog";
import { SweepForm } from "./sweep-form";
import { SweepGrid } from "./sweep-grid";
import { countAsked, type SweepReading, type SweepRun, toSweep, useSweep } from "./sweep-store";
import { restOf, saySweep, SweepTable } from "./sweep-table";
import { sayQuantity, showBare, showValue, valueHead } from "./sweep-values";

/** One number of the line at many values, or two at once; everything else and all draws the same. */
export function SweepView() {
  const { scenario, digest } = useLine();
  const { run: any, progress, error, cancel } = useSweep();
  const run = any?.scenarioId === scenario.id ? any : null;
  return (
    <section>
      <SweepForm />
      {error && (
        <div className="mt-3">
          <ErrorBox title="The comparison stopped">{error} What is done so far is shown.</ErrorBox>
        </div>
      )}
      {progress && run && (
        <div className="mt-3 flex items-center gap-3">
          <p role="status" className="whitespace-nowrap">
            Running {run.first.quantity.path === "size" ? "size" : run.first.quantity.name}{" "}
            {showValue(progress.value, run.first.quantity.unit)}
            {run.second && progress.beside !== null && ` with ${showValue(progress.beside, run.second.quantity.unit)}`}
          </p>
          <div className="max-w-md flex-1">
            <Progress share={progress.share} label="Comparing values" />
          </div>
          <Button kind="stop" size="small" onClick={cancel}>
            Cancel
          </Button>
        </div>
      )}
      {!run || run.readings.length === 0 ? (
        !progress && (
          <Empty title="Nothing compared yet">
            Choose a number of the line and a range: a buffer’s size, a lead time, a share on time, scrap, a cycle,
            demand. All values face the same demand and the same late deliveries, so that what differs is the value’s
            doing.
          </Empty>
        )
      ) : (
        <>
          {run.digest !== digest && progress === null && (
            <p className="caution mt-2 text-ink-2">The line has changed since these values were run.</p>
          )}
          {run.second ? <SweepGrid run={run} /> : <OneNumber run={run} isRunning={progress !== null} />}
          <p className="mt-3 text-s text-ink-3">
            Gains are paired: both values face the same weeks. A step of stock counts as help where it lifts the
            percentile by half a point and by more than its half-width. Large stocks: check floor and rack loads, fire
            load and rules for hazardous goods with qualified people first.
          </p>
        </>
      )}
    </section>
  );
}

function OneNumber({ run, isRunning }: { run: SweepRun; isRunning: boolean }) {
  const { options, document, mayEdit, mayShare, scenario } = useLine();
  const [keeping, setKeeping] = useState<SweepReading | null>(null);
  const [isSharing, setSharing] = useState(false);
  const sweep = toSweep(run, options.acceptedRisk);
  const isComplete = !isRunning && sweep.rows.length === countAsked(run);
  const isOfKept = run.digest === scenario.kept.digest && scenario.kept.reading !== null;
  const { replications, weeks } = run.options;
  const show = (value: number) => showBare(value, sweep.unit);
  return (
    <>
      <div className="mt-4 flex flex-wrap items-baseline gap-x-4 gap-y-1">
        <h3 className="figure-title">{saySweep(sweep, options.acceptedRisk)}</h3>
        <span className="text-s text-ink-3">
          bands are 95{"\u202f%"} half-widths, {formatCount(sweep.rows.length)} × {formatCount(replications * weeks)}{" "}
          weeks
        </span>
        <span className="ml-auto flex gap-2">
          <TakeOutFigures name={sayQuantity(sweep)} rows={() => sweepRows(sweep)} />
          {mayShare && isComplete && isOfKept && (
            <Button size="small" onClick={() => setSharing(true)}>
              Share comparison
            </Button>
          )}
        </span>
      </div>
      {isComplete && !isOfKept && mayShare && (
        <p className="mt-1 text-s text-ink-3">
          To share the comparison, keep the scenario with a full run first: a link shows kept figures only.
        </p>
      )}
      <div className="mt-3 grid gap-6 min-[1700px]:grid-cols-[minmax(0,1fr)_minmax(0,1.2fr)]">
        <SweepChart
          rows={sweep.rows}
          acceptedRisk={options.acceptedRisk}
          currentSize={sweep.currentSize}
          restSize={restOf(sweep)}
          showValue={show}
        />
        <SweepTable
          sweep={sweep}
          acceptedRisk={options.acceptedRisk}
          currency={document.money.currency ?? ""}
          action={
            mayEdit
              ? (row) => (
                  <Button
                    size="small"
                    aria-label={`Keep ${sweep.quantity === undefined ? "size " : ""}${showValue(row.size, sweep.unit)} as a scenario`}
                    onClick={() => setKeeping(run.readings.find(({ value }) => value === row.size) ?? null)}
                  >
                    Keep
                  </Button>
                )
              : undefined
          }
        />
      </div>
      {keeping && (
        <KeepValueDialog
          what={`${sayQuantity(sweep)} at ${showValue(keeping.value, sweep.unit)}`}
          name={`${sayQuantity(sweep)} ${show(keeping.value).replaceAll("\u202f", "")}`}
          entry={keeping}
          onClose={() => setKeeping(null)}
          onKept={(name) => toast(`Kept as ${name}.`)}
        />
      )}
      <ShareDialog isOpen={isSharing} onClose={() => setSharing(false)} sweep={sweep} />
    </>
  );
}

function sweepRows(sweep: Sweep) {
  const keys = ["gain", "p05", "p10", "p50", "atRisk", "risk", "moneyTiedUp", "costPerYear"] as const;
  const figures = (row: SweepRow) => keys.flatMap((key) => [row[key]?.value ?? null, row[key]?.halfWidth ?? null]);
  return [
    [valueHead(sweep), ...keys.flatMap((key) => [key, `${key} half-width`])],
    ...sweep.rows.map((row) => [row.size, ...figures(row)]),
  ];
}
