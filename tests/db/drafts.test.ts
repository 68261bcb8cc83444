import { beforeEach, describe, expect, it } from "vitest";
import { saveDraft } from "@/db/queries/drafts";
import { listLines } from "@/db/queries/lines";
import { getScenario } from "@/db/queries/scenarios";
import { storeResult } from "@/db/queries/results";
import type { Ctx } from "@/db/context";
import type { ScenarioDetail } from "@/lib/schema/lines";
import { emptyDatabase, inRolledBack } from "../helpers/database";
import { makeLine, makePlant, shortRun, smallLine } from "../helpers/plant";
import { runDocument } from "../helpers/result";

let ctx: Ctx;
let colleague: Ctx;
let before: ScenarioDetail;

beforeEach(async () => {
  const plant = await makePlant(await emptyDatabase());
  ctx = plant.as("engineer");
  colleague = plant.as("owner");
  const { scenarios } = await makeLine(ctx);
  before = await getScenario(ctx, scenarios[0].id);
});

const draftOf = (size: number, revision = 1) => ({
  revision,
  document: smallLine("Hub motor line", size),
  layout: { positions: { sup: { x: 10, y: 20 } } },
  notes: [],
  options: shortRun,
});

describe("saveDraft", () => {
  it("saves on top of the revision it was made from and raises it by one", async () => {
    const answer = await saveDraft(ctx, before.id, draftOf(12));

    expect(answer).toMatchObject({ saved: true, revision: 2, updatedBy: ctx.userName });
    const { draft, kept } = await getScenario(ctx, before.id);
    expect(draft.document).toEqual(smallLine("Hub motor line", 12));
    expect(draft.layout.positions.sup).toEqual({ x: 10, y: 20 });
    expect(kept.document).toEqual(smallLine());
  });

  it("changes nothing for a revision that is not the latest and says what differs", async () => {
    await saveDraft(colleague, before.id, draftOf(20));

    const answer = await saveDraft(ctx, before.id, { ...draftOf(12), options: { ...shortRun, seed: "other" } });

    if (answer.saved) throw new Error("a stale draft was saved");
    expect(answer.current.revision).toBe(2);
    expect(answer.current.updatedBy).toBe(colleague.userName);
    expect(answer.current.document).toEqual(smallLine("Hub motor line", 20));
    expect(answer.differs.length).toBeGreaterThanOrEqual(2);
    expect(answer.differs).toContain("Run options: seed phrase 1 → other");
    expect((await getScenario(ctx, before.id)).draft.document).toEqual(smallLine("Hub motor line", 20));
  });

  it("lets only one of two saves at the same time through", async () => {
    const answers = await Promise.all([
      saveDraft(ctx, before.id, draftOf(12)),
      saveDraft(colleague, before.id, draftOf(20)),
    ]);

    expect(answers.map(({ saved }) => saved).sort()).toEqual([false, true]);
    expect((await getScenario(ctx, before.id)).draft.revision).toBe(2);
  });

  it("takes the same draft again whose answer was lost", async () => {
    await saveDraft(ctx, before.id, draftOf(12));

    expect(await saveDraft(ctx, before.id, draftOf(12))).toMatchObject({ saved: true, revision: 2 });
  });

  it("keeps a draft with gaps and says in the register why it cannot run", async () => {
    const document = smallLine();
    document.nodes = document.nodes.map((node) => (node.kind === "station" ? { ...node, cycleMinutes: null } : node));
    await saveDraft(ctx, before.id, { ...draftOf(8), document });

    const [line] = await listLines(ctx);
    expect(line.faults.length).toBeGreaterThan(0);
    expect(line.updatedBy).toBe(ctx.userName);
  });

  it("finds the stored result again when an edit is taken back", async () => {
    const { bytes, digest } = runDocument(smallLine(), shortRun);
    const { resultId } = await storeResult(ctx, { scenarioId: before.id, digest, bytes });

    await saveDraft(ctx, before.id, draftOf(12));
    expect((await getScenario(ctx, before.id)).draftReading).toBeNull();
    await saveDraft(ctx, before.id, draftOf(8, 2));
    expect((await getScenario(ctx, before.id)).draftReading?.resultId).toBe(resultId);
  });

  it("reads another accepted risk off the stored result", async () => {
    const { bytes, digest } = runDocument(smallLine(), shortRun);
    const atTen = await storeResult(ctx, { scenarioId: before.id, digest, bytes });
    expect(atTen.atRisk).toEqual(atTen.p10);

    await saveDraft(ctx, before.id, { ...draftOf(8), options: { ...shortRun, acceptedRisk: 0.05 } });

    const { draftReading } = await getScenario(ctx, before.id);
    expect(draftReading?.resultId).toBe(atTen.resultId);
    expect(draftReading?.atRisk).toEqual(atTen.p05);
  });

  it("refuses a document above 2 MB with the size named", async () => {
    const document = smallLine();
    const values = Array.from({ length: 250_000 }, (_, i) => 1_000_000 + i + 0.5);
    document.nodes = document.nodes.map((node) =>
      node.kind === "customer" ? { ...node, weeklyDemand: { type: "empirical", values } } : node,
    );

    await expect(saveDraft(ctx, before.id, { ...draftOf(8), document })).rejects.toMatchObject({
      code: "too-large",
      message: expect.stringContaining("2 MB"),
    });
  });

  it("reads another workspace's scenario as not found", async () => {
    const stranger = (await makePlant(ctx.db)).as("owner");
    await inRolledBack(ctx.db, async (tx) => {
      await expect(saveDraft({ ...stranger, db: tx }, before.id, draftOf(12))).rejects.toMatchObject({
        code: "not-found",
      });
    });
    expect((await getScenario(ctx, before.id)).draft.revision).toBe(1);
  });
});
