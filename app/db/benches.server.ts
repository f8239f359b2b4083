import { and, asc, count, desc, eq, isNull, lte, ne, or, sql } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { newPublicId } from "./ids.server.ts";
import {
  benches,
  benchReferences,
  benchVersions,
  memberships,
  projects,
  sweeps,
  users,
} from "./schema/index.ts";

export type BenchRow = typeof benches.$inferSelect;
export type BenchVersionRow = typeof benchVersions.$inferSelect;
/** A bench with its home and whose it is. */
export async function findByPublicId(publicId: string, tx: Queryable = db) {
  const rows = await tx
    .select({
      bench: benches,
      owner: users.name,
      home: { publicId: projects.publicId, title: projects.title },
    })
    .from(benches)
    .innerJoin(projects, eq(projects.id, benches.projectId))
    .leftJoin(users, eq(users.id, benches.ownerId))
    .where(eq(benches.publicId, publicId))
    .limit(1);
  return rows[0];
}
export type FoundBench = NonNullable<Awaited<ReturnType<typeof findByPublicId>>>;

export async function findById(id: number, tx: Queryable = db): Promise<BenchRow | undefined> {
  return (await tx.select().from(benches).where(eq(benches.id, id)).limit(1))[0];
}

/** Locks the bench's row: versions of one bench are numbered one after another. */
export async function lock(id: number, tx: Queryable): Promise<BenchRow | undefined> {
  return (await tx.select().from(benches).where(eq(benches.id, id)).limit(1).for("update"))[0];
}

/** The benches kept in a project, those in use before those put away. */
export async function findAllByProject(projectId: number, tx: Queryable = db) {
  return tx
    .select(LISTED)
    .from(benches)
    .innerJoin(projects, eq(projects.id, benches.projectId))
    .leftJoin(users, eq(users.id, benches.ownerId))
    .where(eq(benches.projectId, projectId))
    .orderBy(sql`${benches.retiredAt} is not null`, asc(benches.name))
    .limit(100);
}
export type ListedBench = Awaited<ReturnType<typeof findAllByProject>>[number];

/** Members' own benches that are kept elsewhere and can be used here, for they may add sweeps here. */
export async function findBorrowable(projectId: number, tx: Queryable = db): Promise<ListedBench[]> {
  return tx
    .select(LISTED)
    .from(benches)
    .innerJoin(projects, eq(projects.id, benches.projectId))
    .innerJoin(memberships, and(eq(memberships.userId, benches.ownerId), mayAddSweepsIn(projectId)))
    .leftJoin(users, eq(users.id, benches.ownerId))
    .where(and(ne(benches.projectId, projectId), isNull(benches.retiredAt)))
    .orderBy(asc(users.name), asc(benches.name))
    .limit(100);
}

/** Whether the bench can be used in the project: it is kept there, or belongs to somebody who may add sweeps there. */
export async function isUsableIn(bench: BenchRow, projectId: number, tx: Queryable = db): Promise<boolean> {
  if (bench.projectId === projectId) return true;
  if (bench.ownerId === null) return false;
  const rows = await tx
    .select({ id: memberships.userId })
    .from(memberships)
    .where(and(eq(memberships.userId, bench.ownerId), mayAddSweepsIn(projectId)))
    .limit(1);
  return rows.length > 0;
}

/** The bench of the project's last sweep that has one. */
export async function findLastUsed(projectId: number, tx: Queryable = db): Promise<BenchRow | undefined> {
  const rows = await tx
    .select({ bench: benches })
    .from(sweeps)
    .innerJoin(benches, eq(benches.id, sweeps.benchId))
    .where(and(eq(sweeps.projectId, projectId), eq(sweeps.purpose, "antenna"), isNull(benches.retiredAt)))
    .orderBy(desc(sweeps.createdAt), desc(sweeps.id))
    .limit(1);
  return rows[0]?.bench;
}

export async function insert(
  values: Pick<typeof benches.$inferInsert, "projectId" | "ownerId" | "name" | "description" | "createdBy">,
  tx: Queryable,
) {
  const publicId = newPublicId();
  const now = new Date();
  const [row] = await tx
    .insert(benches)
    .values({ ...values, publicId, createdAt: now, updatedAt: now })
    .$returningId();
  return { id: row.id, publicId };
}

export async function update(id: number, values: Partial<typeof benches.$inferInsert>, tx: Queryable = db) {
  await tx
    .update(benches)
    .set({ ...values, updatedAt: new Date() })
    .where(eq(benches.id, id));
}

export async function deleteById(id: number, tx: Queryable) {
  await tx.delete(benches).where(eq(benches.id, id));
}

