import { and, count, desc, eq, getTableColumns, gt, isNull } from "drizzle-orm";
import { AppError } from "@/lib/errors";
import type { SaveAsScenarioInput } from "@/lib/schema/line-inputs";
import type { Draft, ScenarioDetail, ScenarioSummary } from "@/lib/schema/lines";
import type { Ctx, Db } from "../context";
import { line, result, scenario, scenarioVersion, share, shareVersion, user } from "../schema";
import { examineContent, type Content } from "./content";
import { addLogEntry } from "./log";
import { personName } from "./people";
import { listKeptReadings, toReading } from "./readings";
import { findFit } from "./result-fit";
import { refuseDuplicateName } from "./unique";
import { getLastVersion, insertVersion, listVersions } from "./versions";

const mostScenarios = 200;
const missing = () => new AppError("not-found", "This scenario does not exist.");
type Row = typeof scenario.$inferSelect;

export const isScenario = (ctx: Ctx, scenarioId: string) =>
  and(eq(scenario.id, scenarioId), eq(scenario.workspaceId, ctx.workspaceId));

export function toDraft({ revision, document, layout, notes, options, updatedAt }: Row, updatedBy: string): Draft {
  return { revision, document, layout, notes, options, updatedAt: updatedAt.toISOString(), updatedBy };
}

/** The draft with its last kept version, the list of versions, and the stored result that fits the draft. */
export async function getScenario(ctx: Ctx, scenarioId: string): Promise<ScenarioDetail> {
  const [row] = await ctx.db
    .select({ scenario: getTableColumns(scenario), updatedBy: personName, result: getTableColumns(result) })
    .from(scenario)
    .leftJoin(user, eq(user.id, scenario.updatedBy))
    .leftJoin(result, eq(result.id, scenario.resultId))
    .where(isScenario(ctx, scenarioId));
  if (!row) throw missing();
  const { id, lineId, name, isBase, options } = row.scenario;
  return {
    id,
    lineId,
    name,
    isBase,
    draft: toDraft(row.scenario, row.updatedBy),
    kept: await getLastVersion(ctx, ctx.db, scenarioId),
    versions: await listVersions(ctx, scenarioId),
    draftReading: row.result && toReading(row.result, options.acceptedRisk),
  };
}

/** Scenarios of a line, the base first, then the latest changed. */
export async function listScenarios(ctx: Ctx, lineId: string): Promise<ScenarioSummary[]> {
  const { id, name, isBase, updatedAt } = scenario;
  const rows = await ctx.db
    .select({ id, name, isBase, updatedAt, updatedBy: personName, nVersions: count(scenarioVersion.id) })
    .from(scenario)
    .leftJoin(user, eq(user.id, scenario.updatedBy))
    .leftJoin(scenarioVersion, eq(scenarioVersion.scenarioId, scenario.id))
    .where(and(eq(scenario.lineId, lineId), eq(scenario.workspaceId, ctx.workspaceId)))
    .groupBy(scenario.id, user.name)
    .orderBy(desc(isBase), desc(updatedAt), id);
  const readings = await listKeptReadings(
    ctx,
    ctx.db,
    rows.map((row) => row.id),
  );
  return rows.map((row) => ({
    ...row,
    updatedAt: row.updatedAt.toISOString(),
    reading: readings.get(row.id) ?? null,
  }));
}

/** Writes a scenario with its draft and, of the same content, kept version 1. @returns Its id. */
export async function insertScenario(
  tx: Db,
  ctx: Ctx,
  { lineId, name, isBase, content }: { lineId: string; name: string; isBase: boolean; content: Content },
): Promise<string> {
  const examined = { lineId, ...examineContent(content) };
  const fit = await findFit(ctx, tx, examined, content.options.acceptedRisk);
  const [{ id }] = await tx
    .insert(scenario)
    .values({
      ...content,
      ...examined,
      workspaceId: ctx.workspaceId,
      name,
      isBase,
      resultId: fit?.id,
      createdBy: ctx.userId,
      updatedBy: ctx.userId,
    })
    .returning({ id: scenario.id });
  await insertVersion(tx, ctx, { scenarioId: id, number: 1, content, examined });
  return id;
}

/**
 * A new scenario from the draft of another one of the line, with what is given in place of it.
 * @throws AppError conflict for a name that the line has already
 */
