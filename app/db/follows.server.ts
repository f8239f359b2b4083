import { and, eq, inArray, or } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { dips, follows, trailDips, trails } from "./schema/index.ts";

export type FollowKind = "project" | "trail" | "dip" | "sweep" | "step" | "bench";

/** What can be followed or muted, by kind and public id. */
export interface Subject {
  kind: FollowKind;
  id: string;
}

/** Who follows or mutes any of these. */
export async function findAllOn(projectId: number, subjects: Subject[], tx: Queryable = db) {
  return tx
    .select({
      userId: follows.userId,
      kind: follows.kind,
      subject: follows.subject,
      muted: follows.muted,
      at: follows.at,
    })
    .from(follows)
    .where(
      and(
        eq(follows.projectId, projectId),
        or(...subjects.map(({ kind, id }) => and(eq(follows.kind, kind), eq(follows.subject, id)))),
      ),
    )
    .limit(5000);
}

/** What the person said of these: true muted, false followed; what nothing was said of is missing. */
export async function findByUser(userId: number, subjects: Subject[], tx: Queryable = db) {
  const ids = subjects.map(({ id }) => id);
  const rows = await tx
    .select({ kind: follows.kind, subject: follows.subject, muted: follows.muted })
    .from(follows)
    .where(and(eq(follows.userId, userId), inArray(follows.subject, ids)))
    .limit(100);
  return new Map(rows.map(({ kind, subject, muted }) => [`${kind}:${subject}`, muted]));
}

export async function set(
  userId: number,
  projectId: number,
  { kind, id }: Subject,
  muted: boolean,
  tx: Queryable = db,
) {
  const at = new Date();
  await tx
    .insert(follows)
    .values({ userId, projectId, kind, subject: id, muted, at })
    .onDuplicateKeyUpdate({ set: { muted, at } });
}

/** Begins to follow at that moment, unless something was said of it before. */
export async function setUnlessSaid(
  userId: number,
  projectId: number,
  { kind, id }: Subject,
  at: Date,
  tx: Queryable,
) {
  await tx.insert(follows).ignore().values({ userId, projectId, kind, subject: id, muted: false, at });
}

export async function remove(userId: number, { kind, id }: Subject, tx: Queryable = db) {
  await tx
    .delete(follows)
    .where(and(eq(follows.userId, userId), eq(follows.kind, kind), eq(follows.subject, id)));
}

/** The trail that a dip is on: whoever follows it hears of its dips. */
export async function findTrailOfDip(dip: string, tx: Queryable = db): Promise<string | undefined> {
  const rows = await tx
    .select({ publicId: trails.publicId })
    .from(dips)
    .innerJoin(trailDips, eq(trailDips.dipId, dips.id))
    .innerJoin(trails, eq(trails.id, trailDips.trailId))
    .where(eq(dips.publicId, dip))
    .limit(1);
  return rows[0]?.publicId;
}
