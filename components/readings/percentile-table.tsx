"use client";

import { useMemo } from "react";
import { formatChosenPercent, formatCount, formatShare, oneIn, percentileName } from "@/lib/format";
import { percentile } from "@/lib/simulation";
import type { Figure, RunResult } from "@/lib/simulation/types";

const usual = [0.01, 0.05, 0.1, 0.2, 0.25, 0.5];

export type PercentileRow = { name: string; below: string; figure: Figure; isAtRisk: boolean };

/** Percentiles of the weekly fill rate, the one of the accepted risk among them, then the mean. */
export function percentileRows(result: RunResult, acceptedRisk: number): PercentileRow[] {
  const shares = [...new Set([...usual, acceptedRisk])].sort((a, b) => a - b);
  return [
    ...shares.map((share) => ({
      name: percentileName(share),
      below: oneIn(share),
      figure: percentile(result, share),
      isAtRisk: share === acceptedRisk,
    })),
    { name: "Mean", below: "–", figure: result.summary.mean, isAtRisk: false },
  ];
}

export function PercentileTable({ result, acceptedRisk }: { result: RunResult; acceptedRisk: number }) {
  const rows = useMemo(() => percentileRows(result, acceptedRisk), [result, acceptedRisk]);
  const { replications, weeks, warmupWeeks, targetFillRate } = result.options;
  const risk = formatShare(result.summary.risk);
  return (
    <section>
      <h2 className="figure-title">Percentiles</h2>
      <table className="sheet-table mt-1">
        <thead>
          <tr>
            <th scope="col">Percentile</th>
            <th scope="col">Falls below</th>
            <th scope="col" className="text-right!">
              Fill rate
            </th>
            <th scope="col" className="text-right!">
              ± points
            </th>
          </tr>
        </thead>
        <tbody>
          {rows.map(({ name, below, figure, isAtRisk }) => {
            const text = formatShare(figure);
            return (
              <tr key={name} data-selected={isAtRisk}>
                <th scope="row" className="text-left">
                  {name}
                </th>
                <td className="text-ink-2">{below}</td>
                <td className="text-right">{text.value}</td>
                <td className="text-right text-ink-3">{text.spread?.slice(2) ?? "–"}</td>
              </tr>
            );
          })}
        </tbody>
      </table>
      <p className="mt-2 text-s text-ink-3">
        Below the target of {formatChosenPercent(targetFillRate)}: {risk.value} of weeks {risk.spread}. ± is the
        half-width at 95{"\u202f%"}, from {formatCount(Math.min(20, replications))} sections of{" "}
        {formatCount(replications)} separate runs of {formatCount(weeks)} weeks, each after {formatCount(warmupWeeks)}{" "}
        weeks of warm-up.
      </p>
    </section>
  );
}
