import { createContext, use } from "react";
import type { Caution } from "@/lib/line/cautions";
import type { Edit } from "@/lib/line/edits";
import type { DraftLine, Fault, Layout, Line, Note } from "@/lib/line/types";
import type { ActionResult } from "@/lib/errors";
import type {
  Draft,
  LineDetail,
  ReadingSummary,
  ScenarioDetail,
  ScenarioOptions,
  VersionDetail,
} from "@/lib/schema/lines";
import type { RunResult } from "@/lib/simulation/types";

/** "stale": somebody else saved first; `theirs` holds their draft until the user chooses. */
export type SaveState =
  | { status: "saved"; at: string }
  | { status: "saving" }
  | { status: "waiting" }
  | { status: "failed"; message: string }
  | { status: "stale"; theirs: Draft; differs: string[] };

/** A result on screen together with what it is a result of. `digest` is that of the document it was computed from. */
export type Reading = { result: RunResult; digest: string; options: ScenarioOptions; ranAt: string; engine: string };

export type RunProgress = { doneWeeks: number; totalWeeks: number; startedAtMs: number; partial: RunResult | null };

/** Everything that the views of one line share. Built by LineProvider, read with `useLine()`. */
export type LineState = {
  line: LineDetail;
  scenario: ScenarioDetail;
  selectScenario(id: string): void;
  /** True while another scenario has been picked and is being read; the one before stays on screen. */
  isSwitching: boolean;
  mayEdit: boolean;
  mayShare: boolean;

  document: DraftLine;
  layout: Layout;
  notes: Note[];
  options: ScenarioOptions;
  /** The runnable line, or null while there are faults. */
  parsed: Line | null;
  /** Digest of `parsed`. */
  digest: string | null;
  faults: Fault[];
  cautions: Caution[];
  /** How many fields, nodes and links differ from the last kept version. */
  nEditsNotKept: number;

  /** Applies a pure edit, records it for undo, saves the draft soon after. `coalesce` folds typing in one field into one undo step. */
  apply(edit: Edit, coalesce?: string): void;
  setOptions(options: Partial<ScenarioOptions>): void;
  undo(): void;
  redo(): void;
  canUndo: boolean;
  canRedo: boolean;
  /** What the next undo or redo would do, in words; null when there is none. */
  undoLabel: string | null;
  redoLabel: string | null;

  saveState: SaveState;
  /** Tries a failed save again. */
  retrySave(): void;
  /** After a conflict: keep mine (saved over theirs at their revision) or take theirs. Both can be undone. */
  resolveStale(choice: "mine" | "theirs"): void;

  keep(): Promise<ActionResult<unknown>>;
  saveAsScenario(name: string, document?: DraftLine, reading?: Reading): Promise<ActionResult<{ scenarioId: string }>>;
  renameScenario(name: string): Promise<ActionResult<unknown>>;
  markBase(): Promise<ActionResult<unknown>>;
  /** Deletes the scenario on screen and goes to the base; refused for the base itself. */
  deleteScenario(): Promise<ActionResult<unknown>>;
  /** Brings the draft back to the last kept version; undo restores it. */
  revert(): void;
  /** Brings document, layout, notes and options of a kept version into the draft as one edit. */
  bringBack(version: VersionDetail): void;

  /** Ids of the selected nodes and notes, and "from>to" keys of selected links. */
  selection: readonly string[];
  select(ids: readonly string[]): void;

  /** The last full run whose document and options are those on screen, else the last one with `isCurrent` false. */
  full: (Reading & { isCurrent: boolean }) | null;
  /** Figures of the kept version's stored result, for comparison with an edit. */
  keptReading: ReadingSummary | null;
  /** Quick run of the document on screen; null while it has faults or before the first one. */
  live: Reading | null;
  /** The document that `full` is of, run like `live` with the same draws: what differs between the two is the edit's doing. */
  liveBase: Reading | null;
  isLiveRunning: boolean;
  progress: RunProgress | null;
  runError: string | null;
  runFull(): void;
  cancelRun(): void;
};

export const LineContext = createContext<LineState | null>(null);

export function useLine(): LineState {
  const state = use(LineContext);
  if (!state) throw new Error("useLine outside LineProvider");
  return state;
}
