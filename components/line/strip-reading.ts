import type { LineState, Reading } from "@/lib/client/line-state";
import { totalWeeks } from "@/lib/client/run-size";
import type { ReadingSummary } from "@/lib/schema/lines";
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
};

type Shown = Pick<LineState, "full" | "live" | "keptReading" | "options" | "scenario">;

export function readStrip({ full, live, keptReading, options, scenario }: Shown): StripReading {
  const { acceptedRisk } = options;
  const settled = full
    ? { ...figuresOf(full, acceptedRisk), of: ofWhat(full, scenario.kept.digest) }
    : keptReading
      ? { ...figuresOfSummary(keptReading), of: "kept" as const }
      : null;
  const isEdited = !full?.isCurrent;
  return { settled, live: live && isEdited ? figuresOf(live, acceptedRisk) : null };
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
