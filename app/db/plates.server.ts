import { and, asc, desc, eq, max, sql } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { plateForms, plateSources, plates, users } from "./schema/index.ts";
import { shownName } from "./shown-name.server.ts";

export type PlateRow = typeof plates.$inferSelect;
export type PlateFormRow = typeof plateForms.$inferSelect;
export type PlateSourceRow = typeof plateSources.$inferSelect;

export async function findByPublicId(publicId: string, tx: Queryable = db): Promise<PlateRow | undefined> {
  return (await tx.select().from(plates).where(eq(plates.publicId, publicId)).limit(1))[0];
}

/** Those of a project by number, the newest version of each first; without what they say. */
export async function findAllByProject(projectId: number, tx: Queryable = db) {
  return tx
    .select({
      publicId: plates.publicId,
      number: plates.number,
      version: plates.version,
      kind: plates.kind,
      title: plates.title,
      caption: plates.caption,
      licence: plates.licence,
      createdAt: plates.createdAt,
      withdrawnAt: plates.withdrawnAt,
      by: shownName(users),
    })
    .from(plates)
    .leftJoin(users, eq(users.id, plates.createdBy))
    .where(eq(plates.projectId, projectId))
    .orderBy(asc(plates.number), desc(plates.version))
    .limit(MOST_LISTED);
}
export type ListedPlate = Awaited<ReturnType<typeof findAllByProject>>[number];

/**
 * Every version of a plate, oldest first, itself among them. By the chain of versions and not by the project's number: the
 * project may be gone.
 */
export async function findVersions(plate: Pick<PlateRow, "id" | "previousId">, tx: Queryable = db) {
  const rows = await tx
    .select({ ...VERSION, previousId: plates.previousId, id: plates.id })
    .from(plates)
    .where(
      sql`${plates.id} in (
        with recursive back(id, previous) as (
          select p.id, p.previous_id from ${plates} p where p.id = ${plate.id}
          union select q.id, q.previous_id from ${plates} q join back on q.id = back.previous
        ), forth(id) as (
          select b.id from back b
          union select r.id from ${plates} r join forth on r.previous_id = forth.id
        ) select forth.id from forth)`,
    )
    .orderBy(asc(plates.version), asc(plates.id))
    .limit(MOST_LISTED);
  return rows;
}

/** The next free number of a project; under `projects.lock`. */
export async function nextNumber(projectId: number, tx: Queryable): Promise<number> {
  const rows = await tx
    .select({ n: max(plates.number) })
    .from(plates)
    .where(eq(plates.projectId, projectId));
  return (rows[0].n ?? 0) + 1;
}

/** The newest version of a number; under `projects.lock`. */
export async function findNewest(projectId: number, number: number, tx: Queryable) {
  const rows = await tx
    .select()
    .from(plates)
    .where(and(eq(plates.projectId, projectId), eq(plates.number, number)))
    .orderBy(desc(plates.version))
    .limit(1);
  return rows[0];
}

export async function insert(
  values: Omit<typeof plates.$inferInsert, "id">,
  forms: readonly Omit<typeof plateForms.$inferInsert, "plateId">[],
  sources: readonly Omit<typeof plateSources.$inferInsert, "plateId" | "id">[],
  tx: Queryable,
): Promise<number> {
  const [{ id }] = await tx.insert(plates).values(values).$returningId();
  if (forms.length > 0) await tx.insert(plateForms).values(forms.map((form) => ({ ...form, plateId: id })));
  if (sources.length > 0)
    await tx.insert(plateSources).values(sources.map((source) => ({ ...source, plateId: id })));
  return id;
}

/** Only a plate that stands; false where it was withdrawn before. */
export async function setWithdrawn(
  id: number,
  values: { withdrawnAt: Date; withdrawnReason: string; withdrawnBy: number },
  tx: Queryable,
): Promise<boolean> {
  const [done] = await tx
    .update(plates)
    .set(values)
    .where(and(eq(plates.id, id), sql`${plates.withdrawnAt} is null`));
  return done.affectedRows > 0;
}

/** A form with whether its plate stands, in one query; `form` is null where the plate has none such. */
export async function findForm(publicId: string, form: string, tx: Queryable = db) {
  const rows = await tx
    .select({ withdrawnAt: plates.withdrawnAt, form: plateForms })
    .from(plates)
    .leftJoin(plateForms, and(eq(plateForms.plateId, plates.id), eq(plateForms.form, form)))
    .where(eq(plates.publicId, publicId))
    .limit(1);
  return rows[0];
}

export async function findForms(plateId: number, tx: Queryable = db): Promise<PlateFormRow[]> {
  return tx.select().from(plateForms).where(eq(plateForms.plateId, plateId)).limit(50);
}

/** In the order in which they were written. */
export async function findSources(plateId: number, tx: Queryable = db): Promise<PlateSourceRow[]> {
  return tx
    .select()
    .from(plateSources)
    .where(eq(plateSources.plateId, plateId))
    .orderBy(asc(plateSources.id))
    .limit(2000);
}

/** By a form; originals are asked for with the files. */
export async function isStorageKeyUsed(key: string, tx: Queryable = db): Promise<boolean> {
  const rows = await tx
    .select({ id: plateForms.plateId })
    .from(plateForms)
    .where(eq(plateForms.storageKey, key))
    .limit(1);
  return rows.length > 0;
}

const VERSION = {
  publicId: plates.publicId,
  number: plates.number,
  version: plates.version,
  title: plates.title,
  createdAt: plates.createdAt,
  withdrawnAt: plates.withdrawnAt,
  withdrawnReason: plates.withdrawnReason,
};
const MOST_LISTED = 2000;
