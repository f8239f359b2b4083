import { index, int, json, mysqlTable, text, uniqueIndex, varchar } from "drizzle-orm/mysql-core";
import type { Antenna, ExpectedPlace, StepQuantity } from "../../measurement/antenna.ts";
import { benches } from "./benches.ts";
import { publicId, rowId, rowRef, sha256, utc } from "./columns.ts";
import { users } from "./people.ts";
import { projects } from "./projects.ts";
import { sweeps } from "./sweeps.ts";

/** What was changed between sweeps, or is planned to be. */
export const steps = mysqlTable(
  "steps",
  {
    id: rowId(),
    publicId: publicId(),
    projectId: rowRef("project_id")
      .notNull()
      .references(() => projects.id, { onDelete: "cascade" }),
    title: varchar("title", { length: 160 }).notNull(),
    /** Markdown. */
    body: text("body").notNull(),
    state: varchar("state", { length: 8, enum: ["planned", "done"] }).notNull(),
    /** When it was done; for a planned one null, or the day it is meant for. */
    at: utc("at"),
    quantities: json("quantities").$type<StepQuantity[]>().notNull(),
    /** Said by a person; null: found by date. */
    beforeSweepId: rowRef("before_sweep_id").references(() => sweeps.id, { onDelete: "set null" }),
    afterSweepId: rowRef("after_sweep_id").references(() => sweeps.id, { onDelete: "set null" }),
    /** Where each trail was expected, as reckoned before it was done. */
    expected: json("expected").$type<ExpectedPlace[]>().notNull(),
    createdBy: rowRef("created_by").references(() => users.id, { onDelete: "set null" }),
    createdAt: utc("created_at").notNull(),
    updatedAt: utc("updated_at").notNull(),
  },
  (t) => [index("steps_project").on(t.projectId, t.at)],
);

/** The antenna as it was from a day on; each change is a row of its own. */
export const antennaVersions = mysqlTable(
  "antenna_versions",
  {
    id: rowId(),
    publicId: publicId(),
    projectId: rowRef("project_id")
      .notNull()
      .references(() => projects.id, { onDelete: "cascade" }),
    number: int("number", { unsigned: true }).notNull(),
    validFrom: utc("valid_from").notNull(),
    content: json("content").$type<Antenna>().notNull(),
    /** What changed, in a line. */
    remark: varchar("remark", { length: 300 }).notNull(),
    /** The step that made this version. */
    stepId: rowRef("step_id").references(() => steps.id, { onDelete: "set null" }),
    createdBy: rowRef("created_by").references(() => users.id, { onDelete: "set null" }),
    createdAt: utc("created_at").notNull(),
  },
  (t) => [
    uniqueIndex("antenna_versions_number").on(t.projectId, t.number),
    index("antenna_versions_from").on(t.projectId, t.validFrom),
  ],
);

/** A photograph of the antenna (neither bench nor step), of a bench or of a step. Stored upright and without metadata beside its original. */
export const photographs = mysqlTable(
  "photographs",
  {
    id: rowId(),
    publicId: publicId(),
    projectId: rowRef("project_id")
      .notNull()
      .references(() => projects.id, { onDelete: "cascade" }),
    benchId: rowRef("bench_id").references(() => benches.id, { onDelete: "cascade" }),
    stepId: rowRef("step_id").references(() => steps.id, { onDelete: "cascade" }),
    caption: varchar("caption", { length: 300 }).notNull(),
    name: varchar("name", { length: 255 }).notNull(),
    sizeBytes: int("size_bytes", { unsigned: true }).notNull(),
    sha256: sha256("sha256").notNull(),
    storageKey: varchar("storage_key", { length: 120 }).notNull(),
    /** The copy that is shown, and the small one. */
    shownKey: varchar("shown_key", { length: 120 }).notNull(),
    smallKey: varchar("small_key", { length: 120 }).notNull(),
    width: int("width", { unsigned: true }).notNull(),
    height: int("height", { unsigned: true }).notNull(),
    createdBy: rowRef("created_by").references(() => users.id, { onDelete: "set null" }),
    createdAt: utc("created_at").notNull(),
  },
  (t) => [
    index("photographs_project").on(t.projectId),
    index("photographs_bench").on(t.benchId),
    index("photographs_step").on(t.stepId),
  ],
);
