import { and, asc, eq, getTableColumns, gt, inArray, isNull, like, type SQL, sql } from "drizzle-orm";
import type { MySqlColumn } from "drizzle-orm/mysql-core";
import { type BundleKind, KINDS } from "./bundle-kinds.server.ts";
import { db, type Queryable, type Transaction } from "./client.server.ts";
import {
  memberships,
  notes,
  plateForms,
  plateSources,
  plates,
  sweepPoints,
  sweeps,
  users,
} from "./schema/index.ts";
import { FROM_BUNDLE } from "./shown-name.server.ts";

/** Rows of a project as they go into a bundle and come out of one. */

export type Row = Record<string, unknown>;
/** Row id → public id of every row of a kind that others name. */
export type PublicIds = Map<number, string>;

/** Everything that `work` reads is of one moment, however long it takes. */
export function inSnapshot<T>(work: (tx: Transaction) => Promise<T>): Promise<T> {
  return db.transaction(work, {
    isolationLevel: "repeatable read",
    withConsistentSnapshot: true,
  });
}

/** All rows of a kind, in the order in which they came about, some at a time. */
export async function* readAll(kind: BundleKind, projectId: number, tx: Queryable): AsyncGenerator<Row[]> {
  const columns: Record<string, MySqlColumn> = getTableColumns(kind.table) as never;
  const wanted = Object.fromEntries(Object.entries(columns).filter(([key]) => key !== "preview"));
  let last = 0;
  for (let page = 0; ; page++) {
    const after: SQL | undefined = columns.id && gt(columns.id, last);
    const query = tx
      .select(wanted)
      .from(kind.table)
      .where(and(kind.of(projectId), after))
      .orderBy(...(columns.id ? [asc(columns.id)] : keysOf(columns)))
      .limit(PAGE);
    const rows: Row[] = await (columns.id ? query : query.offset(page * PAGE));
    if (rows.length > 0) yield rows;
    if (rows.length < PAGE) return;
    last = Number(rows[rows.length - 1].id);
  }
}

/** The public ids of every row that another may name. */
export async function readPublicIds(
  projectId: number,
  tx: Queryable,
): Promise<Map<BundleKind["name"], PublicIds>> {
  const found = new Map<BundleKind["name"], PublicIds>();
  for (const kind of KINDS) {
    const columns: Record<string, MySqlColumn> = getTableColumns(kind.table) as never;
    if (!columns.publicId) continue;
    const rows = await tx
      .select({ id: columns.id, publicId: columns.publicId })
      .from(kind.table)
      .where(kind.of(projectId))
      .limit(MOST_ROWS);
    found.set(kind.name, new Map(rows.map((row) => [Number(row.id), String(row.publicId)])));
  }
  return found;
}

export async function findPreviews(sweepIds: number[], tx: Queryable) {
  if (sweepIds.length === 0) return [];
  return tx
    .select({ id: sweeps.id, preview: sweeps.preview })
    .from(sweeps)
    .where(inArray(sweeps.id, sweepIds))
    .limit(sweepIds.length);
}

/** The first bytes of the points of those readings among these that have some. */
export async function findPointHeads(readingIds: number[], tx: Queryable): Promise<Map<number, Buffer>> {
  if (readingIds.length === 0) return new Map();
  const rows = await tx
    .select({ id: sweepPoints.readingId, head: sql<Buffer>`substr(${sweepPoints.data}, 1, 16)` })
    .from(sweepPoints)
    .where(and(inArray(sweepPoints.readingId, readingIds), eq(sweepPoints.part, 0)))
    .limit(readingIds.length);
  return new Map(rows.map((row) => [row.id, row.head]));
}

export async function findNotes(ids: number[], tx: Queryable) {
  return tx
    .select({ note: notes, author: users.name })
    .from(notes)
    .leftJoin(users, eq(users.id, notes.authorId))
    .where(inArray(notes.id, ids))
    .orderBy(asc(notes.id))
    .limit(ids.length);
}

export async function findMembers(projectId: number, tx: Queryable) {
  return tx
    .select({ userId: memberships.userId, role: memberships.role })
    .from(memberships)
    .where(eq(memberships.projectId, projectId))
    .orderBy(asc(memberships.createdAt))
    .limit(10_000);
}

