import { type Remote, transfer } from "comlink";
import type { Line } from "@/lib/line/types";
import { checkOptions } from "@/lib/simulation/options";
import type { WeekTrace } from "@/lib/simulation/trace-types";
import type { RunOptions, RunResult } from "@/lib/simulation/types";
import { type Answer, listBuffers, type SimulationApi } from "@/workers/simulation-api";
import { createBlockJob } from "./block-job";
import { createCrew, type Call, type Job } from "./crew";
import type { Priority, RunHooks, SimulationClient } from "./simulation-client";
import { startBrowserWorker, type WorkerHandle } from "./worker-handle";

export type PoolSettings = { nWorkers?: number; startWorker?(): WorkerHandle; now?(): number; startLimitMs?: number };

/** Shares of a run after which what is finished is merged for show. Each merge costs about one block. */
const partialAt = [0.1, 0.3, 0.55, 0.8];
const progressEveryMs = 100;
const mostWorkers = 8;

/**
 * Starts no worker before the first run.
 * @remarks Results do not depend on the number of workers, the size of the blocks or the order in which they finish.
 */
export function createSimulationClient(settings: PoolSettings = {}): SimulationClient {
  const nWorkers = settings.nWorkers ?? Math.max(1, Math.min(navigator.hardwareConcurrency || 1, mostWorkers));
  const now = settings.now ?? (() => performance.now());
  const crew = createCrew(nWorkers, settings.startWorker ?? startBrowserWorker, now, settings.startLimitMs);
  const pending = new Set<(error: Error) => void>();

  function start<T>(
    hooks: RunHooks,
    build: (settle: { resolve(value: T): void; reject(error: Error): void }) => Job,
  ): Promise<T> {
    return new Promise<T>((resolve, reject) => {
      if (hooks.signal?.aborted) return reject(abortError());
      const end = (): void => {
        crew.drop(job);
        pending.delete(stop);
        hooks.signal?.removeEventListener("abort", cancel);
      };
      const stop = (error: Error): void => {
        end();
        reject(error);
      };
      const cancel = (): void => stop(abortError());
      const job = build({
        resolve(value) {
          end();
          resolve(value);
        },
        reject: stop,
      });
      pending.add(stop);
      hooks.signal?.addEventListener("abort", cancel, { once: true });
      crew.add(job);
    });
  }

  /** Blocks of one run in the order of arrival; `first`: row of a block's first replication. */
  async function runBlocks<Part>(
    line: Line,
    options: RunOptions,
    hooks: RunHooks,
    send: (api: Remote<SimulationApi>, part: RunOptions) => Promise<Answer<Part>>,
  ): Promise<{ first: number; value: Part }[]> {
    const checked = checkOptions(options);
    const base = checked.firstReplication ?? 0;
    const parts: { first: number; value: Part }[] = [];
    return start(hooks, ({ resolve, reject }) => {
      const report = createReporter(hooks, checked.replications, now);
      return createBlockJob<{ first: number; value: Part }>({
        line,
        options: checked,
        rank: rankOf(hooks),
        nWorkers,
        async send(api, part) {
          const answer = await send(api, part);
          if (!answer.ok) return answer;
          return { ...answer, value: { first: (part.firstReplication ?? 0) - base, value: answer.value } };
        },
        onBlock(part, done) {
          parts.push(part);
          report.count(done);
          if (done === checked.replications) resolve(parts);
        },
        fail: reject,
      });
    });
  }

  return {
    nWorkers,
    async run(line, options, hooks = {}) {
      const checked = checkOptions(options);
      return start<RunResult>(hooks, ({ resolve, reject }) => {
        const report = createReporter(hooks, checked.replications, now);
        const gather = createGathering(line, checked, Boolean(hooks.onProgress), report.take, resolve);
        return createBlockJob<RunResult>({
          line,
          options: checked,
          rank: rankOf(hooks),
          nWorkers,
          send: (api, part) => api.simulate(part),
          onBlock(part, done) {
            gather.add(part, done);
            report.count(done);
          },
          aside: gather.next,
          fail: reject,
        });
      });
    },
    async runMany(lines, options, hooks = {}) {
      const checked = checkOptions(options);
      if (lines.length === 0) return [];
      return start<RunResult[]>(hooks, ({ resolve, reject }) =>
        createLinesJob(lines, checked, rankOf(hooks), resolve, reject),
      );
    },
    async stockNeeds(line, options, hooks = {}) {
      const parts = await runBlocks(line, options, hooks, (api, part) => api.stockNeeds(part));
      const [{ value: head }] = parts;
      const needs = new Int32Array(parts.reduce((sum, { value }) => sum + value.needs.length, 0));
      const width = head.needs.length / head.nReplications;
      for (const { first, value } of parts) needs.set(value.needs, first * width);
      return { ...head, nReplications: needs.length / width, needs };
    },
    async lowestLevels(line, options, bufferId, hooks = {}) {
      const parts = await runBlocks(line, options, hooks, (api, part) => api.lowestLevels(part, bufferId));
      const [{ value: head }] = parts;
      const lowest = new Int32Array(parts.reduce((sum, { value }) => sum + value.lowest.length, 0));
      for (const { first, value } of parts) lowest.set(value.lowest, first * head.nWeeks);
      return { ...head, nReplications: lowest.length / head.nWeeks, lowest };
    },
    async traceWeek(line, options, replication, week, hooks = {}) {
      const checked = checkOptions(options);
      return start<WeekTrace>(hooks, ({ resolve, reject }) => {
        const call: Call = {
          line,
          expectedMs: null,
          send: (api) => api.traceWeek(checked, replication, week),
          receive: (value) => resolve(value as WeekTrace),
        };
        const calls = [call];
        return { rank: rankOf(hooks), next: () => calls.pop() ?? null, fail: reject };
      });
    },
    close() {
      for (const stop of [...pending]) stop(abortError());
      crew.close();
    },
  };
}

