import { index, integer, pgTable, text, timestamp } from "drizzle-orm/pg-core";

/** Attempts to sign in to one account, whether or not it exists; the key is a hash of the e-mail address. */
export const signInAttempt = pgTable(
  "sign_in_attempt",
  {
    accountKey: text("account_key").primaryKey(),
    nAttempts: integer("n_attempts").notNull(),
    windowEndsAt: timestamp("window_ends_at", { withTimezone: true }).notNull(),
  },
  (table) => [index("sign_in_attempt_window_idx").on(table.windowEndsAt)],
);
