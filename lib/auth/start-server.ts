import "server-only";
import { hashPassword } from "better-auth/crypto";
import { getDb } from "@/db/client";
import { demoAccounts } from "@/db/demo-accounts";
import { seedDemo } from "@/db/seed";
import { env } from "@/lib/env";
import { getAuth } from "./instance";

/** Opens the database and, for the demo, fills it. A server that cannot do that ends, rather than answer 500 to everything. */
export async function startServer(): Promise<void> {
  try {
    const db = await getDb();
    await getAuth();
    if (env.isLocal && (await seedDemo(db, demoAccounts(), hashPassword))) console.log("The demo plant was set up.");
  } catch (error) {
    console.error("Forebay could not start:", error);
    process.exit(1);
  }
}
