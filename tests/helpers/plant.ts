import { betterAuth } from "better-auth";
import { drizzleAdapter } from "better-auth/adapters/drizzle";
import { testUtils, type TestHelpers } from "better-auth/plugins";
import type { Ctx, Db } from "@/db/context";
import { createLine } from "@/db/queries/lines";
import * as schema from "@/db/schema";
import { authOptions } from "@/lib/auth/options";
import { authSecret } from "@/lib/auth/secret";
import type { DraftLine } from "@/lib/line/types";
import type { LineDetail, ScenarioOptions } from "@/lib/schema/lines";
import type { Role } from "@/lib/schema/roles";

/** Few weeks: enough for a whole result, quick to run. */
export const shortRun: ScenarioOptions = {
  replications: 10,
  weeks: 10,
  warmupWeeks: 2,
  targetFillRate: 0.95,
  acceptedRisk: 0.1,
  seed: "1",
};

/** Two stations with a buffer between; runs. */
export function smallLine(name = "Hub motor line", size = 8): DraftLine {
  return {
    format: "forebay.line/1",
    name,
    calendar: { tickMinutes: 10, hoursPerDay: 8, daysPerWeek: 5, weeksPerYear: 48 },
    money: { currency: "EUR", carryingRate: 0.2 },
    overtime: null,
    nodes: [
      {
        kind: "supplier",
        id: "sup",
        name: "Hub shells",
        leadTimeDays: 5,
        lateness: { type: "lognormal", mean: 1, sd: 0.8 },
        onTimeShare: 0.7,
        correlation: 0,
        keepsSequence: true,
        disruption: null,
        rejectRate: 0,
        lotRejectRate: 0,
        share: 1,
      },
      {
        kind: "buffer",
        id: "shells",
        name: "Shells",
        size: 400,
        startLevel: null,
        unitValue: 12,
        replenishment: { rule: "orderUpTo", reviewDays: 5, lot: null, minimumOrder: 0, orderMultiple: 1 },
      },
      {
        kind: "station",
        id: "wind",
        name: "Winding",
        cycleMinutes: 12,
        cycleCv: 0.1,
        parallel: 1,
        scrapRate: 0,
        stoppages: null,
      },
      { kind: "buffer", id: "wound", name: "Wound hubs", size, startLevel: 0, unitValue: 40, replenishment: null },
      {
        kind: "station",
        id: "close",
        name: "Closing",
        cycleMinutes: 11,
        cycleCv: 0.1,
        parallel: 1,
        scrapRate: 0,
        stoppages: null,
      },
      { kind: "buffer", id: "ready", name: "Motors", size: 60, startLevel: 40, unitValue: 66, replenishment: null },
      {
        kind: "customer",
        id: "cus",
        name: "Bike maker",
        weeklyDemand: { type: "gamma", mean: 150, sd: 25 },
        correlation: 0,
        callOff: "daily",
        unmet: "backorder",
        lateFine: 4,
      },
    ],
    links: [
      { from: "sup", to: "shells" },
      { from: "shells", to: "wind" },
      { from: "wind", to: "wound" },
      { from: "wound", to: "close" },
      { from: "close", to: "ready" },
      { from: "ready", to: "cus" },
    ],
  };
}

export type Plant = { workspaceId: string; as(role: Role): Ctx; headersOf(role: Role): Promise<Headers> };

let nPlants = 0;

/** A workspace with one member of each role, and sessions for them without a password. */
export async function makePlant(db: Db, roles: Role[] = ["owner", "engineer", "manager", "viewer"]): Promise<Plant> {
  const n = ++nPlants;
  const workspaceId = `plant-${n}`;
  const createdAt = new Date();
  await db
    .insert(schema.organization)
    .values({ id: workspaceId, name: `Larkfield ${n}`, slug: workspaceId, createdAt });
  const idOf = (role: Role) => `${role}-${n}`;
  for (const role of roles) {
    const email = `${role}-${n}@larkfield.example`;
    await db.insert(schema.user).values({ id: idOf(role), name: `${role} ${n}`, email });
    const id = crypto.randomUUID();
    await db.insert(schema.member).values({ id, organizationId: workspaceId, userId: idOf(role), role, createdAt });
  }
  return {
    workspaceId,
    as: (role) => ({ db, userId: idOf(role), userName: `${role} ${n}`, workspaceId, role }),
    headersOf: async (role) => (await sessions(db)).login({ userId: idOf(role) }).then(({ headers }) => headers),
  };
}

async function sessions(db: Db): Promise<TestHelpers> {
  const options = authOptions();
  const auth = betterAuth({
    ...options,
    secret: authSecret(),
    baseURL: "http://localhost:3000",
    database: drizzleAdapter(db, { provider: "pg", schema }),
    plugins: [...options.plugins, testUtils()],
  });
  return (await auth.$context).test;
}

/** A line of the plant with a kept base scenario of short runs. */
export function makeLine(ctx: Ctx, document: DraftLine = smallLine()): Promise<LineDetail> {
  const sheet = { document, layout: { positions: {} }, notes: [] };
  return createLine(ctx, { name: document.name, sheet, options: shortRun });
}
