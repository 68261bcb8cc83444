import { eq } from "drizzle-orm";
import { beforeEach, describe, expect, it, vi } from "vitest";
import { POST as authPost } from "@/app/api/auth/[...all]/route";
import type { Db } from "@/db/context";
import { clearSignInAttempts, countSignInAttempt, mostAttempts, windowMinutes } from "@/db/queries/sign-in-attempts";
import { ensureWorkspace, findMembership } from "@/db/queries/workspaces";
import { account, member, organization, session, signInAttempt, user } from "@/db/schema";
import { getCtx } from "@/lib/auth/context";
import { safeNextPath } from "@/lib/auth/next-path";
import { emptyDatabase } from "../helpers/database";
import { setHeaders } from "../helpers/next-headers";
import { makePlant } from "../helpers/plant";
import { json, makeRequest } from "../helpers/request";

vi.mock("next/headers", () => import("../helpers/next-headers"));

let db: Db;
beforeEach(async () => {
  db = await emptyDatabase();
});

const call = (path: string, body: unknown, cookies = new Headers()) =>
  authPost(makeRequest(`/api/auth/${path}`, cookies, json("POST", body)), {
    params: Promise.resolve({ all: path.split("/") }),
  });
const email = "noor.vale@larkfield.example";
const password = "a long enough phrase";
const signUp = () => call("sign-up/email", { name: "Noor Vale", email, password });
const signIn = (given: string, as = email) => call("sign-in/email", { email: as, password: given });

function cookiesOf(response: Response): Headers {
  const cookie = response.headers
    .getSetCookie()
    .map((line) => line.split(";")[0])
    .join("; ");
  return new Headers({ cookie });
}

describe("sign-up", () => {
  it("makes a workspace of one's own and works in it at once", async () => {
    const response = await signUp();
    expect(response.status).toBe(200);

    const [workspace] = await db.select().from(organization);
    expect(workspace.name).toBe("Noor Vale's workspace");
    setHeaders(cookiesOf(response));
    expect(await getCtx()).toMatchObject({ workspaceId: workspace.id, role: "owner", userName: "Noor Vale" });
    const [{ activeOrganizationId }] = await db.select().from(session);
    expect(activeOrganizationId).toBe(workspace.id);
    const [{ password: stored }] = await db.select().from(account);
    expect(stored).not.toContain(password);
  });

  it("sets a cookie that scripts and other sites do not get", async () => {
    const [line] = (await signUp()).headers.getSetCookie();
    expect(line).toMatch(/HttpOnly/i);
    expect(line).toMatch(/SameSite=Lax/i);
  });

  it("refuses a password of 9 characters", async () => {
    const response = await call("sign-up/email", { name: "Noor Vale", email, password: "123456789" });
    expect(response.status).toBe(400);
    expect(await db.select().from(user)).toEqual([]);
  });
});

describe("sign-out", () => {
  it("ends the session", async () => {
    const cookies = cookiesOf(await signUp());
    expect((await call("sign-out", {}, cookies)).status).toBe(200);
    setHeaders(cookies);
    await expect(getCtx()).rejects.toMatchObject({ code: "unauthenticated" });
  });
});

describe("sign-in by account", () => {
  it("locks an account after too many attempts, also for the right password, and says for how long", async () => {
    await signUp();
    for (let i = 0; i < mostAttempts; i++) expect((await signIn("wrong password")).status).toBe(401);

    const refused = await signIn(password);
    expect(refused.status).toBe(429);
    expect(Number(refused.headers.get("retry-after"))).toBeGreaterThan(0);
    expect(await refused.json()).toMatchObject({ message: expect.stringContaining(`${windowMinutes} minutes`) });
  });

  it("says the same of an account that does not exist", async () => {
    await signUp();
    const known = await signIn("wrong password");
    const unknown = await signIn("wrong password", "nobody@larkfield.example");
    expect(unknown.status).toBe(known.status);
    expect(await unknown.json()).toEqual(await known.json());

    for (let i = 0; i < mostAttempts; i++) {
      await countSignInAttempt(db, "nobody@larkfield.example", new Date());
      await countSignInAttempt(db, email, new Date());
    }
    const lockedUnknown = await signIn("wrong password", "nobody@larkfield.example");
    const lockedKnown = await signIn("wrong password");
    expect(lockedUnknown.status).toBe(429);
    expect(await lockedUnknown.json()).toEqual(await lockedKnown.json());
  });

  it("forgets earlier attempts after a sign-in", async () => {
    await signUp();
    await signIn("wrong password");
    expect((await signIn(password)).status).toBe(200);
    expect(await db.select().from(signInAttempt)).toEqual([]);
  });
});

