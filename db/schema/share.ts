import { index, integer, json, pgTable, text } from "drizzle-orm/pg-core";
import type { ShareKind, Sweep } from "@/lib/schema/lines";
import { idColumn, instantColumn, personColumn, workspaceColumn } from "./columns";
import { line } from "./line";

/** A link to a read-only page. Its words are frozen here; its versions (`shareVersion`) are immutable. */
export const share = pgTable(
  "share",
  {
    id: idColumn(),
    workspaceId: workspaceColumn(),
    lineId: text("line_id")
      .notNull()
      .references(() => line.id, { onDelete: "cascade" }),
    kind: text("kind").$type<ShareKind>().notNull(),
    /** SHA-256 of the token, hex; the token itself is shown once and kept nowhere. */
    tokenHash: text("token_hash").notNull().unique(),
    title: text("title").notNull(),
    lineName: text("line_name").notNull(),
    workspaceName: text("workspace_name").notNull(),
    sharedBy: text("shared_by").notNull(),
    sweep: json("sweep").$type<Sweep>(),
    createdAt: instantColumn("created_at").defaultNow().notNull(),
    createdBy: personColumn("created_by"),
    expiresAt: instantColumn("expires_at").notNull(),
    revokedAt: instantColumn("revoked_at"),
    nViews: integer("n_views").default(0).notNull(),
  },
  (table) => [index("share_line_idx").on(table.lineId, table.createdAt)],
);
