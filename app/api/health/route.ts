import { sql } from "drizzle-orm";
import { connection } from "next/server";
import { getDb } from "@/db/client";

/** Answers once the database is open and migrated. */
export async function GET() {
  await connection();
  await (await getDb()).execute(sql`select 1`);
  return Response.json({ ok: true }, { headers: { "Cache-Control": "no-store" } });
}
