import { PGlite } from "@electric-sql/pglite";
import { sql } from "drizzle-orm";
import { drizzle } from "drizzle-orm/pglite";
import { readFileSync } from "node:fs";
import { inject } from "vitest";
import { provideDatabase } from "@/db/client";
import type { Db } from "@/db/context";
import * as schema from "@/db/schema";

let opened: Promise<Db> | undefined;

async function open(): Promise<Db> {
  const client = new PGlite({ loadDataDir: new Blob([readFileSync(inject("databaseTemplate"))]) });
  await client.waitReady;
  const db = drizzle({ client, schema });
  provideDatabase({ db, close: () => client.close() });
  return db;
}

/** The database of this test file, which is also the one that actions and routes open. */
export function testDatabase(): Promise<Db> {
  opened ??= open();
  return opened;
}

export async function emptyDatabase(): Promise<Db> {
  const db = await testDatabase();
  const tables = await db
    .select({ name: sql<string>`quote_ident(tablename)` })
    .from(sql`pg_tables`)
    .where(sql`schemaname = 'public'`);
  await db.execute(sql.raw(`truncate ${tables.map(({ name }) => name).join(", ")} restart identity cascade`));
  return db;
}

class RolledBack extends Error {}

/** Runs work whose changes are undone afterwards. */
export async function inRolledBack(db: Db, work: (tx: Db) => Promise<void>): Promise<void> {
  try {
    await db.transaction(async (tx) => {
      await work(tx);
      throw new RolledBack();
    });
  } catch (error) {
    if (!(error instanceof RolledBack)) throw error;
  }
}
