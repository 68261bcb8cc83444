import { DifferenceAxis, type differenceScale } from "@/components/charts/difference-axis";
import { FillRateRuler } from "@/components/charts/fill-rate-ruler";
import type { KeptRun } from "@/lib/client/use-kept-runs";
import { formatNumber, formatPoints, spreadText } from "@/lib/format";
import { differences as listDifferences } from "@/lib/line/diff";
import { sayDifference } from "./say-difference";
import { FillRateFigures, Money } from "./scenario-figures";
import { type Compared, comparisonColumns } from "./compared";

type Props = {
  row: Compared;
  base: KeptRun | null;
  acceptedRisk: number;
  from: number;
  scale: ReturnType<typeof differenceScale>;
  most: { money: number; cost: number };
  isReading: boolean;
};

/** One scenario: what differs, its percentiles, its paired difference to the base, its money. */
export function ScenarioRow({ row, base, acceptedRisk, from, scale, most, isReading }: Props) {
  const { detail, result, atRisk, differences, letter, isOwn } = row;
  const isBase = base?.detail.id === detail.id;
  const { currency } = detail.kept.document.money;
  return (
    <li className={`grid items-start gap-x-6 gap-y-3 border-b border-rule py-3 last:border-b-0 ${comparisonColumns}`}>
      <div className="flex min-w-0 gap-3">
        <span aria-hidden className="w-4 text-xl font-[640]">
          {letter}
        </span>
        <div className="min-w-0">
          <h3 className="font-[620]">
            {detail.name} {detail.isBase && <span className="text-s font-text text-ink-3">base</span>}
          </h3>
          <p className="text-s text-ink-3">
            version {detail.kept.number}
            {isOwn && ", run on this page"}
          </p>
          <Differs from={base} to={row} isBase={isBase} />
        </div>
      </div>
      {result && atRisk ? (
        <>
          <div>
            <FillRateRuler
              p05={result.summary.p05.value}
              atRisk={atRisk}
              p50={result.summary.p50.value}
              acceptedRisk={acceptedRisk}
              from={from}
              hasWhisker
            />
            <FillRateFigures result={result} atRisk={atRisk} acceptedRisk={acceptedRisk} />
          </div>
          <div>
            {differences ? (
              <>
                <p>
                  <b className="text-l font-[640]">{formatPoints(differences.atRisk.value)}</b>{" "}
                  <span className="text-s text-ink-2">
                    {differences.atRisk.halfWidth !== null &&
                      spreadText(formatNumber(differences.atRisk.halfWidth * 100, 1))}{" "}
                    points
                  </span>
                </p>
                <DifferenceAxis
                  figure={differences.atRisk}
                  scale={scale}
                  label={`${detail.name} against ${base?.detail.name ?? ""}`}
                />
              </>
            ) : (
              <p className="text-s text-ink-2">{isBase ? "what the others are held against" : "no pair to read"}</p>
            )}
          </div>
          <Money
            figure={result.summary.moneyTiedUp}
            difference={differences?.moneyTiedUp ?? null}
            most={most.money}
            currency={currency}
            name="Capital tied up"
          />
          <Money
            figure={result.summary.costPerYear.total}
            difference={differences?.costPerYear ?? null}
            most={most.cost}
            currency={currency}
            name="Cost a year"
            parts={result}
          />
          {differences && base && (
            <p className="text-ink-2 lg:col-start-2 lg:col-end-6">
              {sayDifference(detail.name, base.detail.name, differences, acceptedRisk, currency)}
            </p>
          )}
        </>
      ) : (
        <p className="text-ink-3 lg:col-span-4">
          {row.line === null
            ? "This version has faults and cannot run. Mend them on the sketch and keep it."
            : isReading
              ? "Reading its run"
              : "No run of these weeks is kept with it."}
        </p>
      )}
    </li>
  );
}

const fewLines = 3;

/** What differs from the base, field by field; a long list opens. */
function Differs({ from, to, isBase }: { from: KeptRun | null; to: KeptRun; isBase: boolean }) {
  if (isBase || !from) return null;
  const found = listDifferences(from.detail.kept.document, to.detail.kept.document).map(({ text }) => text);
  if (found.length === 0) return <p className="text-s text-ink-2">the same line</p>;
  const lines = (texts: readonly string[]) =>
    texts.map((text) => (
      <p key={text} className="text-s text-ink-2">
        {text}
      </p>
    ));
  if (found.length <= fewLines + 1) return lines(found);
  return (
    <>
      {lines(found.slice(0, fewLines))}
      <details className="text-s text-ink-2">
        <summary className="cursor-pointer text-water-700">and {found.length - fewLines} more</summary>
        {lines(found.slice(fewLines))}
      </details>
    </>
  );
}
