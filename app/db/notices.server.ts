import { and, count, desc, eq, gt, inArray, isNull, type SQL } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { newPublicId } from "./ids.server.ts";
import { isUnblocked } from "./readable.server.ts";
import { blocks, events, mailChoices, memberships, notes, notices, projects, users } from "./schema/index.ts";
import { before, pageOf } from "./search.server.ts";
import { shownName } from "./shown-name.server.ts";

export type NoticeReason = (typeof notices.$inferSelect)["reason"];
export type MailMode = (typeof mailChoices.$inferSelect)["mode"];

/** An event with what a notice of it needs. */
export async function findEvent(id: number, tx: Queryable = db) {
  const rows = await tx
    .select({ event: events, project: projects, actor: users.name })
    .from(events)
    .innerJoin(projects, eq(projects.id, events.projectId))
    .leftJoin(users, eq(users.id, events.actorId))
    .where(eq(events.id, id))
    .limit(1);
  return rows[0];
}

/** Those of these people who are members now, can sign in, and did not block whoever did it. */
export async function findHearers(
  projectId: number,
  userIds: number[],
  actorId: number | null,
  tx: Queryable,
) {
  if (userIds.length === 0) return [];
  const blocked = tx
    .select({ id: blocks.blockerId })
    .from(blocks)
    .where(eq(blocks.blockedId, actorId ?? 0));
  const [people, unwilling] = await Promise.all([
    tx
      .select({ id: users.id, name: users.name, email: users.email })
      .from(memberships)
      .innerJoin(users, eq(users.id, memberships.userId))
      .where(
        and(
          eq(memberships.projectId, projectId),
          inArray(users.id, userIds),
          isNull(users.suspendedAt),
          isNull(users.closedAt),
        ),
      )
      .limit(userIds.length),
    blocked.limit(10_000),
  ]);
  const away = new Set(unwilling.map(({ id }) => id));
  return people.filter(({ id }) => id !== actorId && !away.has(id));
}

export interface NewNotice {
  userId: number;
  projectId: number;
  eventId: number;
  noteId: number | null;
  reason: NoticeReason;
}

/** One a person and event, however often it is told; answers the row ids of the new ones by person. */
export async function insertNew(values: NewNotice[], tx: Queryable): Promise<Map<number, number>> {
  const made = new Map<number, number>();
  for (const value of values) {
    const publicId = newPublicId();
    const [{ affectedRows, insertId }] = await tx
      .insert(notices)
      .ignore()
      .values({ ...value, publicId, createdAt: new Date() });
    if (affectedRows > 0) made.set(value.userId, insertId);
  }
  return made;
}

/** Who was told that a note names them. */
export async function findNamed(noteId: number, tx: Queryable): Promise<number[]> {
  const rows = await tx
    .select({ userId: notices.userId })
    .from(notices)
    .where(and(eq(notices.noteId, noteId), eq(notices.reason, "mention")))
    .limit(10_000);
  return rows.map(({ userId }) => userId);
}

export async function setMailed(ids: number[], tx: Queryable) {
  if (ids.length > 0) await tx.update(notices).set({ mailedAt: new Date() }).where(inArray(notices.id, ids));
}

/** A person's inbox, newest first; of projects they have left nothing is shown. */
export async function findPage(
  userId: number,
  page: { limit: number; cursor?: string; project?: string },
  tx: Queryable = db,
) {
  const rows = await tx
    .select({
      id: notices.id,
      at: notices.createdAt,
      publicId: notices.publicId,
      reason: notices.reason,
      readAt: notices.readAt,
      kind: events.kind,
      about: events.about,
      actor: shownName(users),
      body: notes.body,
      removedAt: notes.removedAt,
      project: { publicId: projects.publicId, title: projects.title },
    })
    .from(notices)
    .innerJoin(events, eq(events.id, notices.eventId))
    .innerJoin(projects, eq(projects.id, notices.projectId))
    .innerJoin(memberships, isMine)
    .leftJoin(users, eq(users.id, events.actorId))
    .leftJoin(notes, eq(notes.id, notices.noteId))
    .where(
      and(
        eq(notices.userId, userId),
        page.project ? eq(projects.publicId, page.project) : undefined,
        before(page, notices.createdAt, notices.id),
      ),
    )
    .orderBy(desc(notices.createdAt), desc(notices.id))
    .limit(page.limit + 1);
  return pageOf(rows, page);
}
export type InboxRow = Awaited<ReturnType<typeof findPage>>["rows"][number];

