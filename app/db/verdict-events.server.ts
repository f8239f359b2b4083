import { desc, eq, or } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { newPublicId } from "./ids.server.ts";
import { users, verdictEvents } from "./schema/index.ts";

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
export type ListedVerdict = Awaited<ReturnType<typeof findAllOnDip>>[number];
