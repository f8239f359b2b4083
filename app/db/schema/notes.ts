import { foreignKey, index, mediumtext, mysqlTable, varchar } from "drizzle-orm/mysql-core";
import { publicId, rowId, rowRef, utc } from "./columns.ts";
import { users } from "./people.ts";
import { projects } from "./projects.ts";
import { dips, sweeps } from "./sweeps.ts";

/** A Markdown note. On a dip: `dipId` and `sweepId`; on a sweep: `sweepId`; on the project: neither. */
export const notes = mysqlTable(
  "notes",
  {
    id: rowId(),
    publicId: publicId(),
    projectId: rowRef("project_id")
      .notNull()
      .references(() => projects.id, { onDelete: "cascade" }),
    sweepId: rowRef("sweep_id").references(() => sweeps.id, { onDelete: "cascade" }),
    dipId: rowRef("dip_id").references(() => dips.id, { onDelete: "cascade" }),
    parentId: rowRef("parent_id"),
    authorId: rowRef("author_id").references(() => users.id, { onDelete: "set null" }),
    body: mediumtext("body").notNull(),
    createdAt: utc("created_at").notNull(),
    editedAt: utc("edited_at"),
    /** A removed note that was answered stays as a stub; its text is emptied. */
    removedAt: utc("removed_at"),
    removedBy: rowRef("removed_by").references(() => users.id, { onDelete: "set null" }),
    /** Sent twice by a double click or a resend: the second finds the first. */
    clientKey: varchar("client_key", { length: 40 }).unique(),
  },
  (t) => [
    foreignKey({ columns: [t.parentId], foreignColumns: [t.id], name: "notes_parent" }).onDelete("cascade"),
    index("notes_dip").on(t.dipId, t.createdAt),
    index("notes_sweep").on(t.sweepId, t.createdAt),
    index("notes_project").on(t.projectId, t.createdAt),
  ],
);
