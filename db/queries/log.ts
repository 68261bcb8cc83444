import type { Ctx, Db } from "../context";
import { logEntry } from "../schema";

/** Notes who did what, in the transaction of the change itself. `text` completes "<person> ...". */
export async function addLogEntry(tx: Db, ctx: Ctx, action: string, lineId: string, text: string): Promise<void> {
  await tx.insert(logEntry).values({ workspaceId: ctx.workspaceId, userId: ctx.userId, action, lineId, text });
}
