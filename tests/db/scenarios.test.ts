import { beforeEach, describe, expect, it } from "vitest";
import type { Ctx } from "@/db/context";
import { saveDraft } from "@/db/queries/drafts";
import { createLine, deleteLine, getLine, listLines, renameLine } from "@/db/queries/lines";
import { storeResult } from "@/db/queries/results";
import { deleteScenario, getScenario, markBase, renameScenario, saveAsScenario } from "@/db/queries/scenarios";
import { createShare, revokeShare } from "@/db/queries/shares";
import { getVersion, keepVersion } from "@/db/queries/versions";
import { line, logEntry, scenario, scenarioVersion } from "@/db/schema";
import { emptyDatabase } from "../helpers/database";
import { makeLine, makePlant, shortRun, smallLine, type Plant } from "../helpers/plant";
import { runDocument } from "../helpers/result";

let plant: Plant;
let ctx: Ctx;
let stranger: Ctx;
let lineId: string;
let base: string;

beforeEach(async () => {
  const db = await emptyDatabase();
  plant = await makePlant(db);
  ctx = plant.as("engineer");
  stranger = (await makePlant(db)).as("owner");
  const made = await makeLine(ctx);
  lineId = made.id;
  base = made.scenarios[0].id;
});

const edited = (size: number, revision = 1) => ({
  revision,
  document: smallLine("Hub motor line", size),
  layout: { positions: {} },
  notes: [],
  options: shortRun,
});
const saveAs = (name: string, as = ctx) => saveAsScenario(as, { lineId, fromScenarioId: base, name });

describe("createLine", () => {
  it("begins with a base scenario kept as version 1", async () => {
    const detail = await getLine(ctx, lineId);

    expect(detail).toMatchObject({ name: "Hub motor line", role: "engineer", workspaceId: ctx.workspaceId });
    expect(detail.scenarios).toMatchObject([{ name: "Base", isBase: true, nVersions: 1, reading: null }]);
    expect((await getScenario(ctx, base)).kept).toMatchObject({
      number: 1,
      digest: expect.stringMatching(/^[0-9a-f]{64}$/),
    });
  });

  it("lists lines of the own workspace only, the latest changed first", async () => {
    await createLine(ctx, {
      name: "Charger line",
      sheet: { document: smallLine(), layout: { positions: {} }, notes: [] },
    });
    await saveDraft(ctx, base, edited(12));

    expect((await listLines(ctx)).map(({ name }) => name)).toEqual(["Hub motor line", "Charger line"]);
    expect(await listLines(stranger)).toEqual([]);
  });
});

describe("renameLine and deleteLine", () => {
  it("leave another workspace's line as not found", async () => {
    await expect(getLine(stranger, lineId)).rejects.toMatchObject({ code: "not-found" });
    await expect(renameLine(stranger, { lineId, name: "Mine" })).rejects.toMatchObject({ code: "not-found" });
    await expect(deleteLine(stranger, { lineId })).rejects.toMatchObject({ code: "not-found" });
    expect((await getLine(ctx, lineId)).name).toBe("Hub motor line");
  });

  it("delete scenarios and versions with the line and leave a trace in the log", async () => {
    await deleteLine(plant.as("owner"), { lineId });

    expect(await ctx.db.select().from(line)).toEqual([]);
    expect(await ctx.db.select().from(scenario)).toEqual([]);
    expect(await ctx.db.select().from(scenarioVersion)).toEqual([]);
    expect((await ctx.db.select().from(logEntry)).map(({ text }) => text)).toContain(
      'deleted the line "Hub motor line"',
    );
  });
});

describe("keepVersion", () => {
  it("numbers versions and leaves the ones before untouched", async () => {
    await saveDraft(ctx, base, edited(12));
    const second = await keepVersion(ctx, { scenarioId: base, revision: 2 });

    const { versions, kept } = await getScenario(ctx, base);
    expect(versions.map(({ number }) => number)).toEqual([2, 1]);
    expect(kept.id).toBe(second.id);
    const first = await getVersion(ctx, versions[1].id);
    expect(first.document).toEqual(smallLine());
    expect(kept.document).toEqual(smallLine("Hub motor line", 12));
  });

  it("makes no version of a draft that is kept already", async () => {
    expect((await keepVersion(ctx, { scenarioId: base, revision: 1 })).number).toBe(1);
  });

  it("refuses a draft that somebody else has changed since", async () => {
    await saveDraft(ctx, base, edited(12));

    await expect(keepVersion(ctx, { scenarioId: base, revision: 1 })).rejects.toMatchObject({ code: "stale" });
    expect((await getScenario(ctx, base)).versions).toHaveLength(1);
  });

  it("reads another workspace's scenario and version as not found", async () => {
    const { kept } = await getScenario(ctx, base);
    await expect(keepVersion(stranger, { scenarioId: base, revision: 1 })).rejects.toMatchObject({ code: "not-found" });
    await expect(getVersion(stranger, kept.id)).rejects.toMatchObject({ code: "not-found" });
    await expect(getScenario(stranger, base)).rejects.toMatchObject({ code: "not-found" });
  });
});

