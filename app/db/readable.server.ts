import { eq, or, type SQL, sql } from "drizzle-orm";
import { blocks, memberships, type notes, projects } from "./schema/index.ts";

/**
 * What a person may come upon without being given its address: projects they are a member of, and public ones. For a
 * query that has `projects` in it. A linked project is read by its address and found by nobody else.
 */
export function isReadable(userId: number | null): SQL | undefined {
  const isPublic = eq(projects.visibility, "public");
  if (userId === null) return isPublic;
  return or(isPublic, isMember(userId));
}

export function isMember(userId: number): SQL {
  return sql`exists (select 1 from ${memberships} mine where mine.project_id = ${projects.id} and mine.user_id = ${userId})`;
}

/** False for what somebody wrote whom the person does not want to hear of. */
export function isUnblocked(author: typeof notes.authorId, userId: number | null): SQL | undefined {
  if (userId === null) return undefined;
  return sql`not exists (select 1 from ${blocks} b where b.blocker_id = ${userId} and b.blocked_id = ${author})`;
}
