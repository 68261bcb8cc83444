"use server";

import { deleteScenario, markBase, renameScenario, saveAsScenario } from "@/db/queries/scenarios";
import { createShare, revokeShare } from "@/db/queries/shares";
import { keepVersion } from "@/db/queries/versions";
import { runAction } from "@/lib/auth/run-action";
import type { ActionResult } from "@/lib/errors";
import {
  CreateShareInput,
  KeepVersionInput,
  RenameScenarioInput,
  SaveAsScenarioInput,
  ScenarioRef,
  ShareRef,
} from "@/lib/schema/line-inputs";
import type { ScenarioSummary, ShareSummary, VersionSummary } from "@/lib/schema/lines";

const ofScenario = ({ scenarioId }: ScenarioRef) => ({ kind: "scenario", id: scenarioId }) as const;
const edit = { right: "edit", row: ofScenario } as const;

export async function keepVersionAction(input: KeepVersionInput): Promise<ActionResult<VersionSummary>> {
  return runAction(KeepVersionInput, input, edit, keepVersion);
}

export async function saveAsScenarioAction(input: SaveAsScenarioInput): Promise<ActionResult<ScenarioSummary>> {
  const row = ({ lineId }: SaveAsScenarioInput) => ({ kind: "line", id: lineId }) as const;
  return runAction(SaveAsScenarioInput, input, { right: "edit", row }, saveAsScenario);
}

export async function renameScenarioAction(input: RenameScenarioInput): Promise<ActionResult<ScenarioSummary>> {
  return runAction(RenameScenarioInput, input, edit, renameScenario);
}

export async function deleteScenarioAction(input: ScenarioRef): Promise<ActionResult<{ lineId: string }>> {
  return runAction(ScenarioRef, input, edit, deleteScenario);
}

export async function markBaseAction(input: ScenarioRef): Promise<ActionResult<ScenarioSummary>> {
  return runAction(ScenarioRef, input, edit, markBase);
}

/** The address is in the answer and nowhere else; `days` may be left out. */
export async function createShareAction(
  input: Omit<CreateShareInput, "days"> & { days?: number },
): Promise<ActionResult<{ id: string; url: string }>> {
  const row = ({ versionIds }: CreateShareInput) => ({ kind: "version", id: versionIds[0] }) as const;
  return runAction(CreateShareInput, input, { right: "share", row }, createShare);
}

export async function revokeShareAction(input: ShareRef): Promise<ActionResult<ShareSummary>> {
  const row = ({ shareId }: ShareRef) => ({ kind: "share", id: shareId }) as const;
  return runAction(ShareRef, input, { right: "share", row }, revokeShare);
}
