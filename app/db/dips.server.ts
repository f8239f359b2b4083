import { and, asc, count, eq, isNull, or, sql } from "drizzle-orm";
import { completeDip } from "~/measurement/dips/complete";
import type { Dip } from "~/measurement/sweep";
import { db, type Queryable } from "./client.server.ts";
import { dips, notes, sweeps, trailDecisions, trailDips, trails, users } from "./schema/index.ts";
import { standing, standingVerdict } from "./standing-verdict.server.ts";

export type DipRow = typeof dips.$inferSelect;

/** With its table's name: in a query of one table the builder leaves it out, and a subquery then finds its own id. */
const OUTER_DIP_ID = sql`${sql.identifier("dips")}.${sql.identifier("id")}`;

/** A sweep's dips with the verdicts that stand, their notes counted and the latest note's text, lowest frequency first. */
export async function findAllBySweep(sweepId: number, tx: Queryable = db) {
  const rows = await tx
    .select({
      dip: dips,
      standing,
      noteCount:
        sql<number>`(select count(*) from ${notes} n where n.dip_id = ${OUTER_DIP_ID} and n.removed_at is null)`.mapWith(
          Number,
        ),
      latestNote: sql<
        string | null
      >`(select left(n.body, 200) from ${notes} n where n.dip_id = ${OUTER_DIP_ID} and n.removed_at is null order by n.id desc limit 1)`,
    })
    .from(dips)
    .leftJoin(trailDips, eq(trailDips.dipId, dips.id))
    .leftJoin(trails, eq(trails.id, trailDips.trailId))
    .where(eq(dips.sweepId, sweepId))
    .orderBy(asc(dips.frequencyHz))
    .limit(1000);
  return rows.map(({ standing, ...row }) => ({ ...row, dip: withStanding(row.dip, standing) }));
}
export type ListedDip = Awaited<ReturnType<typeof findAllBySweep>>[number];

/** A dip with its sweep and the verdict that stands; `byTrail` where that is its trail's. */
export async function findByPublicId(publicId: string, tx: Queryable = db) {
  const rows = await tx
    .select({
      dip: dips,
      standing,
      sweep: { id: sweeps.id, publicId: sweeps.publicId, title: sweeps.title, takenAt: sweeps.takenAt },
      verdictBy: users.name,
    })
    .from(dips)
    .innerJoin(sweeps, eq(sweeps.id, dips.sweepId))
    .leftJoin(trailDips, eq(trailDips.dipId, dips.id))
    .leftJoin(trails, eq(trails.id, trailDips.trailId))
    .leftJoin(users, eq(users.id, standing.verdictBy))
    .where(eq(dips.publicId, publicId))
    .limit(1);
  if (!rows[0]) return undefined;
  const { dip, standing: stands, ...rest } = rows[0];
  return { ...rest, dip: withStanding(dip, stands), byTrail: stands.byTrail };
}

/** Dips of the project's newest sweep that nobody has settled, those with the lowest SWR first. */
export async function findOpenByProject(projectId: number, limit = 20, tx: Queryable = db) {
  const rows = await tx
    .select({
      publicId: dips.publicId,
      frequencyHz: dips.frequencyHz,
      numbers: dips.numbers,
      minimumSwr: dips.minimumSwr,
      verdict: standing.verdict,
      verdictText: standing.verdictText,
      sweepTitle: sweeps.title,
      sweepPublicId: sweeps.publicId,
      noteCount:
        sql<number>`(select count(*) from ${notes} n where n.dip_id = ${dips.id} and n.removed_at is null)`.mapWith(
          Number,
        ),
    })
    .from(dips)
    .innerJoin(sweeps, eq(sweeps.id, dips.sweepId))
    .leftJoin(trailDips, eq(trailDips.dipId, dips.id))
    .leftJoin(trails, eq(trails.id, trailDips.trailId))
    .where(
      and(
        eq(dips.sweepId, newestSweepOf(projectId)),
        eq(dips.present, true),
        sql`${standingVerdict} <> 'settled'`,
      ),
    )
    .orderBy(asc(dips.minimumSwr))
    .limit(limit);
  return rows.map((row) => ({ ...row, numbers: completeDip(row.numbers) }));
}

