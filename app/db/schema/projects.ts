import { double, index, mysqlTable, primaryKey, text, tinyint, varchar } from "drizzle-orm/mysql-core";
import { publicId, rowId, rowRef, utc } from "./columns.ts";
import { users } from "./people.ts";

export const projects = mysqlTable(
  "projects",
  {
    id: rowId(),
    publicId: publicId(),
    title: varchar("title", { length: 160 }).notNull(),
    /** Markdown. */
    summary: text("summary").notNull(),
    visibility: varchar("visibility", { length: 10, enum: ["private", "linked", "public"] }).notNull(),
    /** ITU region whose allocations are drawn; null while it is not said. */
    ituRegion: tinyint("itu_region"),
    /** Invented data, and the pages say so. */
    demo: tinyint("demo").notNull().default(0),
    createdAt: utc("created_at").notNull(),
    updatedAt: utc("updated_at").notNull(),
  },
  (t) => [index("projects_visibility").on(t.visibility, t.updatedAt)],
);

export const memberships = mysqlTable(
  "memberships",
  {
    projectId: rowRef("project_id")
      .notNull()
      .references(() => projects.id, { onDelete: "cascade" }),
    userId: rowRef("user_id")
      .notNull()
      .references(() => users.id, { onDelete: "cascade" }),
    role: varchar("role", { length: 12, enum: ["owner", "experimenter", "commenter", "reader"] }).notNull(),
    createdAt: utc("created_at").notNull(),
  },
  (t) => [primaryKey({ columns: [t.projectId, t.userId] }), index("memberships_user").on(t.userId)],
);

/** A stretch that the antenna is meant to work in. */
export const designBands = mysqlTable(
  "design_bands",
  {
    id: rowId(),
    publicId: publicId(),
    projectId: rowRef("project_id")
      .notNull()
      .references(() => projects.id, { onDelete: "cascade" }),
    name: varchar("name", { length: 40 }).notNull(),
    lowHz: double("low_hz").notNull(),
    highHz: double("high_hz").notNull(),
    swrLimit: double("swr_limit").notNull(),
  },
  (t) => [index("design_bands_project").on(t.projectId)],
);
