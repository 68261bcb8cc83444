import { formatChosenPercent, formatCount, formatNumber } from "@/lib/format";
import type { SharedVersion } from "@/lib/schema/lines";
import type { RunResult } from "@/lib/simulation/types";

/** What the figures rest on, in words. */
export function Assumptions({
  version: { document, options, digest },
  result,
}: {
  version: SharedVersion;
  result: RunResult | null;
}) {
  const { calendar, overtime, money } = document;
  const or = (value: number | null) => (value === null ? "?" : formatCount(value));
  const items = [
    `A working week of ${or(calendar.daysPerWeek)} days of ${or(calendar.hoursPerDay)} hours, ${or(calendar.weeksPerYear)} weeks a year, in steps of ${or(calendar.tickMinutes)} minutes.`,
    overtime
      ? `Up to ${or(overtime.hoursPerWeek)} hours of overtime in a week after more than ${or(overtime.backlogTrigger)} units are owed.`
      : "No overtime.",
    `Stock costs ${formatNumber((money.carryingRate ?? 0) * 100, 1)}\u202f% of its value a year.`,
    `Accepted risk ${formatChosenPercent(options.acceptedRisk)}; a week counts as below target under ${formatChosenPercent(options.targetFillRate)}.`,
    `${formatCount(options.replications * options.weeks)} simulated weeks: ${formatCount(options.replications)} separate runs of ${formatCount(options.weeks)} weeks, each after ${formatCount(options.warmupWeeks)} weeks of warm-up.`,
    `Demand, lateness, stoppages, scrap and rejects are drawn from the distributions entered for each node; they do not influence one another beyond what the line itself brings about.`,
    "One kind of product passes through; set-up times, staffing and transport between stations are left out.",
  ];
  return (
    <section>
      <h2 className="border-b border-ink pb-1 text-xl font-title">What the figures rest on</h2>
      <ul className="mt-2 list-disc space-y-1 pl-5">
        {items.map((item) => (
          <li key={item}>{item}</li>
        ))}
      </ul>
      <p className="mt-2 text-s text-ink-3 [overflow-wrap:anywhere]">
        Seed phrase <code className="typed">{options.seed}</code>
        {result && `, engine ${result.engine}`}
        {digest && `, document ${digest.slice(0, 12)}`}: with these the run can be had again to the last bit.
      </p>
    </section>
  );
}
