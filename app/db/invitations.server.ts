import { and, desc, eq, isNull, sql } from "drizzle-orm";
import { alias } from "drizzle-orm/mysql-core";
import { db, type Queryable } from "./client.server.ts";
import { newPublicId } from "./ids.server.ts";
import { invitations, projects, users } from "./schema/index.ts";

export type Invitation = typeof invitations.$inferSelect;
export type InvitedRole = Invitation["role"];

const takers = alias(users, "takers");

export async function insert(
  values: Pick<Invitation, "projectId" | "role" | "email" | "tokenHash" | "expiresAt"> & {
    createdBy: number;
  },
  tx: Queryable = db,
) {
  await tx.insert(invitations).values({ ...values, publicId: newPublicId(), createdAt: new Date() });
}

/** With its project and who made it. */
export async function findByTokenHash(tokenHash: string, tx: Queryable = db) {
  const rows = await tx
    .select({
      invitation: invitations,
      project: { id: projects.id, publicId: projects.publicId, title: projects.title },
      by: { id: users.id, name: users.name, email: users.email },
    })
    .from(invitations)
    .innerJoin(projects, eq(projects.id, invitations.projectId))
    .leftJoin(users, eq(users.id, invitations.createdBy))
    .where(eq(invitations.tokenHash, tokenHash))
    .limit(1);
  return rows[0];
}

/** Locks it: one by mail is taken by one person only. */
export async function lock(id: number, tx: Queryable): Promise<Invitation | undefined> {
  return (await tx.select().from(invitations).where(eq(invitations.id, id)).limit(1).for("update"))[0];
}

/** Those that were not revoked, newest first, with who made them and who took them. */
export async function findAllByProject(projectId: number, tx: Queryable = db) {
  return tx
    .select({ invitation: invitations, by: users.name, takenBy: takers.name, takerUserName: takers.userName })
    .from(invitations)
    .leftJoin(users, eq(users.id, invitations.createdBy))
    .leftJoin(takers, eq(takers.id, invitations.acceptedBy))
    .where(and(eq(invitations.projectId, projectId), isNull(invitations.revokedAt)))
    .orderBy(desc(invitations.id))
    .limit(100);
}

/** One by mail is taken with it; a link is only counted. */
export async function countUse(id: number, takenBy: number | null, tx: Queryable = db) {
  const taken = takenBy === null ? {} : { acceptedBy: takenBy, acceptedAt: new Date() };
  await tx
    .update(invitations)
    .set({ uses: sql`${invitations.uses} + 1`, ...taken })
    .where(eq(invitations.id, id));
}

export async function revoke(projectId: number, publicId: string, tx: Queryable = db) {
  await tx
    .update(invitations)
    .set({ revokedAt: new Date() })
    .where(
      and(
        eq(invitations.projectId, projectId),
        eq(invitations.publicId, publicId),
        isNull(invitations.revokedAt),
      ),
    );
}
