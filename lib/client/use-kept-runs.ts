"use client";

import { useCallback, useMemo, useState } from "react";
import useSWR from "swr";
import useSWRImmutable from "swr/immutable";
import { parseLine } from "@/lib/line";
import type { Line } from "@/lib/line/types";
import type { ScenarioDetail, ScenarioOptions, ScenarioSummary } from "@/lib/schema/lines";
import { decodeResult } from "@/lib/simulation";
import type { RunResult } from "@/lib/simulation/types";
import { fetchBytes, fetchJson, resultKey, scenarioKey } from "./api";
import { areSameRun, toRunOptions } from "./readings";
import { useJob } from "./use-job";
import { useSimulation } from "./use-simulation";

/** A scenario as kept, with a run of it over the weeks that all are compared on. */
export type KeptRun = {
  detail: ScenarioDetail;
  /** Null: no run of these weeks is at hand. */
  result: RunResult | null;
  /** Run on this page, not read back from what is kept. */
  isOwn: boolean;
  /** Null: the kept document has faults and cannot run. */
  line: Line | null;
};

/**
 * Kept versions of some scenarios with their runs.
 * @param chosen - In the order they are shown.
 * @param baseId - The one whose run settings all are compared on; runs of other weeks count as missing.
 */
export function useKeptRuns(chosen: readonly ScenarioSummary[], baseId: string | null) {
  const client = useSimulation();
  // Kept versions change only with a new one: their number is part of the key.
  const key = ["kept", ...chosen.map(({ id, nVersions }) => `${id}:${nVersions}`)];
  const details = useSWR<ScenarioDetail[], Error>(
    key,
    () => Promise.all(chosen.map(({ id }) => fetchJson<ScenarioDetail>(scenarioKey(id)))),
    { keepPreviousData: true },
  );
  /** Known once the base's kept version is read. */
  const options = details.data?.find(({ id }) => id === baseId)?.kept.options ?? null;
  const resultIds = details.data?.flatMap(({ kept }) => (kept.reading ? [kept.reading.resultId] : [])) ?? [];
  const stored = useSWRImmutable<Map<string, RunResult>, Error>(
    resultIds.length > 0 ? ["kept results", ...resultIds] : null,
    async () =>
      new Map(
        await Promise.all(
          resultIds.map(async (id) => [id, decodeResult(await fetchBytes(resultKey(id)))] as [string, RunResult]),
        ),
      ),
    { keepPreviousData: true },
  );
  const [own, setOwn] = useState<ReadonlyMap<string, RunResult>>(new Map());
  const { state, start, cancel } = useJob<{ name: string; share: number }, void>();

  const runs = useMemo((): KeptRun[] | null => {
    if (!details.data) return null;
    return chosen.flatMap(({ id }) => {
      const detail = details.data?.find((one) => one.id === id);
      if (!detail) return [];
      const { kept } = detail;
      const parsed = parseLine(kept.document);
      const line = "line" in parsed ? parsed.line : null;
      const fits = options !== null && areSameRun(kept.options, options);
      const read = fits && kept.reading ? (stored.data?.get(kept.reading.resultId) ?? null) : null;
      const ran = options ? (own.get(keyOf(kept.id, options)) ?? null) : null;
      return [{ detail, line, result: read ?? ran, isOwn: read === null && ran !== null }];
    });
  }, [chosen, details.data, options, own, stored.data]);

  /** Runs over the common weeks what has no run of them. */
  const runMissing = useCallback(() => {
    if (!options || !runs) return;
    const missing = runs.filter(({ result, line }) => result === null && line !== null);
    void start({ name: missing[0]?.detail.name ?? "", share: 0 }, async (signal, onProgress) => {
      for (const [i, { detail, line }] of missing.entries()) {
        const show = (share: number) => onProgress({ name: detail.name, share: (i + share) / missing.length });
        show(0);
        const result = await client.run(line!, toRunOptions(options), {
          signal,
          onProgress: ({ replications, total }) => show(replications / total),
        });
        setOwn((known) => new Map([...known, [keyOf(detail.kept.id, options), result]]));
      }
    });
  }, [client, options, runs, start]);

  return {
    runs,
    options,
    isReading: (details.isLoading && !details.data) || (stored.isLoading && !stored.data),
    error: details.error ?? stored.error ?? null,
    runMissing,
    cancel,
    progress: state.status === "running" ? state.progress : null,
    runError: state.status === "failed" ? state.message : null,
  };
}

function keyOf(versionId: string, { seed, replications, weeks, warmupWeeks, targetFillRate }: ScenarioOptions): string {
  return JSON.stringify([versionId, seed, replications, weeks, warmupWeeks, targetFillRate]);
}
