import { and, asc, count, desc, eq, lt, max, or, type SQL, sql } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { decodeCursor, encodeCursor } from "./cursor.server.ts";
import { newPublicId } from "./ids.server.ts";
import { designBands, events, memberships, projects, sweeps, users } from "./schema/index.ts";

export type Project = typeof projects.$inferSelect;
type Role = (typeof memberships.$inferSelect)["role"];
export type DesignBand = typeof designBands.$inferSelect;

/** The project and what this person is in it, in one query. */
export async function findWithRole(publicId: string, userId: number | null, tx: Queryable = db) {
  return findOneWithRole(eq(projects.publicId, publicId), userId, tx);
}

export async function findWithRoleById(id: number, userId: number | null, tx: Queryable = db) {
  return findOneWithRole(eq(projects.id, id), userId, tx);
}

async function findOneWithRole(which: SQL, userId: number | null, tx: Queryable) {
  const rows = await tx
    .select({
      project: projects,
      role: memberships.role,
      lastActiveAt: memberships.lastActiveAt,
      lastEventId: LAST_EVENT_ID,
    })
    .from(projects)
    .leftJoin(memberships, and(eq(memberships.projectId, projects.id), eq(memberships.userId, userId ?? 0)))
    .where(which)
    .limit(1);
  return rows[0];
}

/** Row id of the last event, 0 for none: read before anything else of a page, so that what is told after it is not on the page yet. */
const LAST_EVENT_ID =
  sql<number>`coalesce((select max(e.id) from ${events} e where e.project_id = ${projects.id}), 0)`.mapWith(
    Number,
  );

const listColumns = {
  id: projects.id,
  publicId: projects.publicId,
  title: projects.title,
  summary: projects.summary,
  visibility: projects.visibility,
  ituRegion: projects.ituRegion,
  demo: projects.demo,
  updatedAt: projects.updatedAt,
};

/** The projects that a person is a member of, last changed first, a page at a time. */
export async function findPageByUser(
  userId: number,
  page: { limit?: number; cursor?: string } = {},
  tx: Queryable = db,
) {
  const limit = Math.min(page.limit ?? 100, 100);
  const before = page.cursor ? decodeCursor(page.cursor) : undefined;
  const rows = await tx
    .select({
      ...listColumns,
      role: memberships.role,
      sweepCount: count(sweeps.id),
      lastSweepAt: max(sweeps.createdAt),
    })
    .from(memberships)
    .innerJoin(projects, eq(projects.id, memberships.projectId))
    .leftJoin(sweeps, and(eq(sweeps.projectId, projects.id), eq(sweeps.purpose, "antenna")))
    .where(
      and(
        eq(memberships.userId, userId),
        before &&
          or(
            lt(projects.updatedAt, before.at),
            and(eq(projects.updatedAt, before.at), lt(projects.id, before.id)),
          ),
      ),
    )
    .groupBy(projects.id, memberships.role)
    .orderBy(desc(projects.updatedAt), desc(projects.id))
    .limit(limit + 1);
  const last = rows.length > limit ? rows[limit - 1] : undefined;
  return {
    rows: rows.slice(0, limit),
    nextCursor: last ? encodeCursor({ at: last.updatedAt, id: last.id }) : null,
  };
}

export async function findAllPublic(limit = 20, tx: Queryable = db) {
  return tx
    .select({ ...listColumns, sweepCount: count(sweeps.id) })
    .from(projects)
    .leftJoin(sweeps, and(eq(sweeps.projectId, projects.id), eq(sweeps.purpose, "antenna")))
    .where(eq(projects.visibility, "public"))
    .groupBy(projects.id)
    .orderBy(desc(projects.updatedAt))
    .limit(limit);
}

export async function countByVisibility(tx: Queryable = db) {
  return tx
    .select({ visibility: projects.visibility, n: count() })
    .from(projects)
    .groupBy(projects.visibility)
    .limit(10);
}

/** The projects of the demo, complete or not. */
export async function findIdsOfDemo(tx: Queryable = db): Promise<number[]> {
  const rows = await tx.select({ id: projects.id }).from(projects).where(eq(projects.demo, 1)).limit(100);
  return rows.map((row) => row.id);
}

