import { and, eq, getTableColumns, inArray, isNull, or, type SQL, type SQLWrapper } from "drizzle-orm";
import type { MySqlColumn, MySqlTable } from "drizzle-orm/mysql-core";
import { db } from "./client.server.ts";
import * as t from "./schema/index.ts";

/**
 * The kinds of rows that make a project, in an order in which each comes after those it names (but for `later`). A row's
 * own columns go into a bundle as they are; what names another row is written by that row's public id.
 */
export interface BundleKind {
  name: KindName;
  table: MySqlTable;
  /** Column → kind of row that it names; "people" for persons. */
  refs: Record<string, KindName | "people">;
  /** Refs to kinds that come after this one: written once those are there. */
  later: string[];
  /** Columns that stay behind: places in the store, what is drawn anew, keys of this installation. */
  left: string[];
  of: (projectId: number) => SQL | undefined;
}

export const KIND_NAMES = [
  "project",
  "bands",
  "benches",
  "cables",
  "originals",
  "sweeps",
  "readings",
  "analyses",
  "dips",
  "steps",
  "antenna-versions",
  "bench-versions",
  "bench-references",
  "photographs",
  "trails",
  "trail-dips",
  "trail-decisions",
  "verdicts",
  "notes",
  "note-versions",
  "note-references",
  "attachments",
  "plates",
  "plate-forms",
  "plate-sources",
  "write-ups",
  "write-up-versions",
  "mentions",
  "activity",
] as const;
export type KindName = (typeof KIND_NAMES)[number];

export function columnsOf(kind: BundleKind): [string, MySqlColumn][] {
  const left = new Set(["id", "projectId", ...kind.left]);
  return Object.entries(getTableColumns(kind.table)).filter(([key]) => !left.has(key)) as [
    string,
    MySqlColumn,
  ][];
}

/** The field of a record that holds a column: `publicId` is `id`, and what names a row loses its `Id`. */
export function fieldOf(kind: BundleKind, column: string): string {
  if (column === "publicId") return "id";
  return column in kind.refs ? column.replace(/Id$/, "") : column;
}

export function kindNamed(name: KindName): BundleKind {
  return KINDS[KIND_NAMES.indexOf(name)];
}

type Given = Partial<Omit<BundleKind, "name" | "table" | "of">>;

/** Rows that carry the project's id themselves. */
function own(name: KindName, table: MySqlTable & { projectId: SQLWrapper }, given: Given = {}): BundleKind {
  return kind(name, table, (projectId) => eq(table.projectId, projectId), given);
}

/** Rows that hang on a row of the project. */
function under(
  name: KindName,
  table: MySqlTable,
  link: MySqlColumn,
  parent: MySqlTable & { id: MySqlColumn; projectId: MySqlColumn },
  given: Given = {},
): BundleKind {
  const of = (projectId: number) =>
    inArray(link, db.select({ id: parent.id }).from(parent).where(eq(parent.projectId, projectId)));
  return kind(name, table, of, given);
}

function kind(name: KindName, table: MySqlTable, of: BundleKind["of"], given: Given): BundleKind {
  return { name, table, of, refs: {}, later: [], left: [], ...given };
}

/** Notes that were not removed: what hangs on others waits only for its end, and nobody reads it. */
function standingNotes(projectId: number) {
  const standing = and(eq(t.notes.projectId, projectId), isNull(t.notes.removedAt));
  return db.select({ id: t.notes.id }).from(t.notes).where(standing);
}

/** Mentions of what is the project's that were found to link: what was never looked at, or does not link, is nobody's record. */
function isKeptMention(projectId: number) {
  const of = (table: typeof t.plates | typeof t.writeUps) =>
    db.select({ id: table.id }).from(table).where(eq(table.projectId, projectId));
  return and(
    or(inArray(t.webmentions.plateId, of(t.plates)), inArray(t.webmentions.writeUpId, of(t.writeUps))),
    inArray(t.webmentions.state, ["verified", "shown", "hidden", "gone"]),
  );
}

const BY = { createdBy: "people" } as const;
const PLACE = { sweepId: "sweeps", dipId: "dips", trailId: "trails", stepId: "steps" } as const;

