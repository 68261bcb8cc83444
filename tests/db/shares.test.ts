import { eq } from "drizzle-orm";
import { beforeEach, describe, expect, it } from "vitest";
import type { Ctx } from "@/db/context";
import { saveDraft } from "@/db/queries/drafts";
import { renameLine } from "@/db/queries/lines";
import { storeResult } from "@/db/queries/results";
import { getScenario, saveAsScenario } from "@/db/queries/scenarios";
import { createShare, findSharedPage, findSharedResult, listShares, revokeShare } from "@/db/queries/shares";
import { hashToken } from "@/db/queries/share-token";
import { share } from "@/db/schema";
import type { Sweep } from "@/lib/schema/lines";
import { emptyDatabase } from "../helpers/database";
import { makeLine, makePlant, shortRun, smallLine } from "../helpers/plant";
import { runDocument } from "../helpers/result";

let ctx: Ctx;
let stranger: Ctx;
let lineId: string;
let scenarioId: string;
let versionId: string;
const reading = runDocument(smallLine(), shortRun);

beforeEach(async () => {
  const db = await emptyDatabase();
  ctx = (await makePlant(db)).as("engineer");
  stranger = (await makePlant(db)).as("owner");
  const line = await makeLine(ctx);
  lineId = line.id;
  scenarioId = line.scenarios[0].id;
  await storeResult(ctx, { scenarioId, ...reading });
  versionId = (await getScenario(ctx, scenarioId)).kept.id;
});

const shareOne = (days = 30) => createShare(ctx, { kind: "version", versionIds: [versionId], days });
const tokenOf = ({ url }: { url: string }) => url.replace("/s/", "");
async function open(token: string) {
  const page = await findSharedPage(ctx.db, token);
  if ("gone" in page) throw new Error(`the link is ${page.gone}`);
  return page;
}

const figure = { value: 0.9, halfWidth: 0.01 };
const sweep: Sweep = {
  bufferId: "wound",
  bufferName: "Wound hubs",
  unit: "units",
  currentSize: 8,
  rows: [4, 8, 16].map((size) => ({
    size,
    gain: size === 4 ? null : figure,
    p05: figure,
    p10: figure,
    p50: figure,
    atRisk: figure,
    risk: figure,
    moneyTiedUp: { value: 900, halfWidth: 4 },
    costPerYear: { value: 1200, halfWidth: null },
  })),
};

describe("createShare", () => {
  it("gives an unguessable address once and stores only its hash, for 30 days", async () => {
    const token = tokenOf(await shareOne());

    expect(token).toMatch(/^[A-Za-z0-9_-]{43}$/);
    const [row] = await ctx.db.select().from(share);
    expect(row.tokenHash).toBe(hashToken(token));
    expect(JSON.stringify(row)).not.toContain(token);
    expect((row.expiresAt.getTime() - row.createdAt.getTime()) / 86_400_000).toBeCloseTo(30, 2);
  });

  it("refuses a version without a stored result", async () => {
    const { id } = await saveAsScenario(ctx, {
      lineId,
      fromScenarioId: scenarioId,
      name: "Not run",
      document: smallLine("Hub motor line", 30),
    });
    const { kept } = await getScenario(ctx, id);

    await expect(createShare(ctx, { kind: "version", versionIds: [kept.id], days: 30 })).rejects.toMatchObject({
      code: "conflict",
    });
  });

  it("refuses versions of two lines, of another workspace, and sizes of an unknown buffer", async () => {
    const other = await makeLine(ctx, smallLine("Charger line"));
    const otherScenario = other.scenarios[0].id;
    await storeResult(ctx, { scenarioId: otherScenario, ...runDocument(smallLine("Charger line"), shortRun) });
    const { kept } = await getScenario(ctx, otherScenario);
    const both = { kind: "comparison" as const, versionIds: [versionId, kept.id], days: 30 };

    await expect(createShare(ctx, both)).rejects.toMatchObject({ code: "invalid" });
    await expect(createShare(stranger, { ...both, versionIds: [versionId] })).rejects.toMatchObject({
      code: "not-found",
    });
    await expect(
      createShare(ctx, { ...both, versionIds: [versionId], sweep: { ...sweep, bufferId: "none" } }),
    ).rejects.toMatchObject({ code: "invalid" });
  });
});

