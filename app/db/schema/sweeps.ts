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
import type { Feedline } from "../../measurement/feedline.ts";
import type { AnalysisSettings, Correction, Dip, Warning } from "../../measurement/sweep.ts";
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
    /** A reference is a bench's open, short, load or through: not part of the story, of trails or of search. */
    purpose: varchar("purpose", { length: 10, enum: ["antenna", "reference"] })
      .notNull()
      .default("antenna"),
    /** The bench it was taken with; null while that is not said. Which version counts is found by date. */
    benchId: rowRef("bench_id"),
    /** The line that may be taken away, as last said; null while that is not said. */
    feedline: json("feedline").$type<Feedline | null>(),
    /** Sweeps of the same thing share one; null for a sweep on its own. */
    repeatGroup: varchar("repeat_group", { length: 16 }),
  },
  (t) => [
    index("sweeps_project").on(t.projectId, t.createdAt),
    index("sweeps_taken").on(t.projectId, t.takenAt),
    index("sweeps_file").on(t.fileId),
    index("sweeps_bench").on(t.benchId),
    index("sweeps_repeat").on(t.projectId, t.repeatGroup),
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
    /** What was done before dips were found; null: nothing (as measured). */
    correction: json("correction").$type<StoredCorrection | null>(),
    noiseDb: double("noise_db"),
    warnings: json("warnings").$type<Warning[]>().notNull(),
    dips: json("dips").$type<(Dip & { publicId: string })[]>().notNull(),
    createdBy: rowRef("created_by").references(() => users.id, { onDelete: "set null" }),
    createdAt: utc("created_at").notNull(),
  },
  (t) => [uniqueIndex("analyses_sweep_number").on(t.sweepId, t.number)],
);

/** A correction with where it came from, so that a number can say how it came about. */
export interface StoredCorrection extends Correction {
  /** Public ids and the version's number at that time; null where no bench took part. */
  bench: { bench: string; version: string; number: number; name: string } | null;
  /** SHA-256 of the reference sweeps' originals by kind. */
  references: Partial<Record<"open" | "short" | "load" | "through", string>>;
  feedline: Feedline | null;
  /** Of all that the bench's part was computed from: another one gives other numbers. Absent without a bench. */
  basis?: string;
  /** The day, UTC, from which that version of the bench holds. Absent without a bench. */
  validFrom?: string;
}

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
