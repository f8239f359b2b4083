import { and, asc, desc, eq, lte, sql } from "drizzle-orm";
import type { Antenna } from "~/measurement/antenna";
import { db, type Queryable } from "./client.server.ts";
import { newPublicId } from "./ids.server.ts";
import { antennaVersions, steps, users } from "./schema/index.ts";

export type AntennaVersion = typeof antennaVersions.$inferSelect;

/** The antenna's versions with who and which step made them, the one that counted first in front. */
export async function findAllByProject(projectId: number, tx: Queryable = db) {
  return tx
    .select({
      version: antennaVersions,
      by: users.name,
      step: { publicId: steps.publicId, title: steps.title },
    })
    .from(antennaVersions)
    .leftJoin(users, eq(users.id, antennaVersions.createdBy))
    .leftJoin(steps, eq(steps.id, antennaVersions.stepId))
    .where(eq(antennaVersions.projectId, projectId))
    .orderBy(asc(antennaVersions.validFrom), asc(antennaVersions.number))
    .limit(MOST_VERSIONS);
}
export type ListedVersion = Awaited<ReturnType<typeof findAllByProject>>[number];

/** The version that counted at a moment; undefined before the first one. */
export async function findAt(projectId: number, at: Date, tx: Queryable = db) {
  const rows = await tx
    .select()
    .from(antennaVersions)
    .where(and(eq(antennaVersions.projectId, projectId), lte(antennaVersions.validFrom, at)))
    .orderBy(desc(antennaVersions.validFrom), desc(antennaVersions.number))
    .limit(1);
  return rows[0];
}

/** From when on the antenna is described at all; undefined where it never was. */
export async function findFirstDay(projectId: number, tx: Queryable = db): Promise<Date | undefined> {
  const rows = await tx
    .select({ validFrom: antennaVersions.validFrom })
    .from(antennaVersions)
    .where(eq(antennaVersions.projectId, projectId))
    .orderBy(asc(antennaVersions.validFrom))
    .limit(1);
  return rows[0]?.validFrom;
}

export interface NewVersion {
  projectId: number;
  validFrom: Date;
  content: Antenna;
  remark: string;
  stepId: number | null;
  createdBy: number | null;
  /** Its place among versions of one moment; without it the next free one. */
  number?: number;
}

/** The project's row must be locked: versions are numbered one after another. */
export async function insert(version: NewVersion, tx: Queryable): Promise<string> {
  const publicId = newPublicId();
  const number = version.number ?? (await nextNumber(version.projectId, tx));
  await tx.insert(antennaVersions).values({ ...version, number, publicId, createdAt: new Date() });
  return publicId;
}

export async function updateContent(id: number, content: Antenna, tx: Queryable) {
  await tx.update(antennaVersions).set({ content }).where(eq(antennaVersions.id, id));
}

export async function deleteById(id: number, tx: Queryable) {
  await tx.delete(antennaVersions).where(eq(antennaVersions.id, id));
}

async function nextNumber(projectId: number, tx: Queryable): Promise<number> {
  const rows = await tx
    .select({ n: sql<number>`coalesce(max(${antennaVersions.number}), 0) + 1`.mapWith(Number) })
    .from(antennaVersions)
    .where(eq(antennaVersions.projectId, projectId));
  return rows[0].n;
}

/** A change a day for more than a year. */
export const MOST_VERSIONS = 500;