/** The id of the sweep taken last, among those that were read. */
function newestSweepOf(projectId: number) {
  return sql<number>`(select s.id from ${sweeps} s where s.project_id = ${projectId} and s.purpose = 'antenna'
    and s.analysis_id is not null order by coalesce(s.taken_at, s.created_at) desc, s.id desc limit 1)`;
}

export async function countOpenByProject(projectId: number, tx: Queryable = db): Promise<number> {
  const rows = await tx
    .select({ n: count() })
    .from(dips)
    .innerJoin(sweeps, eq(sweeps.id, dips.sweepId))
    .leftJoin(trailDips, eq(trailDips.dipId, dips.id))
    .leftJoin(trails, eq(trails.id, trailDips.trailId))
    .where(
      and(
        eq(dips.projectId, projectId),
        eq(dips.present, true),
        eq(sweeps.purpose, "antenna"),
        sql`${standingVerdict} <> 'settled'`,
      ),
    );
  return rows[0].n;
}

export async function insertAll(
  values: { projectId: number; sweepId: number; publicId: string; numbers: Dip }[],
  tx: Queryable,
): Promise<void> {
  if (values.length === 0) return;
  const createdAt = new Date();
  await tx
    .insert(dips)
    .values(values.map(({ numbers, ...value }) => ({ ...value, createdAt, ...columnsOf(numbers) })));
}

export async function updateNumbers(id: number, numbers: Dip, tx: Queryable) {
  await tx.update(dips).set(columnsOf(numbers)).where(eq(dips.id, id));
}

export async function setAbsent(id: number, tx: Queryable) {
  await tx.update(dips).set({ present: false }).where(eq(dips.id, id));
}

/** Locks the dip's row: verdicts on it come one after another. */
export async function lock(id: number, tx: Queryable): Promise<DipRow | undefined> {
  return (await tx.select().from(dips).where(eq(dips.id, id)).limit(1).for("update"))[0];
}

export async function updateVerdict(
  id: number,
  values: Pick<DipRow, "verdict" | "verdictText" | "verdictBy" | "verdictAt">,
  tx: Queryable = db,
) {
  await tx.update(dips).set(values).where(eq(dips.id, id));
}

/** A dip that is no longer found and on which nobody said, settled or decided anything. */
export async function deleteIfBare(id: number, tx: Queryable): Promise<boolean> {
  const rows = await tx
    .select({ id: dips.id })
    .from(dips)
    .leftJoin(notes, eq(notes.dipId, dips.id))
    .leftJoin(trailDecisions, or(eq(trailDecisions.oneId, dips.id), eq(trailDecisions.otherId, dips.id)))
    .where(
      and(
        eq(dips.id, id),
        eq(dips.verdict, "open"),
        eq(dips.verdictText, ""),
        isNull(notes.id),
        isNull(trailDecisions.oneId),
      ),
    )
    .limit(1);
  if (rows.length === 0) return false;
  await tx.delete(dips).where(eq(dips.id, id));
  return true;
}

function columnsOf(numbers: Dip) {
  return {
    present: true,
    frequencyHz: numbers.frequencyHz,
    minimumSwr: Number.isFinite(numbers.minimumSwr) ? numbers.minimumSwr : null,
    returnLossDb: numbers.returnLossDb,
    prominenceDb: numbers.prominenceDb,
    numbers,
  };
}

/** The dip with the verdict that stands, and its numbers as the current method's shape has them, whichever version stored them. */
function withStanding(
  row: DipRow,
  { byTrail: _, ...verdict }: Pick<DipRow, keyof Verdict> & { byTrail: boolean },
) {
  return { ...row, ...verdict, numbers: completeDip(row.numbers) };
}

type Verdict = Pick<DipRow, "verdict" | "verdictText" | "verdictBy" | "verdictAt">;
