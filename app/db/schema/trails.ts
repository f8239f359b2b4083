import { double, index, json, mysqlTable, primaryKey, varchar } from "drizzle-orm/mysql-core";
import { publicId, rowId, rowRef, utc } from "./columns.ts";
import { users } from "./people.ts";
import { projects } from "./projects.ts";
import { dips } from "./sweeps.ts";

const VERDICTS = ["open", "proposed", "settled"] as const;

/** One dip followed from sweep to sweep. */
export const trails = mysqlTable(
  "trails",
  {
    id: rowId(),
    publicId: publicId(),
    projectId: rowRef("project_id")
      .notNull()
      .references(() => projects.id, { onDelete: "cascade" }),
    /** Empty while nobody named it. */
    name: varchar("name", { length: 80 }).notNull().default(""),
    /** Of its newest dip: for order and words. */
    frequencyHz: double("frequency_hz").notNull(),
    verdict: varchar("verdict", { length: 10, enum: VERDICTS }).notNull().default("open"),
    verdictText: varchar("verdict_text", { length: 300 }).notNull().default(""),
    verdictBy: rowRef("verdict_by").references(() => users.id, { onDelete: "set null" }),
    verdictAt: utc("verdict_at"),
    createdAt: utc("created_at").notNull(),
  },
  (t) => [index("trails_project").on(t.projectId, t.frequencyHz)],
);

/** A dip is in at most one trail. */
export const trailDips = mysqlTable(
  "trail_dips",
  {
    dipId: rowRef("dip_id")
      .primaryKey()
      .references(() => dips.id, { onDelete: "cascade" }),
    trailId: rowRef("trail_id")
      .notNull()
      .references(() => trails.id, { onDelete: "cascade" }),
  },
  (t) => [index("trail_dips_trail").on(t.trailId)],
);

/** A person's word on two dips; it outranks the pairing for ever. `oneId` is the smaller row id. */
export const trailDecisions = mysqlTable(
  "trail_decisions",
  {
    oneId: rowRef("one_id")
      .notNull()
      .references(() => dips.id, { onDelete: "cascade" }),
    otherId: rowRef("other_id")
      .notNull()
      .references(() => dips.id, { onDelete: "cascade" }),
    decision: varchar("decision", { length: 6, enum: ["same", "apart"] }).notNull(),
    by: rowRef("decided_by").references(() => users.id, { onDelete: "set null" }),
    at: utc("at").notNull(),
  },
  (t) => [primaryKey({ columns: [t.oneId, t.otherId] }), index("trail_decisions_other").on(t.otherId)],
);

/** Every verdict that was given on a dip or a trail: who, when, on what evidence. */
export const verdictEvents = mysqlTable(
  "verdict_events",
  {
    id: rowId(),
    publicId: publicId(),
    projectId: rowRef("project_id")
      .notNull()
      .references(() => projects.id, { onDelete: "cascade" }),
    dipId: rowRef("dip_id").references(() => dips.id, { onDelete: "cascade" }),
    trailId: rowRef("trail_id").references(() => trails.id, { onDelete: "cascade" }),
    verdict: varchar("verdict", { length: 10, enum: VERDICTS }).notNull(),
    text: varchar("text", { length: 300 }).notNull(),
    evidence: json("evidence").$type<Evidence[]>().notNull(),
    by: rowRef("given_by").references(() => users.id, { onDelete: "set null" }),
    at: utc("at").notNull(),
  },
  (t) => [index("verdict_events_dip").on(t.dipId, t.at), index("verdict_events_trail").on(t.trailId, t.at)],
);

/** What a verdict rests on: public ids, and what they said at that time. */
export interface Evidence {
  kind: "sweep" | "step" | "note" | "cause" | "dip";
  id: string;
  text: string;
}
