import { and, desc, eq, sql } from "drizzle-orm";
import { promisify } from "node:util";
import { gunzip, gzip } from "node:zlib";
import { decodeResult, engineVersion, percentile } from "@/lib/simulation";
import type { RunResult } from "@/lib/simulation/types";
import type { Ctx, Db } from "../context";
import { result, resultData } from "../schema";
import { riskKey, type ResultRow } from "./readings";

const inflate = promisify(gunzip);
const deflate = promisify(gzip);

export const compress = (bytes: Uint8Array): Promise<Uint8Array> => deflate(bytes);

/** Encoded bytes of a result of this workspace, or null. */
export async function findResultBytes(
  ctx: Pick<Ctx, "workspaceId">,
  db: Db,
  resultId: string,
): Promise<Uint8Array | null> {
  const [row] = await db
    .select({ bytes: resultData.bytes })
    .from(resultData)
    .innerJoin(result, eq(result.id, resultData.resultId))
    .where(and(eq(resultData.resultId, resultId), eq(result.workspaceId, ctx.workspaceId)));
  return row ? new Uint8Array(await inflate(row.bytes)) : null;
}

/** Works out the percentiles of further accepted risks and keeps them with the result. `decoded` spares reading it back. */
export async function addRisks(
  ctx: Pick<Ctx, "workspaceId">,
  tx: Db,
  row: ResultRow,
  acceptedRisks: number[],
  decoded?: RunResult,
): Promise<ResultRow> {
  const missing = acceptedRisks.filter((risk) => !row.atRisk[riskKey(risk)]);
  if (missing.length === 0) return row;
  const bytes = decoded ? null : await findResultBytes(ctx, tx, row.id);
  const run = decoded ?? (bytes && decodeResult(bytes));
  if (!run) throw new Error(`result ${row.id} has no bytes`);
  const atRisk = { ...row.atRisk };
  for (const risk of missing) atRisk[riskKey(risk)] = percentile(run, risk);
  await tx
    .update(result)
    .set({ atRisk })
    .where(and(eq(result.id, row.id), eq(result.workspaceId, ctx.workspaceId)));
  return { ...row, atRisk };
}

type Wanted = { lineId: string; digest: string | null; optionsKey: string };

/**
 * The stored result of exactly this document and these run options, knowing the percentile of `acceptedRisk`; null where there is none.
 * @remarks Of several engines' results the present engine's comes first, then the newest.
 */
export async function findFit(
  ctx: Pick<Ctx, "workspaceId">,
  tx: Db,
  { lineId, digest, optionsKey }: Wanted,
  acceptedRisk: number,
): Promise<ResultRow | null> {
  if (digest === null) return null;
  const [row] = await tx
    .select()
    .from(result)
    .where(
      and(
        eq(result.workspaceId, ctx.workspaceId),
        eq(result.lineId, lineId),
        eq(result.digest, digest),
        eq(result.optionsKey, optionsKey),
      ),
    )
    .orderBy(desc(sql`${result.engine} = ${engineVersion}`), desc(result.ranAt))
    .limit(1);
  return row ? addRisks(ctx, tx, row, [acceptedRisk]) : null;
}
