import { and, asc, desc, eq, inArray, isNotNull, max, sql } from "drizzle-orm";
import { alias } from "drizzle-orm/mysql-core";
import { db, type Queryable } from "./client.server.ts";
import { newPublicId } from "./ids.server.ts";
import { plates, projects, users, writeUps, writeUpVersions } from "./schema/index.ts";
import { shownName } from "./shown-name.server.ts";

export type WriteUpRow = typeof writeUps.$inferSelect;
export type WriteUpVersion = typeof writeUpVersions.$inferSelect;

const writer = alias(users, "writer");

/** Those of a project, what was written on last first; without drafts only what is published. */
export async function findAllByProject(
  projectId: number,
  { drafts }: { drafts: boolean },
  tx: Queryable = db,
) {
  return tx
    .select({
      publicId: writeUps.publicId,
      title: writeUps.title,
      publishedNumber: writeUps.publishedNumber,
      takenBackAt: writeUps.takenBackAt,
      createdAt: writeUps.createdAt,
      updatedAt: writeUps.updatedAt,
      by: shownName(users),
      publishedTitle: writeUpVersions.title,
      publishedAt: writeUpVersions.publishedAt,
      /** What is written now is not what is published. */
      changed: sql<boolean>`${writeUpVersions.id} is not null and not (
        ${writeUpVersions.title} <=> ${writeUps.title} and ${writeUpVersions.body} <=> ${writeUps.body})`.mapWith(
        Boolean,
      ),
    })
    .from(writeUps)
    .leftJoin(users, eq(users.id, writeUps.createdBy))
    .leftJoin(
      writeUpVersions,
      and(eq(writeUpVersions.writeUpId, writeUps.id), eq(writeUpVersions.number, writeUps.publishedNumber)),
    )
    .where(and(eq(writeUps.projectId, projectId), drafts ? undefined : isNotNull(writeUps.publishedNumber)))
    .orderBy(desc(writeUps.updatedAt), desc(writeUps.id))
    .limit(MOST_LISTED);
}

/** A write-up as it is being written, with its project. */
export async function findByPublicId(publicId: string, tx: Queryable = db) {
  const rows = await tx
    .select({
      writeUp: writeUps,
      project: projects,
      by: shownName(users),
    })
    .from(writeUps)
    .innerJoin(projects, eq(projects.id, writeUps.projectId))
    .leftJoin(users, eq(users.id, writeUps.createdBy))
    .where(eq(writeUps.publicId, publicId))
    .limit(1);
  return rows[0];
}
export type FoundWriteUp = NonNullable<Awaited<ReturnType<typeof findByPublicId>>>;

/** Locks its row: what is written into it comes one after another. */
export async function lock(id: number, tx: Queryable): Promise<WriteUpRow | undefined> {
  return (await tx.select().from(writeUps).where(eq(writeUps.id, id)).limit(1).for("update"))[0];
}

export async function insert(
  values: { projectId: number; title: string; body: string; createdBy: number | null; createdAt?: Date },
  tx: Queryable = db,
) {
  const { createdAt = new Date(), ...rest } = values;
  const publicId = newPublicId();
  const [row] = await tx
    .insert(writeUps)
    .values({ ...rest, publicId, createdAt, updatedAt: createdAt })
    .$returningId();
  return { id: row.id, publicId };
}

export async function update(
  id: number,
  values: Partial<Pick<WriteUpRow, "title" | "body" | "publishedNumber" | "takenBackAt" | "updatedAt">>,
  tx: Queryable = db,
) {
  await tx
    .update(writeUps)
    .set({ updatedAt: new Date(), ...values })
    .where(eq(writeUps.id, id));
}

export async function deleteById(id: number, tx: Queryable = db) {
  await tx.delete(writeUps).where(eq(writeUps.id, id));
}

/** One version as it was published, with who did it. */
export async function findVersion(writeUpId: number, number: number, tx: Queryable = db) {
  const rows = await tx
    .select({
      version: writeUpVersions,
      by: shownName(users),
    })
    .from(writeUpVersions)
    .leftJoin(users, eq(users.id, writeUpVersions.publishedBy))
    .where(and(eq(writeUpVersions.writeUpId, writeUpId), eq(writeUpVersions.number, number)))
    .limit(1);
  return rows[0];
}
export type FoundVersion = NonNullable<Awaited<ReturnType<typeof findVersion>>>;

/** Every version, newest first, without its text. */
export async function findVersions(writeUpId: number, tx: Queryable = db) {
  return tx
    .select({
      number: writeUpVersions.number,
      title: writeUpVersions.title,
      remark: writeUpVersions.remark,
      publishedAt: writeUpVersions.publishedAt,
      by: shownName(users),
    })
    .from(writeUpVersions)
    .leftJoin(users, eq(users.id, writeUpVersions.publishedBy))
    .where(eq(writeUpVersions.writeUpId, writeUpId))
    .orderBy(desc(writeUpVersions.number))
    .limit(MOST_LISTED);
}

/** The highest number that was given out; 0 where nothing was published yet. */
export async function findLastNumber(writeUpId: number, tx: Queryable = db): Promise<number> {
  const rows = await tx
    .select({ last: max(writeUpVersions.number) })
    .from(writeUpVersions)
    .where(eq(writeUpVersions.writeUpId, writeUpId));
  return rows[0]?.last ?? 0;
}

export async function insertVersion(
  values: Omit<typeof writeUpVersions.$inferInsert, "id">,
  tx: Queryable = db,
): Promise<number> {
  const [row] = await tx.insert(writeUpVersions).values(values).$returningId();
  return row.id;
}

/** The published versions of a project, newest first, for its feed. */
export async function findPublished(projectId: number, limit: number, tx: Queryable = db) {
  return tx
    .select({
      publicId: writeUps.publicId,
      number: writeUpVersions.number,
      title: writeUpVersions.title,
      body: writeUpVersions.body,
      remark: writeUpVersions.remark,
      publishedAt: writeUpVersions.publishedAt,
      by: shownName(users),
      writer: shownName(writer),
      firstAt:
        sql<Date>`(select min(v.published_at) from ${writeUpVersions} v where v.write_up_id = ${writeUps.id})`.mapWith(
          writeUpVersions.publishedAt,
        ),
    })
    .from(writeUps)
    .innerJoin(
      writeUpVersions,
      and(eq(writeUpVersions.writeUpId, writeUps.id), eq(writeUpVersions.number, writeUps.publishedNumber)),
    )
    .leftJoin(users, eq(users.id, writeUpVersions.publishedBy))
    .leftJoin(writer, eq(writer.id, writeUps.createdBy))
    .where(eq(writeUps.projectId, projectId))
    .orderBy(desc(writeUpVersions.publishedAt), desc(writeUpVersions.id))
    .limit(limit);
}

/** Plates that a write-up shows, as they are now; one that is not here is missing. */
export async function findPlates(publicIds: readonly string[], tx: Queryable = db) {
  if (publicIds.length === 0) return [];
  return tx
    .select({
      publicId: plates.publicId,
      projectId: plates.projectId,
      number: plates.number,
      version: plates.version,
      kind: plates.kind,
      title: plates.title,
      licence: plates.licence,
      createdAt: plates.createdAt,
      withdrawnAt: plates.withdrawnAt,
      withdrawnReason: plates.withdrawnReason,
    })
    .from(plates)
    .where(inArray(plates.publicId, [...publicIds]))
    .orderBy(asc(plates.id))
    .limit(publicIds.length);
}

/** A project has some dozens (common practice, no source). */
const MOST_LISTED = 500;
