import { pgTable, text } from "drizzle-orm/pg-core";
import { bytea } from "./columns";
import { result } from "./result";

/** The whole result, encoded and compressed with gzip; apart from `result` so that lists never load it. */
export const resultData = pgTable("result_data", {
  resultId: text("result_id")
    .primaryKey()
    .references(() => result.id, { onDelete: "cascade" }),
  bytes: bytea("bytes").notNull(),
});
