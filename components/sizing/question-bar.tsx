"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Pick } from "@/components/ui/pick";
import { frontierRisks, useSizing } from "@/lib/client/use-sizing";
import { formatChosenPercent, formatCount, plural, weeksOf } from "@/lib/format";
import { RangesDialog } from "./ranges-dialog";

const targets = [0.8, 0.85, 0.9, 0.95, 0.98, 0.99, 1];

/** What is asked, as a sentence of picks, and the way to start. */
export function QuestionBar() {
  const { question, ask, search, start, refusal } = useSizing();
  const [isOpen, setOpen] = useState(false);
  const { targetFillRate, acceptedRisk, objective, ranges } = question;
  const nFixed = ranges.filter(({ isFixed }) => isFixed).length;
  const isRunning = search?.status === "running";
  const withOwn = (choices: readonly number[], own: number) => [...new Set([...choices, own])].sort((a, b) => a - b);
  return (
    <div className="flex flex-wrap items-center gap-x-2.5 gap-y-2 border-b border-rule px-4 py-2 sm:px-5">
      <h1 className="sr-only">Sizing</h1>
      <span className="text-l">Cheapest set of buffers that ships at least</span>
      <Pick
        label="Target"
        value={String(targetFillRate)}
        options={withOwn(targets, targetFillRate).map((share) => ({
          value: String(share),
          label: formatChosenPercent(share),
        }))}
        onChange={(value) => ask({ targetFillRate: Number(value) })}
        disabled={isRunning}
      />
      <span className="text-l">of what is due in</span>
      <Pick
        label="Weeks"
        value={String(acceptedRisk)}
        options={withOwn(frontierRisks, acceptedRisk).map((risk) => {
          const { reached, of } = weeksOf(risk);
          return {
            value: String(risk),
            label: `${formatCount(reached)} of ${formatCount(of)}`,
            hint: `${formatChosenPercent(risk)} risk`,
          };
        })}
        onChange={(value) => ask({ acceptedRisk: Number(value) })}
      />
      <span className="text-l">weeks, by</span>
      <Pick
        label="Least"
        value={objective}
        options={[
          { value: "moneyTiedUp" as const, label: "capital tied up" },
          { value: "costPerYear" as const, label: "cost a year" },
        ]}
        onChange={(value) => ask({ objective: value })}
        disabled={isRunning}
      />
      <span className="ml-auto flex flex-wrap items-center gap-2">
        <Button kind="bare" size="small" onClick={() => setOpen(true)} disabled={ranges.length === 0}>
          {nFixed === 0
            ? "No sizes held fixed"
            : `${formatCount(nFixed)} of ${formatCount(ranges.length)} ${plural(nFixed, "size")} held fixed`}
        </Button>
        {!isRunning && (
          <Button kind={search ? "plain" : "main"} disabled={refusal !== null} onClick={start}>
            {search ? "Search again" : "Search sizes"}
          </Button>
        )}
      </span>
      <RangesDialog isOpen={isOpen} onClose={() => setOpen(false)} />
    </div>
  );
}
