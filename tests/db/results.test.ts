import { beforeEach, describe, expect, it } from "vitest";
import type { Ctx } from "@/db/context";
import { saveDraft } from "@/db/queries/drafts";
import { listLines } from "@/db/queries/lines";
import { getResultBytes, storeResult } from "@/db/queries/results";
import { getScenario, saveAsScenario } from "@/db/queries/scenarios";
import { keepVersion } from "@/db/queries/versions";
import { result, resultData } from "@/db/schema";
import { encodeResult, percentile } from "@/lib/simulation";
import { emptyDatabase } from "../helpers/database";
import { makeLine, makePlant, shortRun, smallLine } from "../helpers/plant";
import { runDocument } from "../helpers/result";

let ctx: Ctx;
let lineId: string;
let scenarioId: string;
const { run, bytes, digest } = runDocument(smallLine(), shortRun);

beforeEach(async () => {
  ctx = (await makePlant(await emptyDatabase())).as("engineer");
  const line = await makeLine(ctx);
  lineId = line.id;
  scenarioId = line.scenarios[0].id;
});

describe("storeResult", () => {
  it("gives back the very bytes and figures read off them", async () => {
    const reading = await storeResult(ctx, { scenarioId, digest, bytes });

    expect(await getResultBytes(ctx, reading.resultId)).toEqual(bytes);
    expect(reading.p10).toEqual(percentile(run, 0.1));
    expect(reading.atRisk).toEqual(percentile(run, shortRun.acceptedRisk));
    expect(reading.risk).toEqual(run.summary.risk);
    expect(reading.costPerYear).toEqual(run.summary.costPerYear.total);
    expect(reading).toMatchObject({ weeks: 100, engine: run.engine, acceptedRisk: 0.1 });
  });

  it("attaches itself to the draft and to kept versions that fit and have none", async () => {
    const { id: twin } = await saveAsScenario(ctx, { lineId, fromScenarioId: scenarioId, name: "Twin" });

    const { resultId } = await storeResult(ctx, { scenarioId, digest, bytes });

    const own = await getScenario(ctx, scenarioId);
    expect(own.draftReading?.resultId).toBe(resultId);
    expect(own.kept.reading?.resultId).toBe(resultId);
    expect((await getScenario(ctx, twin)).kept.reading?.resultId).toBe(resultId);
    expect((await listLines(ctx))[0].reading?.resultId).toBe(resultId);
  });

  it("attaches to a version that is kept after the run", async () => {
    const options = { ...shortRun, seed: "after" };
    await saveDraft(ctx, scenarioId, {
      revision: 1,
      document: smallLine(),
      layout: { positions: {} },
      notes: [],
      options,
    });
    const later = runDocument(smallLine(), options);
    const { resultId } = await storeResult(ctx, { scenarioId, ...later });

    const version = await keepVersion(ctx, { scenarioId, revision: 2 });

    expect(version).toMatchObject({ number: 2, reading: { resultId } });
    expect((await getScenario(ctx, scenarioId)).versions.map(({ reading }) => reading?.resultId)).toEqual([
      resultId,
      undefined,
    ]);
  });

  it("stores a result of an older kept version while the draft has moved on", async () => {
    await saveDraft(ctx, scenarioId, {
      revision: 1,
      document: smallLine("Hub motor line", 30),
      layout: { positions: {} },
      notes: [],
      options: shortRun,
    });

    await storeResult(ctx, { scenarioId, digest, bytes });

    const { kept, draftReading } = await getScenario(ctx, scenarioId);
    expect(kept.reading).not.toBeNull();
    expect(draftReading).toBeNull();
  });

  it("keeps one row for the same run", async () => {
    const first = await storeResult(ctx, { scenarioId, digest, bytes });
    const second = await storeResult(ctx, { scenarioId, digest, bytes });

    expect(second).toEqual(first);
    expect(await ctx.db.select().from(result)).toHaveLength(1);
    expect(await ctx.db.select().from(resultData)).toHaveLength(1);
  });

  it("refuses a result of another document", async () => {
    const other = runDocument(smallLine("Hub motor line", 30), shortRun);

    await expect(storeResult(ctx, { scenarioId, ...other })).rejects.toMatchObject({ code: "conflict" });
  });

  it("refuses a result that claims another document's digest", async () => {
    const document = smallLine();
    document.nodes = document.nodes.map((node) => (node.id === "wound" ? { ...node, id: "between" } : node));
    document.links = document.links.map(({ from, to }) => ({
      from: from === "wound" ? "between" : from,
      to: to === "wound" ? "between" : to,
    }));
    const other = runDocument(document, shortRun);

    await expect(storeResult(ctx, { scenarioId, digest, bytes: other.bytes })).rejects.toMatchObject({
      code: "invalid",
    });
    expect(await ctx.db.select().from(result)).toEqual([]);
  });

  it("refuses a result of other run options", async () => {
    const other = runDocument(smallLine(), { ...shortRun, replications: 11 });

    await expect(storeResult(ctx, { scenarioId, digest, bytes: other.bytes })).rejects.toMatchObject({
      code: "conflict",
    });
  });

  it("refuses a result of another engine", async () => {
    const old = encodeResult({ ...run, engine: "0.0.1-older" });

    await expect(storeResult(ctx, { scenarioId, digest, bytes: old })).rejects.toMatchObject({ code: "conflict" });
  });

  it("does not believe figures that the tallies do not bear out", async () => {
    const forged = encodeResult({ ...run, summary: { ...run.summary, risk: { value: 0, halfWidth: 0 } } });

    const { resultId, risk } = await storeResult(ctx, { scenarioId, digest, bytes: forged });

    expect(risk).toEqual(run.summary.risk);
    expect(await getResultBytes(ctx, resultId)).toEqual(bytes);
  });

  it("refuses damaged bytes", async () => {
    await expect(storeResult(ctx, { scenarioId, digest, bytes: bytes.slice(0, 100) })).rejects.toMatchObject({
      code: "invalid",
    });
  });

  it("reads another workspace's scenario and result as not found", async () => {
    const stranger = (await makePlant(ctx.db)).as("owner");
    await expect(storeResult(stranger, { scenarioId, digest, bytes })).rejects.toMatchObject({ code: "not-found" });
    const { resultId } = await storeResult(ctx, { scenarioId, digest, bytes });
    await expect(getResultBytes(stranger, resultId)).rejects.toMatchObject({ code: "not-found" });
  });
});
