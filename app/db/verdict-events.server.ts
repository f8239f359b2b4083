import { desc, eq, or } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { newPublicId } from "./ids.server.ts";
import { trailDips, trails, users, verdictEvents } from "./schema/index.ts";

export async function insert(
  event: Omit<typeof verdictEvents.$inferInsert, "id" | "publicId">,
  tx: Queryable,
) {
  await tx.insert(verdictEvents).values({ ...event, publicId: newPublicId() });
}

/** Every verdict that was given on a dip, and on the trail that it is on now; newest first. */
export async function findAllOnDip(dipId: number, trailId: number | null, tx: Queryable = db) {
  const ofDip = eq(verdictEvents.dipId, dipId);
  return tx
    .select({ event: verdictEvents, by: users.name })
    .from(verdictEvents)
    .leftJoin(users, eq(users.id, verdictEvents.by))
    .where(trailId === null ? ofDip : or(ofDip, eq(verdictEvents.trailId, trailId)))
    .orderBy(desc(verdictEvents.at), desc(verdictEvents.id))
    .limit(100);
}
/** What verdicts rest on, those of a trail's dips and its own, by the trail's public id; newest first. */
export async function findAllOnTrails(projectId: number, tx: Queryable = db) {
  return tx
    .select({ trail: trails.publicId, verdict: verdictEvents.verdict, evidence: verdictEvents.evidence })
    .from(verdictEvents)
    .leftJoin(trailDips, eq(trailDips.dipId, verdictEvents.dipId))
    .innerJoin(trails, or(eq(trails.id, trailDips.trailId), eq(trails.id, verdictEvents.trailId)))
    .where(eq(verdictEvents.projectId, projectId))
    .orderBy(desc(verdictEvents.at), desc(verdictEvents.id))
    .limit(2000);
}
