import { beforeAll, beforeEach, describe, expect, it, vi } from "vitest";
import * as lineActions from "@/app/(app)/lines/[lineId]/actions";
import * as linesActions from "@/app/(app)/lines/actions";
import { GET as getLineRoute } from "@/app/api/lines/[lineId]/route";
import { GET as exportRoute } from "@/app/api/lines/[lineId]/export/route";
import { GET as sharesRoute } from "@/app/api/lines/[lineId]/shares/route";
import { GET as linesRoute } from "@/app/api/lines/route";
import { GET as resultRoute } from "@/app/api/results/[id]/route";
import { PUT as draftRoute } from "@/app/api/scenarios/[id]/draft/route";
import { POST as resultsRoute } from "@/app/api/scenarios/[id]/results/route";
import { GET as scenarioRoute } from "@/app/api/scenarios/[id]/route";
import { GET as versionRoute } from "@/app/api/versions/[id]/route";
import type { Ctx } from "@/db/context";
import { storeResult } from "@/db/queries/results";
import { getScenario, saveAsScenario } from "@/db/queries/scenarios";
import { createShare } from "@/db/queries/shares";
import { logEntry, scenario, scenarioVersion, share } from "@/db/schema";
import type { ActionResult } from "@/lib/errors";
import type { Role } from "@/lib/schema/roles";
import { emptyDatabase } from "../helpers/database";
import { setHeaders } from "../helpers/next-headers";
import { makeLine, makePlant, shortRun, smallLine, type Plant } from "../helpers/plant";
import { json, makeRequest, octets } from "../helpers/request";
import { runDocument } from "../helpers/result";

vi.mock("next/headers", () => import("../helpers/next-headers"));
vi.mock("next/cache", () => ({ refresh: () => undefined }));

type Rows = {
  lineId: string;
  scenarioId: string;
  otherId: string;
  versionId: string;
  resultId: string;
  shareId: string;
};
type Outcome = "done" | "forbidden" | "not-found" | "unauthenticated";
const roles = ["owner", "engineer", "manager", "viewer"] as const;

const reading = runDocument(smallLine(), shortRun);
let plant: Plant;
let outsider: Headers;
let rows: Rows;
const sessions = new Map<Role, Headers>();

/** Everything that the matrix tries is made anew by the engineer, so that "own" means theirs. */
async function makeRows(ctx: Ctx): Promise<Rows> {
  const line = await makeLine(ctx);
  const scenarioId = line.scenarios[0].id;
  const { resultId } = await storeResult(ctx, { scenarioId, ...reading });
  const { id: otherId } = await saveAsScenario(ctx, { lineId: line.id, fromScenarioId: scenarioId, name: "Other" });
  const versionId = (await getScenario(ctx, scenarioId)).kept.id;
  const { id: shareId } = await createShare(ctx, { kind: "version", versionIds: [versionId], days: 30 });
  return { lineId: line.id, scenarioId, otherId, versionId, resultId, shareId };
}

const draft = {
  revision: 1,
  document: smallLine("Hub motor line", 9),
  layout: { positions: {} },
  notes: [],
  options: shortRun,
};
const everyone: readonly Role[] = roles;
const editors: readonly Role[] = ["owner", "engineer"];

type Case = {
  name: string;
  allowed: readonly Role[];
  /** False where the active workspace decides, so that an outsider acts in their own. */
  ofRow?: boolean;
  run(rows: Rows, session: Headers): Promise<Outcome>;
};

async function outcomeOf(response: Response): Promise<Outcome> {
  if (response.ok) return "done";
  const { code, message } = (await response.json()) as { code: Outcome; message: string };
  const statuses: Record<string, number> = { unauthenticated: 401, forbidden: 403, "not-found": 404 };
  expect(response.status).toBe(statuses[code]);
  expect(message.length).toBeGreaterThan(10);
  return code;
}

function action<T>(
  name: string,
  allowed: readonly Role[],
  call: (rows: Rows) => Promise<ActionResult<T>>,
  ofRow = true,
): Case {
  const run = async (target: Rows, session: Headers): Promise<Outcome> => {
    setHeaders(session);
    const result = await call(target);
    return result.ok ? "done" : (result.code as Outcome);
  };
  return { name, allowed, run, ofRow };
}

type Handler<P> = (request: Request, props: { params: Promise<P> }) => Promise<Response>;

