import { and, count, desc, eq, gt, inArray, isNull, lt, ne, or } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import {
  benches,
  dips,
  events,
  memberships,
  notes,
  plates,
  steps,
  sweeps,
  trails,
  users,
  writeUps,
} from "./schema/index.ts";
import { isFormer } from "./shown-name.server.ts";

/** Where a page of the account ended: the newest things come first. */
export interface Before {
  at: Date;
  id: number;
}

/** What happened in a project, newest first. */
export async function findPage(
  projectId: number,
  page: { limit: number; before?: Before; after?: number },
  tx: Queryable = db,
) {
  const { before, after } = page;
  return tx
    .select({
      id: events.id,
      kind: events.kind,
      about: events.about,
      at: events.at,
      by: users.name,
      former: isFormer(users),
    })
    .from(events)
    .leftJoin(users, eq(users.id, events.actorId))
    .where(
      and(
        eq(events.projectId, projectId),
        after === undefined ? undefined : gt(events.id, after),
        before && or(lt(events.at, before.at), and(eq(events.at, before.at), lt(events.id, before.id))),
      ),
    )
    .orderBy(desc(events.at), desc(events.id))
    .limit(page.limit);
}
export type ActivityRow = Awaited<ReturnType<typeof findPage>>[number];

/** Which of these things are still there: an account keeps what is gone, a link to it leads nowhere. */
export async function findPresent(projectId: number, publicIds: string[], tx: Queryable = db) {
  if (publicIds.length === 0) return new Set<string>();
  const of = (
    table:
      | typeof sweeps
      | typeof dips
      | typeof trails
      | typeof steps
      | typeof benches
      | typeof plates
      | typeof writeUps,
  ) =>
    tx
      .select({ publicId: table.publicId })
      .from(table)
      .where(and(eq(table.projectId, projectId), inArray(table.publicId, publicIds)))
      .limit(publicIds.length);
  const found = await Promise.all([sweeps, dips, trails, steps, benches, plates, writeUps].map(of));
  return new Set(found.flat().map(({ publicId }) => publicId));
}

/** The text of the notes that are not removed. */
export async function findNoteTexts(projectId: number, publicIds: string[], tx: Queryable = db) {
  if (publicIds.length === 0) return new Map<string, string>();
  const rows = await tx
    .select({ publicId: notes.publicId, body: notes.body })
    .from(notes)
    .where(and(eq(notes.projectId, projectId), isNull(notes.removedAt), inArray(notes.publicId, publicIds)))
    .limit(publicIds.length);
  return new Map(rows.map(({ publicId, body }) => [publicId, body]));
}

/** How much of each kind others did since the event; for who has seen none, since they became a member. */
export async function countSince(
  projectId: number,
  userId: number,
  seen: { eventId: number | null; memberSince: Date },
  tx: Queryable = db,
) {
  return tx
    .select({ kind: events.kind, n: count() })
    .from(events)
    .where(
      and(
        eq(events.projectId, projectId),
        seen.eventId === null ? gt(events.at, seen.memberSince) : gt(events.id, seen.eventId),
        or(isNull(events.actorId), ne(events.actorId, userId)),
      ),
    )
    .groupBy(events.kind)
    .limit(50);
}

export async function findSeen(projectId: number, userId: number, tx: Queryable = db) {
  const rows = await tx
    .select({ eventId: memberships.seenEventId, memberSince: memberships.createdAt })
    .from(memberships)
    .where(and(eq(memberships.projectId, projectId), eq(memberships.userId, userId)))
    .limit(1);
  return rows[0];
}

/** Never goes back: of two windows, the one that saw more counts. */
export async function setSeen(projectId: number, userId: number, eventId: number, tx: Queryable = db) {
  await tx
    .update(memberships)
    .set({ seenEventId: eventId })
    .where(
      and(
        eq(memberships.projectId, projectId),
        eq(memberships.userId, userId),
        or(isNull(memberships.seenEventId), lt(memberships.seenEventId, eventId)),
      ),
    );
}
