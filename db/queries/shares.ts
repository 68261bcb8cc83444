import { and, desc, eq, getTableColumns, inArray, isNull } from "drizzle-orm";
import { AppError } from "@/lib/errors";
import type { DraftLine } from "@/lib/line/types";
import type { CreateShareInput } from "@/lib/schema/line-inputs";
import type { ShareSummary, Sweep } from "@/lib/schema/lines";
import type { Ctx, Db } from "../context";
import { line, scenario, scenarioVersion, share, shareVersion, user } from "../schema";
import { addLogEntry } from "./log";
import { personName } from "./people";
import { hashToken, makeToken } from "./share-token";
import { getWorkspaceName } from "./workspaces";

const dayMs = 24 * 60 * 60 * 1000;

type Chosen = { id: string; lineId: string; number: number; resultId: string | null; scenarioName: string };

/** The versions in the order asked for: all of one line of the workspace, each with a stored result. */
async function chooseVersions(ctx: Ctx, tx: Db, { versionIds, sweep }: CreateShareInput): Promise<Chosen[]> {
  const { id, lineId, number, resultId, document } = scenarioVersion;
  const rows = await tx
    .select({ id, lineId, number, resultId, document, scenarioName: scenario.name })
    .from(scenarioVersion)
    .innerJoin(scenario, eq(scenario.id, scenarioVersion.scenarioId))
    .where(and(inArray(id, versionIds), eq(scenarioVersion.workspaceId, ctx.workspaceId)));
  const chosen = versionIds.map((wanted) => {
    const row = rows.find((candidate) => candidate.id === wanted);
    if (!row) throw new AppError("not-found", "This version does not exist.");
    if (row.resultId) return row;
    throw new AppError(
      "conflict",
      `Version ${row.number} of "${row.scenarioName}" has no stored result yet. Run it, then share it.`,
    );
  });
  if (chosen.some((row) => row.lineId !== chosen[0].lineId)) {
    throw new AppError("invalid", "A link can show versions of one line only.");
  }
  if (sweep && !hasSwept(chosen[0].document, sweep)) {
    throw new AppError("invalid", `The version shown has no "${sweep.bufferName}".`);
  }
  return chosen;
}

function hasSwept({ nodes }: DraftLine, { bufferId, quantity }: Sweep): boolean {
  if (quantity !== undefined) return bufferId === "line" || nodes.some(({ id }) => id === bufferId);
  return nodes.some(({ kind, id }) => kind === "buffer" && id === bufferId);
}

function titleOf(chosen: Chosen[], { kind, sweep }: CreateShareInput): string {
  const nameOf = ({ scenarioName, number }: Chosen) => `${scenarioName}, version ${number}`;
  if (kind === "version") return nameOf(chosen[0]);
  return sweep
    ? `${sweep.quantity ? `${sweep.bufferName}, ${sweep.quantity}` : `Sizes of ${sweep.bufferName}`}: ${nameOf(chosen[0])}`
    : `Comparison: ${chosen.map(nameOf).join("; ")}`;
}

/**
 * Freezes kept versions, and figures of sizes where given, under a new link.
 * @returns The link's path, to be shown once: only a hash of its token is stored.
 * @throws AppError not-found, invalid, or conflict for a version without a stored result
 */
export async function createShare(ctx: Ctx, input: CreateShareInput): Promise<{ id: string; url: string }> {
  const token = makeToken();
  const id = await ctx.db.transaction(async (tx) => {
    const chosen = await chooseVersions(ctx, tx, input);
    const { lineId } = chosen[0];
    const [{ name: lineName }] = await tx
      .select({ name: line.name })
      .from(line)
      .where(and(eq(line.id, lineId), eq(line.workspaceId, ctx.workspaceId)));
    const title = titleOf(chosen, input);
    const [row] = await tx
      .insert(share)
      .values({
        workspaceId: ctx.workspaceId,
        lineId,
        kind: input.kind,
        tokenHash: hashToken(token),
        title,
        lineName,
        workspaceName: await getWorkspaceName(tx, ctx.workspaceId),
        sharedBy: ctx.userName,
        sweep: input.sweep,
        createdBy: ctx.userId,
        expiresAt: new Date(Date.now() + input.days * dayMs),
      })
      .returning({ id: share.id });
    await tx.insert(shareVersion).values(
      chosen.map(({ id: versionId, scenarioName }, position) => ({
        shareId: row.id,
        position,
        versionId,
        scenarioName,
      })),
    );
    await addLogEntry(tx, ctx, "share.create", lineId, `shared a link for ${input.days} days: ${title}`);
    return row.id;
  });
  return { id, url: `/s/${token}` };
}

function toSummary(row: typeof share.$inferSelect, createdBy: string): ShareSummary {
  const { id, kind, title, createdAt, expiresAt, revokedAt, nViews } = row;
  return {
    id,
    kind,
    title,
    createdAt: createdAt.toISOString(),
    createdBy,
    expiresAt: expiresAt.toISOString(),
    revokedAt: revokedAt?.toISOString() ?? null,
    nViews,
  };
}

/** Links of a line, the newest first, revoked and expired ones too. */
export async function listShares(ctx: Ctx, lineId: string): Promise<ShareSummary[]> {
  const rows = await ctx.db
    .select({ share: getTableColumns(share), createdBy: personName })
    .from(share)
    .leftJoin(user, eq(user.id, share.createdBy))
    .where(and(eq(share.lineId, lineId), eq(share.workspaceId, ctx.workspaceId)))
    .orderBy(desc(share.createdAt), share.id);
  return rows.map((row) => toSummary(row.share, row.createdBy));
}

/** Closes a link for good; one that is revoked already stays as it is. @throws AppError not-found */
export async function revokeShare(ctx: Ctx, { shareId }: { shareId: string }): Promise<ShareSummary> {
  const isShare = and(eq(share.id, shareId), eq(share.workspaceId, ctx.workspaceId));
  await ctx.db.transaction(async (tx) => {
    const [row] = await tx
      .update(share)
      .set({ revokedAt: new Date() })
      .where(and(isShare, isNull(share.revokedAt)))
      .returning({ lineId: share.lineId, title: share.title });
    if (row) await addLogEntry(tx, ctx, "share.revoke", row.lineId, `revoked a link: ${row.title}`);
  });
  const [found] = await ctx.db
    .select({ share: getTableColumns(share), createdBy: personName })
    .from(share)
    .leftJoin(user, eq(user.id, share.createdBy))
    .where(isShare);
  if (!found) throw new AppError("not-found", "This link does not exist.");
  return toSummary(found.share, found.createdBy);
}
export { findSharedPage, findSharedResult, type Gone } from "./shared-page";
