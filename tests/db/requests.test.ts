import { beforeEach, describe, expect, it, vi } from "vitest";
import { createLineAction } from "@/app/(app)/lines/actions";
import { createShareAction, saveAsScenarioAction } from "@/app/(app)/lines/[lineId]/actions";
import { GET as exportRoute } from "@/app/api/lines/[lineId]/export/route";
import { PUT as draftRoute } from "@/app/api/scenarios/[id]/draft/route";
import { POST as resultsRoute } from "@/app/api/scenarios/[id]/results/route";
import { GET as sharedResultRoute } from "@/app/s/[token]/results/[n]/route";
import type { Ctx } from "@/db/context";
import { storeResult } from "@/db/queries/results";
import { getScenario } from "@/db/queries/scenarios";
import { createShare, revokeShare } from "@/db/queries/shares";
import { emptyDatabase } from "../helpers/database";
import { setHeaders } from "../helpers/next-headers";
import { makeLine, makePlant, shortRun, smallLine } from "../helpers/plant";
import { json, makeRequest, octets } from "../helpers/request";
import { runDocument } from "../helpers/result";

vi.mock("next/headers", () => import("../helpers/next-headers"));
vi.mock("next/cache", () => ({ refresh: () => undefined }));
vi.mock("next/server", async (original) => ({ ...(await original<object>()), connection: async () => undefined }));

let ctx: Ctx;
let session: Headers;
let lineId: string;
let scenarioId: string;
const reading = runDocument(smallLine(), shortRun);
const draft = {
  revision: 1,
  document: smallLine("Hub motor line", 9),
  layout: { positions: {} },
  notes: [],
  options: shortRun,
};

beforeEach(async () => {
  const plant = await makePlant(await emptyDatabase());
  ctx = plant.as("engineer");
  session = await plant.headersOf("engineer");
  const line = await makeLine(ctx);
  lineId = line.id;
  scenarioId = line.scenarios[0].id;
});

const params = () => ({ params: Promise.resolve({ id: scenarioId }) });
const put = (init: RequestInit) => draftRoute(makeRequest("/api/x", session, init), params());
const post = (init: RequestInit) => resultsRoute(makeRequest("/api/x", session, init), params());

describe("PUT draft", () => {
  it("answers with the new revision, then 409 with the draft in between", async () => {
    const first = await put(json("PUT", draft));
    expect(first.status).toBe(200);
    expect(first.headers.get("cache-control")).toBe("private, no-store");
    expect(await first.json()).toMatchObject({ revision: 2, updatedBy: ctx.userName });

    const second = await put(json("PUT", { ...draft, document: smallLine("Hub motor line", 20) }));
    expect(second.status).toBe(409);
    expect(await second.json()).toMatchObject({
      code: "stale",
      current: { revision: 2 },
      differs: [expect.any(String)],
    });
  });

  const withDocument = (change: object) => json("PUT", { ...draft, document: { ...draft.document, ...change } });
  it.each<[string, number, () => RequestInit]>([
    ["text that is no JSON", 422, () => ({ ...json("PUT", draft), body: "{" })],
    ["bytes that are no UTF-8", 422, () => ({ ...json("PUT", draft), body: new Uint8Array([0xff, 0xfe]) })],
    ["another content type", 422, () => ({ ...json("PUT", draft), headers: { "content-type": "text/plain" } })],
    ["null", 422, () => json("PUT", null)],
    ["a missing document", 422, () => json("PUT", { ...draft, document: undefined })],
    ["a node of an unknown kind", 422, () => withDocument({ nodes: [{ kind: "robot", id: "r", name: "R" }] })],
    [
      "text where a number belongs",
      422,
      () => withDocument({ calendar: { ...draft.document.calendar, tickMinutes: "6" } }),
    ],
    [
      "5 000 nodes",
      422,
      () =>
        withDocument({ nodes: Array.from({ length: 5000 }, (_, i) => ({ ...draft.document.nodes[3], id: `b${i}` })) }),
    ],
    ["a million replications", 422, () => json("PUT", { ...draft, options: { ...shortRun, replications: 1_000_000 } })],
    [
      "too many weeks in all",
      422,
      () => json("PUT", { ...draft, options: { ...shortRun, replications: 20_000, weeks: 5_000 } }),
    ],
    [
      "a body above the limit",
      413,
      () => ({ ...json("PUT", draft), body: JSON.stringify({ ...draft, pad: "x".repeat(4_000_000) }) }),
    ],
    [
      "another site's origin",
      403,
      () => ({
        ...json("PUT", draft),
        headers: { "content-type": "application/json", origin: "https://elsewhere.example" },
      }),
    ],
    [
      "an opaque origin",
      403,
      () => ({ ...json("PUT", draft), headers: { "content-type": "application/json", origin: "null" } }),
    ],
  ])("refuses %s", async (_, status, init) => {
    const response = await put(init());

    expect(response.status).toBe(status);
    expect(await response.json()).toMatchObject({ code: expect.any(String), message: expect.any(String) });
    expect((await getScenario(ctx, scenarioId)).draft.revision).toBe(1);
  });

  it("names the limit on nodes", async () => {
    const nodes = Array.from({ length: 501 }, (_, i) => ({ ...draft.document.nodes[3], id: `b${i}` }));
    const { message } = (await (await put(withDocument({ nodes }))).json()) as { message: string };
    expect(message).toContain("500");
  });

  it("refuses a request without an origin", async () => {
    const request = makeRequest("/api/x", session, json("PUT", draft));
    const { "content-type": type } = { "content-type": "application/json" };
    const bare = new Request(request.url, {
      method: "PUT",
      headers: { "content-type": type, host: "localhost:3000" },
      body: "{}",
    });
    expect((await draftRoute(bare, params())).status).toBe(403);
  });
});

