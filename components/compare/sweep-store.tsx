"use client";

import { createContext, type ReactNode, use, useMemo, useState } from "react";
import { type Reading, useLine } from "@/lib/client/line-state";
import { toRunOptions } from "@/lib/client/readings";
import { useJob } from "@/lib/client/use-job";
import { useSimulation } from "@/lib/client/use-simulation";
import { digestLine } from "@/lib/line";
import type { Line } from "@/lib/line/types";
import type { ScenarioOptions, Sweep, SweepRow } from "@/lib/schema/lines";
import { pairedDifference, percentile } from "@/lib/simulation";
import type { RunResult } from "@/lib/simulation/types";
import { type Quantity, readQuantity, withQuantity } from "@/lib/sizing/quantities";

/** A quantity and the values it takes. */
export type Varied = { quantity: Quantity; nodeName: string; values: readonly number[] };

/** A sweep: the line it is of, the options of each run, and a reading for each pair of values done. */
export type SweepRun = {
  scenarioId: string;
  digest: string;
  options: ScenarioOptions;
  first: Varied & { now: number };
  second: (Varied & { now: number }) | null;
  readings: SweepReading[];
};

/** `beside`: the second quantity's value, null where only one is varied. */
export type SweepReading = { value: number; beside: number | null; line: Line; reading: Reading };

type SweepState = {
  run: SweepRun | null;
  /** Share done while running. */
  progress: { value: number; beside: number | null; share: number } | null;
  error: string | null;
  start(line: Line, digest: string, first: Varied, second: Varied | null, options: ScenarioOptions): void;
  cancel(): void;
};

const SweepContext = createContext<SweepState | null>(null);

/** Keeps the last sweep while one moves between the views of a line. */
export function SweepProvider({ children }: { children: ReactNode }) {
  const { scenario } = useLine();
  const client = useSimulation();
  const [run, setRun] = useState<SweepRun | null>(null);
  const { state: job, start, cancel } = useJob<NonNullable<SweepState["progress"]>, void>();
  const scenarioId = scenario.id;

  const state = useMemo(
    (): SweepState => ({
      run,
      progress: job.status === "running" ? job.progress : null,
      error: job.status === "failed" ? job.message : null,
      cancel,
      start(line, digest, first, second, options) {
        const pairs = (second?.values ?? [null]).flatMap((beside) => first.values.map((value) => ({ value, beside })));
        void start({ ...pairs[0], share: 0 }, async (signal, onProgress) => {
          const withNow = (varied: Varied) => ({ ...varied, now: readQuantity(line, varied.quantity) });
          const base = {
            scenarioId,
            digest,
            options,
            first: withNow(first),
            second: second && withNow(second),
          };
          const readings: SweepReading[] = [];
          setRun({ ...base, readings });
          for (const [i, { value, beside }] of pairs.entries()) {
            const other = second && beside !== null ? withQuantity(line, second.quantity, beside) : line;
            const varied = withQuantity(other, first.quantity, value);
            const show = (share: number) => onProgress({ value, beside, share: (i + share) / pairs.length });
            show(0);
            const result = await client.run(varied, toRunOptions(options), {
              signal,
              onProgress: ({ replications, total }) => show(replications / total),
            });
            const reading: Reading = {
              result,
              digest: digestLine(varied),
              options,
              ranAt: new Date().toISOString(),
              engine: result.engine,
            };
            readings.push({ value, beside, line: varied, reading });
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

/** Values asked for in all. */
export function countAsked({ first, second }: Pick<SweepRun, "first" | "second">): number {
  return first.values.length * (second?.values.length ?? 1);
}

/** The figures of one value that tables, charts and links show. */
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

/** A sweep of one quantity as it goes into a link. */
export function toSweep({ first, readings }: SweepRun, acceptedRisk: number): Sweep {
  const { quantity, nodeName, now } = first;
  return {
    bufferId: quantity.node ?? "line",
    bufferName: nodeName,
    ...(quantity.path === "size" ? {} : { quantity: quantity.name }),
    unit: quantity.unit,
    currentSize: now,
    rows: readings.map(({ value, reading }, i) =>
      toRow(value, reading.result, readings[i - 1]?.reading.result ?? null, acceptedRisk),
    ),
  };
}