describe("saveAsScenario", () => {
  it("takes the draft, or what is given in its place, and keeps it", async () => {
    await saveDraft(ctx, base, edited(12));
    const copy = await saveAs("Copy");
    const other = await saveAsScenario(ctx, {
      lineId,
      fromScenarioId: base,
      name: "Larger",
      document: smallLine("Hub motor line", 30),
    });

    expect((await getScenario(ctx, copy.id)).kept.document).toEqual(smallLine("Hub motor line", 12));
    expect((await getScenario(ctx, other.id)).draft.document).toEqual(smallLine("Hub motor line", 30));
    expect(other).toMatchObject({ isBase: false, nVersions: 1 });
  });

  it("refuses a name that the line has, whatever its case", async () => {
    await saveAs("More boards");

    await expect(saveAs("more BOARDS")).rejects.toMatchObject({
      code: "conflict",
      fields: { name: expect.any(String) },
    });
    const { id } = await saveAs("Other");
    await expect(renameScenario(ctx, { scenarioId: id, name: "More boards" })).rejects.toMatchObject({
      code: "conflict",
    });
  });

  it("takes no scenario of another line or workspace", async () => {
    const other = await makeLine(ctx, smallLine("Charger line"));
    const input = { lineId: other.id, fromScenarioId: base, name: "Mixed" };
    await expect(saveAsScenario(ctx, input)).rejects.toMatchObject({ code: "not-found" });
    await expect(saveAs("Theirs", stranger)).rejects.toMatchObject({ code: "not-found" });
  });
});

describe("markBase", () => {
  it("leaves exactly one base", async () => {
    const { id } = await saveAs("Larger");
    await markBase(ctx, { scenarioId: id });

    const { scenarios } = await getLine(ctx, lineId);
    expect(scenarios.map(({ name, isBase }) => [name, isBase])).toEqual([
      ["Larger", true],
      ["Base", false],
    ]);
  });

  it("is refused a second base by the database itself", async () => {
    const { id } = await saveAs("Larger");
    await expect(ctx.db.update(scenario).set({ isBase: true })).rejects.toThrow();
    await expect(markBase(stranger, { scenarioId: id })).rejects.toMatchObject({ code: "not-found" });
  });
});

describe("deleteScenario", () => {
  it("refuses the base, which is also the last one", async () => {
    await expect(deleteScenario(ctx, { scenarioId: base })).rejects.toMatchObject({ code: "conflict" });
  });

  it("lets an engineer delete their own and an owner any", async () => {
    const owner = plant.as("owner");
    const { id: own } = await saveAs("Own");
    const { id: another } = await saveAs("Another");
    const { id: ofOwner } = await saveAs("Owner's", owner);

    await deleteScenario(ctx, { scenarioId: own });
    await expect(deleteScenario(ctx, { scenarioId: ofOwner })).rejects.toMatchObject({ code: "forbidden" });
    await deleteScenario(owner, { scenarioId: another });
    expect((await getLine(ctx, lineId)).scenarios.map(({ name }) => name).sort()).toEqual(["Base", "Owner's"]);
  });

  it("refuses a scenario that an open link shows until the link is revoked", async () => {
    const { id } = await saveAs("Shown");
    const { kept } = await getScenario(ctx, id);
    await storeResult(ctx, { scenarioId: id, ...runDocument(smallLine(), shortRun) });
    const link = await createShare(ctx, { kind: "version", versionIds: [kept.id], days: 30 });

    await expect(deleteScenario(ctx, { scenarioId: id })).rejects.toMatchObject({ code: "conflict" });
    await revokeShare(ctx, { shareId: link.id });
    await deleteScenario(ctx, { scenarioId: id });
    expect((await getLine(ctx, lineId)).scenarios).toHaveLength(1);
  });

  it("reads another workspace's scenario as not found", async () => {
    const { id } = await saveAs("Larger");
    await expect(deleteScenario(stranger, { scenarioId: id })).rejects.toMatchObject({ code: "not-found" });
    await expect(renameScenario(stranger, { scenarioId: id, name: "x" })).rejects.toMatchObject({ code: "not-found" });
  });
});
