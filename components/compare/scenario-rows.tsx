"use client";

import { useState } from "react";
import useSWR from "swr";
import { ReadingRuler, rulerStartOf } from "@/components/charts/reading-ruler";
import { ShareDialog } from "@/components/share/share-dialog";
import { Button } from "@/components/ui/button";
import { ErrorLine } from "@/components/ui/error-line";
import { Fact } from "@/components/ui/fact";
import { describeError, fetchJson, scenarioKey } from "@/lib/client/api";
import { useLine } from "@/lib/client/line-state";
import { formatMoneyFigure, formatShare, percentileName } from "@/lib/format";
import { fewDifferences } from "@/lib/line/few-differences";
import type { ScenarioDetail, ScenarioSummary } from "@/lib/schema/lines";

/** Scenarios of the line as kept, on one scale. */
export function ScenarioRows() {
  const { line, mayShare } = useLine();
  const ids = line.scenarios.map(({ id }) => id);
  // Kept versions change only with a new one: their number is part of the key.
  const key = ["kept", ...line.scenarios.map(({ id, nVersions }) => `${id}:${nVersions}`)];
  const { data, error } = useSWR<ScenarioDetail[], Error>(key, () =>
    Promise.all(ids.map((id) => fetchJson<ScenarioDetail>(scenarioKey(id)))),
  );
  const [chosen, setChosen] = useState<readonly string[]>([]);
  const [isSharing, setSharing] = useState(false);
  const base = data?.find(({ isBase }) => isBase);
  const from = rulerStartOf(line.scenarios.map(({ reading }) => reading));
  const comparison = chosen.flatMap((id) => {
    const detail = data?.find((one) => one.id === id);
    return detail?.kept.reading ? [{ versionId: detail.kept.id, name: detail.name }] : [];
  });
  const toggle = (id: string) => setChosen(chosen.includes(id) ? chosen.filter((one) => one !== id) : [...chosen, id]);
  return (
    <section className="border-b border-ink pb-4">
      <div className="flex flex-wrap items-baseline gap-x-3 gap-y-1">
        <h2 className="text-xl font-title tracking-[-.01em]">Scenarios as kept, one scale</h2>
        <span className="text-s text-ink-3">with equal seed phrases all face the same weeks</span>
        {mayShare && line.scenarios.length > 1 && (
          <Button
            size="small"
            className="ml-auto"
            disabled={comparison.length < 2 || comparison.length > 6}
            onClick={() => setSharing(true)}
          >
            Share chosen side by side
          </Button>
        )}
      </div>
      {error && <ErrorLine className="mt-2">The kept versions could not be read: {describeError(error)}</ErrorLine>}
      <ul className="mt-2 border-t border-ink">
        {line.scenarios.map((scenario) => (
          <ScenarioRow
            key={scenario.id}
            scenario={scenario}
            from={from}
            differs={describeDifference(
              base,
              data?.find(({ id }) => id === scenario.id),
            )}
            isChosen={chosen.includes(scenario.id)}
            onToggle={mayShare && line.scenarios.length > 1 && scenario.reading ? () => toggle(scenario.id) : undefined}
          />
        ))}
      </ul>
      <ShareDialog isOpen={isSharing} onClose={() => setSharing(false)} comparison={comparison} />
    </section>
  );
}

function describeDifference(base: ScenarioDetail | undefined, other: ScenarioDetail | undefined): string[] {
  if (!base || !other) return [];
  if (other.isBase) return ["what the others are held against"];
  return fewDifferences(base.kept.document, other.kept.document);
}

type RowProps = {
  scenario: ScenarioSummary;
  from: number;
  differs: readonly string[];
  isChosen: boolean;
  onToggle?(): void;
};

function ScenarioRow({ scenario: { name, isBase, reading }, from, differs, isChosen, onToggle }: RowProps) {
  return (
    <li className="grid items-center gap-x-6 gap-y-2 border-b border-rule py-3 last:border-b-0 lg:grid-cols-[minmax(0,1.2fr)_minmax(0,1.4fr)_110px_110px_110px]">
      <div className="flex items-start gap-2.5">
        {onToggle && (
          <input
            type="checkbox"
            className="mt-1 size-4 shrink-0 accent-ink"
            checked={isChosen}
            onChange={onToggle}
            aria-label={`Share ${name} side by side`}
          />
        )}
        <div className="min-w-0">
          <h3 className="font-[620]">
            {name} {isBase && <span className="text-s font-text text-ink-3">base</span>}
          </h3>
          {differs.map((text) => (
            <p key={text} className="text-s text-ink-2">
              {text}
            </p>
          ))}
        </div>
      </div>
      {reading ? (
        <>
          <ReadingRuler reading={reading} from={from} hasWhisker />
          <Fact name={percentileName(reading.acceptedRisk)} text={formatShare(reading.atRisk)} />
          <Fact name={`Capital, ${reading.currency}`} text={formatMoneyFigure(reading.moneyTiedUp)} />
          <Fact name="Cost a year" text={formatMoneyFigure(reading.costPerYear)} />
        </>
      ) : (
        <p className="text-ink-3 lg:col-span-4">No full run is kept with it yet.</p>
      )}
    </li>
  );
}
