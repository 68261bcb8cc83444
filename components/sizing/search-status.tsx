"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { ErrorBox } from "@/components/ui/error-box";
import { Progress } from "@/components/ui/progress";
import { useLine } from "@/lib/client/line-state";
import { type SizingSearch, useSizing } from "@/lib/client/use-sizing";
import { formatChosenPercent, formatCount, formatMoney, formatNumber, formatPercent, plural } from "@/lib/format";
import { KeepSetDialog } from "./keep-set-dialog";

/** How far the search is, the best so far, and the ways to stop it, go on and use what there is. */
export function SearchStatus({ search }: { search: SizingSearch }) {
  const { cancel, resume, isStale, start, refusal } = useSizing();
  const { mayEdit, document } = useLine();
  const [isKeeping, setKeeping] = useState(false);
  const { status, share, evaluations, spentMs, best, frontier, problem, error } = search;
  const isRunning = status === "running";
  const looking = problem.acceptedRisks[frontier.length];
  return (
    <div className="space-y-3">
      {isStale && !isRunning && (
        <p className="caution flex flex-wrap items-center gap-3 text-ink-2">
          The question or the line has changed since this search. These are the sets from before.
          <Button size="small" onClick={start} disabled={refusal !== null}>
            Search again
          </Button>
        </p>
      )}
      {status === "failed" && (
        <ErrorBox
          title="The search stopped"
          action={
            <Button size="small" onClick={resume}>
              Go on searching
            </Button>
          }
        >
          {error} What was found until then is shown, and none of its runs has to be made again.
        </ErrorBox>
      )}
      {status === "done" && error && <p className="caution text-ink-2">{error}</p>}
      {(isRunning || status === "stopped") && (
        <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
          {isRunning ? (
            <div className="max-w-xs min-w-40 flex-1">
              <Progress share={share} label="Search for sizes" />
            </div>
          ) : (
            <b className="font-[620]">Search stopped</b>
          )}
          <p role="status" className="text-s text-ink-2">
            {isRunning && looking !== undefined && `Looking for ${formatChosenPercent(looking)} risk; `}
            {formatCount(evaluations)} {plural(evaluations, "set")} run in {formatNumber(spentMs / 1000)}
            {"\u202f"}s
          </p>
          {isRunning ? (
            <Button kind="stop" size="small" onClick={cancel}>
              Cancel search
            </Button>
          ) : (
            <Button size="small" onClick={resume}>
              Go on searching
            </Button>
          )}
        </div>
      )}
      {best && looking !== undefined && status !== "done" && (
        <p className="flex flex-wrap items-center gap-x-3 gap-y-1 text-s text-ink-2">
          Cheapest so far within {formatChosenPercent(best.acceptedRisk)}:{" "}
          {formatMoney(best.value, document.money.currency ?? "")}
          {problem.objective === "costPerYear" && " a year"} at {formatPercent(best.risk)} risk on the search’s weeks,
          not yet confirmed.
          {mayEdit && (
            <Button size="small" onClick={() => setKeeping(true)}>
              Keep it as it is
            </Button>
          )}
        </p>
      )}
      {isKeeping && best && (
        <KeepSetDialog
          search={search}
          sizes={best.sizes}
          acceptedRisk={best.acceptedRisk}
          onClose={() => setKeeping(false)}
        />
      )}
    </div>
  );
}
