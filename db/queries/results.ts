import { and, desc, eq, isNull, notExists, notInArray } from "drizzle-orm";
import { AppError } from "@/lib/errors";
import type { DraftLine } from "@/lib/line/types";
import type { ReadingSummary, ScenarioOptions } from "@/lib/schema/lines";
import { decodeResult, encodeResult, engineVersion, mergeRuns, percentile } from "@/lib/simulation";
import type { RunResult } from "@/lib/simulation/types";
import type { Ctx, Db } from "../context";
import { result, resultData, scenario, scenarioVersion } from "../schema";
import { optionsKeyOf } from "./content";
import { toReading, type ResultRow } from "./readings";
import { addRisks, compress, findResultBytes } from "./result-fit";

/** Results of drafts that nothing refers to any more are kept for undo, this many a line. */
const mostLoose = 40;

/** @throws AppError not-found */
export async function getResultBytes(ctx: Ctx, resultId: string): Promise<Uint8Array> {
  const bytes = await findResultBytes(ctx, ctx.db, resultId);
  if (!bytes) throw new AppError("not-found", "This result does not exist.");
  return bytes;
}

type Target = { document: DraftLine; options: ScenarioOptions; digest: string | null; optionsKey: string };

/** Bytes from outside whose parts contradict one another can end in either. */
function readOrRefuse(read: () => RunResult): RunResult {
  try {
    return read();
  } catch (error) {
    if (!(error instanceof RangeError || error instanceof TypeError)) throw error;
    throw new AppError("invalid", `The result cannot be read: ${error.message}`);
  }
}

/** The draft or kept version of the scenario that the result is of, by digests that the server has worked out itself. */
function findTarget(targets: Target[], digest: string, run: RunResult): Target {
  const ofDocument = targets.filter((target) => target.digest === digest);
  if (ofDocument.length === 0) {
    throw new AppError("conflict", "This result is of another line document than the scenario's. Run it again.");
  }
  const key = optionsKeyOf(run.options);
  const target = ofDocument.find(({ optionsKey }) => optionsKey === key);
  if (!target || (run.options.firstReplication ?? 0) !== 0) {
    throw new AppError("conflict", "This result was run with other options than the scenario's. Run it again.");
  }
  return target;
}

function requireSameNodes({ tallies: { shape } }: RunResult, { nodes }: DraftLine): void {
  const idsOf = (kind: string) => nodes.filter((node) => node.kind === kind).map(({ id }) => id);
  const found = [shape.suppliers, shape.buffers, shape.stations, shape.customers].map((group) =>
    group.map(({ id }) => id),
  );
  const wanted = ["supplier", "buffer", "station", "customer"].map(idsOf);
  if (JSON.stringify(found) !== JSON.stringify(wanted)) {
    throw new AppError("invalid", "The result is of other nodes than the line document.");
  }
}

function figuresOf(run: RunResult, { money: { currency } }: DraftLine): ResultRow["figures"] {
  const { risk, moneyTiedUp, costPerYear } = run.summary;
  const [p05, p10, p50] = [0.05, 0.1, 0.5].map((p) => percentile(run, p));
  const weeks = run.options.replications * run.options.weeks;
  return { p05, p10, p50, risk, moneyTiedUp, costPerYear: costPerYear.total, weeks, currency };
}

/**
 * Stores a run of the scenario's draft or of one of its kept versions, and attaches it wherever in the line it fits.
 * @param digest - What the client says it ran; it must be one that the server has worked out from a stored document.
 * @throws AppError invalid for damaged bytes, conflict for a result that fits nothing here or is of another engine.
 * @remarks A result that is there already stays: the same document, options and engine give the same bits.
 */
