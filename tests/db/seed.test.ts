import { beforeAll, describe, expect, it } from "vitest";
import { demoAccounts } from "@/db/demo-accounts";
import type { Ctx, Db } from "@/db/context";
import { listLines } from "@/db/queries/lines";
import { getScenario, listScenarios } from "@/db/queries/scenarios";
import { getResultBytes } from "@/db/queries/results";
import { seedDemo } from "@/db/seed";
import { organization, user } from "@/db/schema";
import { decodeResult } from "@/lib/simulation";
import { emptyDatabase } from "../helpers/database";

let db: Db;
const accounts = (() => {
  process.env.APP_LOCAL = "1";
  const shown = demoAccounts();
  delete process.env.APP_LOCAL;
  return shown;
})();
const hash = async (password: string) => `hash of ${password}`;

beforeAll(async () => {
  db = await emptyDatabase();
  await seedDemo(db, accounts, hash);
}, 300_000);

async function asEngineer(): Promise<Ctx> {
  const [{ id: workspaceId }] = await db.select().from(organization);
  const { id: userId, name: userName } = (await db.select().from(user)).find(({ name }) => name === "Ines Kallweit")!;
  return { db, userId, userName, workspaceId, role: "engineer" };
}

describe("seedDemo", () => {
  it("shows a plant with a line that was run, a second scenario and a line with gaps", async () => {
    const ctx = await asEngineer();
    const [drive, battery] = await listLines(ctx);
    expect(drive.name).toBe("Drive unit line");
    expect(drive.faults).toEqual([]);
    expect(battery.name).toBe("Battery pack line");
    expect(battery.faults.length).toBeGreaterThan(0);
    expect(battery.reading).toBeNull();

    const [base, more] = await listScenarios(ctx, drive.id);
    expect(base.isBase).toBe(true);
    expect(more.name).toBe("More boards and gear sets");
    expect(base.reading?.weeks).toBe(10_000);
    // More stock of the two critical parts ties up more money.
    expect(more.reading!.moneyTiedUp.value).toBeGreaterThan(base.reading!.moneyTiedUp.value);

    const { draft, draftReading } = await getScenario(ctx, base.id);
    expect(Object.keys(draft.layout.positions)).toHaveLength(draft.document.nodes.length);
    const run = decodeResult(await getResultBytes(ctx, draftReading!.resultId));
    expect(run.fillRates).toHaveLength(10_000);
  });

  it("leaves a plant alone that is there already", async () => {
    expect(await seedDemo(db, accounts, hash)).toBe(false);
    expect(await listLines(await asEngineer())).toHaveLength(2);
  });

  it("shows no passwords outside the demo", () => {
    expect(accounts).toHaveLength(4);
    expect(demoAccounts()).toEqual([]);
  });
});