/** A bench's versions, the newest first, each with who wrote it down. */
export async function findVersions(benchId: number, tx: Queryable = db) {
  return tx
    .select({ version: benchVersions, by: users.name })
    .from(benchVersions)
    .leftJoin(users, eq(users.id, benchVersions.createdBy))
    .where(eq(benchVersions.benchId, benchId))
    .orderBy(desc(benchVersions.validFrom), desc(benchVersions.number))
    .limit(100);
}
export type ListedVersion = Awaited<ReturnType<typeof findVersions>>[number];

/** The version that was in force at a time; undefined before the first. */
export async function findVersionAt(benchId: number, at: Date, tx: Queryable = db) {
  const rows = await tx
    .select()
    .from(benchVersions)
    .where(and(eq(benchVersions.benchId, benchId), lte(benchVersions.validFrom, at)))
    .orderBy(desc(benchVersions.validFrom), desc(benchVersions.number))
    .limit(1);
  return rows[0] as BenchVersionRow | undefined;
}

export async function findFirstVersion(benchId: number, tx: Queryable = db) {
  const rows = await tx
    .select()
    .from(benchVersions)
    .where(eq(benchVersions.benchId, benchId))
    .orderBy(asc(benchVersions.validFrom))
    .limit(1);
  return rows[0] as BenchVersionRow | undefined;
}

/** A version by its public id, with its bench. */
export async function findVersionByPublicId(publicId: string, tx: Queryable = db) {
  const rows = await tx
    .select({ version: benchVersions, bench: benches })
    .from(benchVersions)
    .innerJoin(benches, eq(benches.id, benchVersions.benchId))
    .where(eq(benchVersions.publicId, publicId))
    .limit(1);
  return rows[0];
}

/** Give it the locked bench: its number is the next one. */
export async function insertVersion(
  values: Omit<typeof benchVersions.$inferInsert, "id" | "publicId" | "number" | "createdAt">,
  tx: Queryable,
) {
  const [{ n }] = await tx
    .select({ n: sql<number>`coalesce(max(${benchVersions.number}), 0) + 1`.mapWith(Number) })
    .from(benchVersions)
    .where(eq(benchVersions.benchId, values.benchId));
  const publicId = newPublicId();
  const [row] = await tx
    .insert(benchVersions)
    .values({ ...values, number: n, publicId, createdAt: new Date() })
    .$returningId();
  return { id: row.id, publicId, number: n };
}

export async function updateVersion(
  id: number,
  values: Partial<Pick<BenchVersionRow, "validFrom" | "remark" | "parts" | "standards" | "given">>,
  tx: Queryable,
) {
  await tx.update(benchVersions).set(values).where(eq(benchVersions.id, id));
}

/** How many sweeps say that they were taken with the bench. */
export async function countSweeps(benchId: number, tx: Queryable = db): Promise<number> {
  return (await tx.select({ n: count() }).from(sweeps).where(eq(sweeps.benchId, benchId)))[0].n;
}

/** The sweeps of one project that were taken with the bench, the newest first. */
export async function findSweepsTakenWith(benchId: number, projectId: number, tx: Queryable = db) {
  return tx
    .select({
      publicId: sweeps.publicId,
      title: sweeps.title,
      takenAt: sweeps.takenAt,
      createdAt: sweeps.createdAt,
      unread: sql<boolean>`${sweeps.analysisId} is null`.mapWith(Boolean),
    })
    .from(sweeps)
    .where(and(eq(sweeps.benchId, benchId), eq(sweeps.projectId, projectId)))
    .orderBy(desc(sql`coalesce(${sweeps.takenAt}, ${sweeps.createdAt})`), desc(sweeps.id))
    .limit(100);
}

function mayAddSweepsIn(projectId: number) {
  return and(
    eq(memberships.projectId, projectId),
    or(eq(memberships.role, "owner"), eq(memberships.role, "experimenter")),
  );
}

/** With its table's name: in a query of one table the builder leaves it out. */
const OUTER_BENCH_ID = sql`${sql.identifier("benches")}.${sql.identifier("id")}`;

const LISTED = {
  bench: benches,
  owner: users.name,
  home: { publicId: projects.publicId, title: projects.title },
  versionCount:
    sql<number>`(select count(*) from ${benchVersions} v where v.bench_id = ${OUTER_BENCH_ID})`.mapWith(
      Number,
    ),
  validFrom: sql<
    string | null
  >`(select max(v.valid_from) from ${benchVersions} v where v.bench_id = ${OUTER_BENCH_ID})`,
  kinds: sql<
    string | null
  >`(select group_concat(r.kind) from ${benchReferences} r where r.version_id = (select v.id from ${benchVersions} v
    where v.bench_id = ${OUTER_BENCH_ID} order by v.valid_from desc, v.number desc limit 1))`,
  sweepCount: sql<number>`(select count(*) from ${sweeps} s where s.bench_id = ${OUTER_BENCH_ID})`.mapWith(
    Number,
  ),
};