function route<P>(
  name: string,
  allowed: readonly Role[],
  handler: Handler<P>,
  paramsOf: (rows: Rows) => P,
  init?: RequestInit,
): Case {
  const run = async (target: Rows, session: Headers) =>
    outcomeOf(await handler(makeRequest("/api/x", session, init), { params: Promise.resolve(paramsOf(target)) }));
  return { name, allowed, run };
}

const ofLine = ({ lineId }: Rows) => ({ lineId });
const ofScenario = ({ scenarioId }: Rows) => ({ id: scenarioId });

const cases: Case[] = [
  { ...route("GET lines", everyone, linesRoute, ofLine), ofRow: false },
  route("GET line", everyone, getLineRoute, ofLine),
  route("GET export", everyone, exportRoute, ofLine),
  route("GET shares", everyone, sharesRoute, ofLine),
  route("GET scenario", everyone, scenarioRoute, ofScenario),
  route("GET result", everyone, resultRoute, ({ resultId }) => ({ id: resultId })),
  route("GET version", everyone, versionRoute, ({ versionId }) => ({ id: versionId })),
  route("PUT draft", editors, draftRoute, ofScenario, json("PUT", draft)),
  route("POST result", editors, resultsRoute, ofScenario, octets(reading.bytes, reading.digest)),
  action("createLine", editors, () => linesActions.createLineAction({ name: "New", from: "empty" }), false),
  action("renameLine", editors, (r) => linesActions.renameLineAction({ lineId: r.lineId, name: "Renamed" })),
  action("deleteLine", ["owner"], (r) => linesActions.deleteLineAction({ lineId: r.lineId })),
  action("keepVersion", editors, (r) => lineActions.keepVersionAction({ scenarioId: r.scenarioId, revision: 1 })),
  action("saveAsScenario", editors, (r) =>
    lineActions.saveAsScenarioAction({ lineId: r.lineId, fromScenarioId: r.scenarioId, name: "Another" }),
  ),
  action("renameScenario", editors, (r) =>
    lineActions.renameScenarioAction({ scenarioId: r.otherId, name: "Renamed" }),
  ),
  action("deleteScenario", editors, (r) => lineActions.deleteScenarioAction({ scenarioId: r.otherId })),
  action("markBase", editors, (r) => lineActions.markBaseAction({ scenarioId: r.otherId })),
  action("createShare", editors, (r) => lineActions.createShareAction({ kind: "version", versionIds: [r.versionId] })),
  action("revokeShare", editors, (r) => lineActions.revokeShareAction({ shareId: r.shareId })),
];

beforeAll(async () => {
  const db = await emptyDatabase();
  plant = await makePlant(db);
  for (const role of roles) sessions.set(role, await plant.headersOf(role));
  outsider = await (await makePlant(db)).headersOf("owner");
});

beforeEach(async () => {
  rows = await makeRows(plant.as("engineer"));
});

/** All that a refused request could have changed. */
async function snapshot() {
  const { db } = plant.as("owner");
  const tables = [scenario, scenarioVersion, share, logEntry] as const;
  return Promise.all(tables.map((table) => db.select().from(table).orderBy(table.id)));
}

describe.each(cases)("$name", ({ allowed, run, ofRow = true }) => {
  it.each(roles)("as %s", async (role) => {
    const isAllowed = allowed.includes(role);
    const before = isAllowed ? null : await snapshot();

    expect(await run(rows, sessions.get(role)!)).toBe(isAllowed ? "done" : "forbidden");
    if (before) expect(await snapshot()).toEqual(before);
  });

  it("without a session", async () => {
    const before = await snapshot();

    expect(await run(rows, new Headers())).toBe("unauthenticated");
    expect(await snapshot()).toEqual(before);
  });

  if (!ofRow) return;

  it("as the owner of another workspace", async () => {
    const before = await snapshot();

    expect(await run(rows, outsider)).toBe("not-found");
    expect(await snapshot()).toEqual(before);
  });

  it("with ids that do not exist", async () => {
    const unknown = Object.fromEntries(Object.keys(rows).map((key) => [key, crypto.randomUUID()])) as Rows;

    expect(await run(unknown, sessions.get("owner")!)).toBe("not-found");
  });
});

it("has a case for every action", () => {
  const names = [...Object.keys(linesActions), ...Object.keys(lineActions)].map((name) => name.replace("Action", ""));
  for (const name of names) expect(cases.map((entry) => entry.name)).toContain(name);
});
