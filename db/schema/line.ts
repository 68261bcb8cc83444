import { index, pgTable, text } from "drizzle-orm/pg-core";
import { idColumn, instantColumn, personColumn, workspaceColumn } from "./columns";

export const line = pgTable(
  "line",
  {
    id: idColumn(),
    workspaceId: workspaceColumn(),
    name: text("name").notNull(),
    createdAt: instantColumn("created_at").defaultNow().notNull(),
    createdBy: personColumn("created_by"),
    updatedAt: instantColumn("updated_at").defaultNow().notNull(),
    updatedBy: personColumn("updated_by"),
  },
  (table) => [index("line_workspace_idx").on(table.workspaceId, table.updatedAt)],
);
