import { ReadingRuler, rulerStartOf } from "@/components/charts/reading-ruler";
import { Fact } from "@/components/ui/fact";
import { formatMoneyFigure, formatShare, percentileName } from "@/lib/format";
import { fewDifferences } from "@/lib/line/few-differences";
import type { SharedVersion } from "@/lib/schema/lines";

/** Kept versions on one scale; what differs from the first in words. */
export function SharedRows({ versions }: { versions: readonly SharedVersion[] }) {
  const from = rulerStartOf(versions.map(({ reading }) => reading));
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
                <ReadingRuler reading={version.reading} from={from} />
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
  const said = isFirst ? ["what the others are held against"] : fewDifferences(from.document, to.document);
  return said.map((text) => (
    <p key={text} className="text-s text-ink-2">
      {text}
    </p>
  ));
}
