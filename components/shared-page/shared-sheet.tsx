import { SweepChart } from "@/components/charts/sweep-chart";
import { WaterMark } from "@/components/layout/water-mark";
import { LocalTime } from "@/components/line/local-time";
import { SheetPicture } from "@/components/line/sheet-picture";
import { CauseList } from "@/components/readings/cause-list";
import { CostList } from "@/components/readings/cost-list";
import { CustomerTable } from "@/components/readings/customer-table";
import { FillRates } from "@/components/readings/fill-rates";
import { PercentileTable } from "@/components/readings/percentile-table";
import { restOf, saySweep, SweepTable } from "@/components/compare/sweep-table";
import { sayQuantity, showBare } from "@/components/compare/sweep-values";
import type { SharedPage, SharedVersion } from "@/lib/schema/lines";
import type { RunResult } from "@/lib/simulation/types";
import { Assumptions } from "./assumptions";
import { Cautions } from "./cautions";
import { KeyFigures } from "./key-figures";
import { SharedRows } from "./shared-rows";

type Props = { page: SharedPage; results: readonly (RunResult | null)[] };

/** A page for someone who opens one link: the sentence, the figures behind it, the line, and what all rests on. */
export function SharedSheet({ page, results }: Props) {
  const { lineName, workspaceName, sharedBy, sharedAt, expiresAt, versions, sweep } = page;
  const [first] = versions;
  return (
    <>
      <header className="border-b border-ink">
        <div className="mx-auto flex max-w-[1040px] flex-wrap items-center gap-x-4 gap-y-1 px-4 py-3 sm:px-6">
          <span className="flex items-center gap-2 font-[680]">
            <WaterMark /> Forebay
          </span>
          <span className="text-ink-2">
            {workspaceName} / <b className="font-[620] text-ink">{lineName}</b>
          </span>
          <span className="text-s text-ink-3 sm:ml-auto">
            Shared by {sharedBy}, <LocalTime at={sharedAt} format="date" />; open until{" "}
            <LocalTime at={expiresAt} format="date" />
          </span>
        </div>
      </header>
      <main id="main" className="mx-auto max-w-[1040px] space-y-8 px-4 pt-5 pb-16 sm:px-6">
        {versions.length > 1 && <SharedRows versions={versions} />}
        {first && <Version version={first} result={results[0] ?? null} isOneOfMany={versions.length > 1} />}
        {sweep && first && (
          <section>
            <h2 className="border-b border-ink pb-1 text-xl font-title">
              {sweep.quantity === undefined
                ? `Sizes of ${sweep.bufferName} compared`
                : `${sayQuantity(sweep)}, compared`}
            </h2>
            <p className="my-2 text-l">{saySweep(sweep, first.options.acceptedRisk)}.</p>
            <SweepChart
              rows={sweep.rows}
              acceptedRisk={first.options.acceptedRisk}
              currentSize={sweep.currentSize}
              restSize={restOf(sweep)}
              showValue={(value) => showBare(value, sweep.unit)}
            />
            <SweepTable
              sweep={sweep}
              acceptedRisk={first.options.acceptedRisk}
              currency={first.document.money.currency}
            />
          </section>
        )}
        {first && <Assumptions version={first} result={results[0] ?? null} />}
        {first && <Cautions document={first.document} />}
      </main>
    </>
  );
}

function Version({
  version,
  result,
  isOneOfMany,
}: {
  version: SharedVersion;
  result: RunResult | null;
  isOneOfMany: boolean;
}) {
  const { document, layout, notes, options, scenarioName, number } = version;
  return (
    <>
      {isOneOfMany && <h2 className="border-b border-ink pb-1 text-xl font-title">{scenarioName} in detail</h2>}
      <KeyFigures version={version} />
      {result && (
        <>
          <div className="grid gap-8 md:grid-cols-[minmax(0,1.4fr)_minmax(0,1fr)]">
            <FillRates result={result} acceptedRisk={options.acceptedRisk} />
            <PercentileTable result={result} acceptedRisk={options.acceptedRisk} />
          </div>
          <div className="grid gap-8 md:grid-cols-2">
            <CauseList result={result} document={document} />
            <CostList result={result} document={document} />
          </div>
          <CustomerTable result={result} document={document} acceptedRisk={options.acceptedRisk} />
        </>
      )}
      <section>
        <h2 className="border-b border-ink pb-1 text-xl font-title">The line</h2>
        <p className="my-2 text-s text-ink-3">
          {scenarioName}, version {number}. Gauges: solid water is held 9 days in 10, ruled water P10 to P90, the line
          the median; triangle: size; hatch under a gauge: dry at least 1{"\u202f%"} of hours.
        </p>
        <SheetPicture
          document={document}
          layout={layout}
          notes={notes}
          result={result}
          label={`Drawing of ${document.name}`}
        />
      </section>
    </>
  );
}
