import { boolean, index, json, mysqlTable, primaryKey, uniqueIndex, varchar } from "drizzle-orm/mysql-core";
import { publicId, rowId, rowRef, sha256, utc } from "./columns.ts";
import { notes } from "./notes.ts";
import { users } from "./people.ts";
import { projects } from "./projects.ts";

/**
 * What happened in a project, written in the transaction that did it: live updates, activity, feeds and mail all read
 * it. Row ids are given before commit, so a reader must expect a smaller id to appear after a larger one.
 */
export const events = mysqlTable(
  "events",
  {
    id: rowId(),
    projectId: rowRef("project_id")
      .notNull()
      .references(() => projects.id, { onDelete: "cascade" }),
    /** "note.added", "sweep.added", "verdict.given"…; the list is in `services/event-kinds.ts`. */
    kind: varchar("kind", { length: 30 }).notNull(),
    actorId: rowRef("actor_id").references(() => users.id, { onDelete: "set null" }),
    /** Public ids of what it is about, e.g. `{ note, sweep, dip }`, and a line for people. */
    about: json("about").$type<EventAbout>().notNull(),
    at: utc("at").notNull(),
  },
  (t) => [index("events_project").on(t.projectId, t.id), index("events_at").on(t.at)],
);

export interface EventAbout {
  sweep?: string;
  dip?: string;
  trail?: string;
  step?: string;
  bench?: string;
  note?: string;
  plate?: string;
  writeUp?: string;
  /** Of a plate or a write-up, on a page elsewhere. */
  mention?: string;
  /** As a person reads it; may not hold what only some members may read. */
  title: string;
}

/** Who hears of what. Subject "project", or a thread or trail by kind and public id. */
export const follows = mysqlTable(
  "follows",
  {
    userId: rowRef("user_id")
      .notNull()
      .references(() => users.id, { onDelete: "cascade" }),
    projectId: rowRef("project_id")
      .notNull()
      .references(() => projects.id, { onDelete: "cascade" }),
    /** "project", "trail", "dip", "sweep", "step" or "bench". */
    kind: varchar("kind", { length: 8 }).notNull(),
    /** Public id; for "project" the project's own. */
    subject: varchar("subject", { length: 16 }).notNull(),
    /** True: hears nothing of it, even where more is followed. */
    muted: boolean("muted").notNull(),
    at: utc("at").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.userId, t.kind, t.subject] }),
    index("follows_subject").on(t.projectId, t.kind, t.subject),
  ],
);

/** One line of a person's inbox. */
export const notices = mysqlTable(
  "notices",
  {
    id: rowId(),
    publicId: publicId(),
    userId: rowRef("user_id")
      .notNull()
      .references(() => users.id, { onDelete: "cascade" }),
    projectId: rowRef("project_id")
      .notNull()
      .references(() => projects.id, { onDelete: "cascade" }),
    eventId: rowRef("event_id")
      .notNull()
      .references(() => events.id, { onDelete: "cascade" }),
    noteId: rowRef("note_id").references(() => notes.id, { onDelete: "cascade" }),
    reason: varchar("reason", {
      length: 10,
      enum: ["mention", "reply", "follow", "verdict", "invited"],
    }).notNull(),
    createdAt: utc("created_at").notNull(),
    readAt: utc("read_at"),
    /** When a mail took it along; null while none did. */
    mailedAt: utc("mailed_at"),
  },
  (t) => [
    uniqueIndex("notices_user_event").on(t.userId, t.eventId),
    index("notices_unread").on(t.userId, t.readAt, t.createdAt),
    index("notices_unmailed").on(t.mailedAt, t.createdAt),
  ],
);

/** Who is looking at what now; rows older than a minute mean nothing. */
export const presence = mysqlTable(
  "presence",
  {
    /** Hash of the page's own random key: one row a window. */
    id: sha256("id").primaryKey(),
    projectId: rowRef("project_id")
      .notNull()
      .references(() => projects.id, { onDelete: "cascade" }),
    userId: rowRef("user_id")
      .notNull()
      .references(() => users.id, { onDelete: "cascade" }),
    /** "project", "sweep"… and its public id. */
    kind: varchar("kind", { length: 8 }).notNull(),
    subject: varchar("subject", { length: 16 }).notNull(),
    at: utc("at").notNull(),
  },
  (t) => [index("presence_project").on(t.projectId, t.at)],
);

/** A private address for a feed reader, which can't sign in. Only the hash is kept. */
export const feedTokens = mysqlTable(
  "feed_tokens",
  {
    id: rowId(),
    publicId: publicId(),
    userId: rowRef("user_id")
      .notNull()
      .references(() => users.id, { onDelete: "cascade" }),
    projectId: rowRef("project_id")
      .notNull()
      .references(() => projects.id, { onDelete: "cascade" }),
    tokenHash: sha256("token_hash").notNull().unique(),
    createdAt: utc("created_at").notNull(),
    lastUsedAt: utc("last_used_at"),
    revokedAt: utc("revoked_at"),
  },
  (t) => [index("feed_tokens_user").on(t.userId, t.projectId)],
);
