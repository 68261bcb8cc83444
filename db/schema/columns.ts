import { customType, text, timestamp } from "drizzle-orm/pg-core";
import { organization } from "./organization";
import { user } from "./user";

export const bytea = customType<{ data: Uint8Array; driverData: Uint8Array }>({ dataType: () => "bytea" });

export const idColumn = () =>
  text("id")
    .primaryKey()
    .$defaultFn(() => crypto.randomUUID());

/** On every row that belongs to a workspace, so that each `where` can name it. */
export const workspaceColumn = () =>
  text("workspace_id")
    .notNull()
    .references(() => organization.id, { onDelete: "cascade" });

export const personColumn = (name: string) => text(name).references(() => user.id, { onDelete: "set null" });

export const instantColumn = (name: string) => timestamp(name, { withTimezone: true });
