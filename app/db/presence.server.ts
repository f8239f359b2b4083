import { and, asc, eq, gt, inArray, lt, sql } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { memberships, presence, users } from "./schema/index.ts";

export type Presence = typeof presence.$inferInsert;

/** One row a window: where it looks now. */
export async function put(row: Presence, tx: Queryable = db) {
  const { kind, subject, projectId, at } = row;
  await tx.insert(presence).values(row).onDuplicateKeyUpdate({ set: { kind, subject, projectId, at } });
}

export async function deleteById(id: string, tx: Queryable = db) {
  await tx.delete(presence).where(eq(presence.id, id));
}

export async function deleteBefore(at: Date, tx: Queryable = db) {
  await tx.delete(presence).where(lt(presence.at, at));
}

/** Who looks at what, of those who are members at this moment; each person and place once. */
export async function findAllByProjects(projectIds: readonly number[], since: Date, tx: Queryable = db) {
  if (projectIds.length === 0) return [];
  return tx
    .select({
      projectId: presence.projectId,
      name: users.name,
      userName: users.userName,
      kind: presence.kind,
      subject: presence.subject,
    })
    .from(presence)
    .innerJoin(users, eq(users.id, presence.userId))
    .innerJoin(
      memberships,
      and(eq(memberships.projectId, presence.projectId), eq(memberships.userId, presence.userId)),
    )
    .where(and(inArray(presence.projectId, [...projectIds]), gt(presence.at, since)))
    .groupBy(presence.projectId, users.id, users.name, users.userName, presence.kind, presence.subject)
    .orderBy(asc(users.name), sql`max(${presence.at}) desc`)
    .limit(100 * projectIds.length);
}
