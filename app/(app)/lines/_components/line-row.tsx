import type { Route } from "next";
import Link from "next/link";
import { EmptyGauge } from "@/components/charts/empty-gauge";
import { ReadingRuler } from "@/components/charts/reading-ruler";
import { formatMoneyFigure, formatPercent, formatShare, plural, weeksOf } from "@/lib/format";
import type { LineSummary, ReadingSummary } from "@/lib/schema/lines";
import type { Role } from "@/lib/schema/roles";
import { LocalTime } from "@/components/line/local-time";
import { LineRowMenu } from "./line-row-menu";

type Props = { line: LineSummary; role: Role; from: number };

export function LineRow({ line, role, from }: Props) {
  const { id, name, nScenarios, reading, updatedAt, updatedBy } = line;
  return (
    <li className="grid grid-cols-[1fr_auto] items-center gap-x-6 gap-y-2 border-b border-rule py-4 lg:grid-cols-[minmax(0,1.3fr)_minmax(0,2.8fr)_auto]">
      <div className="min-w-0">
        <h2 className="text-xl font-[620] tracking-[-.01em]">
          <Link
            href={`/lines/${id}/sketch` as Route}
            className="inline-block min-h-8 text-ink no-underline hover:underline"
          >
            {name}
          </Link>
        </h2>
        <p className="text-s text-ink-3">
          {nScenarios} {plural(nScenarios, "scenario")}, <LocalTime at={updatedAt} format="dateTime" />, {updatedBy}
        </p>
      </div>
      <div className="col-span-2 lg:order-none lg:col-span-1 max-lg:order-last">
        {reading ? <Reading reading={reading} from={from} /> : <NotRead line={line} />}
      </div>
      <LineRowMenu line={line} role={role} />
    </li>
  );
}

function Reading({ reading, from }: { reading: ReadingSummary; from: number }) {
  const { reached, of } = weeksOf(reading.acceptedRisk);
  const { spread } = formatShare(reading.atRisk);
  const capital = formatMoneyFigure(reading.moneyTiedUp);
  return (
    <div className="grid items-center gap-x-6 gap-y-1 sm:grid-cols-[minmax(0,1fr)_minmax(0,1.3fr)_auto]">
      <p>
        <span className="text-s text-ink-3">
          In {reached} of {of} weeks ships
        </span>
        <br />
        <span className="text-l">
          at least <b className="text-xl">{formatPercent(reading.atRisk.value)}</b>{" "}
        </span>
        <span className="text-ink-3">{spread}</span>
      </p>
      <ReadingRuler reading={reading} from={from} />
      <p className="whitespace-nowrap sm:text-right">
        <span className="text-s text-ink-3">Capital tied up</span>
        <br />
        {reading.currency}
        {"\u00a0"}
        {capital.value}
      </p>
    </div>
  );
}

function NotRead({ line: { faults } }: { line: LineSummary }) {
  return (
    <div className="flex items-center gap-3">
      <EmptyGauge height={40} />
      <p className="text-ink-2">
        {faults.length > 0 ? (
          <>
            <b className="font-[620] text-ink">Cannot run yet.</b> {faults[0]}
            {faults.length > 1 && ` And ${faults.length - 1} more.`}
          </>
        ) : (
          "Nothing to read yet: run it and keep the result."
        )}
      </p>
    </div>
  );
}
