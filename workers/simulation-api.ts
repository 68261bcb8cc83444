import { transfer } from "comlink";
import type { Failure } from "@/lib/errors";
import type { Line } from "@/lib/line/types";
import {
  lowestLevels,
  mergeRuns,
  simulate,
  stockNeeds,
  type LowestLevels,
  type RunOptions,
  type RunResult,
  type StockNeeds,
} from "@/lib/simulation";
import { traceWeek, type WeekTrace } from "@/lib/simulation/trace";

/** `ms`: time the worker spent on it, from which the next block is sized. */
export type Answer<T> = { ok: true; value: T; ms: number } | Failure;

export type SimulationApi = {
  /** Hands over the line of the blocks that follow. */
  load(line: Line): void;
  simulate(options: RunOptions): Answer<RunResult>;
  merge(parts: RunResult[]): Answer<RunResult>;
  lowestLevels(options: RunOptions, bufferId: string): Answer<LowestLevels>;
  stockNeeds(options: RunOptions): Answer<StockNeeds>;
  traceWeek(options: RunOptions, replication: number, week: number): Answer<WeekTrace>;
};

/**
 * What a worker does when asked, apart from the messages.
 * @param now - Milliseconds of a clock that never goes back.
 */
export function createSimulationApi(now: () => number): SimulationApi {
  let held: Line | null = null;
  const lineOf = (): Line => {
    if (!held) throw new Error("no line was handed over");
    return held;
  };
  const answer = <T>(compute: () => T, buffersOf: (value: T) => ArrayBufferLike[]): Answer<T> => {
    const start = now();
    try {
      const value = compute();
      return transfer<Answer<T>>({ ok: true, value, ms: now() - start }, buffersOf(value) as ArrayBuffer[]);
    } catch (error) {
      if (!(error instanceof RangeError)) throw error;
      return { ok: false, code: "invalid", message: error.message };
    }
  };
  return {
    load(line) {
      held = line;
    },
    simulate: (options) => answer(() => simulate(lineOf(), options), listBuffers),
    merge: (parts) => answer(() => mergeRuns(parts), listBuffers),
    lowestLevels: (options, bufferId) =>
      answer(
        () => lowestLevels(lineOf(), options, bufferId),
        ({ lowest }) => [lowest.buffer],
      ),
    stockNeeds: (options) =>
      answer(
        () => stockNeeds(lineOf(), options),
        ({ needs }) => [needs.buffer],
      ),
    traceWeek: (options, replication, week) =>
      answer(
        () => traceWeek(lineOf(), options, replication, week),
        ({ buffers, stations }) => [
          ...buffers.map(({ levels }) => levels.buffer),
          ...stations.flatMap(({ states, lacking }) => [states.buffer, lacking.buffer]),
        ],
      ),
  };
}

/** The buffers behind a result, each once, to be handed over instead of copied. */
export function listBuffers({ fillRates, tallies }: RunResult): ArrayBuffer[] {
  const found = new Set<ArrayBuffer>();
  const visit = (value: unknown): void => {
    if (ArrayBuffer.isView(value)) found.add(value.buffer as ArrayBuffer);
    else if (Array.isArray(value)) value.forEach(visit);
    else if (value && typeof value === "object") Object.values(value).forEach(visit);
  };
  visit(fillRates);
  visit({ ...tallies, shape: null });
  return [...found];
}
