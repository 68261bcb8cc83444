import "server-only";
import { existsSync, mkdirSync, renameSync, rmSync } from "node:fs";
import path from "node:path";
import { env } from "@/lib/env";
import type { Db } from "./context";
import { takeLock } from "./lock";
import * as schema from "./schema";

export type Handle = { db: Db; close(): Promise<void> };

const shared = globalThis as unknown as { forebayDatabase?: Promise<Handle> };
const migrationsFolder = path.join(process.cwd(), "db/migrations");

async function open(): Promise<Handle> {
  const { PGlite } = await import("@electric-sql/pglite");
  const { drizzle } = await import("drizzle-orm/pglite");
  const { migrate } = await import("drizzle-orm/pglite/migrator");
  const dir = env.dataDir;
  mkdirSync(dir, { recursive: true });
  const unlock = takeLock(path.join(/*turbopackIgnore: true*/ dir, "lock"));
  try {
    const folder = path.join(/*turbopackIgnore: true*/ dir, "pg");
    if (!existsSync(folder)) {
      // Made aside and renamed: an interrupted first start must not leave a folder that never opens again.
      const aside = `${folder}.new`;
      rmSync(aside, { recursive: true, force: true });
      await (await PGlite.create(aside)).close();
      renameSync(aside, folder);
    }
    const client = await PGlite.create(folder);
    const db = drizzle({ client, schema });
    await migrate(db, { migrationsFolder });
    const close = async () => {
      shared.forebayDatabase = undefined;
      await client.close();
      unlock();
    };
    return { db, close };
  } catch (error) {
    unlock();
    throw error;
  }
}

/** The one database of this process, opened and migrated on first use; kept on `globalThis` across hot reloads. */
export function openDatabase(): Promise<Handle> {
  if (env.isBuild) throw new Error("the database was asked for during the build");
  shared.forebayDatabase ??= open().catch((error) => {
    shared.forebayDatabase = undefined;
    throw error;
  });
  return shared.forebayDatabase;
}

export async function getDb(): Promise<Db> {
  return (await openDatabase()).db;
}

/** Puts another database in its place, such as one in memory. */
export function provideDatabase(handle: Handle): void {
  shared.forebayDatabase = Promise.resolve(handle);
}
