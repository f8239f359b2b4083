import { and, asc, count, eq, isNull } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { newPublicId } from "./ids.server.ts";
import { dismissals, identities, users } from "./schema/index.ts";

export type User = typeof users.$inferSelect;

export async function findById(id: number, tx: Queryable = db): Promise<User | undefined> {
  return (await tx.select().from(users).where(eq(users.id, id)).limit(1))[0];
}

export async function findByPublicId(publicId: string, tx: Queryable = db): Promise<User | undefined> {
  return (await tx.select().from(users).where(eq(users.publicId, publicId)).limit(1))[0];
}

export async function findByUserName(userName: string, tx: Queryable = db): Promise<User | undefined> {
  return (await tx.select().from(users).where(eq(users.userName, userName)).limit(1))[0];
}

export async function findByEmail(email: string, tx: Queryable = db): Promise<User | undefined> {
  return (await tx.select().from(users).where(eq(users.email, email)).limit(1))[0];
}

export async function findByIdentity(provider: string, subject: string, tx: Queryable = db) {
  const rows = await tx
    .select({ user: users })
    .from(identities)
    .innerJoin(users, eq(users.id, identities.userId))
    .where(and(eq(identities.provider, provider), eq(identities.subject, subject)))
    .limit(1);
  return rows[0]?.user;
}

export interface NewUser {
  userName: string;
  name: string;
  email: string | null;
  administrator?: boolean;
}

export async function insert(user: NewUser, tx: Queryable = db): Promise<number> {
  const [row] = await tx
    .insert(users)
    .values({ ...user, publicId: newPublicId(), createdAt: new Date() })
    .$returningId();
  return row.id;
}

export async function insertIdentity(userId: number, provider: string, subject: string, tx: Queryable = db) {
  await tx.insert(identities).values({ userId, provider, subject, createdAt: new Date() });
}

/** The ways in which the person signs in, oldest first. */
export async function findIdentities(userId: number, tx: Queryable = db) {
  return tx
    .select({ provider: identities.provider, subject: identities.subject, createdAt: identities.createdAt })
    .from(identities)
    .where(eq(identities.userId, userId))
    .orderBy(asc(identities.id))
    .limit(100);
}

/** Locks the person's row: what is counted of it stays so until the transaction ends. */
export async function lock(id: number, tx: Queryable): Promise<User | undefined> {
  return (await tx.select().from(users).where(eq(users.id, id)).limit(1).for("update"))[0];
}

export async function deleteIdentity(userId: number, provider: string, subject: string, tx: Queryable = db) {
  await tx
    .delete(identities)
    .where(
      and(eq(identities.userId, userId), eq(identities.provider, provider), eq(identities.subject, subject)),
    );
}

export async function update(id: number, values: Partial<typeof users.$inferInsert>, tx: Queryable = db) {
  await tx.update(users).set(values).where(eq(users.id, id));
}

export async function findAll(limit = 100, offset = 0, tx: Queryable = db): Promise<User[]> {
  return tx.select().from(users).orderBy(users.id).limit(limit).offset(offset);
}

export async function countAll(tx: Queryable = db): Promise<number> {
  return (await tx.select({ n: count() }).from(users))[0].n;
}

export async function findDismissals(userId: number, tx: Queryable = db): Promise<string[]> {
  const rows = await tx
    .select({ caution: dismissals.caution })
    .from(dismissals)
    .where(eq(dismissals.userId, userId))
    .limit(100);
  return rows.map((row) => row.caution);
}

export async function insertDismissal(userId: number, caution: string, tx: Queryable = db) {
  await tx.insert(dismissals).ignore().values({ userId, caution, at: new Date() });
}

/** A user name that is free: the wish itself, or the wish with a number behind it. */
export async function freeUserName(wish: string, tx: Queryable = db): Promise<string> {
  const base =
    wish
      .toLowerCase()
      .normalize("NFKD")
      .replace(/[^a-z0-9]+/g, "-")
      .replace(/^-+|-+$/g, "")
      .slice(0, 34) || "member";
  for (let n = 1; n < 1000; n++) {
    const userName = n === 1 ? base : `${base}-${n}`;
    if (!(await findByUserName(userName, tx))) return userName;
  }
  return `${base.slice(0, 28)}-${newPublicId()}`;
}

export async function findAdministrators(
  tx: Queryable = db,
): Promise<{ id: number; email: string | null }[]> {
  return tx
    .select({ id: users.id, email: users.email })
    .from(users)
    .where(and(eq(users.administrator, true), isNull(users.suspendedAt)))
    .limit(100);
}

/** Locks the rows of the administrators who can sign in, so that the last two can't both go at once. */
export async function lockAdministrators(tx: Queryable) {
  return tx
    .select({ id: users.id })
    .from(users)
    .where(and(eq(users.administrator, true), isNull(users.suspendedAt)))
    .limit(100)
    .for("update");
}