export const KINDS: readonly BundleKind[] = [
  kind("project", t.projects, (id) => eq(t.projects.id, id), {}),
  own("bands", t.designBands),
  own("benches", t.benches, { refs: { ...BY, ownerId: "people" } }),
  own("cables", t.cables, { refs: BY }),
  own("originals", t.files, { refs: { uploadedBy: "people" }, left: ["storageKey"] }),
  own("sweeps", t.sweeps, {
    refs: { ...BY, fileId: "originals", readingId: "readings", analysisId: "analyses", benchId: "benches" },
    later: ["readingId", "analysisId"],
    left: ["preview"],
  }),
  under("readings", t.readings, t.readings.sweepId, t.sweeps, { refs: { ...BY, sweepId: "sweeps" } }),
  under("analyses", t.analyses, t.analyses.sweepId, t.sweeps, {
    refs: { ...BY, sweepId: "sweeps", readingId: "readings" },
  }),
  own("dips", t.dips, { refs: { sweepId: "sweeps", verdictBy: "people" } }),
  own("steps", t.steps, { refs: { ...BY, beforeSweepId: "sweeps", afterSweepId: "sweeps" } }),
  own("antenna-versions", t.antennaVersions, { refs: { ...BY, stepId: "steps" } }),
  under("bench-versions", t.benchVersions, t.benchVersions.benchId, t.benches, {
    refs: { ...BY, benchId: "benches" },
  }),
  kind(
    "bench-references",
    t.benchReferences,
    (projectId) =>
      inArray(
        t.benchReferences.versionId,
        db
          .select({ id: t.benchVersions.id })
          .from(t.benchVersions)
          .innerJoin(t.benches, eq(t.benches.id, t.benchVersions.benchId))
          .where(eq(t.benches.projectId, projectId)),
      ),
    { refs: { versionId: "bench-versions", sweepId: "sweeps" } },
  ),
  own("photographs", t.photographs, {
    refs: { ...BY, benchId: "benches", stepId: "steps" },
    left: ["storageKey", "shownKey", "smallKey"],
  }),
  own("trails", t.trails, { refs: { verdictBy: "people" } }),
  under("trail-dips", t.trailDips, t.trailDips.trailId, t.trails, {
    refs: { dipId: "dips", trailId: "trails" },
  }),
  under("trail-decisions", t.trailDecisions, t.trailDecisions.oneId, t.dips, {
    refs: { oneId: "dips", otherId: "dips", by: "people" },
  }),
  own("verdicts", t.verdictEvents, { refs: { dipId: "dips", trailId: "trails", by: "people" } }),
  own("notes", t.notes, {
    refs: { ...PLACE, benchId: "benches", parentId: "notes", authorId: "people", removedBy: "people" },
    left: ["clientKey"],
  }),
  kind("note-versions", t.noteVersions, (id) => inArray(t.noteVersions.noteId, standingNotes(id)), {
    refs: { noteId: "notes", editedBy: "people" },
  }),
  kind("note-references", t.noteReferences, (id) => inArray(t.noteReferences.noteId, standingNotes(id)), {
    refs: { noteId: "notes" },
  }),
  kind("attachments", t.attachments, (id) => inArray(t.attachments.noteId, standingNotes(id)), {
    refs: { noteId: "notes", uploadedBy: "people" },
    left: ["storageKey", "shownKey", "smallKey"],
  }),
  own("plates", t.plates, { refs: { ...BY, previousId: "plates", withdrawnBy: "people" }, left: ["record"] }),
  under("plate-forms", t.plateForms, t.plateForms.plateId, t.plates, {
    refs: { plateId: "plates" },
    left: ["storageKey"],
  }),
  under("plate-sources", t.plateSources, t.plateSources.plateId, t.plates, {
    refs: { plateId: "plates" },
    left: ["storageKey"],
  }),
  own("write-ups", t.writeUps, { refs: BY }),
  under("write-up-versions", t.writeUpVersions, t.writeUpVersions.writeUpId, t.writeUps, {
    refs: { writeUpId: "write-ups", publishedBy: "people" },
  }),
  kind("mentions", t.webmentions, isKeptMention, {
    refs: { plateId: "plates", writeUpId: "write-ups", decidedBy: "people" },
    left: ["pairSha256"],
  }),
  own("activity", t.events, { refs: { actorId: "people" } }),
];
