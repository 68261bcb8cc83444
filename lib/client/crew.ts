import type { Remote } from "comlink";
import { AppError } from "@/lib/errors";
import type { Line } from "@/lib/line/types";
import type { Answer, SimulationApi } from "@/workers/simulation-api";
import type { WorkerHandle } from "./worker-handle";

/** One piece of work for one worker. `expectedMs` is null before the speed is known. */
export type Call = {
  line: Line;
  expectedMs: number | null;
  send(api: Remote<SimulationApi>): Promise<Answer<unknown>>;
  receive(value: unknown, ms: number): void;
};

/** A run in progress: hands out calls while it has any, and is told when one fails. */
export type Job = { rank: number; next(): Call | null; fail(error: Error): void };

type Slot = {
  worker: WorkerHandle | null;
  /** The line that the worker holds. */
  loaded: Line | null;
  busy: { job: Job; since: number; giveUp(error: Error): void } | null;
};

/** A worker that has not taken a line by then is not coming; another is started once. */
const defaultStartLimitMs = 6_000;
/** A cancelled block older than this is taken for hung. */
const cancelLimitMs = 1_000;
/** A block may take this many times what was expected of it, and never less than `leastLimitMs`, before it is given up. */
const patience = 50;
const leastLimitMs = 20_000;

/** Hands the calls of all jobs to a fixed number of workers, started when first needed and replaced when they fail. */
export function createCrew(
  nWorkers: number,
  startWorker: () => WorkerHandle,
  now: () => number,
  startLimitMs = defaultStartLimitMs,
) {
  /** Calls whose worker did not start: each is given to another one, once. */
  const again: { job: Job; call: Call }[] = [];
  const slots = Array.from({ length: nWorkers }, (): Slot => ({ worker: null, loaded: null, busy: null }));
  const jobs: Job[] = [];

  function dismiss(slot: Slot): void {
    slot.worker?.stop();
    slot.worker = null;
    slot.loaded = null;
    slot.busy = null;
  }

  function handOut(): void {
    for (const slot of slots) {
      if (slot.busy) continue;
      const waiting = again.shift();
      if (waiting) {
        void serve(slot, waiting.job, waiting.call, true);
        continue;
      }
      for (const job of [...jobs]) {
        const call = jobs.includes(job) ? job.next() : null;
        if (!call) continue;
        void serve(slot, job, call);
        break;
      }
    }
  }

  async function serve(slot: Slot, job: Job, call: Call, isAgain = false): Promise<void> {
    const task = { job, since: now(), giveUp: (_error: Error): void => undefined };
    const given = new Promise<never>((_, reject) => (task.giveUp = reject));
    slot.busy = task;
    try {
      const answer = await Promise.race([given, perform(slot, call, task.giveUp)]);
      if (slot.busy !== task) return;
      slot.busy = null;
      if (!jobs.includes(job)) return;
      if (answer.ok) call.receive(answer.value, answer.ms);
      else job.fail(new AppError(answer.code, answer.message));
    } catch (error) {
      if (slot.busy !== task) return;
      dismiss(slot);
      if (!jobs.includes(job)) return;
      if (error instanceof NotStarted && !isAgain) again.push({ job, call });
      else job.fail(describeFailure(error));
    } finally {
      handOut();
    }
  }

  async function perform(slot: Slot, call: Call, giveUp: (error: Error) => void): Promise<Answer<unknown>> {
    const worker = (slot.worker ??= startWorker());
    worker.onFailure((message) => giveUp(new Error(message)));
    if (slot.loaded !== call.line) {
      await within(startLimitMs, worker.api.load(call.line), () => new NotStarted("it did not start"));
      slot.loaded = call.line;
    }
    const limit = call.expectedMs === null ? Infinity : Math.max(leastLimitMs, patience * call.expectedMs);
    return within(limit, call.send(worker.api), () => new Error("it stopped answering"));
  }

  return {
    add(job: Job): void {
      jobs.push(job);
      jobs.sort((a, b) => a.rank - b.rank);
      handOut();
    },
    /** Ends a job: what its calls still return is ignored, and a worker that does not come back is replaced. */
    drop(job: Job): void {
      const at = jobs.indexOf(job);
      if (at >= 0) jobs.splice(at, 1);
      for (let i = again.length - 1; i >= 0; i--) if (again[i].job === job) again.splice(i, 1);
      for (const slot of slots) {
        const task = slot.busy;
        if (task?.job !== job) continue;
        setTimeout(
          () => {
            if (slot.busy !== task) return;
            dismiss(slot);
            handOut();
          },
          Math.max(0, cancelLimitMs - (now() - task.since)),
        );
      }
    },
    handOut,
    close(): void {
      for (const slot of slots) dismiss(slot);
      jobs.length = 0;
      again.length = 0;
    },
  };
}

export type Crew = ReturnType<typeof createCrew>;

class NotStarted extends Error {}

/** Waits once more after the limit, since a machine that slept wakes with all its timers due. */
function within<T>(limitMs: number, work: Promise<T>, late: () => Error): Promise<T> {
  if (limitMs === Infinity) return work;
  return new Promise((resolve, reject) => {
    let timer = setTimeout(() => {
      timer = setTimeout(() => reject(late()), limitMs);
    }, limitMs);
    work.then(resolve, reject).finally(() => clearTimeout(timer));
  });
}

function describeFailure(error: unknown): Error {
  const reason = error instanceof Error && error.message ? error.message : String(error);
  return new Error(
    `The run stopped because a worker of this page failed: ${reason}. Nothing was changed; run it again.`,
  );
}
