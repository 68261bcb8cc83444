import type { RunOptions } from "./types";

/** Replications x (weeks + warm-up weeks) of one run. */
export const mostWeeks = 1_000_000;

/**
 * Checks run options and brings them to one form: `firstReplication` is present only where it is not 0.
 * @throws RangeError that names the option and its value.
 */
export function checkOptions(options: RunOptions): RunOptions {
  const { seed, replications, weeks, warmupWeeks, targetFillRate, firstReplication = 0 } = options;
  if (typeof seed !== "string") throw new RangeError(`seed must be text, got ${typeof seed}`);
  requireWhole("replications", replications, 1);
  requireWhole("weeks", weeks, 1);
  requireWhole("warmupWeeks", warmupWeeks, 0);
  requireWhole("firstReplication", firstReplication, 0);
  if (!(targetFillRate >= 0 && targetFillRate <= 1)) {
    throw new RangeError(`targetFillRate must be from 0 to 1, got ${targetFillRate}`);
  }
  if (replications * (weeks + warmupWeeks) > mostWeeks) {
    throw new RangeError(
      `replications x (weeks + warm-up weeks) may be at most ${mostWeeks}, got ${replications * (weeks + warmupWeeks)}`,
    );
  }
  const checked = { seed, replications, weeks, warmupWeeks, targetFillRate };
  return firstReplication === 0 ? checked : { ...checked, firstReplication };
}

function requireWhole(name: string, value: number, least: number): void {
  if (!Number.isInteger(value) || value < least || value > 2 ** 30) {
    throw new RangeError(`${name} must be a whole number of at least ${least} and below 2^30, got ${value}`);
  }
}
