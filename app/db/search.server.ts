import { and, desc, eq, isNull, lt, ne, or, type SQL, sql } from "drizzle-orm";
import type { AnyMySqlColumn } from "drizzle-orm/mysql-core";
import { db, type Queryable } from "./client.server.ts";
import { decodeCursor, encodeCursor } from "./cursor.server.ts";
import { isMember, isReadable, isUnblocked } from "./readable.server.ts";
import {
  antennaVersions,
  benches,
  dips,
  files,
  memberships,
  notes,
  projects,
  steps,
  sweeps,
  trails,
  users,
} from "./schema/index.ts";
import { hasWords, textHasWords } from "./words.server.ts";

/** Who searches for which words, and which page of the answer. Every query asks itself what the person may read. */
export interface Search {
  userId: number | null;
  words: string[];
  limit: number;
  cursor?: string;
}

/** With every find: where it is. */
export const project = { publicId: projects.publicId, title: projects.title };

export async function findProjects(search: Search, tx: Queryable = db) {
  const rows = await tx
    .select({ id: projects.id, at: projects.updatedAt, project, summary: projects.summary })
    .from(projects)
    .where(
      and(
        isReadable(search.userId),
        hasWords(search.words, [projects.title, projects.summary]),
        before(search, projects.updatedAt, projects.id),
      ),
    )
    .orderBy(desc(projects.updatedAt), desc(projects.id))
    .limit(search.limit + 1);
  return pageOf(rows, search);
}

export async function findSweeps(search: Search, tx: Queryable = db) {
  const rows = await tx
    .select({
      id: sweeps.id,
      at: sweeps.createdAt,
      project,
      publicId: sweeps.publicId,
      title: sweeps.title,
      fileName: files.name,
      read: sql<boolean>`${sweeps.analysisId} is not null`.mapWith(Boolean),
    })
    .from(sweeps)
    .innerJoin(projects, eq(projects.id, sweeps.projectId))
    .innerJoin(files, eq(files.id, sweeps.fileId))
    .where(
      and(
        isReadable(search.userId),
        eq(sweeps.purpose, "antenna"),
        hasWords(search.words, [sweeps.title], [files.name]),
        before(search, sweeps.createdAt, sweeps.id),
      ),
    )
    .orderBy(desc(sweeps.createdAt), desc(sweeps.id))
    .limit(search.limit + 1);
  return pageOf(rows, search);
}

export async function findNotes(search: Search, tx: Queryable = db) {
  const rows = await tx
    .select({
      id: notes.id,
      at: notes.createdAt,
      project,
      publicId: notes.publicId,
      body: notes.body,
      author: users.name,
      place: {
        sweepPublicId: sweeps.publicId,
        sweepTitle: sweeps.title,
        dipPublicId: dips.publicId,
        dipFrequencyHz: dips.frequencyHz,
        trailPublicId: trails.publicId,
        trailName: trails.name,
        trailFrequencyHz: trails.frequencyHz,
        stepPublicId: steps.publicId,
        stepTitle: steps.title,
        benchPublicId: benches.publicId,
        benchName: benches.name,
      },
    })
    .from(notes)
    .innerJoin(projects, eq(projects.id, notes.projectId))
    .leftJoin(users, eq(users.id, notes.authorId))
    .leftJoin(sweeps, eq(sweeps.id, notes.sweepId))
    .leftJoin(dips, eq(dips.id, notes.dipId))
    .leftJoin(trails, eq(trails.id, notes.trailId))
    .leftJoin(steps, eq(steps.id, notes.stepId))
    .leftJoin(benches, eq(benches.id, notes.benchId))
    .where(
      and(
        isReadable(search.userId),
        isNull(notes.removedAt),
        isUnblocked(notes.authorId, search.userId),
        hasWords(search.words, [notes.body]),
        before(search, notes.createdAt, notes.id),
      ),
    )
    .orderBy(desc(notes.createdAt), desc(notes.id))
    .limit(search.limit + 1);
  return pageOf(rows, search);
}

