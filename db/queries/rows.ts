import { eq } from "drizzle-orm";
import type { Db } from "../context";
import { line, result, scenario, scenarioVersion, share } from "../schema";

const tables = { line, scenario, version: scenarioVersion, result, share };

/** Names a row whose workspace decides what the caller may do. */
export type RowRef = { kind: keyof typeof tables; id: string };

/** Workspace of a row, or null when there is no such row. The one query without a workspace in its `where`: it finds it. */
export async function findWorkspaceOf(db: Db, { kind, id }: RowRef): Promise<string | null> {
  const table = tables[kind];
  const [row] = await db.select({ workspaceId: table.workspaceId }).from(table).where(eq(table.id, id));
  return row?.workspaceId ?? null;
}
