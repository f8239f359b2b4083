import { double, index, int, json, mysqlTable, text, uniqueIndex, varchar } from "drizzle-orm/mysql-core";
import type { BenchGiven, BenchStandards } from "../../measurement/bench.ts";
import { publicId, rowId, rowRef, utc } from "./columns.ts";
import { users } from "./people.ts";
import { projects } from "./projects.ts";
import { sweeps } from "./sweeps.ts";

/**
 * A measuring set-up. It is kept in a project; one with an `ownerId` is that person's own and can be used in every
 * project where that person may add sweeps.
 */
export const benches = mysqlTable(
  "benches",
  {
    id: rowId(),
    publicId: publicId(),
    projectId: rowRef("project_id")
      .notNull()
      .references(() => projects.id, { onDelete: "cascade" }),
    ownerId: rowRef("owner_id").references(() => users.id, { onDelete: "set null" }),
    name: varchar("name", { length: 120 }).notNull(),
    /** Markdown. */
    description: text("description").notNull(),
    createdBy: rowRef("created_by").references(() => users.id, { onDelete: "set null" }),
    createdAt: utc("created_at").notNull(),
    updatedAt: utc("updated_at").notNull(),
    /** Put away: old sweeps keep it, new ones are not offered it. */
    retiredAt: utc("retired_at"),
  },
  (t) => [index("benches_project").on(t.projectId), index("benches_owner").on(t.ownerId)],
);

/** The bench as it was from a day on, until the next version's day. */
export const benchVersions = mysqlTable(
  "bench_versions",
  {
    id: rowId(),
    publicId: publicId(),
    benchId: rowRef("bench_id")
      .notNull()
      .references(() => benches.id, { onDelete: "cascade" }),
    number: int("number", { unsigned: true }).notNull(),
    validFrom: utc("valid_from").notNull(),
    /** What was built or rebuilt, in a line. */
    remark: varchar("remark", { length: 300 }).notNull(),
    /** Connectors and cables. */
    parts: json("parts").$type<BenchPart[]>().notNull(),
    standards: json("standards").$type<BenchStandards>().notNull(),
    given: json("given").$type<BenchGiven>().notNull(),
    createdBy: rowRef("created_by").references(() => users.id, { onDelete: "set null" }),
    createdAt: utc("created_at").notNull(),
  },
  (t) => [
    uniqueIndex("bench_versions_number").on(t.benchId, t.number),
    index("bench_versions_from").on(t.benchId, t.validFrom),
  ],
);

export interface BenchPart {
  kind: "connector" | "cable" | "adapter" | "other";
  text: string;
}

/** A reference sweep of one version: an ordinary sweep whose purpose is "reference". One of each kind. */
export const benchReferences = mysqlTable(
  "bench_references",
  {
    id: rowId(),
    versionId: rowRef("version_id")
      .notNull()
      .references(() => benchVersions.id, { onDelete: "cascade" }),
    kind: varchar("kind", { length: 8, enum: ["open", "short", "load", "through"] }).notNull(),
    sweepId: rowRef("sweep_id")
      .notNull()
      .references(() => sweeps.id, { onDelete: "cascade" }),
    createdAt: utc("created_at").notNull(),
  },
  (t) => [
    uniqueIndex("bench_references_kind").on(t.versionId, t.kind),
    index("bench_references_sweep").on(t.sweepId),
  ],
);

/** A project's own entry beside the built-in cable table. */
export const cables = mysqlTable(
  "cables",
  {
    id: rowId(),
    publicId: publicId(),
    projectId: rowRef("project_id")
      .notNull()
      .references(() => projects.id, { onDelete: "cascade" }),
    name: varchar("name", { length: 80 }).notNull(),
    /** dB per metre: k1·√f + k2·f, f in MHz. */
    k1: double("k1").notNull(),
    k2: double("k2").notNull(),
    velocityFactor: double("velocity_factor").notNull(),
    /** The attenuation points that k1 and k2 were fitted to; null where k1 and k2 were given. */
    points: json("points").$type<{ mhz: number; dbPer100m: number }[] | null>(),
    source: varchar("source", { length: 300 }).notNull(),
    createdBy: rowRef("created_by").references(() => users.id, { onDelete: "set null" }),
    createdAt: utc("created_at").notNull(),
  },
  (t) => [uniqueIndex("cables_project_name").on(t.projectId, t.name)],
);
