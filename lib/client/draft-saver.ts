import { AppError } from "@/lib/errors";
import type { Draft } from "@/lib/schema/lines";
import { describeError, type DraftAnswer, type DraftToSave } from "./api";
import type { Snapshot } from "./draft-history";
import type { SaveState } from "./line-state";

export type SaverSettings = {
  revision: number;
  savedAt: string;
  put(draft: DraftToSave, isLeaving: boolean): Promise<DraftAnswer>;
  onState(state: SaveState): void;
};

const pauseMs = 600;
const retryAfterMs = [2_000, 5_000, 15_000, 30_000];
/** Browsers refuse requests that outlive the page above 64 kB. */
const mostLeavingBytes = 60_000;

/**
 * Saves drafts of one scenario a moment after the last edit, one at a time, each on top of the revision it was made from.
 * @remarks Nothing is sent while a conflict waits for its answer; network failures are tried again by themselves.
 */
export function createDraftSaver({ revision, savedAt, put, onState }: SaverSettings) {
  let known = revision;
  let waiting: Snapshot | null = null;
  let inFlight: Promise<void> | null = null;
  let timer: ReturnType<typeof setTimeout> | undefined;
  let nFailures = 0;
  let state: SaveState = { status: "saved", at: savedAt };

  function show(next: SaveState): void {
    state = next;
    onState(next);
  }

  function schedule(ms: number): void {
    clearTimeout(timer);
    timer = setTimeout(() => void send(), ms);
  }

  async function send(isLeaving = false): Promise<void> {
    clearTimeout(timer);
    if (inFlight) return inFlight;
    if (!waiting || state.status === "stale") return;
    const draft = waiting;
    waiting = null;
    if (!isLeaving) show({ status: "saving" });
    inFlight = deliver(draft, isLeaving).finally(() => (inFlight = null));
    await inFlight;
    if (waiting && state.status === "saved") {
      show({ status: "waiting" });
      schedule(pauseMs);
    }
  }

  async function deliver(draft: Snapshot, isLeaving: boolean): Promise<void> {
    try {
      const answer = await put({ revision: known, ...draft }, isLeaving);
      nFailures = 0;
      if (answer.status === "stale") {
        waiting ??= draft;
        show({ status: "stale", theirs: answer.current, differs: answer.differs });
        return;
      }
      known = answer.revision;
      show({ status: "saved", at: answer.updatedAt });
    } catch (error) {
      waiting ??= draft;
      show({ status: "failed", message: describeError(error) });
      if (error instanceof AppError) return;
      schedule(retryAfterMs[Math.min(nFailures++, retryAfterMs.length - 1)]);
    }
  }

  return {
    get state(): SaveState {
      return state;
    },
    get revision(): number {
      return known;
    },
    get hasUnsaved(): boolean {
      return waiting !== null || inFlight !== null;
    },
    queue(draft: Snapshot): void {
      waiting = draft;
      if (state.status === "stale") return;
      if (!inFlight) show({ status: "waiting" });
      schedule(pauseMs);
    },
    /** Saves what waits now. @returns Whether everything is saved. */
    async flush(): Promise<boolean> {
      await inFlight;
      if (waiting) await send();
      return !waiting && !inFlight && state.status === "saved";
    },
    retry(): Promise<void> {
      return send();
    },
    /** Ends a conflict: what is queued from now on goes on top of their revision. */
    acceptRevision(theirs: Pick<Draft, "revision" | "updatedAt">): void {
      clearTimeout(timer);
      known = theirs.revision;
      waiting = null;
      nFailures = 0;
      show({ status: "saved", at: theirs.updatedAt });
    },
    /** For a page that goes away: sends what waits if it is small enough to outlive the page. */
    leave(): void {
      if (!waiting || inFlight) return;
      if (new TextEncoder().encode(JSON.stringify(waiting)).length <= mostLeavingBytes) void send(true);
    },
    dispose(): void {
      clearTimeout(timer);
    },
  };
}

export type DraftSaver = ReturnType<typeof createDraftSaver>;
