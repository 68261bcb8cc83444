"use client";

import { createContext, type ReactNode, use, useMemo, useState } from "react";
import { type Reading, useLine } from "@/lib/client/line-state";
import { useJob } from "@/lib/client/use-job";
import { useSimulation } from "@/lib/client/use-simulation";
import { digestLine } from "@/lib/line";
import type { Line } from "@/lib/line/types";
import type { ScenarioOptions, Sweep, SweepRow } from "@/lib/schema/lines";
import { pairedDifference, percentile } from "@/lib/simulation";
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
  const { state: job, start, cancel } = useJob<{ size: number; share: number }, void>();
  const scenarioId = scenario.id;

  const state = useMemo(
    (): SweepState => ({
      run,
      progress: job.status === "running" ? job.progress : null,
      error: job.status === "failed" ? job.message : null,
      cancel,
      start(line, digest, bufferId, sizes, options) {
        void start({ size: sizes[0], share: 0 }, async (signal, onProgress) => {
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
            const show = (share: number) => onProgress({ size, share: (i + share) / sizes.length });
            show(0);
            const result = await client.run(sized, runOptions, {
              signal,
              onProgress: ({ replications, total }) => show(replications / total),
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
        });
      },
    }),
    [cancel, client, job, run, scenarioId, start],
  );

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