describe("findSharedPage", () => {
  it("shows what was frozen, whatever changes afterwards", async () => {
    const token = tokenOf(await shareOne());
    await renameLine(ctx, { lineId, name: "Renamed" });
    await saveDraft(ctx, scenarioId, {
      revision: 1,
      document: smallLine("Hub motor line", 99),
      layout: { positions: {} },
      notes: [],
      options: shortRun,
    });

    const page = await open(token);

    expect(page).toMatchObject({ kind: "version", lineName: "Hub motor line", sharedBy: ctx.userName, sweep: null });
    expect(page.versions).toHaveLength(1);
    expect(page.versions[0]).toMatchObject({ number: 1, scenarioName: "Base", document: smallLine() });
    expect(page.versions[0].reading?.weeks).toBe(100);
  });

  it("shows no ids of rows and no e-mail addresses", async () => {
    const text = JSON.stringify(await open(tokenOf(await shareOne())));

    for (const secret of [versionId, scenarioId, lineId, ctx.workspaceId, "@"]) expect(text).not.toContain(secret);
  });

  it("counts views", async () => {
    const token = tokenOf(await shareOne());
    await open(token);
    await open(token);

    expect((await listShares(ctx, lineId)).map(({ nViews }) => nViews)).toEqual([2]);
  });

  it("keeps a comparison of sizes as it was", async () => {
    const link = await createShare(ctx, { kind: "comparison", versionIds: [versionId], sweep, days: 7 });

    expect((await open(tokenOf(link))).sweep).toEqual(sweep);
  });

  it("says of a link whether it is unknown, expired or revoked, and reveals nothing more", async () => {
    const revoked = await shareOne();
    await revokeShare(ctx, { shareId: revoked.id });
    const expired = await shareOne();
    await ctx.db
      .update(share)
      .set({ expiresAt: new Date(Date.now() - 1000) })
      .where(eq(share.id, expired.id));

    expect(await findSharedPage(ctx.db, tokenOf(revoked))).toEqual({ gone: "revoked" });
    expect(await findSharedPage(ctx.db, tokenOf(expired))).toEqual({ gone: "expired" });
    expect(await findSharedPage(ctx.db, "A".repeat(43))).toEqual({ gone: "unknown" });
    expect(await findSharedPage(ctx.db, "' or 1=1 --")).toEqual({ gone: "unknown" });
    expect(await findSharedResult(ctx.db, tokenOf(revoked), 0)).toEqual({ gone: "revoked" });
    expect(await findSharedResult(ctx.db, tokenOf(expired), 0)).toEqual({ gone: "expired" });
  });
});

describe("findSharedResult", () => {
  it("gives the bytes of a version by its place and nothing beyond", async () => {
    const token = tokenOf(await shareOne());

    expect(await findSharedResult(ctx.db, token, 0)).toEqual(reading.bytes);
    expect(await findSharedResult(ctx.db, token, 1)).toBeNull();
  });
});

describe("revokeShare", () => {
  it("keeps the first moment of revoking and reads another workspace's link as not found", async () => {
    const { id } = await shareOne();
    await expect(revokeShare(stranger, { shareId: id })).rejects.toMatchObject({ code: "not-found" });
    expect((await listShares(ctx, lineId))[0].revokedAt).toBeNull();
    expect(await listShares(stranger, lineId)).toEqual([]);

    const first = await revokeShare(ctx, { shareId: id });
    expect(first.revokedAt).not.toBeNull();
    expect((await revokeShare(ctx, { shareId: id })).revokedAt).toBe(first.revokedAt);
  });
});
