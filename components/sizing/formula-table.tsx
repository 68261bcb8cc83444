"use client";

import { useMemo } from "react";
import { TakeOutFigures } from "@/components/charts/take-out-figures";
import type { SizingSearch } from "@/lib/client/use-sizing";
import { formatChosenPercent, formatCount, formatNumber, formatShare, withSign } from "@/lib/format";
import type { FrontierPoint } from "@/lib/sizing";
import { averageSizes, differencesFrom, textbookAssumptions, textbookSizes } from "@/lib/sizing/textbook";
import { SerialParts } from "./serial-parts";

/** The textbook's safety stock and the plan on averages beside what the simulation finds, and why they differ. */
export function FormulaTable({ search, point }: { search: SizingSearch; point: FrontierPoint | null }) {
  const { line, textbook, averages, options, problem } = search;
  const { acceptedRisk } = options;
  const rows = useMemo(() => textbookSizes(line, acceptedRisk), [line, acceptedRisk]);
  const plain = useMemo(() => averageSizes(line), [line]);
  if (rows.length === 0) return <SerialParts line={line} />;
  const nameOf = (id: string) => line.nodes.find((node) => node.id === id)?.name ?? id;
  const found = (id: string) => point?.sizes[id] ?? null;
  return (
    <section className="mt-6 border-t border-ink pt-4">
      <div className="flex flex-wrap items-baseline gap-x-3 gap-y-1">
        <h2 className="text-xl font-title tracking-[-.01em]">Formula beside simulation</h2>
        <span className="text-s text-ink-3">
          purchased parts, each on its own by the formula; a day is a working day
        </span>
        <span className="ml-auto">
          <TakeOutFigures
            name={`${line.name} formula`}
            rows={() => [
              [
                "buffer",
                "use a day",
                "sd of use",
                "days",
                "sd of days",
                "z",
                "safety stock",
                "textbook",
                "found",
                "on averages",
                "note",
              ],
              ...rows.map((row) =>
                row.applies
                  ? [
                      nameOf(row.id),
                      row.meanUse,
                      row.sdUse,
                      row.leadDays,
                      row.sdLeadDays,
                      row.z,
                      row.safetyStock,
                      row.size,
                      found(row.id),
                      plain[row.id] ?? null,
                      differencesFrom(line, row.id).join("; "),
                    ]
                  : [
                      nameOf(row.id),
                      null,
                      null,
                      null,
                      null,
                      null,
                      null,
                      null,
                      found(row.id),
                      plain[row.id] ?? null,
                      row.reason,
                    ],
              ),
            ]}
          />
        </span>
      </div>
      <div className="mt-1 overflow-x-auto" tabIndex={0} role="group" aria-label="Formula beside simulation">
        <table className="sheet-table">
          <thead>
            <tr>
              <th scope="col">Buffer</th>
              {[
                "Use a day",
                "Days to cover",
                "Safety stock",
                "Textbook",
                "Found",
                "Found less textbook",
                "On averages",
              ].map((head) => (
                <th key={head} scope="col" className="text-right!">
                  {head}
                </th>
              ))}
              <th scope="col">Why the line differs from the formula</th>
            </tr>
          </thead>
          <tbody>
            {rows.map((row) => (
              <tr key={row.id}>
                <th scope="row" className="text-left font-text! whitespace-nowrap">
                  {nameOf(row.id)}
                </th>
                {row.applies ? (
                  <>
                    <td className="text-right whitespace-nowrap">
                      {formatNumber(row.meanUse)} <Spread value={row.sdUse} />
                    </td>
                    <td className="text-right whitespace-nowrap">
                      {formatNumber(row.leadDays, 1)} <Spread value={row.sdLeadDays} decimals={1} />
                    </td>
                    <td className="text-right">{formatNumber(row.safetyStock)}</td>
                    <td className="text-right">{formatCount(row.size)}</td>
                    <td className="text-right">
                      <b className="font-[640]">{found(row.id) === null ? "–" : formatCount(found(row.id)!)}</b>
                    </td>
                    <td className="text-right">
                      {found(row.id) === null ? "–" : withSign(formatCount(found(row.id)! - row.size))}
                    </td>
                  </>
                ) : (
                  <td colSpan={6} className="text-ink-3">
                    no formula: {row.reason}
                  </td>
                )}
                <td className="text-right text-ink-2">
                  {plain[row.id] === undefined ? "–" : formatCount(plain[row.id])}
                </td>
                <td className="min-w-64 text-s text-ink-2">{differencesFrom(line, row.id).join("; ")}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      <div className="caution mt-3 max-w-[90ch] space-y-1">
        {textbook && (
          <p>
            Textbook sizes (mean use over lead time, lateness and, for order-up-to levels, review, plus{" "}
            {formatNumber(zOf(rows), 2)} standard deviations), run in this line: they miss{" "}
            {formatChosenPercent(problem.targetFillRate)} in <Risk result={textbook.result} /> of weeks.
          </p>
        )}
        {averages && (
          <p>
            Planned on averages, as is common practice (mean use over the quoted lead time and review, nothing for
            lateness or spread): they miss it in <Risk result={averages.result} /> of weeks.
          </p>
        )}
        {!textbook && search.status === "running" && <p>Both sets are run in this line once the first set is found.</p>}
      </div>
      <details className="mt-2 text-s text-ink-2">
        <summary className="cursor-pointer text-water-700">What the formula takes for granted</summary>
        <p className="mt-1">
          Safety stock = z √(L s<sub>D</sub>² + D² s<sub>L</sub>²); L: lead time, mean lateness and, for order-up-to
          levels, the review period, D and s<sub>D</sub>: use a day and its standard deviation, s<sub>L</sub>: standard
          deviation of the lead time (small figures behind ±), z: normal quantile of the accepted risk.
        </p>
        <ul className="mt-1 list-disc pl-5">
          {textbookAssumptions.map((text) => (
            <li key={text}>{text}</li>
          ))}
        </ul>
      </details>
      <SerialParts line={line} />
    </section>
  );
}

const zOf = (rows: ReturnType<typeof textbookSizes>) => rows.flatMap((row) => (row.applies ? [row.z] : []))[0] ?? NaN;

function Spread({ value, decimals = 0 }: { value: number; decimals?: number }) {
  return (
    <span className="text-s text-ink-3">
      ±{"\u202f"}
      {formatNumber(value, decimals)}
    </span>
  );
}

function Risk({ result }: { result: NonNullable<SizingSearch["textbook"]>["result"] }) {
  const { value, spread } = formatShare(result.summary.risk);
  return (
    <>
      <b className="font-[640]">{value}</b> {spread}
    </>
  );
}