export async function storeResult(
  ctx: Ctx,
  { scenarioId, digest, bytes }: { scenarioId: string; digest: string; bytes: Uint8Array },
): Promise<ReadingSummary> {
  const sent = readOrRefuse(() => decodeResult(bytes));
  if (sent.engine !== engineVersion) {
    throw new AppError(
      "conflict",
      `This result is of engine ${sent.engine}, the server has ${engineVersion}. Reload the page.`,
    );
  }
  // Figures are computed anew from the tallies, so that none has to be believed; an honest result keeps its bits.
  const run = readOrRefuse(() => mergeRuns([sent]));
  const compressed = await compress(encodeResult(run));
  return ctx.db.transaction(async (tx) => {
    const { lineId, targets } = await listTargets(ctx, tx, scenarioId);
    const target = findTarget(targets, digest, run);
    requireSameNodes(run, target.document);
    const fit = { workspaceId: ctx.workspaceId, lineId, digest, optionsKey: target.optionsKey };
    const [fresh] = await tx
      .insert(result)
      .values({ ...fit, engine: run.engine, figures: figuresOf(run, target.document), atRisk: {}, ranBy: ctx.userId })
      .onConflictDoNothing()
      .returning();
    if (fresh) await tx.insert(resultData).values({ resultId: fresh.id, bytes: compressed });
    const row = fresh ?? (await getStored(ctx, tx, fit, run.engine));
    const risks = await attach(ctx, tx, row);
    const complete = await addRisks(ctx, tx, row, [...risks, target.options.acceptedRisk], run);
    if (fresh) await dropLoose(ctx, tx, lineId);
    return toReading(complete, target.options.acceptedRisk);
  });
}

async function listTargets(ctx: Ctx, tx: Db, scenarioId: string): Promise<{ lineId: string; targets: Target[] }> {
  const { document, options, digest, optionsKey, lineId } = scenario;
  const [draft] = await tx
    .select({ document, options, digest, optionsKey, lineId })
    .from(scenario)
    .where(and(eq(scenario.id, scenarioId), eq(scenario.workspaceId, ctx.workspaceId)));
  if (!draft) throw new AppError("not-found", "This scenario does not exist.");
  const kept = await tx
    .select({
      document: scenarioVersion.document,
      options: scenarioVersion.options,
      digest: scenarioVersion.digest,
      optionsKey: scenarioVersion.optionsKey,
    })
    .from(scenarioVersion)
    .where(and(eq(scenarioVersion.scenarioId, scenarioId), eq(scenarioVersion.workspaceId, ctx.workspaceId)))
    .orderBy(desc(scenarioVersion.number));
  return { lineId: draft.lineId, targets: [draft, ...kept] };
}

type Fit = { workspaceId: string; lineId: string; digest: string; optionsKey: string };

async function getStored(ctx: Ctx, tx: Db, fit: Fit, engine: string): Promise<ResultRow> {
  const [row] = await tx
    .select()
    .from(result)
    .where(
      and(
        eq(result.workspaceId, ctx.workspaceId),
        eq(result.lineId, fit.lineId),
        eq(result.digest, fit.digest),
        eq(result.optionsKey, fit.optionsKey),
        eq(result.engine, engine),
      ),
    );
  if (!row) throw new Error("a result that is in the way is not there");
  return row;
}

/** Points drafts that fit, and kept versions that fit and have none, to the result. @returns The accepted risks they ask for. */
async function attach(ctx: Ctx, tx: Db, { id, lineId, digest, optionsKey }: ResultRow): Promise<number[]> {
  const drafts = await tx
    .update(scenario)
    .set({ resultId: id })
    .where(
      and(
        eq(scenario.workspaceId, ctx.workspaceId),
        eq(scenario.lineId, lineId),
        eq(scenario.digest, digest),
        eq(scenario.optionsKey, optionsKey),
      ),
    )
    .returning({ options: scenario.options });
  const versions = await tx
    .update(scenarioVersion)
    .set({ resultId: id })
    .where(
      and(
        eq(scenarioVersion.workspaceId, ctx.workspaceId),
        eq(scenarioVersion.lineId, lineId),
        eq(scenarioVersion.digest, digest),
        eq(scenarioVersion.optionsKey, optionsKey),
        isNull(scenarioVersion.resultId),
      ),
    )
    .returning({ options: scenarioVersion.options });
  return [...drafts, ...versions].map(({ options }) => options.acceptedRisk);
}

async function dropLoose(ctx: Ctx, tx: Db, lineId: string): Promise<void> {
  const isLoose = and(
    eq(result.workspaceId, ctx.workspaceId),
    eq(result.lineId, lineId),
    notExists(tx.select({ id: scenario.id }).from(scenario).where(eq(scenario.resultId, result.id))),
    notExists(
      tx.select({ id: scenarioVersion.id }).from(scenarioVersion).where(eq(scenarioVersion.resultId, result.id)),
    ),
  );
  const newest = tx.select({ id: result.id }).from(result).where(isLoose).orderBy(desc(result.ranAt)).limit(mostLoose);
  await tx.delete(result).where(and(isLoose, notInArray(result.id, newest)));
}
