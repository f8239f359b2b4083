import {
  index,
  int,
  json,
  mediumtext,
  mysqlTable,
  primaryKey,
  text,
  uniqueIndex,
  varchar,
} from "drizzle-orm/mysql-core";
import { longBlob, publicId, rowId, rowRef, sha256, utc } from "./columns.ts";
import { users } from "./people.ts";
import { projects } from "./projects.ts";

/**
 * A frozen, numbered, citable figure. Nothing here but `withdrawn…` changes once it is written; what it shows is kept
 * with it, so that it outlives the sweep, the project and the method.
 */
export const plates = mysqlTable(
  "plates",
  {
    id: rowId(),
    publicId: publicId(),
    /** Null once the project was deleted: the plate stays. */
    projectId: rowRef("project_id").references(() => projects.id, { onDelete: "set null" }),
    /** Within the project, from 1; the same for every version. */
    number: int("number", { unsigned: true }).notNull(),
    version: int("version", { unsigned: true }).notNull(),
    /** The version before this one. */
    previousId: rowRef("previous_id"),
    kind: varchar("kind", {
      length: 8,
      enum: ["sweep", "dip", "compare", "trail", "strip", "bench"],
    }).notNull(),
    title: varchar("title", { length: 160 }).notNull(),
    caption: text("caption").notNull(),
    licence: varchar("licence", { length: 40 }).notNull(),
    /** All that its page and its forms say; the shape is documented with the JSON form. */
    record: mediumtext("record").notNull(),
    recordSha256: sha256("record_sha256").notNull(),
    createdBy: rowRef("created_by").references(() => users.id, { onDelete: "set null" }),
    createdAt: utc("created_at").notNull(),
    withdrawnAt: utc("withdrawn_at"),
    withdrawnReason: varchar("withdrawn_reason", { length: 500 }).notNull().default(""),
    withdrawnBy: rowRef("withdrawn_by").references(() => users.id, { onDelete: "set null" }),
  },
  (t) => [
    uniqueIndex("plates_project_number").on(t.projectId, t.number, t.version),
    index("plates_previous").on(t.previousId),
  ],
);

/** A frozen form of a plate: "svg-light", "csv"… Made once, never made anew. */
export const plateForms = mysqlTable(
  "plate_forms",
  {
    plateId: rowRef("plate_id")
      .notNull()
      .references(() => plates.id, { onDelete: "cascade" }),
    form: varchar("form", { length: 20 }).notNull(),
    mediaType: varchar("media_type", { length: 80 }).notNull(),
    sha256: sha256("sha256").notNull(),
    sizeBytes: int("size_bytes", { unsigned: true }).notNull(),
    storageKey: varchar("storage_key", { length: 120 }).notNull(),
    createdAt: utc("created_at").notNull(),
  },
  (t) => [primaryKey({ columns: [t.plateId, t.form] })],
);

/** An original that a plate rests on, kept for as long as the plate is, and all that is needed to compute it again. */
export const plateSources = mysqlTable(
  "plate_sources",
  {
    id: rowId(),
    plateId: rowRef("plate_id")
      .notNull()
      .references(() => plates.id, { onDelete: "cascade" }),
    /** "sweep", or a reference of its bench: "open", "short", "load", "through"; several sweeps by number. */
    role: varchar("role", { length: 20 }).notNull(),
    sweep: varchar("sweep", { length: 16 }).notNull(),
    name: varchar("name", { length: 255 }).notNull(),
    sha256: sha256("sha256").notNull(),
    sizeBytes: int("size_bytes", { unsigned: true }).notNull(),
    storageKey: varchar("storage_key", { length: 120 }).notNull(),
    /** Given, settings, correction: what turns these bytes into the plate's numbers. */
    recipe: mediumtext("recipe").notNull(),
  },
  (t) => [index("plate_sources_plate").on(t.plateId), index("plate_sources_key").on(t.storageKey)],
);

/** A page in the project: text with plates, live figures and dips. */
export const writeUps = mysqlTable(
  "write_ups",
  {
    id: rowId(),
    publicId: publicId(),
    projectId: rowRef("project_id")
      .notNull()
      .references(() => projects.id, { onDelete: "cascade" }),
    title: varchar("title", { length: 160 }).notNull(),
    /** Markdown, as it is being written. */
    body: mediumtext("body").notNull(),
    /** Number of the version that readers see; null for a draft. */
    publishedNumber: int("published_number", { unsigned: true }),
    /** When it was taken back; null while it is published or was never. */
    takenBackAt: utc("taken_back_at"),
    createdBy: rowRef("created_by").references(() => users.id, { onDelete: "set null" }),
    createdAt: utc("created_at").notNull(),
    updatedAt: utc("updated_at").notNull(),
  },
  (t) => [index("write_ups_project").on(t.projectId, t.updatedAt)],
);

