import { eq } from "drizzle-orm";
import { parseLine } from "@/lib/line";
import { defaultOptions } from "@/lib/schema/lines";
import { encodeResult, simulate } from "@/lib/simulation";
import type { Ctx, Db } from "./context";
import type { DemoAccount } from "./demo-accounts";
import { createLine } from "./queries/lines";
import { storeResult } from "./queries/results";
import { getScenario, saveAsScenario } from "./queries/scenarios";
import { account, member, organization, user } from "./schema";
import { batteryPackSheet, driveUnitSheet, largerStocks } from "./seed-lines";

const workspace = { name: "Larkfield Drives", slug: "larkfield-drives" };

/**
 * Puts the demo plant into a database, all or nothing; one that has it is left alone, with all that was changed since.
 * @param hashPassword - As the sign-in does it.
 * @returns Whether anything was added.
 */
export async function seedDemo(
  db: Db,
  accounts: DemoAccount[],
  hashPassword: (password: string) => Promise<string>,
): Promise<boolean> {
  const [present] = await db
    .select({ id: organization.id })
    .from(organization)
    .where(eq(organization.slug, workspace.slug));
  if (present) return false;
  const hashes = await Promise.all(accounts.map(({ password }) => hashPassword(password)));
  await db.transaction(async (tx) => {
    const workspaceId = crypto.randomUUID();
    const createdAt = new Date();
    await tx.insert(organization).values({ ...workspace, id: workspaceId, createdAt });
    const ids = new Map<string, string>();
    for (const [i, { name, email, role }] of accounts.entries()) {
      const userId = crypto.randomUUID();
      ids.set(role, userId);
      await tx.insert(user).values({ id: userId, name, email, emailVerified: true });
      await tx.insert(account).values({
        id: crypto.randomUUID(),
        accountId: userId,
        providerId: "credential",
        userId,
        password: hashes[i],
      });
      await tx.insert(member).values({ id: crypto.randomUUID(), organizationId: workspaceId, userId, role, createdAt });
    }
    const engineer = accounts.find(({ role }) => role === "engineer");
    if (!engineer) throw new Error("the demo needs an engineer");
    const ctx: Ctx = {
      db: tx,
      userId: ids.get("engineer")!,
      userName: engineer.name,
      workspaceId,
      role: "engineer",
    };
    await seedLines(ctx);
  });
  return true;
}

async function seedLines(ctx: Ctx): Promise<void> {
  const battery = batteryPackSheet();
  await createLine(ctx, { name: battery.document.name, sheet: battery });
  const sheet = driveUnitSheet(ctx.userName, new Date().toISOString());
  const { id: lineId, scenarios } = await createLine(ctx, { name: sheet.document.name, sheet });
  const base = scenarios[0].id;
  const { id: second } = await saveAsScenario(ctx, {
    lineId,
    fromScenarioId: base,
    name: "More boards and gear sets",
    ...largerStocks(sheet),
  });
  for (const scenarioId of [base, second]) await runAndStore(ctx, scenarioId);
}

/** The scenario's own full run, so that the demo shows figures that were computed and nothing else. */
async function runAndStore(ctx: Ctx, scenarioId: string): Promise<void> {
  const { kept } = await getScenario(ctx, scenarioId);
  const parsed = parseLine(kept.document);
  if ("faults" in parsed || !kept.digest) throw new Error("the demo line cannot run");
  const { replications, weeks, warmupWeeks, targetFillRate, seed } = defaultOptions;
  const run = simulate(parsed.line, { replications, weeks, warmupWeeks, targetFillRate, seed });
  await storeResult(ctx, { scenarioId, digest: kept.digest, bytes: encodeResult(run) });
}
