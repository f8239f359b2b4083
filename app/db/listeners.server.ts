import { and, eq, gt, inArray, isNull } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import type { Project } from "./projects.server.ts";
import { memberships, projects, sessions, users } from "./schema/index.ts";

/** Whether those who listen to projects may still do so, for many at once. */

export interface Standing {
  /** By project; one that is deleted is missing. */
  visibility: Map<number, Project["visibility"]>;
  /** Whose session it is; one that ended, or of a suspended person, is missing. */
  userOf: Map<string, number>;
  /** "project user" for each membership. */
  members: Set<string>;
}

export async function findStanding(
  projectIds: readonly number[],
  sessionIds: readonly string[],
  tx: Queryable = db,
): Promise<Standing> {
  const ids = [...projectIds];
  const [shown, living, members] = await Promise.all([
    tx
      .select({ id: projects.id, visibility: projects.visibility })
      .from(projects)
      .where(inArray(projects.id, ids))
      .limit(ids.length),
    sessionIds.length === 0
      ? []
      : tx
          .select({ id: sessions.id, userId: users.id })
          .from(sessions)
          .innerJoin(users, eq(users.id, sessions.userId))
          .where(
            and(
              inArray(sessions.id, [...sessionIds]),
              gt(sessions.expiresAt, new Date()),
              isNull(users.suspendedAt),
              isNull(users.closedAt),
            ),
          )
          .limit(sessionIds.length),
    sessionIds.length === 0
      ? []
      : tx
          .select({ projectId: memberships.projectId, userId: memberships.userId })
          .from(memberships)
          .innerJoin(sessions, eq(sessions.userId, memberships.userId))
          .where(and(inArray(memberships.projectId, ids), inArray(sessions.id, [...sessionIds])))
          .limit(ids.length * sessionIds.length),
  ]);
  return {
    visibility: new Map(shown.map(({ id, visibility }) => [id, visibility])),
    userOf: new Map(living.map(({ id, userId }) => [id, userId])),
    members: new Set(members.map(({ projectId, userId }) => memberKey(projectId, userId))),
  };
}

export function memberKey(projectId: number, userId: number): string {
  return `${projectId} ${userId}`;
}
