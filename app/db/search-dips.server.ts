import { and, desc, eq, gt, gte, isNotNull, lt, lte } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { isReadable } from "./readable.server.ts";
import { dips, projects, sweeps, trailDips, trails } from "./schema/index.ts";
import { before, pageOf, type Search } from "./search.server.ts";
import { standing } from "./standing-verdict.server.ts";
import { hasWords } from "./words.server.ts";

export interface DipsSearch extends Search {
  fromHz: number | null;
  toHz: number | null;
  /** A dip whose SWR has no number is neither under nor over anything. */
  swrUnder: number | null;
  swrOver: number | null;
  verdict: "open" | "proposed" | "settled" | null;
  /** The words may stand in the sweep's title too. */
  inTitles: boolean;
}

/** Dips that are found now, by their numbers and by words of their verdict (or of their sweep's title). */
export async function findDips(search: DipsSearch, tx: Queryable = db) {
  const { fromHz, toHz, swrUnder, swrOver, verdict } = search;
  const rows = await tx
    .select({
      id: dips.id,
      at: sweeps.createdAt,
      project: { publicId: projects.publicId, title: projects.title },
      publicId: dips.publicId,
      numbers: dips.numbers,
      verdict: standing.verdict,
      verdictText: standing.verdictText,
      sweepTitle: sweeps.title,
    })
    .from(dips)
    .innerJoin(sweeps, eq(sweeps.id, dips.sweepId))
    .innerJoin(projects, eq(projects.id, dips.projectId))
    .leftJoin(trailDips, eq(trailDips.dipId, dips.id))
    .leftJoin(trails, eq(trails.id, trailDips.trailId))
    .where(
      and(
        isReadable(search.userId),
        eq(dips.present, true),
        eq(sweeps.purpose, "antenna"),
        fromHz === null ? undefined : gte(dips.frequencyHz, fromHz),
        toHz === null ? undefined : lte(dips.frequencyHz, toHz),
        swrUnder === null ? undefined : and(isNotNull(dips.minimumSwr), lt(dips.minimumSwr, swrUnder)),
        swrOver === null ? undefined : and(isNotNull(dips.minimumSwr), gt(dips.minimumSwr, swrOver)),
        verdict === null ? undefined : eq(standing.verdict, verdict),
        hasWords(search.words, [dips.verdictText], ...(search.inTitles ? [[sweeps.title]] : [])),
        before(search, sweeps.createdAt, dips.id),
      ),
    )
    .orderBy(desc(sweeps.createdAt), desc(dips.id))
    .limit(search.limit + 1);
  return pageOf(rows, search);
}
