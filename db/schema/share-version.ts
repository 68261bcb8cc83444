import { index, integer, pgTable, primaryKey, text } from "drizzle-orm/pg-core";
import { scenarioVersion } from "./scenario-version";
import { share } from "./share";

/** The versions of a link in the order shown, with the scenario's name as it was. */
export const shareVersion = pgTable(
  "share_version",
  {
    shareId: text("share_id")
      .notNull()
      .references(() => share.id, { onDelete: "cascade" }),
    position: integer("position").notNull(),
    versionId: text("version_id")
      .notNull()
      .references(() => scenarioVersion.id, { onDelete: "cascade" }),
    scenarioName: text("scenario_name").notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.shareId, table.position] }),
    index("share_version_version_idx").on(table.versionId),
  ],
);