export async function findOne(userId: number, publicId: string, tx: Queryable = db) {
  const rows = await tx
    .select({ about: events.about, project: projects.publicId })
    .from(notices)
    .innerJoin(events, eq(events.id, notices.eventId))
    .innerJoin(projects, eq(projects.id, notices.projectId))
    .innerJoin(memberships, isMine)
    .where(and(eq(notices.userId, userId), eq(notices.publicId, publicId)))
    .limit(1);
  return rows[0];
}

export async function countUnread(userId: number, tx: Queryable = db): Promise<number> {
  const rows = await tx
    .select({ n: count() })
    .from(notices)
    .innerJoin(memberships, isMine)
    .where(and(eq(notices.userId, userId), isNull(notices.readAt)));
  return rows[0].n;
}

/** The projects that the person's inbox has something of. */
export async function findProjects(userId: number, tx: Queryable = db) {
  return tx
    .selectDistinct({ publicId: projects.publicId, title: projects.title })
    .from(notices)
    .innerJoin(projects, eq(projects.id, notices.projectId))
    .innerJoin(memberships, isMine)
    .where(eq(notices.userId, userId))
    .orderBy(projects.title)
    .limit(200);
}

/** Those of these that are the person's own; none given: all, or all of a project. */
export async function setRead(
  userId: number,
  which: { publicIds?: string[]; project?: string },
  tx: Queryable = db,
): Promise<void> {
  const project = which.project
    ? tx.select({ id: projects.id }).from(projects).where(eq(projects.publicId, which.project))
    : undefined;
  const wanted: (SQL | undefined)[] = [
    which.publicIds ? inArray(notices.publicId, which.publicIds) : undefined,
    project ? inArray(notices.projectId, project) : undefined,
  ];
  await tx
    .update(notices)
    .set({ readAt: new Date() })
    .where(and(eq(notices.userId, userId), isNull(notices.readAt), ...wanted));
}

/** People and projects with something that a digest may take along, by how they want it. */
export async function findWaiting(modes: MailMode[], since: Date, tx: Queryable = db) {
  return tx
    .selectDistinct({ userId: notices.userId, projectId: notices.projectId })
    .from(notices)
    .innerJoin(memberships, isMine)
    .innerJoin(mailChoices, eq(mailChoices.userId, notices.userId))
    .where(
      and(
        isNull(notices.mailedAt),
        isNull(notices.readAt),
        gt(notices.createdAt, since),
        inArray(mailChoices.mode, modes),
      ),
    )
    .limit(1000);
}

/** What one person was not mailed of one project and has not read, oldest last; locked, so that one process takes it. */
export async function lockUnmailed(userId: number, projectId: number, tx: Queryable) {
  return tx
    .select({ id: notices.id, at: notices.createdAt, eventId: notices.eventId })
    .from(notices)
    .where(
      and(
        eq(notices.userId, userId),
        eq(notices.projectId, projectId),
        isNull(notices.mailedAt),
        isNull(notices.readAt),
      ),
    )
    .orderBy(desc(notices.id))
    .limit(200)
    .for("update", { skipLocked: true });
}

/** What a mail says of notices, oldest first; of a note that was removed, or whose author is blocked, nothing. */
export async function findToMail(ids: number[], userId: number, tx: Queryable) {
  return tx
    .select({
      id: notices.id,
      reason: notices.reason,
      kind: events.kind,
      about: events.about,
      at: events.at,
      actor: users.name,
      body: notes.body,
      dipId: notes.dipId,
    })
    .from(notices)
    .innerJoin(events, eq(events.id, notices.eventId))
    .leftJoin(users, eq(users.id, events.actorId))
    .leftJoin(notes, eq(notes.id, notices.noteId))
    .where(and(inArray(notices.id, ids), isNull(notes.removedAt), isUnblocked(notes.authorId, userId)))
    .orderBy(notices.id)
    .limit(200);
}

/** The membership that a notice rests on; without it nothing is shown or sent. */
const isMine = and(eq(memberships.projectId, notices.projectId), eq(memberships.userId, notices.userId));
