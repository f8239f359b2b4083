import { and, eq, inArray, isNull } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { mailChoices, memberships, projects, users } from "./schema/index.ts";

export type MailMode = (typeof mailChoices.$inferSelect)["mode"];

/** For all projects that nothing else is said of. */
export const ALL = "all";

/** What each of these people wants for a project: said of it, else of all, else missing. */
export async function findModes(userIds: number[], project: string, tx: Queryable = db) {
  if (userIds.length === 0) return new Map<number, MailMode>();
  const rows = await tx
    .select({ userId: mailChoices.userId, scope: mailChoices.scope, mode: mailChoices.mode })
    .from(mailChoices)
    .where(and(inArray(mailChoices.userId, userIds), inArray(mailChoices.scope, [ALL, project])))
    .limit(2 * userIds.length);
  const ofAll = rows.filter(({ scope }) => scope === ALL);
  const ofProject = rows.filter(({ scope }) => scope !== ALL);
  return new Map([...ofAll, ...ofProject].map(({ userId, mode }) => [userId, mode]));
}

/** Everything that the person said, with the projects' titles. */
export async function findAllByUser(userId: number, tx: Queryable = db) {
  return tx
    .select({ scope: mailChoices.scope, mode: mailChoices.mode, title: projects.title })
    .from(mailChoices)
    .leftJoin(projects, eq(projects.id, mailChoices.projectId))
    .where(eq(mailChoices.userId, userId))
    .limit(500);
}

export async function set(
  userId: number,
  project: { id: number; publicId: string } | null,
  mode: MailMode,
  tx: Queryable = db,
) {
  const at = new Date();
  await tx
    .insert(mailChoices)
    .values({ userId, projectId: project?.id ?? null, scope: project?.publicId ?? ALL, mode, at })
    .onDuplicateKeyUpdate({ set: { mode, at } });
}

/** From now on as for all others. */
export async function remove(userId: number, scope: string, tx: Queryable = db) {
  await tx.delete(mailChoices).where(and(eq(mailChoices.userId, userId), eq(mailChoices.scope, scope)));
}

/** The person can sign in, has this address, is a member, and did not say that no mail is wanted. */
export async function mayBeMailed(userId: number, projectId: number, address: string, tx: Queryable = db) {
  const rows = await tx
    .select({ project: projects.publicId })
    .from(memberships)
    .innerJoin(users, eq(users.id, memberships.userId))
    .innerJoin(projects, eq(projects.id, memberships.projectId))
    .where(
      and(
        eq(memberships.userId, userId),
        eq(memberships.projectId, projectId),
        eq(users.email, address),
        isNull(users.suspendedAt),
        isNull(users.closedAt),
      ),
    )
    .limit(1);
  if (rows.length === 0) return false;
  return (await findModes([userId], rows[0].project, tx)).get(userId) !== "none";
}
