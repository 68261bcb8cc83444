"use client";

import type { ReactNode } from "react";
import useSWR from "swr";
import type { LineDetail, ScenarioDetail } from "@/lib/schema/lines";
import { fetchJson, lineKey } from "./api";
import type { LineActions } from "./line-actions";
import { LineContext } from "./line-state";
import { useLineKeys } from "./use-line-keys";
import { useLineState, type ScenarioOnScreen } from "./use-line-state";
import { useScenarioChoice } from "./use-scenario-choice";

type Props = {
  detail: LineDetail;
  initial: ScenarioDetail;
  actions: LineActions;
  /** Shown while the first scenario is being read, and when it cannot be. */
  whileAway(state: { error: Error | null; retry(): void }): ReactNode;
  children: ReactNode;
};

/** Holds everything that the views of one line share, so that going from view to view loses nothing. */
export function LineProvider({ detail, initial, actions, whileAway, children }: Props) {
  const { data: line = detail } = useSWR<LineDetail>(lineKey(detail.id), fetchJson, { fallbackData: detail });
  const { scenario, isSwitching, error, retry, select } = useScenarioChoice(line, initial);
  if (!scenario || error) return whileAway({ error: error ?? null, retry });
  return (
    <ScenarioSheet line={line} scenario={scenario} isSwitching={isSwitching} select={select} actions={actions}>
      {children}
    </ScenarioSheet>
  );
}

function ScenarioSheet({ children, ...onScreen }: ScenarioOnScreen & { children: ReactNode }) {
  const state = useLineState(onScreen);
  useLineKeys(state);
  return <LineContext value={state}>{children}</LineContext>;
}
