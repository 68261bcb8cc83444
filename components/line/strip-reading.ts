import type { LineState, Reading } from "@/lib/client/line-state";
import { totalWeeks } from "@/lib/client/run-size";
import type { ReadingSummary } from "@/lib/schema/lines";
import { pairedDifference } from "@/lib/simulation/paired";
import { percentile } from "@/lib/simulation/percentile";
import type { Figure, RunResult } from "@/lib/simulation/types";

/** The figures of one reading that the strip shows. */
export type StripFigures = {
  acceptedRisk: number;
  atRisk: Figure;
  p05: Figure;
  p50: Figure;
  moneyTiedUp: Figure;
  costPerYear: Figure;
  weeks: number;
};

/** What the strip says first. `settled` comes from a full run, `live` from a quick one. */
export type StripReading = {
  /** "kept": of the last kept version; "now": of what is on screen; "before": a run made before the last edits. */
  settled: (StripFigures & { of: "kept" | "now" | "before" }) | null;
  live: StripFigures | null;
  /** What the edit would make of the settled figures; null before both quick runs of the comparison are there. */
  edited: { atRisk: Figure; moneyTiedUp: number; costPerYear: number; weeks: number } | null;
};

type Shown = Pick<LineState, "full" | "live" | "liveBase" | "keptReading" | "options" | "scenario">;

export function readStrip({ full, live, liveBase, keptReading, options, scenario }: Shown): StripReading {
  const { acceptedRisk } = options;
  const settled = full
    ? { ...figuresOf(full, acceptedRisk), of: ofWhat(full, scenario.kept.digest) }
    : keptReading
      ? { ...figuresOfSummary(keptReading), of: "kept" as const }
      : null;
  const quick = full?.isCurrent ? null : live;
  return {
    settled,
    live: quick && figuresOf(quick, acceptedRisk),
    edited: settled && quick && liveBase ? readEdit(settled, quick, liveBase, acceptedRisk) : null,
  };
}

/** The settled figures moved by what differs between two quick runs with the same draws. */
function readEdit(settled: StripFigures, live: Reading, base: Reading, acceptedRisk: number): StripReading["edited"] {
  const [after, before] = [live.result.summary, base.result.summary];
  return {
    atRisk: moveFigure(settled.atRisk, pairedDifference(live.result, base.result, acceptedRisk)),
    moneyTiedUp: after.moneyTiedUp.value - before.moneyTiedUp.value,
    costPerYear: after.costPerYear.total.value - before.costPerYear.total.value,
    weeks: totalWeeks(live.options),
  };
}

function ofWhat(full: NonNullable<LineState["full"]>, keptDigest: string | null): "kept" | "now" | "before" {
  if (full.isCurrent) return "now";
  return full.digest === keptDigest ? "kept" : "before";
}

export function figuresOf({ result }: Pick<Reading, "result">, acceptedRisk: number): StripFigures {
  const { summary } = result;
  return {
    acceptedRisk,
    atRisk: readAtRisk(result, acceptedRisk),
    p05: summary.p05,
    p50: summary.p50,
    moneyTiedUp: summary.moneyTiedUp,
    costPerYear: summary.costPerYear.total,
    weeks: totalWeeks(result.options),
  };
}

function readAtRisk(result: RunResult, acceptedRisk: number): Figure {
  return acceptedRisk === 0.1 ? result.summary.p10 : percentile(result, acceptedRisk);
}

function figuresOfSummary({
  acceptedRisk,
  atRisk,
  p05,
  p50,
  moneyTiedUp,
  costPerYear,
  weeks,
}: ReadingSummary): StripFigures {
  return { acceptedRisk, atRisk, p05, p50, moneyTiedUp, costPerYear, weeks };
}

/** A settled figure moved by a difference; both are off independently. */
export function moveFigure(settled: Figure, difference: Figure): Figure {
  const halfWidths = [settled.halfWidth ?? 0, difference.halfWidth ?? 0];
  return {
    value: Math.min(1, Math.max(0, settled.value + difference.value)),
    halfWidth: difference.halfWidth === null ? null : Math.hypot(...halfWidths),
  };
}
