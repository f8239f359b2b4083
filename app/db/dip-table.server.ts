import {
  and,
  asc,
  count,
  desc,
  eq,
  gte,
  inArray,
  isNotNull,
  lt,
  lte,
  not,
  or,
  type SQL,
  sql,
} from "drizzle-orm";
import { completeDip } from "~/measurement/dips/complete";
import { db, type Queryable } from "./client.server.ts";
import { dipNumber } from "./dip-numbers.server.ts";
import { dips, notes, sweeps, trailDips, trails } from "./schema/index.ts";
import { standing } from "./standing-verdict.server.ts";
import { textHasWords } from "./words.server.ts";

export interface DipFilter {
  projectId: number;
  fromHz: number | null;
  toHz: number | null;
  /** A dip whose SWR has no number is under nothing. */
  swrUnder: number | null;
  verdict: "open" | "proposed" | "settled" | null;
  /** Public id of the sweep it is of. */
  sweep: string | null;
  /** Letters and digits only; each begins a word of the sweep's title, the verdict or the trail's name. */
  words: string[];
  /** Within one of these stretches, or within none of them; null: anywhere. */
  stretches: { inside: boolean; of: readonly { lowHz: number; highHz: number }[] } | null;
}

export const DIP_ORDERS = [
  "sweep",
  "taken",
  "frequency",
  "swr",
  "return-loss",
  "width",
  "q",
  "verdict",
] as const;
export interface DipOrder {
  key: (typeof DIP_ORDERS)[number];
  direction: "ascending" | "descending";
}

/** Dips that are found now in the antenna's sweeps; one more than `limit` where there are more. */
export async function findAll(
  filter: DipFilter,
  order: DipOrder,
  page: { limit: number; offset: number },
  tx: Queryable = db,
) {
  const rows = await tableRows(tx)
    .where(wanted(filter))
    .orderBy(...inOrder(order))
    .limit(page.limit + 1)
    .offset(page.offset);
  return { rows: rows.slice(0, page.limit).map(whole), more: rows.length > page.limit };
}

export async function countAll(filter: DipFilter, tx: Queryable = db): Promise<number> {
  const rows = await tx
    .select({ n: count() })
    .from(dips)
    .innerJoin(sweeps, eq(sweeps.id, dips.sweepId))
    .leftJoin(trailDips, eq(trailDips.dipId, dips.id))
    .leftJoin(trails, eq(trails.id, trailDips.trailId))
    .where(wanted(filter));
  return rows[0].n;
}

/** Row ids in order, for whoever fetches them piece by piece: what is added meanwhile shifts nothing. */
export async function findIds(filter: DipFilter, order: DipOrder, tx: Queryable = db): Promise<number[]> {
  const rows = await tx
    .select({ id: dips.id })
    .from(dips)
    .innerJoin(sweeps, eq(sweeps.id, dips.sweepId))
    .leftJoin(trailDips, eq(trailDips.dipId, dips.id))
    .leftJoin(trails, eq(trails.id, trailDips.trailId))
    .where(wanted(filter))
    .orderBy(...inOrder(order))
    .limit(MOST_IDS);
  return rows.map(({ id }) => id);
}

/** In the order of the ids; one that is gone is left out. */
export async function findAllByIds(ids: number[], tx: Queryable = db): Promise<TableRow[]> {
  if (ids.length === 0) return [];
  const rows = await tableRows(tx).where(inArray(dips.id, ids)).limit(ids.length);
  const byId = new Map(rows.map((row) => [row.id, whole(row)]));
  return ids.flatMap((id) => byId.get(id) ?? []);
}

/** The sweeps that have dips to choose from, newest first. */
export async function findSweepsWithDips(projectId: number, tx: Queryable = db) {
  return tx
    .select({ publicId: sweeps.publicId, title: sweeps.title })
    .from(sweeps)
    .where(and(eq(sweeps.projectId, projectId), eq(sweeps.purpose, "antenna"), isNotNull(sweeps.analysisId)))
    .orderBy(desc(TIME), desc(sweeps.id))
    .limit(MOST_SWEEPS);
}

