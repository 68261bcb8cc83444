"use client";

import { useMemo } from "react";
import useSWRImmutable from "swr/immutable";
import { digestLine, parseLine } from "@/lib/line";
import type { DraftLine, Line } from "@/lib/line/types";
import type { ReadingSummary, ScenarioDetail, ScenarioOptions } from "@/lib/schema/lines";
import { decodeResult } from "@/lib/simulation";
import { fetchBytes, resultKey } from "./api";
import type { Reading } from "./line-state";

/** A reading with the line it is of, null where that can no longer be run. */
export type ReadingOfLine = Reading & { line: Line | null };

type Stored = { summary: ReadingSummary; document: DraftLine; options: ScenarioOptions };

/** Reads back the result kept for the draft, else that of the last kept version. Stored results never change. */
export function useStoredReading(scenario: ScenarioDetail): {
  stored: ReadingOfLine | null;
  isLoading: boolean;
  error: unknown;
} {
  const { draft, kept, draftReading } = scenario;
  const source: Stored | null = draftReading
    ? { summary: draftReading, document: draft.document, options: draft.options }
    : kept.reading
      ? { summary: kept.reading, document: kept.document, options: kept.options }
      : null;
  const { data, isLoading, error } = useSWRImmutable(source && resultKey(source.summary.resultId), async (url) => {
    const result = decodeResult(await fetchBytes(url));
    const parsed = parseLine(source?.document);
    if (!("line" in parsed)) return { result, digest: "", line: null };
    return { result, digest: digestLine(parsed.line), line: parsed.line };
  });
  const ranAt = source?.summary.ranAt;
  const engine = source?.summary.engine;
  const acceptedRisk = source?.options.acceptedRisk;
  const stored = useMemo((): ReadingOfLine | null => {
    if (!data || ranAt === undefined || engine === undefined || acceptedRisk === undefined) return null;
    const { seed, replications, weeks, warmupWeeks, targetFillRate } = data.result.options;
    const options = { acceptedRisk, seed, replications, weeks, warmupWeeks, targetFillRate };
    return { ...data, options, ranAt, engine };
  }, [data, ranAt, engine, acceptedRisk]);
  return { stored, isLoading, error };
}
