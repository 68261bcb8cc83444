import type { PgDatabase, PgQueryResultHKT } from "drizzle-orm/pg-core";
import type { Role } from "@/lib/schema/roles";
import type * as schema from "./schema";

export type Db = PgDatabase<PgQueryResultHKT, typeof schema>;

/** Who asks, in which workspace and as what. Every query takes it first and names `workspaceId` in every `where`. */
export type Ctx = { db: Db; userId: string; userName: string; workspaceId: string; role: Role };
