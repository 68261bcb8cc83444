import { index, integer, json, pgTable, text, uniqueIndex } from "drizzle-orm/pg-core";
import type { DraftLine, Layout, Note } from "@/lib/line/types";
import type { ScenarioOptions } from "@/lib/schema/lines";
import { idColumn, instantColumn, personColumn, workspaceColumn } from "./columns";
import { line } from "./line";
import { result } from "./result";
import { scenario } from "./scenario";

/** A kept version. Nothing of it changes but `resultId`, from null to a result that fits. */
export const scenarioVersion = pgTable(
  "scenario_version",
  {
    id: idColumn(),
    workspaceId: workspaceColumn(),
    lineId: text("line_id")
      .notNull()
      .references(() => line.id, { onDelete: "cascade" }),
    scenarioId: text("scenario_id")
      .notNull()
      .references(() => scenario.id, { onDelete: "cascade" }),
    number: integer("number").notNull(),
    document: json("document").$type<DraftLine>().notNull(),
    layout: json("layout").$type<Layout>().notNull(),
    notes: json("notes").$type<Note[]>().notNull(),
    options: json("options").$type<ScenarioOptions>().notNull(),
    digest: text("digest"),
    optionsKey: text("options_key").notNull(),
    resultId: text("result_id").references(() => result.id, { onDelete: "set null" }),
    createdAt: instantColumn("created_at").defaultNow().notNull(),
    createdBy: personColumn("created_by"),
  },
  (table) => [
    uniqueIndex("scenario_version_number_idx").on(table.scenarioId, table.number),
    index("scenario_version_digest_idx").on(table.lineId, table.digest, table.optionsKey),
  ],
);
