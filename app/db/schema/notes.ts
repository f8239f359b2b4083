import {
  double,
  foreignKey,
  index,
  int,
  json,
  mediumtext,
  mysqlTable,
  uniqueIndex,
  varchar,
} from "drizzle-orm/mysql-core";
import { steps } from "./antennas.ts";
import { benches } from "./benches.ts";
import { publicId, rowId, rowRef, sha256, utc } from "./columns.ts";
import { users } from "./people.ts";
import { projects } from "./projects.ts";
import { dips, sweeps } from "./sweeps.ts";
import { trails } from "./trails.ts";

/**
 * A Markdown note. On a dip: `dipId` and `sweepId`; on a sweep: `sweepId`; on a trail, step or bench: that one; on the
 * project: none of them. A note on a sweep may speak of a stretch of frequency or of a region of its picture.
 */
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
    trailId: rowRef("trail_id").references(() => trails.id, { onDelete: "cascade" }),
    stepId: rowRef("step_id").references(() => steps.id, { onDelete: "cascade" }),
    benchId: rowRef("bench_id").references(() => benches.id, { onDelete: "cascade" }),
    fromHz: double("from_hz"),
    toHz: double("to_hz"),
    region: json("region").$type<PictureRegion | null>(),
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
    index("notes_trail").on(t.trailId, t.createdAt),
    index("notes_step").on(t.stepId, t.createdAt),
    index("notes_bench").on(t.benchId, t.createdAt),
    index("notes_author").on(t.authorId),
  ],
);

/** In shares of the picture as it is shown, 0 to 1. */
export interface PictureRegion {
  x: number;
  y: number;
  width: number;
  height: number;
}

/** What a note said before it was edited. */
export const noteVersions = mysqlTable(
  "note_versions",
  {
    id: rowId(),
    noteId: rowRef("note_id")
      .notNull()
      .references(() => notes.id, { onDelete: "cascade" }),
    body: mediumtext("body").notNull(),
    /** From when to when it said this. */
    from: utc("from_at").notNull(),
    until: utc("until_at").notNull(),
    editedBy: rowRef("edited_by").references(() => users.id, { onDelete: "set null" }),
  },
  (t) => [index("note_versions_note").on(t.noteId, t.until)],
);

/** A short reference in a note, with the numbers at the time of writing. */
export const noteReferences = mysqlTable(
  "note_references",
  {
    id: rowId(),
    noteId: rowRef("note_id")
      .notNull()
      .references(() => notes.id, { onDelete: "cascade" }),
    kind: varchar("kind", { length: 8, enum: ["dip", "sweep", "step", "plate"] }).notNull(),
    subject: varchar("subject", { length: 16 }).notNull(),
    /** As it read when the note was written. */
    text: varchar("text", { length: 300 }).notNull(),
  },
  (t) => [uniqueIndex("note_references_subject").on(t.noteId, t.kind, t.subject)],
);

/** A file in a note. Uploaded while it is written: `noteId` is null until the note is sent. */
export const attachments = mysqlTable(
  "attachments",
  {
    id: rowId(),
    publicId: publicId(),
    projectId: rowRef("project_id")
      .notNull()
      .references(() => projects.id, { onDelete: "cascade" }),
    noteId: rowRef("note_id").references(() => notes.id, { onDelete: "cascade" }),
    name: varchar("name", { length: 255 }).notNull(),
    /** From what is in it, not from its name. */
    mediaType: varchar("media_type", { length: 80 }).notNull(),
    sizeBytes: int("size_bytes", { unsigned: true }).notNull(),
    sha256: sha256("sha256").notNull(),
    storageKey: varchar("storage_key", { length: 120 }).notNull(),
    /** Pictures only: the copy that is shown, and the small one. */
    shownKey: varchar("shown_key", { length: 120 }),
    smallKey: varchar("small_key", { length: 120 }),
    width: int("width", { unsigned: true }),
    height: int("height", { unsigned: true }),
    uploadedBy: rowRef("uploaded_by").references(() => users.id, { onDelete: "set null" }),
    createdAt: utc("created_at").notNull(),
  },
  (t) => [index("attachments_note").on(t.noteId), index("attachments_project").on(t.projectId)],
);

/** A note told to the administrator. */
export const reports = mysqlTable(
  "reports",
  {
    id: rowId(),
    publicId: publicId(),
    noteId: rowRef("note_id")
      .notNull()
      .references(() => notes.id, { onDelete: "cascade" }),
    reason: varchar("reason", { length: 500 }).notNull(),
    reportedBy: rowRef("reported_by").references(() => users.id, { onDelete: "set null" }),
    createdAt: utc("created_at").notNull(),
    closedAt: utc("closed_at"),
    closedBy: rowRef("closed_by").references(() => users.id, { onDelete: "set null" }),
    outcome: varchar("outcome", { length: 300 }).notNull().default(""),
  },
  (t) => [index("reports_open").on(t.closedAt, t.createdAt)],
);
