"use client";

import { useEffect, useState, useSyncExternalStore } from "react";
import type { ScenarioDetail } from "@/lib/schema/lines";
import { putDraft } from "./api";
import { createDraftSheet, type DraftSheet, type SheetView } from "./draft-sheet";

/** The sheet of the scenario on screen. Sheets of scenarios seen before keep their history and go on saving. */
export function useDraft(scenario: ScenarioDetail, mayEdit: boolean): { sheet: DraftSheet; view: SheetView } {
  const [sheets] = useState(() => new Map<string, DraftSheet>());
  let sheet = sheets.get(scenario.id);
  if (!sheet) {
    sheet = openSheet(scenario, mayEdit);
    sheets.set(scenario.id, sheet);
  }
  const view = useSyncExternalStore(sheet.subscribe, sheet.getView, sheet.getView);

  useEffect(() => sheets.get(scenario.id)?.adopt(scenario.draft), [sheets, scenario.id, scenario.draft]);

  useEffect(() => {
    const all = () => [...sheets.values()];
    const warn = (event: BeforeUnloadEvent): void => {
      if (all().some(({ saver }) => saver.hasUnsaved)) event.preventDefault();
    };
    const leave = (): void => all().forEach(({ saver }) => saver.leave());
    const retry = (): void =>
      all()
        .filter(({ saver }) => saver.state.status === "failed")
        .forEach(({ saver }) => void saver.retry());
    window.addEventListener("beforeunload", warn);
    window.addEventListener("pagehide", leave);
    window.addEventListener("online", retry);
    return () => {
      window.removeEventListener("beforeunload", warn);
      window.removeEventListener("pagehide", leave);
      window.removeEventListener("online", retry);
      all().forEach(({ saver }) => void saver.flush());
    };
  }, [sheets]);

  return { sheet, view };
}

function openSheet({ id, draft }: ScenarioDetail, mayEdit: boolean): DraftSheet {
  return createDraftSheet({
    draft,
    mayEdit,
    put: (edited, isLeaving) => putDraft(id, edited, isLeaving),
    now: () => performance.now(),
  });
}
