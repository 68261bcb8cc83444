import { FillRateRuler, rulerStart } from "@/components/charts/fill-rate-ruler";
import { formatMoneyFigure, formatShare, percentileName } from "@/lib/format";
import { differences } from "@/lib/line/diff";
import type { SharedVersion } from "@/lib/schema/lines";

/** Kept versions on one scale; what differs from the first in words. */
export function SharedRows({ versions }: { versions: readonly SharedVersion[] }) {
  const from = rulerStart(
    ...versions.flatMap(({ reading }) => (reading ? [reading.p05.value, reading.atRisk.value] : [])),
  );
  return (
    <section>
      <h1 className="border-b border-ink pb-1 text-2xl font-title tracking-[-.015em]">
        {versions.length} scenarios on one scale
      </h1>
      <ul>
        {versions.map((version, i) => (
          <li
            key={version.id}
            className="grid gap-x-6 gap-y-2 border-b border-rule py-3 sm:grid-cols-[minmax(0,1fr)_minmax(0,1.2fr)_auto_auto]"
          >
            <div>
              <h2 className="font-[620]">{version.scenarioName}</h2>
              <Differs from={versions[0]} to={version} isFirst={i === 0} />
            </div>
            {version.reading ? (
              <>
                <FillRateRuler
                  p05={version.reading.p05.value}
                  atRisk={version.reading.atRisk}
                  p50={version.reading.p50.value}
                  acceptedRisk={version.reading.acceptedRisk}
                  from={from}
                />
                <Fact name={percentileName(version.reading.acceptedRisk)} text={formatShare(version.reading.atRisk)} />
                <Fact
                  name={`Capital, ${version.reading.currency}`}
                  text={formatMoneyFigure(version.reading.moneyTiedUp)}
                />
              </>
            ) : (
              <p className="text-ink-3">not run</p>
            )}
          </li>
        ))}
      </ul>
    </section>
  );
}

function Differs({ from, to, isFirst }: { from: SharedVersion; to: SharedVersion; isFirst: boolean }) {
  if (isFirst) return <p className="text-s text-ink-2">what the others are held against</p>;
  const found = differences(from.document, to.document).map(({ text }) => text);
  const shown = found.length > 5 ? [...found.slice(0, 4), `and ${found.length - 4} more`] : found;
  return (
    <>
      {shown.map((text) => (
        <p key={text} className="text-s text-ink-2">
          {text}
        </p>
      ))}
    </>
  );
}

function Fact({ name, text }: { name: string; text: { value: string; spread: string | null } }) {
  return (
    <p className="whitespace-nowrap">
      <span className="block text-s text-ink-3">{name}</span>
      <b className="font-[620]">{text.value}</b> <span className="text-s text-ink-3">{text.spread}</span>
    </p>
  );
}
