"use client";

import { useCallback, useEffect, useMemo, useRef, useState } from "react";
import type { Line } from "@/lib/line/types";
import type { ScenarioDetail, ScenarioOptions } from "@/lib/schema/lines";
import { describeError } from "./api";
import type { Reading, RunProgress } from "./line-state";
import { chooseReading, toRunOptions } from "./readings";
import { useSimulation } from "./use-simulation";
import { useStoredReading, type ReadingOfLine } from "./use-stored-reading";

const nReadingsKept = 6;

type Made = Record<string, ReadingOfLine[]>;

/**
 * The full runs of the scenario on screen: those made in this page and the one stored before.
 * @param onDone - Told of each finished run; what it throws is shown beside the result, which stays.
 */
export function useFullRun(
  scenario: ScenarioDetail,
  line: Line | null,
  digest: string | null,
  options: ScenarioOptions,
  onDone: (reading: Reading) => Promise<void>,
) {
  const client = useSimulation();
  const { stored, isLoading, error: storedError } = useStoredReading(scenario);
  const [made, setMade] = useState<Made>({});
  const [progress, setProgress] = useState<(RunProgress & { scenarioId: string }) | null>(null);
  const [failure, setFailure] = useState<{ scenarioId: string; message: string } | null>(null);
  const abort = useRef<AbortController | null>(null);

  const cancelRun = useCallback(() => {
    abort.current?.abort();
    abort.current = null;
    setProgress(null);
  }, []);
  useEffect(() => cancelRun, [cancelRun, scenario.id]);

  const runFull = useCallback(async () => {
    if (!line || digest === null || abort.current) return;
    const scenarioId = scenario.id;
    const own = new AbortController();
    abort.current = own;
    setFailure(null);
    const totalWeeks = options.replications * options.weeks;
    const start = { scenarioId, doneWeeks: 0, totalWeeks, startedAtMs: performance.now(), partial: null };
    setProgress(start);
    try {
      const result = await client.run(line, toRunOptions(options), {
        signal: own.signal,
        onProgress: ({ replications, partial }) =>
          setProgress({ ...start, doneWeeks: replications * options.weeks, partial }),
      });
      const reading: ReadingOfLine = {
        line,
        result,
        digest,
        options,
        ranAt: new Date().toISOString(),
        engine: result.engine,
      };
      setMade((all) => ({ ...all, [scenarioId]: [reading, ...(all[scenarioId] ?? [])].slice(0, nReadingsKept) }));
      abort.current = null;
      setProgress(null);
      await onDone(reading);
    } catch (error) {
      if (own.signal.aborted) return;
      if (abort.current === own) abort.current = null;
      setProgress(null);
      setFailure({ scenarioId, message: describeError(error) });
    }
  }, [client, digest, line, onDone, options, scenario.id]);

  const full = useMemo(() => {
    const readings = [...(made[scenario.id] ?? []), ...(stored ? [stored] : [])];
    return chooseReading(readings, digest, options);
  }, [made, scenario.id, stored, digest, options]);

  const readError = storedError ? `The stored result could not be read: ${describeError(storedError)}` : null;
  return {
    full,
    isLoading,
    progress: progress?.scenarioId === scenario.id ? progress : null,
    runError: failure?.scenarioId === scenario.id ? failure.message : readError,
    runFull,
    cancelRun,
  };
}
