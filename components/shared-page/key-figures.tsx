import { ReadingRuler } from "@/components/charts/reading-ruler";
import { formatChosenPercent, formatMoneyFigure, formatShare, headlineSentence } from "@/lib/format";
import type { SharedVersion } from "@/lib/schema/lines";

/** The sentence first, then risk and money. */
export function KeyFigures({ version: { reading, scenarioName, options } }: { version: SharedVersion }) {
  if (!reading) return <p className="text-ink-2">No result was kept with {scenarioName}.</p>;
  const said = headlineSentence(reading.atRisk, reading.acceptedRisk);
  const { spread } = formatShare(reading.atRisk);
  const facts = [
    { name: `Weeks below ${formatChosenPercent(options.targetFillRate)}`, text: formatShare(reading.risk) },
    { name: `Capital tied up, ${reading.currency}`, text: formatMoneyFigure(reading.moneyTiedUp) },
    { name: `Cost a year, ${reading.currency}`, text: formatMoneyFigure(reading.costPerYear) },
  ];
  return (
    <section>
      <p className="text-s text-ink-3">{scenarioName}</p>
      <h1 className="mt-1 max-w-[24ch] text-[30px]/[37px] font-light tracking-[-.015em] sm:max-w-none sm:text-[34px]/[42px]">
        {said.before} <b className="font-[700]">{said.value}</b> {said.after}
      </h1>
      {spread && (
        <p className="mt-1 text-ink-2">
          {spread} points, half-width at 95{"\u202f%"}
        </p>
      )}
      <div className="mt-4 grid items-end gap-x-8 gap-y-4 sm:grid-cols-[minmax(0,1.4fr)_repeat(3,auto)]">
        <ReadingRuler reading={reading} />
        {facts.map(({ name, text }) => (
          <p
            key={name}
            className="border-t border-rule pt-1.5 whitespace-nowrap sm:border-t-0 sm:border-l sm:pt-0 sm:pl-4"
          >
            <span className="block text-s text-ink-3">{name}</span>
            <b className="text-xl font-[620]">{text.value}</b> <span className="text-s text-ink-3">{text.spread}</span>
          </p>
        ))}
      </div>
    </section>
  );
}
