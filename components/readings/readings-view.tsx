"use client";

import { TakeOutFigures } from "@/components/charts/take-out-figures";
import { BarTools } from "@/components/line/bar-slot";
import { LocalTime } from "@/components/line/local-time";
import { Button } from "@/components/ui/button";
import { Empty } from "@/components/ui/empty";
import { Pick } from "@/components/ui/pick";
import { type Reading, useLine } from "@/lib/client/line-state";
import { formatChosenPercent } from "@/lib/format";
import { describeAbout } from "@/lib/line/describe-fault";
import { BadWeek } from "./bad-week";
import { CauseList } from "./cause-list";
import { CostList } from "./cost-list";
import { CustomerTable } from "./customer-table";
import { FillRates } from "./fill-rates";
import { LowestStock } from "./lowest-stock";
import { PercentileTable } from "./percentile-table";
import { readingRows } from "./reading-rows";
import { RunAgain } from "./run-again";
import { RunWarnings } from "./run-warnings";
import { StationTable } from "./station-table";
import { SupplierTable } from "./supplier-table";

const risks = [0.01, 0.05, 0.1, 0.2, 0.25];

/** What a full run says, from the sentence to the parts. */
export function ReadingsView() {
  const { full, options, setOptions, mayEdit, document } = useLine();
  const choices = [...new Set([...risks, options.acceptedRisk])].sort((a, b) => a - b);
  return (
    <>
      <BarTools>
        <Pick
          label="Accepted risk"
          value={String(options.acceptedRisk)}
          disabled={!mayEdit}
          options={choices.map((risk) => ({
            value: String(risk),
            label: formatChosenPercent(risk),
          }))}
          onChange={(value) => setOptions({ acceptedRisk: Number(value) })}
        />
      </BarTools>
      {full && (
        <BarTools slot="end">
          <span className="text-s text-ink-3 max-xl:hidden">
            Run <LocalTime at={full.ranAt} format="dateTime" />, engine {full.engine}
          </span>
          <TakeOutFigures name={`${document.name} readings`} rows={() => readingRows(full.result, document)} />
        </BarTools>
      )}
      {full ? <Figures reading={full} isCurrent={full.isCurrent} /> : <NothingYet />}
    </>
  );
}

function Figures({ reading, isCurrent }: { reading: Reading; isCurrent: boolean }) {
  const { document, parsed, options, runFull } = useLine();
  const { result } = reading;
  return (
    <div className="px-4 pt-3 pb-8 sm:px-5">
      {!isCurrent && (
        <p className="caution mb-4 flex flex-wrap items-center gap-3">
          The line or its run settings have changed since this run. These are the figures from before.
          <Button size="small" disabled={!parsed} onClick={runFull}>
            Run again
          </Button>
        </p>
      )}
      <RunWarnings result={result} acceptedRisk={options.acceptedRisk} />
      <div className="grid gap-y-6 lg:grid-cols-[minmax(0,1.9fr)_minmax(0,1fr)] xl:grid-cols-[minmax(0,1.9fr)_minmax(0,0.95fr)_minmax(0,1.3fr)] [&>*]:min-w-0 lg:[&>*+*]:border-l lg:[&>*+*]:border-rule lg:[&>*+*]:pl-5 lg:[&>*]:pr-5">
        <FillRates result={result} acceptedRisk={options.acceptedRisk} />
        <PercentileTable result={result} acceptedRisk={options.acceptedRisk} />
        <CauseList result={result} document={document} />
      </div>
      <div className="mt-6 grid gap-y-6 border-t border-ink pt-4 lg:grid-cols-2 xl:grid-cols-[minmax(0,1.2fr)_minmax(0,1.4fr)_minmax(0,0.9fr)] [&>*]:min-w-0 lg:[&>*+*]:border-l lg:[&>*+*]:border-rule lg:[&>*+*]:pl-5 lg:[&>*]:pr-5">
        <LowestStock reading={reading} />
        <StationTable result={result} document={document} />
        <CostList result={result} document={document} />
      </div>
      <div className="mt-6 grid gap-y-6 border-t border-ink pt-4 lg:grid-cols-2 [&>*]:min-w-0 lg:[&>*+*]:border-l lg:[&>*+*]:border-rule lg:[&>*+*]:pl-5 lg:[&>*]:pr-5">
        <SupplierTable result={result} document={document} />
        <div className="space-y-6">
          <CustomerTable result={result} document={document} acceptedRisk={options.acceptedRisk} />
          <RunAgain />
        </div>
      </div>
      <div className="mt-6 min-w-0 border-t border-ink pt-4">
        <BadWeek reading={reading} />
      </div>
    </div>
  );
}

function NothingYet() {
  const { parsed, faults, document, runFull, progress } = useLine();
  return (
    <div className="px-5 py-6">
      {faults.length > 0 ? (
        <Empty title="This line cannot run yet">
          <ul className="list-disc pl-5">
            {faults.slice(0, 8).map((fault) => (
              <li key={`${fault.node}${fault.path}${fault.message}`}>{describeAbout(fault, document)}</li>
            ))}
          </ul>
          {faults.length > 8 && <p>And {faults.length - 8} more.</p>}
        </Empty>
      ) : (
        <Empty
          title={progress ? "The first run is under way" : "Not run yet"}
          action={
            !progress && (
              <Button kind="main" disabled={!parsed} onClick={runFull}>
                Run all weeks
              </Button>
            )
          }
        >
          Percentiles, causes and costs appear here after a full run. It takes seconds and happens in this browser.
        </Empty>
      )}
    </div>
  );
}
