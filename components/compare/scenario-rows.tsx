"use client";

import { type ReactNode, useMemo, useState } from "react";
import { DifferenceAxis, differenceScale } from "@/components/charts/difference-axis";
import { rulerStart } from "@/components/charts/fill-rate-ruler";
import { TakeOutFigures } from "@/components/charts/take-out-figures";
import { ShareDialog } from "@/components/share/share-dialog";
import { Button } from "@/components/ui/button";
import { ErrorLine } from "@/components/ui/error-line";
import { Pick } from "@/components/ui/pick";
import { Progress } from "@/components/ui/progress";
import { describeError } from "@/lib/client/api";
import { useLine } from "@/lib/client/line-state";
import { useKeptRuns } from "@/lib/client/use-kept-runs";
import { formatCount, percentileName, plural } from "@/lib/format";
import { pairedDifferences, percentile } from "@/lib/simulation";
import { CauseTable } from "./cause-table";
import { type Compared, comparisonColumns } from "./compared";
import { comparisonRows } from "./comparison-rows";
import { ScenarioRow } from "./scenario-row";

/** Scenarios on one scale at most. */
export const mostCompared = 6;

/** Scenarios of the line as kept, over the same weeks, each held against one of them. */
export function ScenarioRows() {
  const { line, mayShare } = useLine();
  const [picked, setPicked] = useState<readonly string[] | null>(null);
  const [baseId, setBaseId] = useState<string | null>(null);
  const [isSharing, setSharing] = useState(false);
  const chosen = useMemo(() => {
    const wanted = line.scenarios.filter(({ id }) => picked?.includes(id) ?? true);
    return wanted.slice(0, mostCompared);
  }, [line.scenarios, picked]);
  const baseSummary = chosen.find(({ id }) => id === baseId) ?? chosen.find(({ isBase }) => isBase) ?? chosen[0];
  const kept = useKeptRuns(chosen, baseSummary?.id ?? null);
  const { options } = kept;
  const base = kept.runs?.find(({ detail }) => detail.id === baseSummary?.id) ?? null;
  const acceptedRisk = options?.acceptedRisk ?? 0.1;
  const rows = useMemo(
    () =>
      (kept.runs ?? []).map((run, i): Compared => {
        const isPair = run.result && base?.result && run.detail.id !== base.detail.id;
        return {
          ...run,
          letter: String.fromCharCode(65 + i),
          atRisk: run.result && percentile(run.result, acceptedRisk),
          differences: isPair ? pairedDifferences(run.result!, base.result!, acceptedRisk) : null,
        };
      }),
    [acceptedRisk, base, kept.runs],
  );
  const nMissing = rows.filter(({ result, line: own }) => result === null && own !== null).length;
  const scale = differenceScale(rows.flatMap(({ differences }) => (differences ? [differences.atRisk] : [])));
  const from = rulerStart(
    ...rows.flatMap(({ result, atRisk }) => (result && atRisk ? [result.summary.p05.value, atRisk.value] : [])),
  );
  const mostMoney = Math.max(1, ...rows.map(({ result }) => result?.summary.moneyTiedUp.value ?? 0));
  const mostCost = Math.max(1, ...rows.map(({ result }) => result?.summary.costPerYear.total.value ?? 0));
  const shareable = rows.flatMap(({ detail }) =>
    detail.kept.reading ? [{ versionId: detail.kept.id, name: detail.name }] : [],
  );
  const toggle = (id: string) => {
    const now = chosen.map((one) => one.id);
    setPicked(now.includes(id) ? now.filter((one) => one !== id) : [...now, id]);
  };
  const currency = base?.detail.kept.document.money.currency ?? "";
  return (
    <section className="border-b border-ink pb-4">
      <div className="flex flex-wrap items-center gap-x-3 gap-y-2">
        <h2 className="text-xl font-title tracking-[-.01em]">
          {sayCount(chosen.length)} {plural(chosen.length, "scenario")}, one scale
        </h2>
        {options && (
          <span className="text-s text-ink-3">
            as kept; the same {formatCount(options.replications * options.weeks)} weeks in each, seed phrase{" "}
            <span className="font-mono">{options.seed}</span>
          </span>
        )}
        <span className="ml-auto flex flex-wrap gap-2">
          {chosen.length > 1 && baseSummary && (
            <Pick
              label="Held against"
              value={baseSummary.id}
              options={chosen.map(({ id, name }) => ({ value: id, label: name }))}
              onChange={setBaseId}
            />
          )}
          {base?.result && (
            <TakeOutFigures
              name={`${line.name} scenarios`}
              rows={() => comparisonRows(rows, acceptedRisk, base.detail.name)}
            />
          )}
          {mayShare && line.scenarios.length > 1 && (
            <Button size="small" disabled={shareable.length < 2} onClick={() => setSharing(true)}>
              Share side by side
            </Button>
          )}
        </span>
      </div>
      {line.scenarios.length > 1 && (
        <fieldset className="mt-2 flex flex-wrap gap-x-4 gap-y-1 text-ink-2">
          <legend className="sr-only">Scenarios to compare, up to {mostCompared}</legend>
          {line.scenarios.map(({ id, name }) => {
            const isChosen = chosen.some((one) => one.id === id);
            return (
              <label key={id} className="flex min-h-6 items-center gap-1.5">
                <input
                  type="checkbox"
                  className="size-4 accent-ink"
                  checked={isChosen}
                  disabled={isChosen ? chosen.length === 1 : chosen.length === mostCompared}
                  onChange={() => toggle(id)}
                />
                {name}
              </label>
            );
          })}
          {line.scenarios.length > mostCompared && (
            <span className="text-s text-ink-3">up to {mostCompared} at a time</span>
          )}
        </fieldset>
      )}
      {kept.error && (
        <ErrorLine className="mt-2">The kept versions could not be read: {describeError(kept.error)}</ErrorLine>
      )}
      {nMissing > 0 && !kept.isReading && !kept.progress && (
        <p className="caution mt-3 flex flex-wrap items-center gap-3 text-ink-2">
          {nMissing === 1 ? "One scenario has" : `${sayCount(nMissing)} scenarios have`} no kept run of these weeks, so
          there is nothing to hold side by side yet.
          <Button size="small" onClick={kept.runMissing}>
            Run on the same weeks
          </Button>
        </p>
      )}
      {kept.progress && (
        <div className="mt-3 flex items-center gap-3">
          <p role="status" className="whitespace-nowrap">
            Running {kept.progress.name}
          </p>
          <div className="max-w-md flex-1">
            <Progress share={kept.progress.share} label="Running scenarios" />
          </div>
          <Button kind="stop" size="small" onClick={kept.cancel}>
            Cancel
          </Button>
        </div>
      )}
      {kept.runError && <ErrorLine className="mt-2">{kept.runError}</ErrorLine>}
      <Head
        name={percentileName(acceptedRisk)}
        letter={rows.find(({ detail }) => detail.id === base?.detail.id)?.letter ?? ""}
        currency={currency}
        axis={<DifferenceAxis figure={null} scale={scale} label="Scale of the differences" hasAxis />}
      />
      <ul>
        {rows.length === 0 && !kept.error && (
          <li role="status" className="py-3 text-ink-2">
            Reading the kept versions
          </li>
        )}
        {rows.map((row) => (
          <ScenarioRow
            key={row.detail.id}
            row={row}
            base={base}
            acceptedRisk={acceptedRisk}
            from={from}
            scale={scale}
            most={{ money: mostMoney, cost: mostCost }}
            isReading={kept.isReading}
          />
        ))}
      </ul>
      <CauseTable rows={rows} />
      <ShareDialog isOpen={isSharing} onClose={() => setSharing(false)} comparison={shareable} />
    </section>
  );
}

function Head({ name, letter, currency, axis }: { name: string; letter: string; currency: string; axis: ReactNode }) {
  return (
    <div
      className={`mt-3 hidden items-end gap-x-6 border-b border-ink pb-1 text-s text-ink-2 lg:grid ${comparisonColumns}`}
    >
      <span>Scenario and what differs</span>
      <span>Weekly fill rate: P5, {name}, P50</span>
      <span>
        {name} against {letter}, points
        {axis}
      </span>
      <span>Capital tied up, {currency}</span>
      <span>Cost a year, {currency}</span>
    </div>
  );
}

const counts = ["No", "One", "Two", "Three", "Four", "Five", "Six"];
const sayCount = (n: number) => counts[n] ?? formatCount(n);
