import { and, asc, desc, eq, isNotNull, sql } from "drizzle-orm";
import { alias } from "drizzle-orm/mysql-core";
import { completeDip } from "~/measurement/dips/complete";
import { db, type Queryable } from "./client.server.ts";
import { dipNumber } from "./dip-numbers.server.ts";
import { newPublicId } from "./ids.server.ts";
import { dips, steps, sweeps, trailDips, trails, users } from "./schema/index.ts";

export type StepRow = typeof steps.$inferSelect;

/** Every step in order of time, those of one moment by when they were written down; planned ones without a day last. */
export async function findAllByProject(projectId: number, tx: Queryable = db) {
  return tx
    .select({ step: steps, by: users.name })
    .from(steps)
    .leftJoin(users, eq(users.id, steps.createdBy))
    .where(eq(steps.projectId, projectId))
    .orderBy(sql`${steps.at} is null`, asc(steps.at), asc(steps.createdAt), asc(steps.id))
    .limit(MOST_STEPS);
}
export type ListedStep = Awaited<ReturnType<typeof findAllByProject>>[number];

/** A step with who wrote it down and the sweeps that a person put beside it. */
export async function findByPublicId(publicId: string, tx: Queryable = db) {
  const rows = await tx
    .select({
      step: steps,
      by: users.name,
      before: { publicId: before.publicId, title: before.title },
      after: { publicId: after.publicId, title: after.title },
    })
    .from(steps)
    .leftJoin(users, eq(users.id, steps.createdBy))
    .leftJoin(before, eq(before.id, steps.beforeSweepId))
    .leftJoin(after, eq(after.id, steps.afterSweepId))
    .where(eq(steps.publicId, publicId))
    .limit(1);
  return rows[0];
}
export type FoundStep = NonNullable<Awaited<ReturnType<typeof findByPublicId>>>;

/** Locks the step's row: edits of it come one after another. */
export async function lock(id: number, tx: Queryable): Promise<StepRow | undefined> {
  return (await tx.select().from(steps).where(eq(steps.id, id)).limit(1).for("update"))[0];
}

export type NewStep = Omit<typeof steps.$inferInsert, "id" | "publicId" | "createdAt" | "updatedAt">;

export async function insert(
  { createdAt = new Date(), ...step }: NewStep & { createdAt?: Date },
  tx: Queryable,
) {
  const publicId = newPublicId();
  const [row] = await tx
    .insert(steps)
    .values({ ...step, publicId, createdAt, updatedAt: createdAt })
    .$returningId();
  return { id: row.id, publicId };
}

export async function update(id: number, values: Partial<NewStep>, tx: Queryable) {
  await tx
    .update(steps)
    .set({ ...values, updatedAt: new Date() })
    .where(eq(steps.id, id));
}

export async function deleteById(id: number, tx: Queryable) {
  await tx.delete(steps).where(eq(steps.id, id));
}

/** The sweeps of the antenna that have numbers, oldest first: what can stand before or after a step. */
export async function findSweepsInOrder(projectId: number, tx: Queryable = db) {
  const rows = await tx
    .select({
      id: sweeps.id,
      publicId: sweeps.publicId,
      title: sweeps.title,
      takenAt: sweeps.takenAt,
      createdAt: sweeps.createdAt,
      readingId: sweeps.readingId,
    })
    .from(sweeps)
    .where(
      and(
        eq(sweeps.projectId, projectId),
        eq(sweeps.purpose, "antenna"),
        isNotNull(sweeps.analysisId),
        isNotNull(sweeps.readingId),
      ),
    )
    .orderBy(desc(orderTime), desc(sweeps.id))
    .limit(MOST_SWEEPS);
  return rows.reverse();
}
/** Every dip that is on a trail and found now, with its trail and sweep: what expectations are reckoned from. */
export async function findTrailStops(projectId: number, tx: Queryable = db) {
  const rows = await tx
    .select({ trail: trails.publicId, sweepId: dips.sweepId, numbers: dips.numbers })
    .from(trailDips)
    .innerJoin(trails, eq(trails.id, trailDips.trailId))
    .innerJoin(dips, eq(dips.id, trailDips.dipId))
    .where(and(eq(trails.projectId, projectId), eq(dips.present, true)))
    .orderBy(asc(dips.id))
    .limit(MOST_STOPS);
  return rows.map((row) => ({ ...row, numbers: completeDip(row.numbers) }));
}

/** The trails that a sweep's dips are on, with every dip on them: no more of it than tells how they moved. */
export async function findTrailStopsOf(sweepId: number, tx: Queryable = db) {
  const rows = await tx
    .select({
      trail: trails.publicId,
      sweepId: dips.sweepId,
      frequencyHz: dips.frequencyHz,
      frequencyUncertaintyHz: dipNumber("frequencyUncertaintyHz"),
      edge: sql<boolean>`json_value(${dips.numbers}, '$.edge') in ('1', 'true')`.mapWith(Boolean),
    })
    .from(trailDips)
    .innerJoin(trails, eq(trails.id, trailDips.trailId))
    .innerJoin(dips, eq(dips.id, trailDips.dipId))
    .where(
      and(
        eq(dips.present, true),
        sql`${trailDips.trailId} in (select own.trail_id from ${trailDips} own inner join ${dips} d on d.id = own.dip_id where d.sweep_id = ${sweepId})`,
      ),
    )
    .orderBy(asc(dips.id))
    .limit(MOST_STOPS);
  return rows.map(({ trail, sweepId: of, ...numbers }) => ({ trail, sweepId: of, numbers }));
}

export type OrderedSweep = Awaited<ReturnType<typeof findSweepsInOrder>>[number];

const before = alias(sweeps, "before_sweep");
const after = alias(sweeps, "after_sweep");
/** By when it was taken, or where that is unknown by when it came in: as in every list of sweeps. */
const orderTime = sql<Date>`coalesce(${sweeps.takenAt}, ${sweeps.createdAt})`;
export const MOST_STEPS = 500;
const MOST_SWEEPS = 2000;
const MOST_STOPS = 20_000;
