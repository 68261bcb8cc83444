"use client";

import { useEffect, useState } from "react";
import { Button } from "@/components/ui/button";
import { Kbd } from "@/components/ui/kbd";
import { useLine } from "@/lib/client/line-state";
import { mostTotalWeeks, replicationsFor, totalWeeks } from "@/lib/client/run-size";
import { formatCount } from "@/lib/format";
import { RunDetails } from "./run-details";
import { StripField } from "./strip-field";
import { describeTime, describeWeeks } from "./strip-text";

const cell = "px-3 pb-2 sm:border-l sm:border-rule sm:pt-2 lg:px-3 lg:pt-[11px] lg:pb-2.5 lg:pr-5";

/** How long and with which draws to run, and the button that does it. */
export function ResultStripRun() {
  const { progress } = useLine();
  return <div className={cell}>{progress ? <InProgress /> : <Ready />}</div>;
}

function Ready() {
  const { options, setOptions, mayEdit, runFull, full, parsed } = useLine();
  const weeks = totalWeeks(options);
  const label = full?.isCurrent ? "Run again" : `Run ${describeWeeks(weeks)}`;
  return (
    <>
      <div className="mb-[7px] hidden grid-cols-[1fr_84px] items-end gap-2 lg:grid">
        <StripField
          label="Weeks"
          value={formatCount(weeks)}
          isReadOnly={!mayEdit}
          inputMode="numeric"
          corner={<RunDetails />}
          read={(text) => {
            const total = Number(text.replace(/[\s\u202f.,]/g, ""));
            if (!Number.isInteger(total) || total < 1) return "Weeks are a whole number of at least 1.";
            const most = mostTotalWeeks(options);
            if (total > most) return `At most ${formatCount(most)} weeks at this split.`;
            setOptions({ replications: replicationsFor(total, options) });
            return null;
          }}
        />
        <StripField
          label="Seed phrase"
          value={options.seed}
          isReadOnly={!mayEdit}
          read={(text) => {
            const seed = text.trim();
            if (seed.length < 1 || seed.length > 200) return "A seed phrase has 1 to 200 characters.";
            setOptions({ seed });
            return null;
          }}
        />
      </div>
      <Button
        kind={full?.isCurrent ? "edge" : "main"}
        className="min-h-11 w-full lg:min-h-8"
        disabled={!parsed}
        onClick={runFull}
        title={parsed ? undefined : "This line has faults and cannot run yet."}
      >
        {label} <Kbd className="max-lg:hidden">R</Kbd>
      </Button>
    </>
  );
}

function InProgress() {
  const { progress, options, cancelRun } = useLine();
  const nowMs = useClock();
  if (!progress) return null;
  const { doneWeeks, totalWeeks: total, startedAtMs } = progress;
  return (
    <>
      <p className="mb-[3px] truncate text-s text-ink-2 max-lg:hidden">Run, seed phrase {options.seed}</p>
      <p className="text-l/5 whitespace-nowrap">
        {formatCount(doneWeeks)} <span className="text-ink-3">of {describeWeeks(total)}</span>
      </p>
      <p className="text-s whitespace-nowrap text-ink-3">
        {describeTime(doneWeeks, total, Math.max(0, nowMs - startedAtMs))}
      </p>
      <Button kind="stop" size="small" className="mt-1 min-h-11 w-full lg:min-h-[26px]" onClick={cancelRun}>
        Cancel run <Kbd className="max-lg:hidden">Esc</Kbd>
      </Button>
    </>
  );
}

/** Milliseconds of the page's clock, twice a second. */
function useClock(): number {
  const [nowMs, setNowMs] = useState(() => performance.now());
  useEffect(() => {
    const timer = setInterval(() => setNowMs(performance.now()), 500);
    return () => clearInterval(timer);
  }, []);
  return nowMs;
}
