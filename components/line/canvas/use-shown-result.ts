"use client";

import { useLine } from "@/lib/client/line-state";
import type { RunResult } from "@/lib/simulation/types";

/** The run that the sheet shows: a full one of just this document, else the live one, else the last full one. */
export function useShownResult(): RunResult | null {
  const { full, live } = useLine();
  if (full?.isCurrent) return full.result;
  return live?.result ?? full?.result ?? null;
}
