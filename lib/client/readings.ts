import type { ScenarioOptions } from "@/lib/schema/lines";
import type { RunOptions } from "@/lib/simulation/types";
import type { Reading } from "./line-state";

/** The accepted risk chooses what is read off a run, not how it is made. */
export function toRunOptions({ acceptedRisk: _, ...run }: ScenarioOptions): RunOptions {
  return run;
}

/** Whether a run made with `a` answers for `b`. */
export function areSameRun(a: ScenarioOptions, b: ScenarioOptions): boolean {
  return (
    a.seed === b.seed &&
    a.replications === b.replications &&
    a.weeks === b.weeks &&
    a.warmupWeeks === b.warmupWeeks &&
    a.targetFillRate === b.targetFillRate
  );
}

/** A short run with the same draws: the first replications of the full one. */
export function toLiveOptions(options: ScenarioOptions): ScenarioOptions {
  return { ...options, replications: Math.min(20, options.replications), weeks: Math.min(50, options.weeks) };
}

/** The newest reading of this document and these options, else the newest of all. */
export function chooseReading<R extends Reading>(
  readings: readonly R[],
  digest: string | null,
  options: ScenarioOptions,
): (R & { isCurrent: boolean }) | null {
  const fits = (reading: R): boolean => reading.digest === digest && areSameRun(reading.options, options);
  const current = readings.find(fits);
  if (current)
    return { ...current, options: { ...current.options, acceptedRisk: options.acceptedRisk }, isCurrent: true };
  const [newest] = readings;
  return newest ? { ...newest, isCurrent: false } : null;
}
