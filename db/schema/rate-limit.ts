import { bigint, integer, pgTable, text } from "drizzle-orm/pg-core";

/** Requests by address; written by the sign-in library. */
export const rateLimit = pgTable("rate_limit", {
  id: text("id").primaryKey(),
  key: text("key").notNull().unique(),
  count: integer("count").notNull(),
  lastRequest: bigint("last_request", { mode: "number" }).notNull(),
});
