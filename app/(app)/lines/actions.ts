"use server";

import { refresh } from "next/cache";
import { createLine, deleteLine, renameLine } from "@/db/queries/lines";
import { runAction } from "@/lib/auth/run-action";
import type { ActionResult } from "@/lib/errors";
import { CreateLineInput, LineRef, RenameLineInput } from "@/lib/schema/line-inputs";
import type { LineDetail } from "@/lib/schema/lines";
import { readStart } from "./read-start";

const ofLine = ({ lineId }: LineRef) => ({ kind: "line", id: lineId }) as const;

export async function createLineAction(input: CreateLineInput): Promise<ActionResult<LineDetail>> {
  return runAction(CreateLineInput, input, { right: "edit" }, (ctx, { name, from }) =>
    createLine(ctx, { name, sheet: readStart(name, from) }),
  );
}

export async function renameLineAction(input: RenameLineInput): Promise<ActionResult<LineDetail>> {
  const result = await runAction(RenameLineInput, input, { right: "edit", row: ofLine }, renameLine);
  if (result.ok) refresh();
  return result;
}

export async function deleteLineAction(input: LineRef): Promise<ActionResult<{ lineId: string }>> {
  const result = await runAction(LineRef, input, { right: "deleteLine", row: ofLine }, deleteLine);
  if (result.ok) refresh();
  return result;
}