const ranks: Record<Priority, number> = { full: 0, live: 1, search: 2 };
const rankOf = ({ priority = "full" }: RunHooks): number => ranks[priority];

/** One call a line. */
function createLinesJob(
  lines: readonly Line[],
  options: RunOptions,
  rank: number,
  resolve: (results: RunResult[]) => void,
  fail: (error: Error) => void,
): Job {
  const results: RunResult[] = [];
  let nHandedOut = 0;
  let nDone = 0;
  return {
    rank,
    fail,
    next() {
      if (nHandedOut >= lines.length) return null;
      const i = nHandedOut++;
      return {
        line: lines[i],
        expectedMs: null,
        send: (api) => api.simulate(options),
        receive(value) {
          results[i] = value as RunResult;
          if (++nDone === lines.length) resolve(results);
        },
      };
    },
  };
}

/** Collects the parts of a run and has them merged by a worker, so that the page never stands still for it. */
function createGathering(
  line: Line,
  { replications: total }: RunOptions,
  showsPartials: boolean,
  onPartial: (partial: RunResult) => void,
  onWhole: (result: RunResult) => void,
) {
  const parts: RunResult[] = [];
  const marks = showsPartials && total >= 20 ? partialAt.map((share) => Math.ceil(share * total)) : [];
  let done = 0;
  let isMerging = false;
  let isClosing = false;
  return {
    add(part: RunResult, nDone: number): void {
      parts.push(part);
      done = nDone;
    },
    next(): Call | null {
      if (isMerging) return null;
      if (done === total && !isClosing) {
        isClosing = true;
        return {
          line,
          expectedMs: null,
          send: (api) => api.merge(transfer(parts, parts.flatMap(listBuffers))),
          receive: (value) => onWhole(value as RunResult),
        };
      }
      if (isClosing || !(done >= marks[0])) return null;
      while (done >= marks[0]) marks.shift();
      isMerging = true;
      return {
        line,
        expectedMs: null,
        send: (api) => api.merge([...parts]),
        receive(value) {
          isMerging = false;
          onPartial(value as RunResult);
        },
      };
    },
  };
}

/** Tells the page how far a run is, at most ten times a second and not before the first block. */
function createReporter(hooks: RunHooks, total: number, now: () => number) {
  let partial: RunResult | null = null;
  let last = -Infinity;
  return {
    take(value: RunResult): void {
      partial = value;
    },
    count(done: number): void {
      if (!hooks.onProgress || now() - last < progressEveryMs) return;
      last = now();
      hooks.onProgress({ replications: done, total, partial });
    },
  };
}

function abortError(): DOMException {
  return new DOMException("The run was cancelled.", "AbortError");
}
