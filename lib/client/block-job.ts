import type { Remote } from "comlink";
import type { Line } from "@/lib/line/types";
import type { RunOptions } from "@/lib/simulation/types";
import type { Answer, SimulationApi } from "@/workers/simulation-api";
import type { Call, Job } from "./crew";

/** About how long a block takes: short enough to cancel at once, long enough that messages cost little. */
const blockMs = 25;

export type BlockJob<Part> = {
  line: Line;
  options: RunOptions;
  rank: number;
  nWorkers: number;
  send(api: Remote<SimulationApi>, options: RunOptions): Promise<Answer<Part>>;
  /** Told of each block in the order of arrival. */
  onBlock(part: Part, done: number): void;
  /** Other work between or after blocks, such as merging; asked first. */
  aside?(): Call | null;
  fail(error: Error): void;
};

/**
 * Replications of the next block.
 * @param msPerReplication - As measured; null before the first answer.
 * @param left - Replications not yet handed out, >= 1.
 */
export function sizeBlock(msPerReplication: number | null, left: number, nWorkers: number): number {
  if (msPerReplication === null) return 1;
  const wanted = Math.max(1, Math.round(blockMs / Math.max(msPerReplication, 0.01)));
  // The last blocks are made smaller so that all workers finish together.
  return Math.min(wanted, Math.max(1, Math.ceil(left / (2 * nWorkers))), left);
}

/** Cuts the replications of a run into blocks whose size follows the measured speed. */
export function createBlockJob<Part>(job: BlockJob<Part>): Job {
  const { replications: total, firstReplication: base = 0 } = job.options;
  let handedOut = 0;
  let done = 0;
  let msPerReplication: number | null = null;
  return {
    rank: job.rank,
    fail: job.fail,
    next() {
      const aside = job.aside?.();
      if (aside) return aside;
      if (handedOut >= total) return null;
      const size = sizeBlock(msPerReplication, total - handedOut, job.nWorkers);
      const options = { ...job.options, replications: size, firstReplication: base + handedOut };
      handedOut += size;
      return {
        line: job.line,
        expectedMs: msPerReplication === null ? null : msPerReplication * size,
        send: (api) => job.send(api, options),
        receive(part, ms) {
          const measured = ms / size;
          msPerReplication = msPerReplication === null ? measured : (msPerReplication + measured) / 2;
          done += size;
          job.onBlock(part as Part, done);
        },
      };
    },
  };
}
