"use client";

import { Button } from "@/components/ui/button";
import { ErrorLine } from "@/components/ui/error-line";
import { Progress } from "@/components/ui/progress";
import { fetchBytes, resultKey } from "@/lib/client/api";
import { useLine } from "@/lib/client/line-state";
import { useJob } from "@/lib/client/use-job";
import { useSimulation } from "@/lib/client/use-simulation";
import { formatCount } from "@/lib/format";
import { parseLine } from "@/lib/line";
import { decodeResult } from "@/lib/simulation";
import { compareResults, type Verdict } from "./compare-results";

/** Recomputes the last kept version from its document, options and seed phrase, and says whether the figures are the same. */
export function RunAgain() {
  const { scenario } = useLine();
  const client = useSimulation();
  const { kept } = scenario;
  const { state, start, cancel } = useJob<number, Verdict>();
  if (!kept.reading) return null;
  const { resultId } = kept.reading;

  const run = () =>
    start(0, async (signal, onProgress) => {
      const parsed = parseLine(kept.document);
      if ("faults" in parsed) throw new Error("This version can no longer be run: it has faults by today’s rules.");
      const stored = decodeResult(await fetchBytes(resultKey(resultId)));
      const { seed, replications, weeks, warmupWeeks, targetFillRate } = kept.options;
      const fresh = await client.run(
        parsed.line,
        { seed, replications, weeks, warmupWeeks, targetFillRate },
        { signal, onProgress: (done) => onProgress(done.replications / done.total) },
      );
      return compareResults(stored, fresh);
    });

  return (
    <section>
      <h2 className="figure-title">Can the kept figures be had again?</h2>
      <p className="mt-1 text-ink-2">
        Version {kept.number} of {scenario.name} was run with the seed phrase{" "}
        <code className="typed">{kept.options.seed}</code>. Running it again has to give the same figures to the last
        bit, in any browser.
      </p>
      {state.status === "running" && (
        <div className="mt-2 flex items-center gap-3">
          <div className="flex-1">
            <Progress share={state.progress} label="Running the kept version again" />
          </div>
          <Button size="small" kind="stop" onClick={cancel}>
            Cancel
          </Button>
        </div>
      )}
      {state.status === "done" && (
        <VerdictLine verdict={state.value} weeks={kept.options.replications * kept.options.weeks} />
      )}
      {state.status === "failed" && <ErrorLine className="mt-2">{state.message}</ErrorLine>}
      {state.status !== "running" && (
        <Button size="small" className="mt-2" onClick={() => void run()}>
          Run version {kept.number} again
        </Button>
      )}
    </section>
  );
}

function VerdictLine({ verdict, weeks }: { verdict: Verdict; weeks: number }) {
  if (verdict.status === "same")
    return (
      <p role="status" className="mt-2 font-[620] text-water-700">
        Same figures to the last bit, in all {formatCount(weeks)} weeks.
      </p>
    );
  if (verdict.status === "other-engine")
    return (
      <p role="status" className="caution mt-2">
        The kept figures were made by engine {verdict.engine}; this one is another, so they may differ. The kept figures
        stay as they are.
      </p>
    );
  return (
    <ErrorLine className="mt-2">
      Not the same: {verdict.what.join(", ")} differ. Report this: it must not happen.
    </ErrorLine>
  );
}
