import { and, asc, desc, eq, inArray, like, or, type SQL, sql } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { dips, memberships, plates, projects, steps, sweeps, users } from "./schema/index.ts";

/** Whom and what the notes of a project can name: only what is of that project. */

export async function findPeople(
  projectId: number,
  named: { userNames?: string[]; publicIds?: string[] },
  tx: Queryable = db,
) {
  const { userNames = [], publicIds = [] } = named;
  if (userNames.length + publicIds.length === 0) return [];
  const these = or(
    userNames.length > 0 ? inArray(users.userName, userNames) : undefined,
    publicIds.length > 0 ? inArray(users.publicId, publicIds) : undefined,
  );
  return memberRows(projectId, these, MOST, tx);
}

/** Members whose name or user name has a word that begins so. */
export async function searchPeople(projectId: number, begin: string, tx: Queryable = db) {
  const wish = pattern(begin);
  const begins = [`${wish}%`, `% ${wish}%`].map((one) => like(users.name, one));
  return memberRows(projectId, or(like(users.userName, `${wish}%`), ...begins), SUGGESTED, tx);
}

function memberRows(projectId: number, which: SQL | undefined, limit: number, tx: Queryable) {
  return tx
    .select({ publicId: users.publicId, userName: users.userName, name: users.name })
    .from(memberships)
    .innerJoin(users, eq(users.id, memberships.userId))
    .where(and(eq(memberships.projectId, projectId), which))
    .orderBy(asc(users.name))
    .limit(limit);
}

const dip = {
  publicId: dips.publicId,
  numbers: dips.numbers,
  present: dips.present,
  sweepTitle: sweeps.title,
  project: projects.publicId,
};

export async function findDips(projectId: number, publicIds: string[], tx: Queryable = db) {
  if (publicIds.length === 0) return [];
  return dipRows(and(eq(dips.projectId, projectId), inArray(dips.publicId, publicIds)), MOST, tx);
}

/** Dips whose frequency in MHz begins so, or whose sweep's title has the words; the newest sweeps' first. */
export async function searchDips(projectId: number, words: string, limit = SUGGESTED, tx: Queryable = db) {
  const mhz = /^\d[\d.,]*$/.test(words) ? words.replace(",", ".") : null;
  const wanted = mhz
    ? sql`cast(round(${dips.frequencyHz} / 1e6, 4) as char) like ${`${mhz}%`}`
    : like(sweeps.title, `%${pattern(words)}%`);
  return dipRows(and(eq(dips.projectId, projectId), eq(dips.present, true), wanted), limit, tx);
}

function dipRows(where: ReturnType<typeof and>, limit: number, tx: Queryable) {
  return tx
    .select(dip)
    .from(dips)
    .innerJoin(sweeps, eq(sweeps.id, dips.sweepId))
    .innerJoin(projects, eq(projects.id, dips.projectId))
    .where(where)
    .orderBy(desc(sweeps.id), asc(dips.frequencyHz))
    .limit(limit);
}

const sweep = {
  publicId: sweeps.publicId,
  title: sweeps.title,
  dipCount:
    sql<number>`(select count(*) from ${dips} d where d.sweep_id = ${sweeps.id} and d.present)`.mapWith(
      Number,
    ),
  project: projects.publicId,
};

export async function findSweeps(projectId: number, publicIds: string[], tx: Queryable = db) {
  if (publicIds.length === 0) return [];
  return sweepRows(and(eq(sweeps.projectId, projectId), inArray(sweeps.publicId, publicIds)), MOST, tx);
}

export async function searchSweeps(projectId: number, words: string, limit = SUGGESTED, tx: Queryable = db) {
  const titled = like(sweeps.title, `%${pattern(words)}%`);
  return sweepRows(and(eq(sweeps.projectId, projectId), titled), limit, tx);
}

function sweepRows(where: ReturnType<typeof and>, limit: number, tx: Queryable) {
  return tx
    .select(sweep)
    .from(sweeps)
    .innerJoin(projects, eq(projects.id, sweeps.projectId))
    .where(where)
    .orderBy(desc(sweeps.id))
    .limit(limit);
}

export async function findSteps(projectId: number, publicIds: string[], tx: Queryable = db) {
  if (publicIds.length === 0) return [];
  return stepRows(and(eq(steps.projectId, projectId), inArray(steps.publicId, publicIds)), MOST, tx);
}

export async function searchSteps(projectId: number, words: string, tx: Queryable = db) {
  const titled = like(steps.title, `%${pattern(words)}%`);
  return stepRows(and(eq(steps.projectId, projectId), titled), SUGGESTED, tx);
}

function stepRows(where: ReturnType<typeof and>, limit: number, tx: Queryable) {
  return tx
    .select({
      publicId: steps.publicId,
      title: steps.title,
      state: steps.state,
      project: projects.publicId,
    })
    .from(steps)
    .innerJoin(projects, eq(projects.id, steps.projectId))
    .where(where)
    .orderBy(desc(steps.id))
    .limit(limit);
}

export async function findPlates(projectId: number, publicIds: string[], tx: Queryable = db) {
  if (publicIds.length === 0) return [];
  return plateRows(and(eq(plates.projectId, projectId), inArray(plates.publicId, publicIds)), MOST, tx);
}

export async function searchPlates(projectId: number, words: string, limit = SUGGESTED, tx: Queryable = db) {
  const titled = like(plates.title, `%${pattern(words)}%`);
  return plateRows(and(eq(plates.projectId, projectId), titled), limit, tx);
}

function plateRows(where: ReturnType<typeof and>, limit: number, tx: Queryable) {
  return tx
    .select({
      publicId: plates.publicId,
      number: plates.number,
      version: plates.version,
      title: plates.title,
      withdrawnAt: plates.withdrawnAt,
    })
    .from(plates)
    .where(where)
    .orderBy(desc(plates.id))
    .limit(limit);
}

/** What a person typed, taken as it stands. */
function pattern(words: string): string {
  return words.replace(/[\\%_]/g, "\\$&");
}

/** A note of 20,000 characters names fewer; a thread of 1000 notes seldom more. */
const MOST = 5000;
const SUGGESTED = 6;