export interface NewProject {
  title: string;
  summary: string;
  visibility: Project["visibility"];
  ituRegion: number | null;
  demo?: number;
}

export async function insert(project: NewProject, tx: Queryable = db) {
  const publicId = newPublicId();
  const now = new Date();
  const [row] = await tx
    .insert(projects)
    .values({ ...project, publicId, createdAt: now, updatedAt: now })
    .$returningId();
  return { id: row.id, publicId };
}

export async function update(id: number, values: Partial<typeof projects.$inferInsert>, tx: Queryable = db) {
  await tx
    .update(projects)
    .set({ ...values, updatedAt: new Date() })
    .where(eq(projects.id, id));
}

/** Locks the project's row: nothing can be put into the project until the transaction ends. */
export async function lock(id: number, tx: Queryable) {
  return (await tx.select().from(projects).where(eq(projects.id, id)).limit(1).for("update"))[0];
}

export async function deleteById(id: number, tx: Queryable = db) {
  await tx.delete(projects).where(eq(projects.id, id));
}

export async function findMembers(projectId: number, tx: Queryable = db) {
  return tx
    .select({
      userId: users.id,
      userName: users.userName,
      name: users.name,
      role: memberships.role,
      since: memberships.createdAt,
      lastActiveAt: memberships.lastActiveAt,
      callSign: users.callSign,
    })
    .from(memberships)
    .innerJoin(users, eq(users.id, memberships.userId))
    .where(eq(memberships.projectId, projectId))
    .orderBy(sql`field(${memberships.role}, 'owner', 'experimenter', 'commenter', 'reader')`, asc(users.name))
    .limit(100);
}

/** Locks the owners' rows, so that two owners who leave at once can't both go. */
export async function lockOwners(projectId: number, tx: Queryable) {
  return tx
    .select({ userId: memberships.userId })
    .from(memberships)
    .where(and(eq(memberships.projectId, projectId), eq(memberships.role, "owner")))
    .limit(100)
    .for("update");
}

/** What the person is in the project, locked until the transaction ends. */
export async function lockMember(projectId: number, userId: number, tx: Queryable) {
  const rows = await tx
    .select({ role: memberships.role })
    .from(memberships)
    .where(and(eq(memberships.projectId, projectId), eq(memberships.userId, userId)))
    .limit(1)
    .for("update");
  return rows[0]?.role;
}

export async function insertMember(projectId: number, userId: number, role: Role, tx: Queryable = db) {
  await tx.insert(memberships).values({ projectId, userId, role, createdAt: new Date() });
}

export async function updateMember(projectId: number, userId: number, role: Role, tx: Queryable = db) {
  await tx
    .update(memberships)
    .set({ role })
    .where(and(eq(memberships.projectId, projectId), eq(memberships.userId, userId)));
}

/** That the member was here just now. */
export async function setActive(projectId: number, userId: number, tx: Queryable = db) {
  await tx
    .update(memberships)
    .set({ lastActiveAt: new Date() })
    .where(and(eq(memberships.projectId, projectId), eq(memberships.userId, userId)));
}

export async function deleteMember(projectId: number, userId: number, tx: Queryable = db) {
  await tx
    .delete(memberships)
    .where(and(eq(memberships.projectId, projectId), eq(memberships.userId, userId)));
}

export async function findDesignBands(projectId: number, tx: Queryable = db): Promise<DesignBand[]> {
  return tx
    .select()
    .from(designBands)
    .where(eq(designBands.projectId, projectId))
    .orderBy(asc(designBands.lowHz))
    .limit(100);
}

export async function replaceDesignBands(
  projectId: number,
  bands: { name: string; lowHz: number; highHz: number; swrLimit: number }[],
  tx: Queryable,
) {
  await tx.delete(designBands).where(eq(designBands.projectId, projectId));
  if (bands.length === 0) return;
  await tx.insert(designBands).values(bands.map((band) => ({ ...band, projectId, publicId: newPublicId() })));
}
