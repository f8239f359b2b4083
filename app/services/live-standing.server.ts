import { effectiveRole } from "~/auth/permissions";
import { findStanding, memberKey } from "~/db/listeners.server";

/** Who listens to a project: with a session, or as anyone who may read it. */
export interface Ear {
  projectId: number;
  sessionId: string | null;
}

export type Hearing = "member" | "reader";

/** What each may hear now, asked of the database: who lost access, or whose session ended, is missing. */
export async function hearingOf<E extends Ear>(ears: readonly E[]): Promise<Map<E, Hearing>> {
  const hearing = new Map<E, Hearing>();
  if (ears.length === 0) return hearing;
  const projectIds = [...new Set(ears.map(({ projectId }) => projectId))];
  const sessionIds = [...new Set(ears.flatMap(({ sessionId }) => sessionId ?? []))];
  const standing = await findStanding(projectIds, sessionIds);
  for (const ear of ears) {
    const visibility = standing.visibility.get(ear.projectId);
    const userId = ear.sessionId === null ? null : standing.userOf.get(ear.sessionId);
    if (!visibility || userId === undefined) continue;
    const member = userId !== null && standing.members.has(memberKey(ear.projectId, userId));
    if (member) hearing.set(ear, "member");
    else if (effectiveRole(null, visibility)) hearing.set(ear, "reader");
  }
  return hearing;
}
