"use client";

import { useCallback, useMemo, useState } from "react";
import type { DraftLine, Note } from "@/lib/line/types";

/** What is selected in one scenario; whatever an edit or an undo takes away is no longer selected. */
export function useSelection(scenarioId: string, document: DraftLine, notes: readonly Note[]) {
  const [chosen, setChosen] = useState<{ scenarioId: string; ids: readonly string[] }>({ scenarioId, ids: [] });
  const ids = chosen.scenarioId === scenarioId ? chosen.ids : none;
  const selection = useMemo(() => {
    if (ids.length === 0) return none;
    const present = new Set([
      ...document.nodes.map(({ id }) => id),
      ...notes.map(({ id }) => id),
      ...document.links.map(({ from, to }) => `${from}>${to}`),
    ]);
    return ids.every((id) => present.has(id)) ? ids : ids.filter((id) => present.has(id));
  }, [ids, document, notes]);
  const select = useCallback(
    (next: readonly string[]) =>
      setChosen((last) => {
        const isSame = last.scenarioId === scenarioId && last.ids.join("\n") === next.join("\n");
        return isSame ? last : { scenarioId, ids: next };
      }),
    [scenarioId],
  );
  return [selection, select] as const;
}

const none: readonly string[] = [];
