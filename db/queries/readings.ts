import { and, desc, eq, getTableColumns, inArray, isNotNull } from "drizzle-orm";
import type { ReadingSummary } from "@/lib/schema/lines";
import type { Ctx, Db } from "../context";
import { result, scenarioVersion } from "../schema";

export type ResultRow = typeof result.$inferSelect;

export const riskKey = (acceptedRisk: number) => String(acceptedRisk);

/** The few figures of a stored result, with the percentile of the accepted risk, which was worked out when the result was attached. */
export function toReading(row: ResultRow, acceptedRisk: number): ReadingSummary {
  const atRisk = row.atRisk[riskKey(acceptedRisk)];
  if (!atRisk) throw new Error(`result ${row.id} has no percentile for the accepted risk ${acceptedRisk}`);
  return {
    resultId: row.id,
    ranAt: row.ranAt.toISOString(),
    engine: row.engine,
    acceptedRisk,
    atRisk,
    ...row.figures,
  };
}

/** By scenario id, the reading of its last kept version that has one; scenarios without are absent. */
export async function listKeptReadings(
  ctx: Pick<Ctx, "workspaceId">,
  db: Db,
  scenarioIds: string[],
): Promise<Map<string, ReadingSummary>> {
  if (scenarioIds.length === 0) return new Map();
  const rows = await db
    .selectDistinctOn([scenarioVersion.scenarioId], {
      scenarioId: scenarioVersion.scenarioId,
      options: scenarioVersion.options,
      result: getTableColumns(result),
    })
    .from(scenarioVersion)
    .innerJoin(result, eq(result.id, scenarioVersion.resultId))
    .where(
      and(
        eq(scenarioVersion.workspaceId, ctx.workspaceId),
        inArray(scenarioVersion.scenarioId, scenarioIds),
        isNotNull(scenarioVersion.resultId),
      ),
    )
    .orderBy(scenarioVersion.scenarioId, desc(scenarioVersion.number));
  return new Map(rows.map((row) => [row.scenarioId, toReading(row.result, row.options.acceptedRisk)]));
}
