"use client";

import { useCallback, useMemo } from "react";
import { cautionsOf } from "@/lib/line/cautions";
import { differences } from "@/lib/line/diff";
import type { Edit } from "@/lib/line/edits";
import { digestLine, parseLine } from "@/lib/line";
import type { DraftLine } from "@/lib/line/types";
import type { LineDetail, ScenarioDetail, ScenarioOptions, VersionDetail } from "@/lib/schema/lines";
import { can } from "@/lib/schema/roles";
import { snapshotOf } from "./draft-sheet";
import type { LineActions } from "./line-actions";
import type { LineState } from "./line-state";
import { useDraft } from "./use-draft";
import { useFullRun } from "./use-full-run";
import { useLiveRun } from "./use-live-run";
import { useScenarioActions } from "./use-scenario-actions";
import { useSelection } from "./use-selection";

export type ScenarioOnScreen = {
  line: LineDetail;
  scenario: ScenarioDetail;
  isSwitching: boolean;
  select(id: string): void;
  actions: LineActions;
};

/** Puts the parts together: the draft and its history, what it means, its runs, and what can be done with the scenario. */
export function useLineState({ line, scenario, isSwitching, select, actions }: ScenarioOnScreen): LineState {
  const mayEdit = can(line.role, "edit");
  const { sheet, view } = useDraft(scenario, mayEdit);
  const { past, present, future } = view.history;
  const { document, layout, notes, options } = present;
  const { kept } = scenario;

  const reading = useMemo(() => readDocument(document), [document]);
  const nEditsNotKept = useMemo(
    () => differences(kept.document, document).length + countOptions(kept.options, options),
    [kept, document, options],
  );

  const done = useScenarioActions({ line, scenario, select, actions, sheet, mayEdit });
  const run = useFullRun(scenario, reading.parsed, reading.digest, options, done.storeRun);
  const isLiveWanted = !run.isLoading && !run.full?.isCurrent;
  const quick = useLiveRun(scenario.id, reading.parsed, reading.digest, options, isLiveWanted);
  const base = run.full?.line ? run.full : null;
  const quickBase = useLiveRun(
    scenario.id,
    base?.line ?? null,
    base?.digest ?? null,
    options,
    isLiveWanted && reading.parsed !== null,
  );
  const [selection, setSelection] = useSelection(scenario.id, document, notes);

  const apply = useCallback(
    (edit: Edit, coalesce?: string) =>
      sheet.change({
        label: edit.label,
        coalesce,
        apply(snapshot) {
          const before = { document: snapshot.document, layout: snapshot.layout, notes: snapshot.notes };
          const after = edit.apply(before);
          return after === before ? snapshot : { ...after, options: snapshot.options };
        },
      }),
    [sheet],
  );
  const setOptions = useCallback(
    (changed: Partial<ScenarioOptions>) =>
      sheet.change({
        label: "Change how it is run",
        coalesce: `options ${Object.keys(changed).join(" ")}`,
        apply(snapshot) {
          const next = { ...snapshot.options, ...changed };
          return countOptions(snapshot.options, next) === 0 ? snapshot : { ...snapshot, options: next };
        },
      }),
    [sheet],
  );
  const bringBack = useCallback(
    (version: VersionDetail) =>
      sheet.change({ label: `Bring back version ${version.number}`, apply: () => snapshotOf(version) }),
    [sheet],
  );
  const revert = useCallback(
    () => sheet.change({ label: `Revert to version ${kept.number}`, apply: () => snapshotOf(kept) }),
    [sheet, kept],
  );

  return {
    line,
    scenario,
    selectScenario: select,
    isSwitching,
    mayEdit,
    mayShare: can(line.role, "share"),
    document,
    layout,
    notes,
    options,
    ...reading,
    nEditsNotKept,
    apply,
    setOptions,
    undo: sheet.undo,
    redo: sheet.redo,
    canUndo: past.length > 0,
    canRedo: future.length > 0,
    undoLabel: past.at(-1)?.label ?? null,
    redoLabel: future[0]?.label ?? null,
    saveState: view.saveState,
    retrySave: () => void sheet.saver.retry(),
    resolveStale: sheet.resolve,
    keep: done.keep,
    saveAsScenario: done.saveAsScenario,
    renameScenario: done.renameScenario,
    markBase: done.markBase,
    deleteScenario: done.deleteScenario,
    revert,
    bringBack,
    selection,
    select: setSelection,
    full: run.full,
    keptReading: kept.reading,
    live: quick.live,
    liveBase: quickBase.isLiveRunning ? null : quickBase.live,
    isLiveRunning: quick.isLiveRunning || quickBase.isLiveRunning,
    progress: run.progress,
    runError: run.runError ?? quick.liveError ?? quickBase.liveError,
    runFull: () => void run.runFull(),
    cancelRun: run.cancelRun,
  };
}

function readDocument(document: DraftLine): Pick<LineState, "parsed" | "digest" | "faults" | "cautions"> {
  const outcome = parseLine(document);
  if ("faults" in outcome) return { parsed: null, digest: null, faults: outcome.faults, cautions: [] };
  const { line } = outcome;
  return { parsed: line, digest: digestLine(line), faults: [], cautions: cautionsOf(line) };
}

function countOptions(a: ScenarioOptions, b: ScenarioOptions): number {
  return (Object.keys(a) as (keyof ScenarioOptions)[]).filter((key) => a[key] !== b[key]).length;
}
