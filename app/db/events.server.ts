import { and, asc, eq, gt, inArray, max, or } from "drizzle-orm";
import { db, type Queryable, type Transaction } from "./client.server.ts";
import { type EventAbout, events, users } from "./schema/index.ts";

export interface NewEvent {
  projectId: number;
  kind: string;
  /** Row id of who did it; null for the service itself. */
  actorId: number | null;
  about: EventAbout;
  /** When it happened, where that is not now. */
  at?: Date;
}

/** Answers the event's row id. */
export async function insert({ at = new Date(), ...event }: NewEvent, tx: Transaction): Promise<number> {
  const [{ id }] = await tx
    .insert(events)
    .values({ ...event, at })
    .$returningId();
  return id;
}

/** How far one project's events were read. */
export interface ReadTo {
  projectId: number;
  /** Row id of the last one that is known; 0 for none. */
  after: number;
}

export type FoundEvent = Awaited<ReturnType<typeof findAfter>>[number];

/**
 * What happened since in all these projects, in the order of ids, which within a project is the order of commits. Each
 * project has a mark of its own: between projects a smaller id may come into sight after a larger one.
 */
export async function findAfter(marks: readonly ReadTo[], limit: number, tx: Queryable = db) {
  if (marks.length === 0) return [];
  return tx
    .select({
      id: events.id,
      projectId: events.projectId,
      kind: events.kind,
      about: events.about,
      at: events.at,
      by: { name: users.name, userName: users.userName },
    })
    .from(events)
    .leftJoin(users, eq(users.id, events.actorId))
    .where(
      or(...marks.map(({ projectId, after }) => and(eq(events.projectId, projectId), gt(events.id, after)))),
    )
    .orderBy(asc(events.id))
    .limit(limit);
}

/** Row id of each project's last event; a project without any is missing. */
export async function findLast(projectIds: readonly number[], tx: Queryable = db) {
  if (projectIds.length === 0) return new Map<number, number>();
  const rows = await tx
    .select({ projectId: events.projectId, id: max(events.id) })
    .from(events)
    .where(inArray(events.projectId, [...projectIds]))
    .groupBy(events.projectId)
    .limit(projectIds.length);
  return new Map(rows.map(({ projectId, id }) => [projectId, Number(id)]));
}
