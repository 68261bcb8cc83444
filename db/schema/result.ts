import { json, pgTable, text, uniqueIndex } from "drizzle-orm/pg-core";
import type { ReadingSummary } from "@/lib/schema/lines";
import type { Figure } from "@/lib/simulation/types";
import { idColumn, instantColumn, personColumn, workspaceColumn } from "./columns";
import { line } from "./line";

export type StoredFigures = Pick<
  ReadingSummary,
  "p05" | "p10" | "p50" | "risk" | "moneyTiedUp" | "costPerYear" | "weeks" | "currency"
>;

/** What is known of a result without reading its bytes. One row for each document, run options and engine of a line. */
export const result = pgTable(
  "result",
  {
    id: idColumn(),
    workspaceId: workspaceColumn(),
    lineId: text("line_id")
      .notNull()
      .references(() => line.id, { onDelete: "cascade" }),
    digest: text("digest").notNull(),
    optionsKey: text("options_key").notNull(),
    engine: text("engine").notNull(),
    figures: json("figures").$type<StoredFigures>().notNull(),
    /** The percentile of each accepted risk that was asked for so far, by the risk as text. */
    atRisk: json("at_risk").$type<Record<string, Figure>>().notNull(),
    ranAt: instantColumn("ran_at").defaultNow().notNull(),
    ranBy: personColumn("ran_by"),
  },
  (table) => [uniqueIndex("result_fit_idx").on(table.lineId, table.digest, table.optionsKey, table.engine)],
);
