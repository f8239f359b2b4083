import { and, asc, count, eq, isNull } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { newPublicId } from "./ids.server.ts";
import { benches, photographs, steps } from "./schema/index.ts";

export type PhotographRow = typeof photographs.$inferSelect;

/** What a photograph shows: a bench, a step, or, with neither, the project's antenna. */
export interface PhotographOf {
  projectId: number;
  benchId?: number | null;
  stepId?: number | null;
}

export async function findAllOf(of: PhotographOf, tx: Queryable = db): Promise<PhotographRow[]> {
  return tx.select().from(photographs).where(shows(of)).orderBy(asc(photographs.id)).limit(100);
}

export async function countOf(of: PhotographOf, tx: Queryable = db): Promise<number> {
  return (await tx.select({ n: count() }).from(photographs).where(shows(of)))[0].n;
}

/** A photograph with the bench or step that it shows. */
export async function findByPublicId(publicId: string, tx: Queryable = db) {
  const rows = await tx
    .select({ photograph: photographs, bench: benches, step: steps })
    .from(photographs)
    .leftJoin(benches, eq(benches.id, photographs.benchId))
    .leftJoin(steps, eq(steps.id, photographs.stepId))
    .where(eq(photographs.publicId, publicId))
    .limit(1);
  return rows[0] as (typeof rows)[number] | undefined;
}

/** The bench or step that is photographed; neither for the antenna. */
export async function findSubject({ benchId, stepId }: PhotographOf, tx: Queryable = db) {
  const [bench] = benchId ? await tx.select().from(benches).where(eq(benches.id, benchId)).limit(1) : [];
  const [step] = stepId ? await tx.select().from(steps).where(eq(steps.id, stepId)).limit(1) : [];
  return { bench, step };
}

export async function insert(
  values: Omit<typeof photographs.$inferInsert, "id" | "publicId" | "createdAt">,
  tx: Queryable,
) {
  const publicId = newPublicId();
  await tx.insert(photographs).values({ ...values, publicId, createdAt: new Date() });
  return publicId;
}

export async function updateCaption(id: number, caption: string, tx: Queryable = db) {
  await tx.update(photographs).set({ caption }).where(eq(photographs.id, id));
}

export async function deleteById(id: number, tx: Queryable) {
  await tx.delete(photographs).where(eq(photographs.id, id));
}

/** Every stored object of the project's photographs. */
export async function findStorageKeys(projectId: number, tx: Queryable = db): Promise<string[]> {
  const rows = await tx
    .select({
      original: photographs.storageKey,
      shown: photographs.shownKey,
      small: photographs.smallKey,
    })
    .from(photographs)
    .where(eq(photographs.projectId, projectId))
    .limit(100_000);
  return rows.flatMap(({ original, shown, small }) => [original, shown, small]);
}

/** The three objects of one photograph differ in their ending only, so the original's key speaks for them. */
export async function isStorageKeyUsed(key: string, tx: Queryable = db): Promise<boolean> {
  const original = key.replace(/\.(shown|small)$/, "");
  const rows = await tx
    .select({ id: photographs.id })
    .from(photographs)
    .where(eq(photographs.storageKey, original))
    .limit(1);
  return rows.length > 0;
}

function shows({ projectId, benchId = null, stepId = null }: PhotographOf) {
  return and(
    eq(photographs.projectId, projectId),
    benchId === null ? isNull(photographs.benchId) : eq(photographs.benchId, benchId),
    stepId === null ? isNull(photographs.stepId) : eq(photographs.stepId, stepId),
  );
}