describe("POST results", () => {
  it("stores and answers with the figures", async () => {
    const response = await post(octets(reading.bytes, reading.digest));
    expect(response.status).toBe(201);
    expect(await response.json()).toMatchObject({ weeks: 100, engine: reading.run.engine });
  });

  it.each<[string, number, () => RequestInit]>([
    ["no digest", 422, () => octets(reading.bytes, "")],
    ["a digest of nothing here", 409, () => octets(reading.bytes, "0".repeat(64))],
    ["noise", 422, () => octets(new Uint8Array(5_000).fill(7), reading.digest)],
    ["nothing", 422, () => octets(new Uint8Array(), reading.digest)],
    ["more than 8 MB", 413, () => octets(new Uint8Array(8_000_001), reading.digest)],
    ["JSON", 422, () => json("POST", {})],
  ])("refuses %s", async (_, status, init) => {
    expect((await post(init())).status).toBe(status);
    expect((await getScenario(ctx, scenarioId)).draftReading).toBeNull();
  });
});

describe("GET export", () => {
  const get = (query: string) =>
    exportRoute(makeRequest(`/api/x${query}`, session), { params: Promise.resolve({ lineId }) });

  it("gives a file that a new line can start from", async () => {
    const response = await get("");
    expect(response.headers.get("content-disposition")).toBe('attachment; filename="hub-motor-line-base.json"');
    const text = await response.text();

    const made = await createLineAction({ name: "Brought in", from: text });
    if (!made.ok) throw new Error(made.message);
    expect((await getScenario(ctx, made.value.scenarios[0].id)).draft.document).toEqual(smallLine());
  });

  it("knows no scenario of another line", async () => {
    const other = await makeLine(ctx, smallLine("Charger line"));
    expect((await get(`?scenario=${other.scenarios[0].id}`)).status).toBe(404);
  });
});

describe("actions", () => {
  beforeEach(() => setHeaders(session));

  it("start a line from the example", async () => {
    const made = await createLineAction({ name: "Drive units", from: "example" });
    if (!made.ok) throw new Error(made.message);
    const { draft: begun } = await getScenario(ctx, made.value.scenarios[0].id);
    expect(begun.document.nodes.length).toBeGreaterThan(20);
    expect(Object.keys(begun.layout.positions)).toHaveLength(begun.document.nodes.length);
  });

  it.each([
    ["a name of blanks", { name: "   ", from: "empty" }],
    ["text that is no JSON", { name: "New", from: "{" }],
    ["JSON that is no line", { name: "New", from: "[1, 2]" }],
    ["no object", null],
  ])("refuse %s with a reason and change nothing", async (_, input) => {
    const result = await createLineAction(input as never);
    expect(result).toMatchObject({ ok: false, code: "invalid", message: expect.any(String) });
  });

  it("refuse links of odd kinds", async () => {
    const { kept } = await getScenario(ctx, scenarioId);
    for (const input of [
      { kind: "version", versionIds: [] },
      { kind: "version", versionIds: [kept.id, kept.id] },
      { kind: "comparison", versionIds: [kept.id] },
      { kind: "version", versionIds: [kept.id], days: 0 },
      { kind: "version", versionIds: [kept.id], days: 366 },
      { kind: "decision", versionIds: [kept.id] },
    ]) {
      expect(await createShareAction(input as never)).toMatchObject({ ok: false, code: "invalid" });
    }
  });

  it("say which field is at fault", async () => {
    const result = await saveAsScenarioAction({ lineId, fromScenarioId: scenarioId, name: "Base" });
    expect(result).toMatchObject({ ok: false, code: "conflict", fields: { name: expect.any(String) } });
  });
});

describe("GET shared result", () => {
  const get = (token: string, n: string) =>
    sharedResultRoute(new Request("http://localhost:3000/s/x"), { params: Promise.resolve({ token, n }) });

  it("gives the bytes without a session and nothing once the link is revoked", async () => {
    await storeResult(ctx, { scenarioId, ...reading });
    const { kept } = await getScenario(ctx, scenarioId);
    const link = await createShare(ctx, { kind: "version", versionIds: [kept.id], days: 1 });
    const token = link.url.replace("/s/", "");
    setHeaders(new Headers());

    const open = await get(token, "0");
    expect(new Uint8Array(await open.arrayBuffer())).toEqual(reading.bytes);
    expect(open.headers.get("referrer-policy")).toBe("no-referrer");
    expect(open.headers.get("x-robots-tag")).toContain("noindex");
    expect(open.headers.get("cache-control")).toBe("private, no-store");
    expect((await get(token, "1")).status).toBe(404);
    expect((await get(token, "../0")).status).toBe(404);
    expect((await get("unknown", "0")).status).toBe(404);

    await revokeShare(ctx, { shareId: link.id });
    const closed = await get(token, "0");
    expect(closed.status).toBe(410);
    expect(await closed.json()).toEqual({ code: "expired", message: "This link was revoked." });
  });
});
