import type { SheetState } from "@/lib/line/edits";
import type { ScenarioOptions } from "@/lib/schema/lines";

/** All that a draft holds, as one value to go back to. */
export type Snapshot = SheetState & { options: ScenarioOptions };

/** A way back or forward: `label` is the edit that lies between this snapshot and the next one towards the present. */
type Step = { label: string; snapshot: Snapshot };

export type History = {
  past: readonly Step[];
  present: Snapshot;
  future: readonly Step[];
  /** What the last edit may be folded with, and when it was made. */
  last: { coalesce: string; atMs: number } | null;
};

/** Edits of one field fold into one step while they follow each other this closely. */
export const coalesceMs = 3_000;
const nStepsKept = 200;

export function startHistory(present: Snapshot): History {
  return { past: [], present, future: [], last: null };
}

export type Change = { label: string; coalesce?: string; atMs: number; apply(snapshot: Snapshot): Snapshot };

/** Makes a change a step of the history; one that changes nothing returns the same history. */
export function record(history: History, { label, coalesce, atMs, apply }: Change): History {
  const present = apply(history.present);
  if (present === history.present) return history;
  const { last, past } = history;
  const folds = coalesce !== undefined && last?.coalesce === coalesce && atMs - last.atMs <= coalesceMs;
  return {
    past: folds && past.length > 0 ? past : [...past, { label, snapshot: history.present }].slice(-nStepsKept),
    present,
    future: [],
    last: coalesce === undefined ? null : { coalesce, atMs },
  };
}

export function undo(history: History): History {
  const step = history.past.at(-1);
  if (!step) return history;
  return {
    past: history.past.slice(0, -1),
    present: step.snapshot,
    future: [{ label: step.label, snapshot: history.present }, ...history.future],
    last: null,
  };
}

export function redo(history: History): History {
  const [step] = history.future;
  if (!step) return history;
  return {
    past: [...history.past, { label: step.label, snapshot: history.present }],
    present: step.snapshot,
    future: history.future.slice(1),
    last: null,
  };
}
