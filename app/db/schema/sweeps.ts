import {
  boolean,
  double,
  index,
  int,
  json,
  mysqlTable,
  primaryKey,
  smallint,
  uniqueIndex,
  varchar,
} from "drizzle-orm/mysql-core";
import type { AnalysisSettings, Dip, Warning } from "../../measurement/sweep.ts";
import type { Given, Reading, ReadProblem } from "../../readers/reading.ts";
import { longBlob, publicId, rowId, rowRef, sha256, utc } from "./columns.ts";
import { users } from "./people.ts";
import { projects } from "./projects.ts";

/** An original as it was given. The object in the store is never changed. */
export const files = mysqlTable(
  "files",
  {
    id: rowId(),
    publicId: publicId(),
    projectId: rowRef("project_id")
      .notNull()
      .references(() => projects.id, { onDelete: "cascade" }),
    name: varchar("name", { length: 255 }).notNull(),
    sizeBytes: int("size_bytes", { unsigned: true }).notNull(),
    sha256: sha256("sha256").notNull(),
    storageKey: varchar("storage_key", { length: 120 }).notNull(),
    uploadedBy: rowRef("uploaded_by").references(() => users.id, { onDelete: "set null" }),
    createdAt: utc("created_at").notNull(),
  },
  (t) => [uniqueIndex("files_project_sha256").on(t.projectId, t.sha256)],
);

/** A sweep; `problem` is set, and the numbers are null, while its file could not be read. */
export const sweeps = mysqlTable(
  "sweeps",
  {
    id: rowId(),
    publicId: publicId(),
    projectId: rowRef("project_id")
      .notNull()
      .references(() => projects.id, { onDelete: "cascade" }),
    fileId: rowRef("file_id")
      .notNull()
      .references(() => files.id, { onDelete: "cascade" }),
    title: varchar("title", { length: 160 }).notNull(),
    takenAt: utc("taken_at"),
    createdBy: rowRef("created_by").references(() => users.id, { onDelete: "set null" }),
    createdAt: utc("created_at").notNull(),
    readingId: rowRef("reading_id"),
    analysisId: rowRef("analysis_id"),
    problem: json("problem").$type<ReadProblem | null>(),
    pointCount: int("point_count", { unsigned: true }),
    startHz: double("start_hz"),
    stopHz: double("stop_hz"),
    referenceOhm: double("reference_ohm"),
    complex: boolean("complex"),
    /** Decimated points for lists and the first paint; dips kept. */
    preview: longBlob("preview"),
  },
  (t) => [
    index("sweeps_project").on(t.projectId, t.createdAt),
    index("sweeps_taken").on(t.projectId, t.takenAt),
    index("sweeps_file").on(t.fileId),
  ],
);

/** How the file was read; one row for each time it was read anew. */
export const readings = mysqlTable(
  "readings",
  {
    id: rowId(),
    publicId: publicId(),
    sweepId: rowRef("sweep_id")
      .notNull()
      .references(() => sweeps.id, { onDelete: "cascade" }),
    number: int("number", { unsigned: true }).notNull(),
    /** What a person fixed; empty where nothing was. */
    given: json("given").$type<Given>().notNull(),
    reading: json("reading").$type<Reading | null>(),
    shape: varchar("shape", { length: 190 }),
    createdBy: rowRef("created_by").references(() => users.id, { onDelete: "set null" }),
    createdAt: utc("created_at").notNull(),
  },
  (t) => [uniqueIndex("readings_sweep_number").on(t.sweepId, t.number), index("readings_shape").on(t.shape)],
);

/** The points of a reading: Float64 columns, byte-shuffled and deflated, in parts of bounded size. */
export const sweepPoints = mysqlTable(
  "sweep_points",
  {
    readingId: rowRef("reading_id")
      .notNull()
      .references(() => readings.id, { onDelete: "cascade" }),
    part: smallint("part").notNull(),
    data: longBlob("data").notNull(),
  },
  (t) => [primaryKey({ columns: [t.readingId, t.part] })],
);

/** Findings of one reading under one set of settings; never changed once written. */
export const analyses = mysqlTable(
  "analyses",
  {
    id: rowId(),
    publicId: publicId(),
    sweepId: rowRef("sweep_id")
      .notNull()
      .references(() => sweeps.id, { onDelete: "cascade" }),
    readingId: rowRef("reading_id")
      .notNull()
      .references(() => readings.id, { onDelete: "cascade" }),
    number: int("number", { unsigned: true }).notNull(),
    version: varchar("version", { length: 20 }).notNull(),
    settings: json("settings").$type<AnalysisSettings>().notNull(),
    noiseDb: double("noise_db"),
    warnings: json("warnings").$type<Warning[]>().notNull(),
    dips: json("dips").$type<(Dip & { publicId: string })[]>().notNull(),
    createdBy: rowRef("created_by").references(() => users.id, { onDelete: "set null" }),
    createdAt: utc("created_at").notNull(),
  },
  (t) => [uniqueIndex("analyses_sweep_number").on(t.sweepId, t.number)],
);

/**
 * A dip's lasting identity: its thread and verdict stay while its numbers are computed anew.
 * `present` is false when the current analysis no longer finds it.
 */
export const dips = mysqlTable(
  "dips",
  {
    id: rowId(),
    publicId: publicId(),
    projectId: rowRef("project_id")
      .notNull()
      .references(() => projects.id, { onDelete: "cascade" }),
    sweepId: rowRef("sweep_id")
      .notNull()
      .references(() => sweeps.id, { onDelete: "cascade" }),
    present: boolean("present").notNull(),
    frequencyHz: double("frequency_hz").notNull(),
    /** Null where SWR has no number (abs Γ at 1). */
    minimumSwr: double("minimum_swr"),
    returnLossDb: double("return_loss_db").notNull(),
    prominenceDb: double("prominence_db").notNull(),
    numbers: json("numbers").$type<Dip>().notNull(),
    verdict: varchar("verdict", { length: 10, enum: ["open", "proposed", "settled"] })
      .notNull()
      .default("open"),
    verdictText: varchar("verdict_text", { length: 300 }).notNull().default(""),
    verdictBy: rowRef("verdict_by").references(() => users.id, { onDelete: "set null" }),
    verdictAt: utc("verdict_at"),
    createdAt: utc("created_at").notNull(),
  },
  (t) => [
    index("dips_sweep").on(t.sweepId, t.frequencyHz),
    index("dips_project_frequency").on(t.projectId, t.frequencyHz),
    index("dips_project_verdict").on(t.projectId, t.verdict),
  ],
);
