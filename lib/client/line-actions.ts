import type { ActionResult } from "@/lib/errors";
import type { DraftLine, Layout, Note } from "@/lib/line/types";
import type { ScenarioOptions } from "@/lib/schema/lines";

/** The server actions that the line's pages call; handed in by the layout, since this side imports no pages. */
export type LineActions = {
  keepVersion(input: { scenarioId: string; revision: number }): Promise<ActionResult<unknown>>;
  saveAsScenario(input: {
    lineId: string;
    fromScenarioId: string;
    name: string;
    document?: DraftLine;
    options?: ScenarioOptions;
    layout?: Layout;
    notes?: Note[];
  }): Promise<ActionResult<{ id: string }>>;
  renameScenario(input: { scenarioId: string; name: string }): Promise<ActionResult<unknown>>;
  deleteScenario(input: { scenarioId: string }): Promise<ActionResult<unknown>>;
  markBase(input: { scenarioId: string }): Promise<ActionResult<unknown>>;
};
