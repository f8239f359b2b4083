import { createHash } from "node:crypto";
import { and, count, desc, eq, inArray, lt, or, type SQL, sql } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { decodeCursor, encodeCursor } from "./cursor.server.ts";
import { newPublicId } from "./ids.server.ts";
import { plates, projects, users, webmentions, writeUps } from "./schema/index.ts";
import { shownName } from "./shown-name.server.ts";

export type MentionRow = typeof webmentions.$inferSelect;
export type MentionState = MentionRow["state"];
export const MENTION_STATES: readonly MentionState[] = webmentions.state.enumValues;

/** What of ours is mentioned: row ids, one of them. */
export type MentionOf = { plateId: number; writeUpId: null } | { plateId: null; writeUpId: number };

/** One that came, for the first time or again; answers its public id. What was refused or gone is looked at anew. */
export async function receive(
  { source, target, ...of }: { source: string; target: string } & MentionOf,
  tx: Queryable,
): Promise<string> {
  const pairSha256 = pairOf(source, target);
  const now = new Date();
  await tx
    .insert(webmentions)
    .values({ ...of, pairSha256, source, target, publicId: newPublicId(), state: "queued", receivedAt: now })
    .onDuplicateKeyUpdate({
      set: {
        receivedAt: now,
        state: sql`if(${webmentions.state} in ('refused', 'gone'), 'queued', ${webmentions.state})`,
      },
    });
  const rows = await tx
    .select({ publicId: webmentions.publicId })
    .from(webmentions)
    .where(eq(webmentions.pairSha256, pairSha256))
    .limit(1);
  return rows[0].publicId;
}

/** By which a mention that comes again is known. */
export function pairOf(source: string, target: string): string {
  return createHash("sha256").update(`${source}\n${target}`).digest("hex");
}

/** With what it mentions, and of which project that is; a plate may outlive its project. */
export async function findByPublicId(publicId: string, tx: Queryable = db) {
  const rows = await tx
    .select({ mention: webmentions, ...MENTIONED })
    .from(webmentions)
    .leftJoin(plates, eq(plates.id, webmentions.plateId))
    .leftJoin(writeUps, eq(writeUps.id, webmentions.writeUpId))
    .where(eq(webmentions.publicId, publicId))
    .limit(1);
  return rows[0];
}
export type FoundMention = NonNullable<Awaited<ReturnType<typeof findByPublicId>>>;

export async function lock(id: number, tx: Queryable): Promise<MentionRow | undefined> {
  return (await tx.select().from(webmentions).where(eq(webmentions.id, id)).limit(1).for("update"))[0];
}

export async function update(
  id: number,
  values: Partial<Pick<MentionRow, "state" | "title" | "reason" | "checkedAt" | "decidedBy">>,
  tx: Queryable = db,
) {
  await tx.update(webmentions).set(values).where(eq(webmentions.id, id));
}

/** Those in these states of what is the project's, the last to come first. */
export async function findAllByProject(
  projectId: number,
  states: readonly MentionState[],
  limit: number,
  tx: Queryable = db,
) {
  return listed(and(isOf(projectId), inArray(webmentions.state, [...states])), limit, tx);
}
export type ListedMention = Awaited<ReturnType<typeof findAllByProject>>[number];

/** The same in pages of at most 100. */
export async function findPageByProject(
  projectId: number,
  states: readonly MentionState[],
  cursor: string | undefined,
  tx: Queryable = db,
) {
  const before = cursor ? decodeCursor(cursor) : undefined;
  const older =
    before &&
    or(
      lt(webmentions.receivedAt, before.at),
      and(eq(webmentions.receivedAt, before.at), lt(webmentions.id, before.id)),
    );
  const wanted = and(isOf(projectId), inArray(webmentions.state, [...states]), older);
  const rows = await listed(wanted, PAGE_ROWS + 1, tx);
  const last = rows.length > PAGE_ROWS ? rows[PAGE_ROWS - 1].mention : undefined;
  return {
    rows: rows.slice(0, PAGE_ROWS),
    nextCursor: last ? encodeCursor({ at: last.receivedAt, id: last.id }) : null,
  };
}

/** As in a list; `findByPublicId` says whose it is. */
export async function findListed(publicId: string, tx: Queryable = db): Promise<ListedMention | undefined> {
  return (await listed(eq(webmentions.publicId, publicId), 1, tx))[0];
}

/** How many wait for the owner. */
export async function countWaiting(projectId: number, tx: Queryable = db): Promise<number> {
  const rows = await tx
    .select({ n: count() })
    .from(webmentions)
    .leftJoin(plates, eq(plates.id, webmentions.plateId))
    .leftJoin(writeUps, eq(writeUps.id, webmentions.writeUpId))
    .where(and(isOf(projectId), eq(webmentions.state, "verified")));
  return rows[0].n;
}

/** Those that are shown under a plate or a write-up, oldest first. */
export async function findShown(of: { plateId: number } | { writeUpId: number }, tx: Queryable = db) {
  const mentioned =
    "plateId" in of ? eq(webmentions.plateId, of.plateId) : eq(webmentions.writeUpId, of.writeUpId);
  return tx
    .select({ source: webmentions.source, title: webmentions.title, at: webmentions.receivedAt })
    .from(webmentions)
    .where(and(mentioned, eq(webmentions.state, "shown")))
    .orderBy(webmentions.id)
    .limit(MOST_SHOWN);
}

async function listed(wanted: SQL | undefined, limit: number, tx: Queryable) {
  return tx
    .select({
      mention: webmentions,
      ...MENTIONED,
      decidedBy: shownName(users),
    })
    .from(webmentions)
    .leftJoin(plates, eq(plates.id, webmentions.plateId))
    .leftJoin(writeUps, eq(writeUps.id, webmentions.writeUpId))
    .leftJoin(users, eq(users.id, webmentions.decidedBy))
    .where(wanted)
    .orderBy(desc(webmentions.receivedAt), desc(webmentions.id))
    .limit(limit);
}

const isOf = (projectId: number) => or(eq(plates.projectId, projectId), eq(writeUps.projectId, projectId));

const MENTIONED = {
  projectId: sql<number | null>`coalesce(${plates.projectId}, ${writeUps.projectId})`.mapWith(projects.id),
  plate: { publicId: plates.publicId, number: plates.number, title: plates.title },
  writeUp: { publicId: writeUps.publicId, title: writeUps.title },
};

const PAGE_ROWS = 100;
const MOST_SHOWN = 200;
