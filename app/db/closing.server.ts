import { and, eq, inArray, ne, notExists, sql } from "drizzle-orm";
import { alias } from "drizzle-orm/mysql-core";
import { db, type Queryable, type Transaction } from "./client.server.ts";
import {
  apiTokens,
  attachments,
  blocks,
  dismissals,
  events,
  feedTokens,
  follows,
  identities,
  mailChoices,
  memberships,
  notes,
  noteVersions,
  notices,
  presence,
  projects,
  sessions,
  unsubscribeTokens,
} from "./schema/index.ts";

/** What goes with an account, and what of it stands in the way. */

const others = alias(memberships, "others");
const answers = alias(notes, "answers");

/** The projects that would be left without an owner. */
export async function findOnlyOwned(userId: number, tx: Queryable = db) {
  return tx
    .select({ id: projects.id, publicId: projects.publicId, title: projects.title })
    .from(memberships)
    .innerJoin(projects, eq(projects.id, memberships.projectId))
    .where(
      and(
        eq(memberships.userId, userId),
        eq(memberships.role, "owner"),
        notExists(
          tx
            .select({ one: sql`1` })
            .from(others)
            .where(
              and(
                eq(others.projectId, memberships.projectId),
                eq(others.role, "owner"),
                ne(others.userId, userId),
              ),
            ),
        ),
      ),
    )
    .limit(1000);
}

/** Locks every membership of the person: nobody takes or gives a role meanwhile. */
export async function lockMemberships(userId: number, tx: Transaction): Promise<number[]> {
  const rows = await tx
    .select({ projectId: memberships.projectId })
    .from(memberships)
    .where(eq(memberships.userId, userId))
    .limit(10_000)
    .for("update");
  return rows.map((row) => row.projectId);
}

/** Everything by which the account is entered, reached, followed and remembered. */
export async function deleteTraces(userId: number, tx: Transaction) {
  await tx.delete(identities).where(eq(identities.userId, userId));
  await tx.delete(sessions).where(eq(sessions.userId, userId));
  await tx.delete(apiTokens).where(eq(apiTokens.userId, userId));
  await tx.delete(feedTokens).where(eq(feedTokens.userId, userId));
  await tx.delete(follows).where(eq(follows.userId, userId));
  await tx.delete(notices).where(eq(notices.userId, userId));
  await tx.delete(presence).where(eq(presence.userId, userId));
  await tx.delete(mailChoices).where(eq(mailChoices.userId, userId));
  await tx.delete(unsubscribeTokens).where(eq(unsubscribeTokens.userId, userId));
  await tx.delete(dismissals).where(eq(dismissals.userId, userId));
  await tx.delete(blocks).where(eq(blocks.blockerId, userId));
  await tx.delete(blocks).where(eq(blocks.blockedId, userId));
  await tx.delete(memberships).where(eq(memberships.userId, userId));
}

/** The name goes from what was told of the person's coming and going. */
export async function forgetName(name: string, projectIds: number[], tx: Transaction) {
  if (projectIds.length === 0) return;
  await tx
    .update(events)
    .set({ about: sql`json_set(${events.about}, '$.title', 'A former member')` })
    .where(
      and(
        inArray(events.projectId, projectIds),
        inArray(events.kind, ["member.joined", "member.changed", "member.left"]),
        sql`json_value(${events.about}, '$.title') = ${name}`,
      ),
    );
}

/** The stored objects of what the person attached to notes. */
export async function findAttachmentKeys(userId: number, tx: Queryable = db): Promise<string[]> {
  const rows = await tx
    .select({ original: attachments.storageKey, shown: attachments.shownKey, small: attachments.smallKey })
    .from(attachments)
    .innerJoin(notes, eq(notes.id, attachments.noteId))
    .where(eq(notes.authorId, userId))
    .limit(100_000);
  return rows.flatMap(({ original, shown, small }) => [original, shown, small].filter((key) => key !== null));
}

/** Removes every note of the person: what was answered leaves a stub, the rest goes. */
export async function removeNotes(userId: number, tx: Transaction) {
  const mine = await tx
    .select({ id: notes.id })
    .from(notes)
    .where(eq(notes.authorId, userId))
    .limit(1_000_000)
    .for("update");
  const ids = mine.map((row) => row.id);
  for (let i = 0; i < ids.length; i += BATCH) {
    const batch = ids.slice(i, i + BATCH);
    await tx.delete(noteVersions).where(inArray(noteVersions.noteId, batch));
    await tx.delete(attachments).where(inArray(attachments.noteId, batch));
    await tx
      .update(notes)
      .set({ body: "", removedAt: new Date(), removedBy: null })
      .where(inArray(notes.id, batch));
  }
  // From the newest: an answer goes before what it answers, which then may go too.
  for (;;) {
    const bare = await tx
      .select({ id: notes.id })
      .from(notes)
      .where(
        and(
          eq(notes.authorId, userId),
          notExists(tx.select({ one: sql`1` }).from(answers).where(eq(answers.parentId, notes.id))),
        ),
      )
      .limit(BATCH);
    if (bare.length === 0) return;
    await tx.delete(notes).where(
      inArray(
        notes.id,
        bare.map((row) => row.id),
      ),
    );
  }
}

const BATCH = 500;
