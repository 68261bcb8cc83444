import type { RunOptions } from "@/lib/simulation";

/** Fixed seed, so that a failure can be had again; PROPERTY_RUNS looks at more lines. */
export const settings = (nRuns: number) => ({
  seed: 20261201,
  numRuns: Number(process.env.PROPERTY_RUNS ?? 1) * nRuns,
  endOnFailure: process.env.PROPERTY_RUNS === undefined,
});

export const options: RunOptions = {
  seed: "larkfield",
  replications: 5,
  weeks: 4,
  warmupWeeks: 1,
  targetFillRate: 0.9,
};
