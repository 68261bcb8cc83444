import { and, asc, eq, getTableColumns, sql } from "drizzle-orm";
import type { SharedPage, SharedVersion } from "@/lib/schema/lines";
import type { Db } from "../context";
import { result, scenarioVersion, share, shareVersion, user } from "../schema";
import { personName } from "./people";
import { findResultBytes } from "./result-fit";
import { hashToken, isToken } from "./share-token";
import { toVersionDetail } from "./versions";

export type Gone = { gone: "expired" | "revoked" | "unknown" };

async function findOpenShare(db: Db, token: string): Promise<typeof share.$inferSelect | Gone> {
  if (!isToken(token)) return { gone: "unknown" };
  const [row] = await db
    .select()
    .from(share)
    .where(eq(share.tokenHash, hashToken(token)));
  if (!row) return { gone: "unknown" };
  if (row.revokedAt) return { gone: "revoked" };
  return row.expiresAt <= new Date() ? { gone: "expired" } : row;
}

/**
 * What the holder of a link may see; counts a view. No session: the token is the right.
 * @returns Versions in the order shared. Ids are replaced by the version's place, from 0, which also names its result.
 */
export async function findSharedPage(db: Db, token: string): Promise<SharedPage | Gone> {
  const row = await findOpenShare(db, token);
  if ("gone" in row) return row;
  const found = await db
    .select({
      version: getTableColumns(scenarioVersion),
      createdBy: personName,
      result: getTableColumns(result),
      position: shareVersion.position,
      scenarioName: shareVersion.scenarioName,
    })
    .from(shareVersion)
    .innerJoin(scenarioVersion, eq(scenarioVersion.id, shareVersion.versionId))
    .leftJoin(user, eq(user.id, scenarioVersion.createdBy))
    .leftJoin(result, eq(result.id, scenarioVersion.resultId))
    .where(and(eq(shareVersion.shareId, row.id), eq(scenarioVersion.workspaceId, row.workspaceId)))
    .orderBy(asc(shareVersion.position));
  await db
    .update(share)
    .set({ nViews: sql`${share.nViews} + 1` })
    .where(eq(share.id, row.id));
  const versions = found.map(({ position, scenarioName, ...rest }): SharedVersion => {
    const detail = toVersionDetail(rest);
    const place = String(position);
    const reading = detail.reading && { ...detail.reading, resultId: place };
    return { ...detail, id: place, scenarioId: place, reading, scenarioName };
  });
  return {
    kind: row.kind,
    lineName: row.lineName,
    workspaceName: row.workspaceName,
    sharedBy: row.sharedBy,
    sharedAt: row.createdAt.toISOString(),
    expiresAt: row.expiresAt.toISOString(),
    versions,
    sweep: row.sweep,
  };
}

/** Encoded result of the version at a place of an open link; null where there is none. */
export async function findSharedResult(db: Db, token: string, position: number): Promise<Uint8Array | Gone | null> {
  const row = await findOpenShare(db, token);
  if ("gone" in row) return row;
  const [found] = await db
    .select({ resultId: scenarioVersion.resultId })
    .from(shareVersion)
    .innerJoin(scenarioVersion, eq(scenarioVersion.id, shareVersion.versionId))
    .where(and(eq(shareVersion.shareId, row.id), eq(shareVersion.position, position)));
  return found?.resultId ? findResultBytes({ workspaceId: row.workspaceId }, db, found.resultId) : null;
}