export async function findPersons(ids: number[], tx: Queryable) {
  if (ids.length === 0) return [];
  return tx
    .select({ id: users.id, publicId: users.publicId, name: users.name, userName: users.userName })
    .from(users)
    .where(inArray(users.id, ids))
    .limit(ids.length);
}

/** Which of these public ids are in use here. */
export async function findTaken(kind: BundleKind, publicIds: string[], tx: Queryable): Promise<string[]> {
  const column = (getTableColumns(kind.table) as Record<string, MySqlColumn>).publicId;
  const taken: string[] = [];
  for (let i = 0; i < publicIds.length; i += PAGE) {
    const rows = await tx
      .select({ publicId: column })
      .from(kind.table)
      .where(inArray(column, publicIds.slice(i, i + PAGE)))
      .limit(PAGE);
    taken.push(...rows.map((row) => String(row.publicId)));
  }
  return taken;
}

/** Writes rows; answers the row id of each by its public id, where its kind has one. */
export async function insertRows(kind: BundleKind, rows: Row[], tx: Queryable): Promise<Map<string, number>> {
  await tx.insert(kind.table).values(rows as never);
  const columns = getTableColumns(kind.table) as Record<string, MySqlColumn>;
  if (!columns.publicId) return new Map();
  const made = await tx
    .select({ id: columns.id, publicId: columns.publicId })
    .from(kind.table)
    .where(
      inArray(
        columns.publicId,
        rows.map((row) => row.publicId),
      ),
    )
    .limit(rows.length);
  return new Map(made.map((row) => [String(row.publicId), Number(row.id)]));
}

/** Sets some columns of a row by its row id. */
export async function updateRow(kind: BundleKind, id: number, values: Row, tx: Queryable) {
  const columns = getTableColumns(kind.table) as Record<string, MySqlColumn>;
  await tx
    .update(kind.table)
    .set(values as never)
    .where(eq(columns.id, id));
}

export async function insertPoints(readingId: number, parts: Buffer[], tx: Queryable) {
  for (const [part, data] of parts.entries()) await tx.insert(sweepPoints).values({ readingId, part, data });
}

export async function updatePreview(sweepId: number, preview: Buffer, tx: Queryable = db) {
  await tx.update(sweeps).set({ preview }).where(eq(sweeps.id, sweepId));
}

/** Removes the plates of a project that was taken in by half, and answers their objects: a plate outlives its project else. */
export async function deletePlates(projectId: number, tx: Queryable): Promise<string[]> {
  const mine = tx.select({ id: plates.id }).from(plates).where(eq(plates.projectId, projectId));
  const forms = await tx
    .select({ key: plateForms.storageKey })
    .from(plateForms)
    .where(inArray(plateForms.plateId, mine))
    .limit(MOST_ROWS);
  const sources = await tx
    .select({ key: plateSources.storageKey })
    .from(plateSources)
    .where(inArray(plateSources.plateId, mine))
    .limit(MOST_ROWS);
  await tx.delete(plates).where(eq(plates.projectId, projectId));
  return [...forms, ...sources].map(({ key }) => key);
}

/** A person who is kept by name only; answers the row id. */
export async function insertPlaceholder(
  person: { publicId: string; name: string; userName: string },
  tx: Queryable,
): Promise<number> {
  const now = new Date();
  const [row] = await tx
    .insert(users)
    .values({ ...person, email: null, createdAt: now, closedAt: now })
    .$returningId();
  return row.id;
}

/** When the bundle came that a person is known by; undefined for whoever is not from one. */
export async function findTakenInAt(userId: number, tx: Queryable = db): Promise<Date | undefined> {
  const rows = await tx
    .select({ at: users.createdAt })
    .from(users)
    .where(and(eq(users.id, userId), like(users.userName, `${FROM_BUNDLE}%`)))
    .limit(1);
  return rows[0]?.at;
}

/** Removes persons that were made for a project that was taken in by half. */
export async function deletePersons(ids: number[], tx: Queryable) {
  if (ids.length > 0) await tx.delete(users).where(and(inArray(users.id, ids), isNull(users.email)));
}

/** Of a table without row ids. */
function keysOf(columns: Record<string, MySqlColumn>): SQL[] {
  const keys = ["dipId", "oneId", "otherId", "plateId", "form"];
  return keys.filter((key) => columns[key]).map((key) => asc(columns[key]));
}

const PAGE = 200;
/** More rows of a kind than a project can have before its bundle is refused. */
const MOST_ROWS = 1_000_000;
