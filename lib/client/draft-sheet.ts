import type { Draft } from "@/lib/schema/lines";
import type { DraftAnswer, DraftToSave } from "./api";
import { record, redo, startHistory, undo, type Change, type History, type Snapshot } from "./draft-history";
import { createDraftSaver } from "./draft-saver";
import type { SaveState } from "./line-state";

export type SheetView = { history: History; saveState: SaveState };

export type SheetSettings = {
  draft: Draft;
  mayEdit: boolean;
  put(draft: DraftToSave, isLeaving: boolean): Promise<DraftAnswer>;
  now(): number;
};

/** The draft of one scenario in this page: its history, and the saver that follows it. Lives as long as the line's pages. */
export function createDraftSheet({ draft, mayEdit, put, now }: SheetSettings) {
  const listeners = new Set<() => void>();
  const saver = createDraftSaver({
    revision: draft.revision,
    savedAt: draft.updatedAt,
    put,
    onState: (saveState) => show({ ...view, saveState }),
  });
  let view: SheetView = { history: startHistory(snapshotOf(draft)), saveState: saver.state };

  function show(next: SheetView): void {
    view = next;
    listeners.forEach((listener) => listener());
  }

  function move(next: History): void {
    if (next === view.history) return;
    show({ ...view, history: next });
    saver.queue(next.present);
  }

  return {
    getView: (): SheetView => view,
    subscribe(listener: () => void): () => void {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    change(change: Omit<Change, "atMs">): void {
      if (mayEdit) move(record(view.history, { ...change, atMs: now() }));
    },
    undo: (): void => move(undo(view.history)),
    redo: (): void => move(redo(view.history)),
    /** Answers a conflict. Both drafts stay within reach of undo. */
    resolve(choice: "mine" | "theirs"): void {
      if (view.saveState.status !== "stale") return;
      const { theirs } = view.saveState;
      const mine = view.history.present;
      const taken = record(view.history, {
        label: `Take the edits of ${theirs.updatedBy}`,
        atMs: now(),
        apply: () => snapshotOf(theirs),
      });
      saver.acceptRevision(theirs);
      if (choice === "theirs") return show({ ...view, history: taken });
      const label = `Save over the edits of ${theirs.updatedBy}`;
      move(record(taken, { label, atMs: now(), apply: () => mine }));
    },
    /** Takes what somebody else saved meanwhile, unless edits of this page wait to be saved. */
    adopt(theirs: Draft): void {
      if (theirs.revision <= saver.revision || saver.hasUnsaved || view.saveState.status !== "saved") return;
      saver.acceptRevision(theirs);
      const label = `Edits by ${theirs.updatedBy}`;
      show({ ...view, history: record(view.history, { label, atMs: now(), apply: () => snapshotOf(theirs) }) });
    },
    saver,
  };
}

export type DraftSheet = ReturnType<typeof createDraftSheet>;

export function snapshotOf({ document, layout, notes, options }: Snapshot): Snapshot {
  return { document, layout, notes, options };
}
