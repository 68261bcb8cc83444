import { sql } from "drizzle-orm";
import { boolean, integer, json, pgTable, text, uniqueIndex } from "drizzle-orm/pg-core";
import type { DraftLine, Layout, Note } from "@/lib/line/types";
import type { ScenarioOptions } from "@/lib/schema/lines";
import { idColumn, instantColumn, personColumn, workspaceColumn } from "./columns";
import { line } from "./line";
import { result } from "./result";

/** A scenario with its one shared draft. `json`, not `jsonb`: the text comes back as it was written. */
export const scenario = pgTable(
  "scenario",
  {
    id: idColumn(),
    workspaceId: workspaceColumn(),
    lineId: text("line_id")
      .notNull()
      .references(() => line.id, { onDelete: "cascade" }),
    name: text("name").notNull(),
    isBase: boolean("is_base").notNull(),
    createdAt: instantColumn("created_at").defaultNow().notNull(),
    createdBy: personColumn("created_by"),
    revision: integer("revision").default(1).notNull(),
    document: json("document").$type<DraftLine>().notNull(),
    layout: json("layout").$type<Layout>().notNull(),
    notes: json("notes").$type<Note[]>().notNull(),
    options: json("options").$type<ScenarioOptions>().notNull(),
    /** Null while the draft has faults. */
    digest: text("digest"),
    optionsKey: text("options_key").notNull(),
    /** The first of them, in words, so that registers need not read documents. */
    faults: json("faults").$type<string[]>().notNull(),
    resultId: text("result_id").references(() => result.id, { onDelete: "set null" }),
    updatedAt: instantColumn("updated_at").defaultNow().notNull(),
    updatedBy: personColumn("updated_by"),
  },
  (table) => [
    uniqueIndex("scenario_line_name_idx").on(table.lineId, sql`lower(${table.name})`),
    uniqueIndex("scenario_one_base_idx")
      .on(table.lineId)
      .where(sql`${table.isBase}`),
  ],
);
