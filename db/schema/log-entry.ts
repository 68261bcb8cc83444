import { index, pgTable, text } from "drizzle-orm/pg-core";
import { idColumn, instantColumn, personColumn, workspaceColumn } from "./columns";

/** Who did what, for changes that matter; `text` reads as a sentence and holds no secret. */
export const logEntry = pgTable(
  "log_entry",
  {
    id: idColumn(),
    workspaceId: workspaceColumn(),
    at: instantColumn("at").defaultNow().notNull(),
    userId: personColumn("user_id"),
    action: text("action").notNull(),
    /** Id of the line concerned, kept also after the line is gone. */
    lineId: text("line_id"),
    text: text("text").notNull(),
  },
  (table) => [index("log_entry_workspace_idx").on(table.workspaceId, table.at)],
);
