"use client";

import { createContext, type ReactNode, use, useEffect, useMemo, useRef, useState } from "react";
import { type Reading, useLine } from "@/lib/client/line-state";
import { pairedDifference } from "@/lib/client/paired";
import { useSimulation } from "@/lib/client/use-simulation";
import { digestLine } from "@/lib/line";
import type { Line } from "@/lib/line/types";
import type { ScenarioOptions, Sweep, SweepRow } from "@/lib/schema/lines";
import { percentile } from "@/lib/simulation";
import type { RunResult } from "@/lib/simulation/types";
import { withSize } from "@/lib/sizing/with-size";

/** A comparison of sizes: the line it is of, the options of each run, and a reading for each size done. */
export type SweepRun = {
  scenarioId: string;
  digest: string;
  options: ScenarioOptions;
  bufferId: string;
  bufferName: string;
  currentSize: number;
  nSizes: number;
  readings: { size: number; line: Line; reading: Reading }[];
};

type SweepState = {
  run: SweepRun | null;
  /** Share done while running. */
  progress: { size: number; share: number } | null;
  error: string | null;
  start(line: Line, digest: string, bufferId: string, sizes: readonly number[], options: ScenarioOptions): void;
  cancel(): void;
};

const SweepContext = createContext<SweepState | null>(null);

/** Keeps the last comparison of sizes while one moves between the views of a line. */
export function SweepProvider({ children }: { children: ReactNode }) {
  const { scenario } = useLine();
  const client = useSimulation();
  const [run, setRun] = useState<SweepRun | null>(null);
  const [progress, setProgress] = useState<SweepState["progress"]>(null);
  const [error, setError] = useState<string | null>(null);
  const abort = useRef<AbortController | null>(null);
  useEffect(() => () => abort.current?.abort(), []);
  const scenarioId = scenario.id;

  const state = useMemo((): SweepState => {
    async function work(
      own: AbortController,
      line: Line,
      digest: string,
      bufferId: string,
      sizes: readonly number[],
      options: ScenarioOptions,
    ) {
      const buffer = line.nodes.find(({ id }) => id === bufferId);
      if (buffer?.kind !== "buffer") throw new Error("the buffer is no longer on the line");
      const { acceptedRisk, ...runOptions } = options;
      const base = {
        scenarioId,
        digest,
        options,
        bufferId,
        bufferName: buffer.name,
        currentSize: buffer.size,
        nSizes: sizes.length,
      };
      const readings: SweepRun["readings"] = [];
      setRun({ ...base, readings });
      for (const [i, size] of sizes.entries()) {
        const sized = withSize(line, bufferId, size);
        setProgress({ size, share: i / sizes.length });
        const result = await client.run(sized, runOptions, {
          signal: own.signal,
          onProgress: ({ replications, total }) =>
            setProgress({ size, share: (i + replications / total) / sizes.length }),
        });
        const reading: Reading = {
          result,
          digest: digestLine(sized),
          options: { ...runOptions, acceptedRisk },
          ranAt: new Date().toISOString(),
          engine: result.engine,
        };
        readings.push({ size, line: sized, reading });
        setRun({ ...base, readings: [...readings] });
      }
    }
    return {
      run,
      progress,
      error,
      start(line, digest, bufferId, sizes, options) {
        abort.current?.abort();
        const own = (abort.current = new AbortController());
        setError(null);
        setProgress({ size: sizes[0], share: 0 });
        work(own, line, digest, bufferId, sizes, options)
          .catch((problem: unknown) => {
            if (!own.signal.aborted) setError(problem instanceof Error ? problem.message : String(problem));
          })
          .finally(() => {
            if (abort.current === own) setProgress(null);
          });
      },
      cancel() {
        abort.current?.abort();
        setProgress(null);
      },
    };
  }, [client, error, progress, run, scenarioId]);

  return <SweepContext value={state}>{children}</SweepContext>;
}

export function useSweep(): SweepState {
  const state = use(SweepContext);
  if (!state) throw new Error("useSweep outside SweepProvider");
  return state;
}

/** The figures of one size that tables, charts and links show. */
export function toRow(size: number, result: RunResult, before: RunResult | null, acceptedRisk: number): SweepRow {
  const { p05, p10, p50, risk, moneyTiedUp, costPerYear } = result.summary;
  return {
    size,
    gain: before && pairedDifference(result, before, acceptedRisk),
    p05,
    p10,
    p50,
    atRisk: percentile(result, acceptedRisk),
    risk,
    moneyTiedUp,
    costPerYear: costPerYear.total,
  };
}

/** The comparison as it goes into a link. */
export function toSweep({ bufferId, bufferName, currentSize, readings }: SweepRun, acceptedRisk: number): Sweep {
  return {
    bufferId,
    bufferName,
    unit: "units",
    currentSize,
    rows: readings.map(({ size, reading }, i) =>
      toRow(size, reading.result, readings[i - 1]?.reading.result ?? null, acceptedRisk),
    ),
  };
}
