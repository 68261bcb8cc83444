import { PGlite } from "@electric-sql/pglite";
import { drizzle } from "drizzle-orm/pglite";
import { migrate } from "drizzle-orm/pglite/migrator";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import os from "node:os";
import path from "node:path";
import type { TestProject } from "vitest/node";

declare module "vitest" {
  export interface ProvidedContext {
    databaseTemplate: string;
  }
}

/** One migrated database for all test files, written out once and loaded by each. */
export default async function setup(project: TestProject) {
  const client = new PGlite();
  await migrate(drizzle({ client }), { migrationsFolder: "db/migrations" });
  const folder = mkdtempSync(path.join(os.tmpdir(), "forebay-template-"));
  const file = path.join(folder, "template.tar");
  writeFileSync(file, Buffer.from(await (await client.dumpDataDir("none")).arrayBuffer()));
  await client.close();
  project.provide("databaseTemplate", file);
  return () => rmSync(folder, { recursive: true, force: true });
}
