"use client";

import { useMemo } from "react";
import { DistributionChart } from "@/components/charts/distribution-chart";
import { useMediaQuery } from "@/lib/client/use-media-query";
import { formatCount, formatNumber, formatPercent, weeksOf } from "@/lib/format";
import { percentile } from "@/lib/simulation";
import type { RunResult } from "@/lib/simulation/types";
import { countRates } from "@/lib/statistics/histogram";

const numerals = ["No", "One", "Two", "Three", "Four", "Five", "Six", "Seven", "Eight", "Nine", "Ten"];
const word = (n: number) => numerals[n] ?? formatCount(n);

/** The finding in words: what so many weeks reach, and how often everything ships. */
export function sayFinding(atRisk: number, acceptedRisk: number, inFull: number): string {
  const { reached, of } = weeksOf(acceptedRisk);
  const first = `${word(reached)} weeks in ${word(of).toLowerCase()} reach ${formatPercent(atRisk)}`;
  if (inFull <= 0) return `${first}; none ships everything`;
  const tenths = Math.round(inFull * 10);
  if (tenths === 0) return `${first}; ${formatNumber(inFull * 100, 1)} in a hundred ship everything`;
  if (tenths === 10) return `${first}; nearly all ship everything`;
  return `${first}; about ${word(tenths).toLowerCase()} in ten ${tenths === 1 ? "ships" : "ship"} everything`;
}

export function FillRates({ result, acceptedRisk }: { result: RunResult; acceptedRisk: number }) {
  const isNarrow = useMediaQuery("(max-width: 639px)");
  const histogram = useMemo(() => countRates(result.fillRates), [result]);
  const atRisk = useMemo(() => percentile(result, acceptedRisk), [result, acceptedRisk]);
  return (
    <figure>
      <h2 className="figure-title">{sayFinding(atRisk.value, acceptedRisk, result.summary.weeksInFull.value)}</h2>
      <DistributionChart
        histogram={histogram}
        atRisk={atRisk}
        acceptedRisk={acceptedRisk}
        width={isNarrow ? 400 : 640}
      />
      <figcaption className="text-s text-ink-3">
        Share of what was due that shipped in the week, %, one bar a point; {formatCount(histogram.nWeeks)} weeks
        {histogram.nNoDemand > 0 && `, ${formatCount(histogram.nNoDemand)} more had nothing due`}.
      </figcaption>
    </figure>
  );
}
