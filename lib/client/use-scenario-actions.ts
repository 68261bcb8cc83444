"use client";

import { useCallback } from "react";
import { useSWRConfig } from "swr";
import type { ActionResult, Failure } from "@/lib/errors";
import { digestLine, parseLine } from "@/lib/line";
import type { LineDetail, ScenarioDetail } from "@/lib/schema/lines";
import { lineKey, scenarioKey, describeError } from "./api";
import type { DraftSheet } from "./draft-sheet";
import type { LineActions } from "./line-actions";
import type { LineState, Reading } from "./line-state";
import { areSameRun } from "./readings";
import { postReading } from "./store-reading";

type Settings = {
  line: LineDetail;
  scenario: ScenarioDetail;
  select(id: string): void;
  actions: LineActions;
  sheet: DraftSheet;
  mayEdit: boolean;
};

const notSaved: Failure = {
  ok: false,
  code: "conflict",
  message: "The last edits are not saved yet, so nothing was kept. Try again when they are.",
};

/** Keeping, saving as, renaming and storing: each first sees to it that the draft on screen is the saved one. */
export function useScenarioActions({ line, scenario, select, actions, sheet, mayEdit }: Settings) {
  const { mutate } = useSWRConfig();
  const refresh = useCallback(
    () => Promise.all([mutate(scenarioKey(scenario.id)), mutate(lineKey(line.id))]),
    [mutate, scenario.id, line.id],
  );

  const keep = useCallback<LineState["keep"]>(async () => {
    if (!(await sheet.saver.flush())) return notSaved;
    const result = await attempt(() =>
      actions.keepVersion({ scenarioId: scenario.id, revision: sheet.saver.revision }),
    );
    await refresh();
    return result;
  }, [actions, refresh, scenario.id, sheet]);

  const saveAsScenario = useCallback<LineState["saveAsScenario"]>(
    async (name, document, reading) => {
      const { present } = sheet.getView().history;
      const saved = await attempt(() =>
        actions.saveAsScenario({
          lineId: line.id,
          fromScenarioId: scenario.id,
          name,
          document: document ?? present.document,
          options: reading?.options ?? present.options,
          layout: present.layout,
          notes: present.notes,
        }),
      );
      if (!saved.ok) return saved;
      const scenarioId = saved.value.id;
      try {
        if (reading) await postReading(scenarioId, reading);
      } catch (error) {
        return {
          ok: false,
          code: "invalid",
          message: `"${name}" was saved without its result: ${describeError(error)}`,
        };
      } finally {
        await mutate(lineKey(line.id));
      }
      return { ok: true, value: { scenarioId } };
    },
    [actions, line.id, mutate, scenario.id, sheet],
  );

  const change = useCallback(
    async (act: () => Promise<ActionResult<unknown>>) => {
      const result = await attempt(act);
      await refresh();
      return result;
    },
    [refresh],
  );
  const renameScenario = useCallback(
    (name: string) => change(() => actions.renameScenario({ scenarioId: scenario.id, name })),
    [actions, change, scenario.id],
  );
  const markBase = useCallback(
    () => change(() => actions.markBase({ scenarioId: scenario.id })),
    [actions, change, scenario.id],
  );
  const deleteScenario = useCallback(async () => {
    const result = await attempt(() => actions.deleteScenario({ scenarioId: scenario.id }));
    const base = line.scenarios.find(({ isBase }) => isBase);
    if (result.ok && base) select(base.id);
    await mutate(lineKey(line.id));
    return result;
  }, [actions, line, mutate, scenario.id, select]);

  /** Stores a finished run with the scenario, if its document is still the one on screen. */
  const storeRun = useCallback(
    async (reading: Reading) => {
      if (!mayEdit) return;
      if (!(await sheet.saver.flush()) || !isOnScreen(reading, sheet)) return;
      try {
        await postReading(scenario.id, reading);
      } catch (error) {
        throw new Error(`The result is on screen but could not be stored: ${describeError(error)}`, { cause: error });
      }
      await refresh();
    },
    [mayEdit, refresh, scenario.id, sheet],
  );

  return { keep, saveAsScenario, renameScenario, markBase, deleteScenario, storeRun };
}

/** A run of a document that has been edited since belongs to nothing that is saved. */
function isOnScreen(reading: Reading, sheet: DraftSheet): boolean {
  const { document, options } = sheet.getView().history.present;
  const parsed = parseLine(document);
  return "line" in parsed && digestLine(parsed.line) === reading.digest && areSameRun(options, reading.options);
}

/** An action that throws has not reached the server or broke there; either way the page says so. */
async function attempt<T>(act: () => Promise<ActionResult<T>>): Promise<ActionResult<T>> {
  try {
    return await act();
  } catch (error) {
    return { ok: false, code: "invalid", message: describeError(error) };
  }
}