export async function findSteps(search: Search, tx: Queryable = db) {
  const rows = await tx
    .select({
      id: steps.id,
      at: steps.createdAt,
      project,
      publicId: steps.publicId,
      title: steps.title,
      body: steps.body,
    })
    .from(steps)
    .innerJoin(projects, eq(projects.id, steps.projectId))
    .where(
      and(
        isReadable(search.userId),
        hasWords(search.words, [steps.title, steps.body]),
        before(search, steps.createdAt, steps.id),
      ),
    )
    .orderBy(desc(steps.createdAt), desc(steps.id))
    .limit(search.limit + 1);
  return pageOf(rows, search);
}

export async function findTrails(search: Search, tx: Queryable = db) {
  const rows = await tx
    .select({
      id: trails.id,
      at: trails.createdAt,
      project,
      publicId: trails.publicId,
      name: trails.name,
      frequencyHz: trails.frequencyHz,
      verdictText: trails.verdictText,
    })
    .from(trails)
    .innerJoin(projects, eq(projects.id, trails.projectId))
    .where(
      and(
        isReadable(search.userId),
        hasWords(search.words, [trails.name, trails.verdictText]),
        before(search, trails.createdAt, trails.id),
      ),
    )
    .orderBy(desc(trails.createdAt), desc(trails.id))
    .limit(search.limit + 1);
  return pageOf(rows, search);
}

/** Antennas as they are now, one a project; earlier versions are not looked into, and JSON has no index of words. */
export async function findAntennas(search: Search, tx: Queryable = db) {
  const rows = await tx
    .select({
      id: antennaVersions.id,
      at: antennaVersions.createdAt,
      project,
      words: antennaWords.as("words"),
    })
    .from(antennaVersions)
    .innerJoin(projects, eq(projects.id, antennaVersions.projectId))
    .where(
      and(
        isReadable(search.userId),
        sql`not exists (select 1 from ${antennaVersions} later
          where later.project_id = ${antennaVersions.projectId} and later.number > ${antennaVersions.number})`,
        textHasWords(search.words, antennaWords),
        before(search, antennaVersions.createdAt, antennaVersions.id),
      ),
    )
    .orderBy(desc(antennaVersions.createdAt), desc(antennaVersions.id))
    .limit(search.limit + 1);
  return pageOf(rows, search);
}

/** People of one's own projects, by a word of their name; nobody else is found. */
export async function findPeople(search: Search, tx: Queryable = db) {
  const { userId } = search;
  if (userId === null) return { rows: [], nextCursor: null };
  const rows = await tx
    .selectDistinct({
      id: users.id,
      at: users.createdAt,
      name: users.name,
      userName: users.userName,
      project,
    })
    .from(users)
    .innerJoin(memberships, eq(memberships.userId, users.id))
    .innerJoin(projects, eq(projects.id, memberships.projectId))
    .where(
      and(
        isMember(userId),
        ne(users.id, userId),
        isNull(users.closedAt),
        textHasWords(search.words, sql`concat_ws(' ', ${users.name}, ${users.userName})`),
        before(search, users.createdAt, users.id),
      ),
    )
    .orderBy(desc(users.createdAt), desc(users.id))
    .limit(search.limit + 1);
  return pageOf(rows, search);
}

/** What people wrote about the antenna, without the names of the fields. */
const antennaWords = sql<string>`concat_ws(' ', ${sql.join(
  [
    ["$.elements[*].name", "$.elements[*].material", "$.elements[*].where"],
    ["$.feedline.cable", "$.feedline.route", "$.choke.core", "$.choke.where", "$.ground", "$.remarks"],
  ]
    .flat()
    .map((path) => sql.raw(`json_extract(\`antenna_versions\`.\`content\`, '${path}')`)),
  sql`, `,
)}, ${antennaVersions.remark})`;

/** After the last row of the page before. */
export function before(search: { cursor?: string }, at: AnyMySqlColumn, id: AnyMySqlColumn): SQL | undefined {
  const cursor = search.cursor ? decodeCursor(search.cursor) : undefined;
  return cursor && or(lt(at, cursor.at), and(eq(at, cursor.at), lt(id, cursor.id)));
}

export function pageOf<Row extends { at: Date; id: number }>(rows: Row[], { limit }: { limit: number }) {
  const last = rows.length > limit ? rows[limit - 1] : undefined;
  return { rows: rows.slice(0, limit), nextCursor: last ? encodeCursor(last) : null };
}
