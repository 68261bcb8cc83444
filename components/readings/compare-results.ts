import type { RunResult } from "@/lib/simulation/types";

export type Verdict =
  { status: "same" } | { status: "other-engine"; engine: string } | { status: "differs"; what: string[] };

/** Compares two runs to the last bit: every weekly fill rate and every figure. */
export function compareResults(stored: RunResult, fresh: RunResult): Verdict {
  if (stored.engine !== fresh.engine) return { status: "other-engine", engine: stored.engine };
  const what: string[] = [];
  const nDiffering = countDiffering(stored.fillRates, fresh.fillRates);
  if (nDiffering > 0) what.push(`${nDiffering} weekly fill rates`);
  for (const key of ["summary", "buffers", "stations", "suppliers", "customers", "causes"] as const)
    // JSON writes the shortest text that reads back as the same double.
    if (JSON.stringify(stored[key]) !== JSON.stringify(fresh[key])) what.push(key);
  return what.length === 0 ? { status: "same" } : { status: "differs", what };
}

function countDiffering(a: Float32Array, b: Float32Array): number {
  if (a.length !== b.length) return Math.max(a.length, b.length);
  let n = 0;
  for (let i = 0; i < a.length; i++) if (!Object.is(a[i], b[i])) n++;
  return n;
}
