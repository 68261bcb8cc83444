import { and, desc, eq, getTableColumns } from "drizzle-orm";
import { isDeepStrictEqual } from "node:util";
import { AppError } from "@/lib/errors";
import type { VersionDetail, VersionSummary } from "@/lib/schema/lines";
import type { Ctx, Db } from "../context";
import { result, scenario, scenarioVersion, user } from "../schema";
import type { Content } from "./content";
import { addLogEntry } from "./log";
import { personName } from "./people";
import { findFit } from "./result-fit";
import { toReading, type ResultRow } from "./readings";

type VersionRow = typeof scenarioVersion.$inferSelect;
type Found = { version: VersionRow; createdBy: string; result: ResultRow | null };

function selectVersions(db: Db) {
  return db
    .select({ version: getTableColumns(scenarioVersion), createdBy: personName, result: getTableColumns(result) })
    .from(scenarioVersion)
    .leftJoin(user, eq(user.id, scenarioVersion.createdBy))
    .leftJoin(result, eq(result.id, scenarioVersion.resultId));
}

/** A kept version as pages get it. */
export function toVersionDetail({ version, createdBy, result: row }: Found): VersionDetail {
  const { id, scenarioId, number, document, layout, notes, options, digest, createdAt } = version;
  const reading = row && toReading(row, options.acceptedRisk);
  const when = createdAt.toISOString();
  return { id, scenarioId, number, createdAt: when, createdBy, reading, document, layout, notes, options, digest };
}

/** @throws AppError not-found */
export async function getVersion(ctx: Ctx, versionId: string): Promise<VersionDetail> {
  const [found] = await selectVersions(ctx.db).where(
    and(eq(scenarioVersion.id, versionId), eq(scenarioVersion.workspaceId, ctx.workspaceId)),
  );
  if (!found) throw new AppError("not-found", "This version does not exist.");
  return toVersionDetail(found);
}

/** The last kept version; every scenario has one from its beginning. */
export async function getLastVersion(ctx: Ctx, db: Db, scenarioId: string): Promise<VersionDetail> {
  const [found] = await selectVersions(db)
    .where(and(eq(scenarioVersion.scenarioId, scenarioId), eq(scenarioVersion.workspaceId, ctx.workspaceId)))
    .orderBy(desc(scenarioVersion.number))
    .limit(1);
  if (!found) throw new AppError("not-found", "This scenario does not exist.");
  return toVersionDetail(found);
}

/** Newest first, without documents. */
export async function listVersions(ctx: Ctx, scenarioId: string): Promise<VersionSummary[]> {
  const { id, number, options, createdAt } = scenarioVersion;
  const rows = await ctx.db
    .select({ id, number, options, createdAt, createdBy: personName, result: getTableColumns(result) })
    .from(scenarioVersion)
    .leftJoin(user, eq(user.id, scenarioVersion.createdBy))
    .leftJoin(result, eq(result.id, scenarioVersion.resultId))
    .where(and(eq(scenarioVersion.scenarioId, scenarioId), eq(scenarioVersion.workspaceId, ctx.workspaceId)))
    .orderBy(desc(number));
  return rows.map(({ options: { acceptedRisk }, result: row, ...version }) => ({
    ...version,
    scenarioId,
    createdAt: version.createdAt.toISOString(),
    reading: row && toReading(row, acceptedRisk),
  }));
}

type Examined = { lineId: string; digest: string | null; optionsKey: string };

/** Writes a kept version with the stored result that fits it, if there is one. */
export async function insertVersion(
  tx: Db,
  ctx: Ctx,
  {
    scenarioId,
    number,
    content,
    examined,
  }: { scenarioId: string; number: number; content: Content; examined: Examined },
): Promise<string> {
  const fit = await findFit(ctx, tx, examined, content.options.acceptedRisk);
  const { document, layout, notes, options } = content;
  const { lineId, digest, optionsKey } = examined;
  const [row] = await tx
    .insert(scenarioVersion)
    .values({
      workspaceId: ctx.workspaceId,
      lineId,
      scenarioId,
      number,
      document,
      layout,
      notes,
      options,
      digest,
      optionsKey,
      resultId: fit?.id,
      createdBy: ctx.userId,
    })
    .returning({ id: scenarioVersion.id });
  return row.id;
}

/**
 * Keeps the draft as a new immutable version; a draft equal to the last version makes none.
 * @throws AppError stale when the draft is no longer at `revision`, not-found
 */
export async function keepVersion(
  ctx: Ctx,
  { scenarioId, revision }: { scenarioId: string; revision: number },
): Promise<VersionSummary> {
  return ctx.db.transaction(async (tx) => {
    const [draft] = await tx
      .select()
      .from(scenario)
      .where(and(eq(scenario.id, scenarioId), eq(scenario.workspaceId, ctx.workspaceId)))
      .for("update");
    if (!draft) throw new AppError("not-found", "This scenario does not exist.");
    if (draft.revision !== revision) {
      throw new AppError("stale", "Somebody else has changed this draft since. Look at it first, then keep it.");
    }
    const last = await getLastVersion(ctx, tx, scenarioId);
    const { document, layout, notes, options } = draft;
    const content: Content = { document, layout, notes, options };
    const { document: lastDocument, layout: lastLayout, notes: lastNotes, options: lastOptions } = last;
    const lastContent: Content = { document: lastDocument, layout: lastLayout, notes: lastNotes, options: lastOptions };
    if (isDeepStrictEqual(content, lastContent)) return toSummary(last);
    const number = last.number + 1;
    await insertVersion(tx, ctx, { scenarioId, number, content, examined: draft });
    await addLogEntry(tx, ctx, "version.keep", draft.lineId, `kept version ${number} of "${draft.name}"`);
    return toSummary(await getLastVersion(ctx, tx, scenarioId));
  });
}

function toSummary({ id, scenarioId, number, createdAt, createdBy, reading }: VersionDetail): VersionSummary {
  return { id, scenarioId, number, createdAt, createdBy, reading };
}