export async function saveAsScenario(ctx: Ctx, input: SaveAsScenarioInput): Promise<ScenarioSummary> {
  const { lineId, fromScenarioId, name } = input;
  const id = await refuseDuplicateName(`This line has a scenario "${name}" already.`, () =>
    ctx.db.transaction(async (tx) => {
      const [from] = await tx
        .select()
        .from(scenario)
        .where(and(isScenario(ctx, fromScenarioId), eq(scenario.lineId, lineId)));
      if (!from) throw missing();
      const [{ n }] = await tx
        .select({ n: count() })
        .from(scenario)
        .where(and(eq(scenario.lineId, lineId), eq(scenario.workspaceId, ctx.workspaceId)));
      if (n >= mostScenarios) throw new AppError("conflict", `A line may have at most ${mostScenarios} scenarios.`);
      const { document = from.document, layout = from.layout, notes = from.notes, options = from.options } = input;
      const content: Content = { document, layout, notes, options };
      const newId = await insertScenario(tx, ctx, { lineId, name, isBase: false, content });
      await touchLine(tx, ctx, lineId);
      await addLogEntry(tx, ctx, "scenario.create", lineId, `saved the scenario "${name}"`);
      return newId;
    }),
  );
  return getSummary(ctx, lineId, id);
}

/** @throws AppError not-found, conflict for a name that the line has already */
export async function renameScenario(
  ctx: Ctx,
  { scenarioId, name }: { scenarioId: string; name: string },
): Promise<ScenarioSummary> {
  const lineId = await refuseDuplicateName(`This line has a scenario "${name}" already.`, () =>
    ctx.db.transaction(async (tx) => {
      const row = await lockScenario(ctx, tx, scenarioId);
      await tx.update(scenario).set({ name }).where(isScenario(ctx, scenarioId));
      await touchLine(tx, ctx, row.lineId);
      await addLogEntry(tx, ctx, "scenario.rename", row.lineId, `renamed the scenario "${row.name}" to "${name}"`);
      return row.lineId;
    }),
  );
  return getSummary(ctx, lineId, scenarioId);
}

/** Makes the scenario the one base of its line. */
export async function markBase(ctx: Ctx, { scenarioId }: { scenarioId: string }): Promise<ScenarioSummary> {
  const lineId = await ctx.db.transaction(async (tx) => {
    const row = await lockScenario(ctx, tx, scenarioId);
    await tx
      .update(scenario)
      .set({ isBase: false })
      .where(and(eq(scenario.lineId, row.lineId), eq(scenario.workspaceId, ctx.workspaceId)));
    await tx.update(scenario).set({ isBase: true }).where(isScenario(ctx, scenarioId));
    await touchLine(tx, ctx, row.lineId);
    if (!row.isBase) await addLogEntry(tx, ctx, "scenario.base", row.lineId, `made "${row.name}" the base`);
    return row.lineId;
  });
  return getSummary(ctx, lineId, scenarioId);
}

/**
 * Deletes a scenario with its versions: one's own, or any as an owner.
 * @throws AppError conflict for the base and for a scenario that an open link shows; forbidden for somebody else's
 */
export async function deleteScenario(ctx: Ctx, { scenarioId }: { scenarioId: string }): Promise<{ lineId: string }> {
  return ctx.db.transaction(async (tx) => {
    const row = await lockScenario(ctx, tx, scenarioId);
    if (ctx.role !== "owner" && row.createdBy !== ctx.userId) {
      throw new AppError("forbidden", "Only who made this scenario or an owner may delete it.");
    }
    if (row.isBase) throw new AppError("conflict", "The base cannot be deleted. Make another scenario the base first.");
    const [open] = await tx
      .select({ title: share.title })
      .from(share)
      .innerJoin(shareVersion, eq(shareVersion.shareId, share.id))
      .innerJoin(scenarioVersion, eq(scenarioVersion.id, shareVersion.versionId))
      .where(
        and(
          eq(share.workspaceId, ctx.workspaceId),
          eq(scenarioVersion.scenarioId, scenarioId),
          isNull(share.revokedAt),
          gt(share.expiresAt, new Date()),
        ),
      )
      .limit(1);
    if (open)
      throw new AppError("conflict", `An open link shows this scenario (${open.title}). Revoke the link first.`);
    await tx.delete(scenario).where(isScenario(ctx, scenarioId));
    await touchLine(tx, ctx, row.lineId);
    await addLogEntry(tx, ctx, "scenario.delete", row.lineId, `deleted the scenario "${row.name}"`);
    return { lineId: row.lineId };
  });
}

async function lockScenario(ctx: Ctx, tx: Db, scenarioId: string): Promise<Row> {
  const [row] = await tx.select().from(scenario).where(isScenario(ctx, scenarioId)).for("update");
  if (!row) throw missing();
  return row;
}

async function getSummary(ctx: Ctx, lineId: string, scenarioId: string): Promise<ScenarioSummary> {
  const found = (await listScenarios(ctx, lineId)).find(({ id }) => id === scenarioId);
  if (!found) throw missing();
  return found;
}

/** Notes on the line that something of it has changed. */
export async function touchLine(tx: Db, ctx: Ctx, lineId: string): Promise<void> {
  await tx
    .update(line)
    .set({ updatedAt: new Date(), updatedBy: ctx.userId })
    .where(and(eq(line.id, lineId), eq(line.workspaceId, ctx.workspaceId)));
}
