"use client";

import { useMemo } from "react";
import { Button } from "@/components/ui/button";
import { useLine } from "@/lib/client/line-state";
import { formatCount, formatNumber, percentileName } from "@/lib/format";
import { limits } from "@/lib/line/limits";
import { judgeRuns, judgeWarmup, percentile } from "@/lib/simulation";
import type { RunResult } from "@/lib/simulation/types";

/** Says where the figures should not be leaned on yet, and offers what would help. */
export function RunWarnings({ result, acceptedRisk }: { result: RunResult; acceptedRisk: number }) {
  const { mayEdit, options, setOptions } = useLine();
  const warmup = useMemo(() => judgeWarmup(result), [result]);
  const figure = useMemo(() => percentile(result, acceptedRisk), [result, acceptedRisk]);
  const runs = judgeRuns(result, acceptedRisk, figure);
  const name = percentileName(acceptedRisk);
  const { warmupWeeks, replications, weeks } = result.options;
  const fourfold = Math.min(4 * replications, Math.floor(limits.replicationWeeks / (weeks + warmupWeeks)));
  const mayWiden = mayEdit && fourfold > options.replications;
  const longer = warmup.suggestedWeeks ?? warmupWeeks * 2 + 10;
  const isWorse = runs.tooFewBeyond || runs.tooFewReplications || runs.tooWide;
  if (warmup.isEnough && !isWorse) return null;
  return (
    <div className="mb-4 space-y-2" role="status">
      {!warmup.isEnough && (
        <p className="caution flex flex-wrap items-center gap-x-3 gap-y-1">
          <span>
            {warmup.suggestedWeeks === null
              ? `The line has hardly settled within these ${formatCount(warmupWeeks + weeks)} weeks: the start still shows in the figures.`
              : `A warm-up of ${formatCount(warmupWeeks)} weeks is short: the start shows for about ${formatCount(warmup.suggestedWeeks)} weeks.`}
          </span>
          {mayEdit && options.warmupWeeks < longer && (
            <Button size="small" onClick={() => setOptions({ warmupWeeks: longer })}>
              Set warm-up to {formatCount(longer)} weeks
            </Button>
          )}
        </p>
      )}
      {isWorse && (
        <p className="caution flex flex-wrap items-center gap-x-3 gap-y-1">
          <span>
            {runs.tooFewBeyond
              ? `Only about ${formatCount(runs.nBeyond)} weeks lie beyond ${name}: too few to read it.`
              : runs.tooFewReplications
                ? `${formatCount(replications)} separate runs are too few for a half-width to be trusted.`
                : `${name} is only known to ±\u202f${formatNumber((figure.halfWidth ?? 0) * 100, 1)} points.`}{" "}
            Four times the weeks halve the half-width.
          </span>
          {mayWiden && (
            <Button size="small" onClick={() => setOptions({ replications: fourfold })}>
              Set {formatCount(fourfold * weeks)} weeks
            </Button>
          )}
        </p>
      )}
    </div>
  );
}
