import type { Line } from "@/lib/line/types";
import type { WeekTrace } from "@/lib/simulation/trace-types";
import type { StockNeeds } from "@/lib/simulation/stock-needs";
import type { RunOptions, RunResult } from "@/lib/simulation/types";

export type Priority = "full" | "live" | "search";

export type RunHooks = {
  signal?: AbortSignal;
  /** Blocks of a live run wait while a full run has blocks to hand out, those of a search while either has. Default "full". */
  priority?: Priority;
  /** Called with merged finished blocks, at most about 10 times a second, never after the promise settled or the signal aborted. */
  onProgress?(done: { replications: number; total: number; partial: RunResult | null }): void;
};

/** Lowest level of each week of every replication, warm-up weeks included: row-major by replication. */
export type LowestLevels = { nReplications: number; nWeeks: number; lowest: Int32Array };

/** The pool over the machine's cores. `run` rejects with AbortError on cancel and with an Error in plain words when a worker fails. */
export interface SimulationClient {
  readonly nWorkers: number;
  run(line: Line, options: RunOptions, hooks?: RunHooks): Promise<RunResult>;
  /** Runs several lines, each as a whole on one worker; results in the order of the lines. For many short runs. */
  runMany(lines: readonly Line[], options: RunOptions, hooks?: Omit<RunHooks, "onProgress">): Promise<RunResult[]>;
  stockNeeds(line: Line, options: RunOptions, hooks?: RunHooks): Promise<StockNeeds>;
  lowestLevels(line: Line, options: RunOptions, bufferId: string, hooks?: RunHooks): Promise<LowestLevels>;
  /** One week of one replication tick by tick, run again from its seed; `onProgress` is never called. */
  traceWeek(line: Line, options: RunOptions, replication: number, week: number, hooks?: RunHooks): Promise<WeekTrace>;
  /** Stops the workers and rejects what is pending with AbortError; a later run starts new workers. */
  close(): void;
}