describe("countSignInAttempt", () => {
  const now = new Date("2026-03-02T08:00:00Z");

  it("lets attempts through again when the window has ended", async () => {
    for (let i = 0; i < mostAttempts; i++) expect(await countSignInAttempt(db, email, now)).toBe(0);
    expect(await countSignInAttempt(db, email, now)).toBe(windowMinutes * 60);
    const later = new Date(now.getTime() + windowMinutes * 60_000 + 1);
    expect(await countSignInAttempt(db, email, later)).toBe(0);
  });

  it("counts attempts made at the same time", async () => {
    const waits = await Promise.all(Array.from({ length: 15 }, () => countSignInAttempt(db, email, now)));
    expect(waits.filter((wait) => wait === 0)).toHaveLength(mostAttempts);
  });

  it("takes the same address in other letters as the same account", async () => {
    for (let i = 0; i < mostAttempts; i++) await countSignInAttempt(db, email, now);
    expect(await countSignInAttempt(db, ` ${email.toUpperCase()}`, now)).toBeGreaterThan(0);
    await clearSignInAttempts(db, email);
    expect(await countSignInAttempt(db, email, now)).toBe(0);
  });
});

describe("the library's other addresses", () => {
  it.each([
    "organization/create",
    "organization/invite-member",
    "organization/add-member",
    "organization/update-member-role",
    "organization/remove-member",
    "organization/delete",
    "organization/set-active",
    "update-user",
    "delete-user",
    "request-password-reset",
  ])("are closed: %s", async (path) => {
    const plant = await makePlant(db);
    const response = await call(
      path,
      { organizationId: plant.workspaceId, role: "owner" },
      await plant.headersOf("viewer"),
    );
    expect(response.status).toBe(404);
    expect((await db.select().from(member).where(eq(member.role, "owner"))).length).toBe(1);
  });

  it("refuse writes from other sites", async () => {
    const request = makeRequest("/api/auth/sign-in/email", new Headers(), {
      ...json("POST", { email, password }),
      headers: { "content-type": "application/json", origin: "https://elsewhere.example" },
    });
    expect((await authPost(request, { params: Promise.resolve({ all: ["sign-in", "email"] }) })).status).toBe(403);
  });

  it("answer malformed input without breaking", async () => {
    const request = makeRequest("/api/auth/sign-in/email", new Headers(), { ...json("POST", {}), body: "{" });
    const response = await authPost(request, { params: Promise.resolve({ all: ["sign-in", "email"] }) });
    expect(response.status).toBe(400);
  });
});

describe("ensureWorkspace", () => {
  it("makes one workspace for two sessions that begin together", async () => {
    await db.insert(user).values({ id: "u", name: "Noor Vale", email });
    const ids = await Promise.all([ensureWorkspace(db, "u"), ensureWorkspace(db, "u")]);
    expect(ids[0]).toBe(ids[1]);
    expect(await db.select().from(organization)).toHaveLength(1);
  });
});

describe("findMembership", () => {
  it("takes the strongest of several roles and none of unknown ones", async () => {
    const { workspaceId, as } = await makePlant(db, ["viewer"]);
    const { userId } = as("viewer");
    await db.update(member).set({ role: "viewer,engineer" });
    expect(await findMembership(db, userId, workspaceId)).toEqual({ workspaceId, role: "engineer" });
    await db.update(member).set({ role: "admin" });
    expect(await findMembership(db, userId, workspaceId)).toBeNull();
  });
});

describe("safeNextPath", () => {
  it.each([
    ["/lines/a/sketch?scenario=b", "/lines/a/sketch?scenario=b"],
    ["https://elsewhere.example", "/lines"],
    ["//elsewhere.example", "/lines"],
    ["/\\elsewhere.example", "/lines"],
    ["/\t/elsewhere.example", "/lines"],
    ["javascript:alert(1)", "/lines"],
    [undefined, "/lines"],
    [["/a"], "/lines"],
  ])("takes %j as %s", (next, path) => {
    expect(safeNextPath(next)).toBe(path);
  });
});