/** What was published; never changed. */
export const writeUpVersions = mysqlTable(
  "write_up_versions",
  {
    id: rowId(),
    writeUpId: rowRef("write_up_id")
      .notNull()
      .references(() => writeUps.id, { onDelete: "cascade" }),
    number: int("number", { unsigned: true }).notNull(),
    title: varchar("title", { length: 160 }).notNull(),
    body: mediumtext("body").notNull(),
    /** The figures and numbers that it shows, and its licence, as they were when it was published. */
    frozen: mediumtext("frozen").notNull(),
    /** What changed, in a line. */
    remark: varchar("remark", { length: 300 }).notNull(),
    publishedBy: rowRef("published_by").references(() => users.id, { onDelete: "set null" }),
    publishedAt: utc("published_at").notNull(),
  },
  (t) => [
    uniqueIndex("write_up_versions_number").on(t.writeUpId, t.number),
    index("write_up_versions_at").on(t.publishedAt),
  ],
);

/** Somebody else's page says that it links to one of ours (W3C Webmention). */
export const webmentions = mysqlTable(
  "webmentions",
  {
    id: rowId(),
    publicId: publicId(),
    /** SHA-256 of source and target: a pair is one row. */
    pairSha256: sha256("pair_sha256").notNull().unique(),
    source: text("source").notNull(),
    target: text("target").notNull(),
    plateId: rowRef("plate_id").references(() => plates.id, { onDelete: "cascade" }),
    writeUpId: rowRef("write_up_id").references(() => writeUps.id, { onDelete: "cascade" }),
    /** queued → verified (waits for the owner) → shown or hidden; refused: no link there; gone: it was, and is no more. */
    state: varchar("state", {
      length: 8,
      enum: ["queued", "verified", "shown", "hidden", "refused", "gone"],
    }).notNull(),
    /** As the page calls itself. */
    title: varchar("title", { length: 300 }).notNull().default(""),
    reason: varchar("reason", { length: 300 }).notNull().default(""),
    receivedAt: utc("received_at").notNull(),
    checkedAt: utc("checked_at"),
    decidedBy: rowRef("decided_by").references(() => users.id, { onDelete: "set null" }),
  },
  (t) => [
    index("webmentions_plate").on(t.plateId, t.state),
    index("webmentions_write_up").on(t.writeUpId, t.state),
  ],
);

/** Ours to others, from a published write-up. */
export const sentMentions = mysqlTable(
  "sent_mentions",
  {
    id: rowId(),
    writeUpId: rowRef("write_up_id")
      .notNull()
      .references(() => writeUps.id, { onDelete: "cascade" }),
    targetSha256: sha256("target_sha256").notNull(),
    target: text("target").notNull(),
    endpoint: text("endpoint"),
    /** Of the newest version that was told of. */
    number: int("number", { unsigned: true }).notNull(),
    state: varchar("state", { length: 8, enum: ["queued", "sent", "none", "failed"] }).notNull(),
    reason: varchar("reason", { length: 300 }).notNull().default(""),
    at: utc("at").notNull(),
  },
  (t) => [uniqueIndex("sent_mentions_target").on(t.writeUpId, t.targetSha256)],
);

/** A bundle being made, taken in, or a batch of sweeps being checked: its progress and its outcome. */
export const bundleRuns = mysqlTable(
  "bundle_runs",
  {
    id: rowId(),
    publicId: publicId(),
    kind: varchar("kind", { length: 8, enum: ["export", "import", "mine", "batch"] }).notNull(),
    projectId: rowRef("project_id").references(() => projects.id, { onDelete: "cascade" }),
    userId: rowRef("user_id").references(() => users.id, { onDelete: "cascade" }),
    state: varchar("state", { length: 8, enum: ["waiting", "running", "done", "failed"] }).notNull(),
    doneParts: int("done_parts", { unsigned: true }).notNull().default(0),
    allParts: int("all_parts", { unsigned: true }).notNull().default(0),
    storageKey: varchar("storage_key", { length: 120 }),
    sizeBytes: int("size_bytes", { unsigned: true }),
    sha256: sha256("sha256"),
    /** What was found, row by row, or why it was refused. */
    report: json("report").$type<unknown>(),
    /** What a run that was broken off needs to go on. */
    resume: longBlob("resume"),
    createdAt: utc("created_at").notNull(),
    updatedAt: utc("updated_at").notNull(),
    expiresAt: utc("expires_at"),
  },
  (t) => [
    index("bundle_runs_project").on(t.projectId, t.createdAt),
    index("bundle_runs_user").on(t.userId, t.createdAt),
  ],
);
