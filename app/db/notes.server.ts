import { and, asc, desc, eq, gt, isNull } from "drizzle-orm";
import { alias } from "drizzle-orm/mysql-core";
import { db, type Queryable } from "./client.server.ts";
import { decodeCursor, encodeCursor } from "./cursor.server.ts";
import { newPublicId } from "./ids.server.ts";
import { benches, dips, notes, steps, sweeps, trails, users } from "./schema/index.ts";

export type NoteRow = typeof notes.$inferSelect;

/** What a note stands on: a dip (with its sweep), a sweep, a trail, a step, a bench, or the project itself. */
export interface NotePlace {
  projectId: number;
  sweepId: number | null;
  dipId: number | null;
  trailId?: number | null;
  stepId?: number | null;
  benchId?: number | null;
}

const parents = alias(notes, "parents");

const columns = {
  note: notes,
  author: { id: users.id, name: users.name, userName: users.userName },
};

/** What a note stands on, as addresses name it and as people do. */
const placeColumns = {
  sweepPublicId: sweeps.publicId,
  sweepTitle: sweeps.title,
  dipPublicId: dips.publicId,
  dipFrequencyHz: dips.frequencyHz,
  trailPublicId: trails.publicId,
  trailName: trails.name,
  trailFrequencyHz: trails.frequencyHz,
  stepPublicId: steps.publicId,
  stepTitle: steps.title,
  benchPublicId: benches.publicId,
  benchName: benches.name,
};

/** Every note of one place, oldest first; replies are put under their parents by whoever draws them. */
export async function findAllByPlace(place: NotePlace, tx: Queryable = db) {
  return tx
    .select(columns)
    .from(notes)
    .leftJoin(users, eq(users.id, notes.authorId))
    .where(and(eq(notes.projectId, place.projectId), standsOn(place)))
    .orderBy(asc(notes.id))
    .limit(1000);
}
export type ListedNote = Awaited<ReturnType<typeof findAllByPlace>>[number];

export async function findByPublicId(publicId: string, tx: Queryable = db) {
  const rows = await tx
    .select({
      ...columns,
      ...placeColumns,
    })
    .from(notes)
    .leftJoin(users, eq(users.id, notes.authorId))
    .leftJoin(sweeps, eq(sweeps.id, notes.sweepId))
    .leftJoin(dips, eq(dips.id, notes.dipId))
    .leftJoin(trails, eq(trails.id, notes.trailId))
    .leftJoin(steps, eq(steps.id, notes.stepId))
    .leftJoin(benches, eq(benches.id, notes.benchId))
    .where(eq(notes.publicId, publicId))
    .limit(1);
  return rows[0];
}

const withParent = { ...columns, parent: parents.publicId };

/** The notes on a dip, oldest first, a page at a time, each with the note that it answers. */
export async function findPageByDip(
  dipId: number,
  page: { limit?: number; cursor?: string } = {},
  tx: Queryable = db,
) {
  const limit = Math.min(page.limit ?? 100, 100);
  const after = page.cursor ? decodeCursor(page.cursor) : undefined;
  const rows = await tx
    .select(withParent)
    .from(notes)
    .leftJoin(users, eq(users.id, notes.authorId))
    .leftJoin(parents, eq(parents.id, notes.parentId))
    .where(and(eq(notes.dipId, dipId), after && gt(notes.id, after.id)))
    .orderBy(asc(notes.id))
    .limit(limit + 1);
  const last = rows.length > limit ? rows[limit - 1].note : undefined;
  return {
    rows: rows.slice(0, limit),
    nextCursor: last ? encodeCursor({ at: last.createdAt, id: last.id }) : null,
  };
}

export async function findWithParent(publicId: string, tx: Queryable = db) {
  const rows = await tx
    .select(withParent)
    .from(notes)
    .leftJoin(users, eq(users.id, notes.authorId))
    .leftJoin(parents, eq(parents.id, notes.parentId))
    .where(eq(notes.publicId, publicId))
    .limit(1);
  return rows[0];
}

export async function findByClientKey(clientKey: string, tx: Queryable = db) {
  return (await tx.select().from(notes).where(eq(notes.clientKey, clientKey)).limit(1))[0];
}

/** The newest notes anywhere in the project, with where they stand. */
export async function findLatestByProject(projectId: number, limit = 10, tx: Queryable = db) {
  return tx
    .select({
      ...columns,
      ...placeColumns,
    })
    .from(notes)
    .leftJoin(users, eq(users.id, notes.authorId))
    .leftJoin(sweeps, eq(sweeps.id, notes.sweepId))
    .leftJoin(dips, eq(dips.id, notes.dipId))
    .leftJoin(trails, eq(trails.id, notes.trailId))
    .leftJoin(steps, eq(steps.id, notes.stepId))
    .leftJoin(benches, eq(benches.id, notes.benchId))
    .where(and(eq(notes.projectId, projectId), isNull(notes.removedAt)))
    .orderBy(desc(notes.id))
    .limit(limit);
}

export async function insert(
  values: NotePlace & {
    fromHz?: number | null;
    toHz?: number | null;
    region?: NoteRow["region"];
    parentId: number | null;
    authorId: number;
    body: string;
    clientKey: string | null;
    createdAt?: Date;
  },
  tx: Queryable = db,
) {
  const publicId = newPublicId();
  const [row] = await tx
    .insert(notes)
    .values({ createdAt: new Date(), ...values, publicId })
    .$returningId();
  return { id: row.id, publicId };
}

/** Locks the note's row: nobody can answer it until the transaction ends. */
export async function lock(id: number, tx: Queryable): Promise<NoteRow | undefined> {
  return (await tx.select().from(notes).where(eq(notes.id, id)).limit(1).for("update"))[0];
}

export async function updateBody(id: number, body: string, editedAt: Date, tx: Queryable) {
  await tx.update(notes).set({ body, editedAt }).where(eq(notes.id, id));
}

/** Reads what is committed now, not what was there when the transaction began. */
export async function hasReplies(id: number, tx: Queryable): Promise<boolean> {
  const rows = await tx
    .select({ id: notes.id })
    .from(notes)
    .where(eq(notes.parentId, id))
    .limit(1)
    .for("update");
  return rows.length > 0;
}

/** Nobody reads it from now on; its text stays until it is purged. */
export async function setRemoved(id: number, removedBy: number, tx: Queryable) {
  await tx.update(notes).set({ removedAt: new Date(), removedBy }).where(eq(notes.id, id));
}

export async function setRestored(id: number, tx: Queryable) {
  await tx.update(notes).set({ removedAt: null, removedBy: null }).where(eq(notes.id, id));
}

/** Leaves a stub in its place: the text goes, who and when stay. */
export async function emptyBody(id: number, tx: Queryable) {
  await tx.update(notes).set({ body: "" }).where(eq(notes.id, id));
}

export async function deleteById(id: number, tx: Queryable = db) {
  await tx.delete(notes).where(eq(notes.id, id));
}

/** The column that says where a note stands; for the project itself, all of them empty. */
function standsOn({ sweepId, dipId, trailId, stepId, benchId }: NotePlace) {
  if (dipId) return eq(notes.dipId, dipId);
  if (trailId) return eq(notes.trailId, trailId);
  if (stepId) return eq(notes.stepId, stepId);
  if (benchId) return eq(notes.benchId, benchId);
  if (sweepId) return and(eq(notes.sweepId, sweepId), isNull(notes.dipId));
  return and(isNull(notes.sweepId), isNull(notes.trailId), isNull(notes.stepId), isNull(notes.benchId));
}