function wanted(filter: DipFilter): SQL | undefined {
  const { fromHz, toHz, swrUnder, verdict, words } = filter;
  return and(
    eq(dips.projectId, filter.projectId),
    eq(dips.present, true),
    eq(sweeps.purpose, "antenna"),
    fromHz === null ? undefined : gte(dips.frequencyHz, fromHz),
    toHz === null ? undefined : lte(dips.frequencyHz, toHz),
    swrUnder === null ? undefined : and(isNotNull(dips.minimumSwr), lt(dips.minimumSwr, swrUnder)),
    verdict === null ? undefined : eq(standing.verdict, verdict),
    filter.sweep === null ? undefined : eq(sweeps.publicId, filter.sweep),
    textHasWords(words, sql`concat_ws(' ', ${sweeps.title}, ${standing.verdictText}, ${trails.name})`),
    filter.stretches === null ? undefined : within(filter.stretches),
  );
}

function within({ inside, of }: NonNullable<DipFilter["stretches"]>): SQL | undefined {
  const one = or(
    ...of.map(({ lowHz, highHz }) => and(gte(dips.frequencyHz, lowHz), lte(dips.frequencyHz, highHz))),
  );
  if (!one) return inside ? sql`false` : undefined;
  return inside ? one : not(one);
}

/** What is not known comes last either way; then by frequency, so that one order is always the same. */
function inOrder({ key, direction }: DipOrder): SQL[] {
  const way = direction === "ascending" ? asc : desc;
  if (key === "frequency") return [way(dips.frequencyHz), way(dips.id)];
  return [sql`${EXPRESSIONS[key]} is null`, way(EXPRESSIONS[key]), asc(dips.frequencyHz), asc(dips.id)];
}

function tableRows(tx: Queryable) {
  return tx
    .select(TABLE_ROW)
    .from(dips)
    .innerJoin(sweeps, eq(sweeps.id, dips.sweepId))
    .leftJoin(trailDips, eq(trailDips.dipId, dips.id))
    .leftJoin(trails, eq(trails.id, trailDips.trailId));
}

function whole<Row extends { numbers: Parameters<typeof completeDip>[0] }>(row: Row) {
  return { ...row, numbers: completeDip(row.numbers) };
}

/** By when it was taken, or where that is unknown by when it came in: as in every list of sweeps. */
const TIME = sql<Date>`coalesce(${sweeps.takenAt}, ${sweeps.createdAt})`;
const EXPRESSIONS: Record<Exclude<DipOrder["key"], "frequency">, SQL> = {
  sweep: sql`${sweeps.title}`,
  taken: TIME,
  swr: sql`${dips.minimumSwr}`,
  "return-loss": sql`${dips.returnLossDb}`,
  width: dipNumber("bandwidth.widthHz"),
  q: dipNumber("q", "qLow"),
  verdict: sql`field(${standing.verdict}, 'open', 'proposed', 'settled')`,
};
const TABLE_ROW = {
  id: dips.id,
  publicId: dips.publicId,
  numbers: dips.numbers,
  sweepPublicId: sweeps.publicId,
  sweepTitle: sweeps.title,
  takenAt: sweeps.takenAt,
  createdAt: sweeps.createdAt,
  verdict: standing.verdict,
  verdictText: standing.verdictText,
  trailPublicId: trails.publicId,
  trailName: trails.name,
  trailHz: trails.frequencyHz,
  noteCount:
    sql<number>`(select count(*) from ${notes} n where n.dip_id = ${dips.id} and n.removed_at is null)`.mapWith(
      Number,
    ),
};
export type TableRow = Awaited<ReturnType<typeof findAll>>["rows"][number];
/** Ten dips a sweep in 20,000 sweeps. */
const MOST_IDS = 200_000;
const MOST_SWEEPS = 1000;
