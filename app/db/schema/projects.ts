import { double, index, int, mysqlTable, primaryKey, text, tinyint, varchar } from "drizzle-orm/mysql-core";
import { publicId, rowId, rowRef, sha256, utc } from "./columns.ts";
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
    /** Licence that is proposed for its plates; an SPDX name. */
    licence: varchar("licence", { length: 40 }).notNull().default("CC-BY-4.0"),
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
    lastActiveAt: utc("last_active_at"),
    /** The newest event the person had seen on the project's page: "since you were last here". */
    seenEventId: rowRef("seen_event_id"),
  },
  (t) => [primaryKey({ columns: [t.projectId, t.userId] }), index("memberships_user").on(t.userId)],
);

/** An open door with a role, by mail to one address or by link. Only the token's hash is kept. */
export const invitations = mysqlTable(
  "invitations",
  {
    id: rowId(),
    publicId: publicId(),
    projectId: rowRef("project_id")
      .notNull()
      .references(() => projects.id, { onDelete: "cascade" }),
    role: varchar("role", { length: 12, enum: ["experimenter", "commenter", "reader"] }).notNull(),
    /** Null: anyone with the link. */
    email: varchar("email", { length: 254 }),
    tokenHash: sha256("token_hash").notNull().unique(),
    createdBy: rowRef("created_by").references(() => users.id, { onDelete: "set null" }),
    createdAt: utc("created_at").notNull(),
    expiresAt: utc("expires_at").notNull(),
    revokedAt: utc("revoked_at"),
    /** For one by mail: who took it. A link may be taken many times. */
    acceptedBy: rowRef("accepted_by").references(() => users.id, { onDelete: "set null" }),
    acceptedAt: utc("accepted_at"),
    uses: int("uses", { unsigned: true }).notNull().default(0),
  },
  (t) => [index("invitations_project").on(t.projectId)],
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
