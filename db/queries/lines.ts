import { and, count, desc, eq, inArray } from "drizzle-orm";
import { AppError } from "@/lib/errors";
import { defaultOptions, type LineDetail, type LineSummary } from "@/lib/schema/lines";
import type { Ctx } from "../context";
import { line, scenario, user } from "../schema";
import type { Content } from "./content";
import { addLogEntry } from "./log";
import { personName } from "./people";
import { listKeptReadings } from "./readings";
import { insertScenario, listScenarios } from "./scenarios";
import { getWorkspaceName } from "./workspaces";

const mostLines = 500;
const missing = () => new AppError("not-found", "This line does not exist.");
const isLine = (ctx: Ctx, lineId: string) => and(eq(line.id, lineId), eq(line.workspaceId, ctx.workspaceId));

/** Lines of the workspace, the latest changed first, without documents. */
export async function listLines(ctx: Ctx): Promise<LineSummary[]> {
  const { id, name, workspaceId, updatedAt } = line;
  const rows = await ctx.db
    .select({ id, name, workspaceId, updatedAt, updatedBy: personName })
    .from(line)
    .leftJoin(user, eq(user.id, line.updatedBy))
    .where(eq(line.workspaceId, ctx.workspaceId))
    .orderBy(desc(updatedAt), id);
  return summarise(ctx, rows);
}

type Row = Pick<LineSummary, "id" | "name" | "workspaceId" | "updatedBy"> & { updatedAt: Date };

async function summarise(ctx: Ctx, rows: Row[]): Promise<LineSummary[]> {
  if (rows.length === 0) return [];
  const ids = rows.map((row) => row.id);
  const ofWorkspace = and(eq(scenario.workspaceId, ctx.workspaceId), inArray(scenario.lineId, ids));
  const counts = await ctx.db
    .select({ lineId: scenario.lineId, n: count() })
    .from(scenario)
    .where(ofWorkspace)
    .groupBy(scenario.lineId);
  const bases = await ctx.db
    .select({ id: scenario.id, lineId: scenario.lineId, faults: scenario.faults })
    .from(scenario)
    .where(and(ofWorkspace, eq(scenario.isBase, true)));
  const readings = await listKeptReadings(
    ctx,
    ctx.db,
    bases.map((base) => base.id),
  );
  return rows.map((row) => {
    const base = bases.find(({ lineId }) => lineId === row.id);
    if (!base) throw new Error(`line ${row.id} has no base scenario`);
    return {
      ...row,
      updatedAt: row.updatedAt.toISOString(),
      nScenarios: counts.find(({ lineId }) => lineId === row.id)?.n ?? 0,
      baseScenarioId: base.id,
      reading: readings.get(base.id) ?? null,
      faults: base.faults,
    };
  });
}

/** @throws AppError not-found */
export async function getLine(ctx: Ctx, lineId: string): Promise<LineDetail> {
  const { id, name, workspaceId } = line;
  const [row] = await ctx.db.select({ id, name, workspaceId }).from(line).where(isLine(ctx, lineId));
  if (!row) throw missing();
  const workspaceName = await getWorkspaceName(ctx.db, ctx.workspaceId);
  return { ...row, workspaceName, role: ctx.role, userName: ctx.userName, scenarios: await listScenarios(ctx, lineId) };
}

export type NewLine = { name: string; sheet: Omit<Content, "options">; options?: Content["options"] };

/** A line with one scenario, "Base", kept as version 1. */
export async function createLine(ctx: Ctx, { name, sheet, options = defaultOptions }: NewLine): Promise<LineDetail> {
  const lineId = await ctx.db.transaction(async (tx) => {
    const [{ n }] = await tx.select({ n: count() }).from(line).where(eq(line.workspaceId, ctx.workspaceId));
    if (n >= mostLines) throw new AppError("conflict", `A workspace may have at most ${mostLines} lines.`);
    const [{ id }] = await tx
      .insert(line)
      .values({ workspaceId: ctx.workspaceId, name, createdBy: ctx.userId, updatedBy: ctx.userId })
      .returning({ id: line.id });
    await insertScenario(tx, ctx, { lineId: id, name: "Base", isBase: true, content: { ...sheet, options } });
    await addLogEntry(tx, ctx, "line.create", id, `made the line "${name}"`);
    return id;
  });
  return getLine(ctx, lineId);
}

/** @throws AppError not-found */
export async function renameLine(ctx: Ctx, { lineId, name }: { lineId: string; name: string }): Promise<LineDetail> {
  await ctx.db.transaction(async (tx) => {
    const [row] = await tx.select({ name: line.name }).from(line).where(isLine(ctx, lineId)).for("update");
    if (!row) throw missing();
    await tx.update(line).set({ name, updatedAt: new Date(), updatedBy: ctx.userId }).where(isLine(ctx, lineId));
    await addLogEntry(tx, ctx, "line.rename", lineId, `renamed the line "${row.name}" to "${name}"`);
  });
  return getLine(ctx, lineId);
}

/** Deletes a line with its scenarios, results and links. @throws AppError not-found */
export async function deleteLine(ctx: Ctx, { lineId }: { lineId: string }): Promise<{ lineId: string }> {
  await ctx.db.transaction(async (tx) => {
    const [row] = await tx.delete(line).where(isLine(ctx, lineId)).returning({ name: line.name });
    if (!row) throw missing();
    await addLogEntry(tx, ctx, "line.delete", lineId, `deleted the line "${row.name}"`);
  });
  return { lineId };
}
