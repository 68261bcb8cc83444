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
import type { SweepRow } from "@/lib/schema/lines";
import { findRest } from "@/lib/sizing/sweep";
import { KeepSizeDialog } from "./keep-size-dialog";
import { SweepForm } from "./sweep-form";
import { toSweep, useSweep } from "./sweep-store";
import { saySweep, SweepTable } from "./sweep-table";

/** One buffer at many sizes, everything else and all draws the same. */
export function SizeComparison() {
  const { options, document, mayEdit, mayShare, scenario, digest } = useLine();
  const { run, progress, error, cancel } = useSweep();
  const [keeping, setKeeping] = useState<SweepRow | null>(null);
  const [isSharing, setSharing] = useState(false);
  const sweep = run && run.scenarioId === scenario.id ? toSweep(run, options.acceptedRisk) : null;
  const isStale = run !== null && run.digest !== digest && progress === null;
  const isComplete = sweep !== null && progress === null && sweep.rows.length === run?.nSizes;
  const isOfKept = run?.digest === scenario.kept.digest && scenario.kept.reading !== null;
  return (
    <section>
      <SweepForm />
      {error && (
        <div className="mt-3">
          <ErrorBox title="The comparison stopped">{error} The sizes done so far are shown.</ErrorBox>
        </div>
      )}
      {progress && (
        <div className="mt-3 flex items-center gap-3">
          <p role="status" className="whitespace-nowrap">
            Running size {formatCount(progress.size)}
          </p>
          <div className="max-w-md flex-1">
            <Progress share={progress.share} label="Comparing sizes" />
          </div>
          <Button kind="stop" size="small" onClick={cancel}>
            Cancel
          </Button>
        </div>
      )}
      {!sweep || sweep.rows.length === 0 ? (
        !progress && (
          <Empty title="No sizes compared yet">
            Choose a buffer and a range. All sizes face the same demand and the same late deliveries, so that what
            differs is the size’s doing.
          </Empty>
        )
      ) : (
        <>
          <div className="mt-4 flex flex-wrap items-baseline gap-x-4 gap-y-1">
            <h3 className="figure-title">{saySweep(sweep.bufferName, sweep.rows, options.acceptedRisk)}</h3>
            <span className="text-s text-ink-3">
              bands are 95{"\u202f%"} half-widths, {formatCount(sweep.rows.length)} ×{" "}
              {formatCount((run?.options.replications ?? 0) * (run?.options.weeks ?? 0))} weeks
            </span>
            <span className="ml-auto flex gap-2">
              <TakeOutFigures name={`${sweep.bufferName} sizes`} rows={() => sweepRows(sweep.rows)} />
              {mayShare && isComplete && isOfKept && (
                <Button size="small" onClick={() => setSharing(true)}>
                  Share comparison
                </Button>
              )}
            </span>
          </div>
          {isStale && <p className="caution mt-2 text-ink-2">The line has changed since these sizes were run.</p>}
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
              restSize={findRest(sweep.rows)}
            />
            <SweepTable
              rows={sweep.rows}
              acceptedRisk={options.acceptedRisk}
              currentSize={sweep.currentSize}
              currency={document.money.currency}
              action={
                mayEdit
                  ? (row) => (
                      <Button
                        size="small"
                        aria-label={`Keep size ${formatCount(row.size)} as a scenario`}
                        onClick={() => setKeeping(row)}
                      >
                        Keep
                      </Button>
                    )
                  : undefined
              }
            />
          </div>
          <p className="mt-3 text-s text-ink-3">
            Gains are paired: both sizes face the same weeks. A step counts as help where it lifts the percentile by
            half a point and by more than its half-width. Large stocks: check floor and rack loads, fire load and rules
            for hazardous goods with qualified people first.
          </p>
        </>
      )}
      {keeping && run && (
        <KeepSizeDialog
          bufferName={run.bufferName}
          size={keeping.size}
          entry={run.readings.find(({ size }) => size === keeping.size) ?? null}
          onClose={() => setKeeping(null)}
          onKept={(name) => toast(`Kept as ${name}.`)}
        />
      )}
      <ShareDialog isOpen={isSharing} onClose={() => setSharing(false)} sweep={sweep} />
    </section>
  );
}

function sweepRows(rows: readonly SweepRow[]) {
  const keys = ["gain", "p05", "p10", "p50", "atRisk", "risk", "moneyTiedUp", "costPerYear"] as const;
  return [
    ["size", ...keys.flatMap((key) => [key, `${key} half-width`])],
    ...rows.map((row) => [row.size, ...keys.flatMap((key) => [row[key]?.value ?? null, row[key]?.halfWidth ?? null])]),
  ];
}
