import { sql } from "drizzle-orm";
import { user } from "../schema";

/** Name of the joined person, also of one whose account is gone. */
export const personName = sql<string>`coalesce(${user.name}, 'a former member')`;
