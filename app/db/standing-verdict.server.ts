import { type SQL, sql } from "drizzle-orm";
import { dips, trails } from "./schema/index.ts";

/**
 * The verdict that stands for a dip. The query joins the dip's trail (left). A trail's verdict stands for its dips, except for one
 * that was settled itself, or about which something was said after the trail's verdict, or as strong a word before it. So a
 * dip that comes to a settled trail is settled too, and one that is opened again is open.
 */
const RANKS = sql.raw("'open', 'proposed', 'settled'");
const higher = sql`field(${trails.verdict}, ${RANKS}) > field(${dips.verdict}, ${RANKS})`;
const byTrail = sql`(${trails.verdict} is not null and ${higher}
  and (${dips.verdictAt} is null or ${trails.verdictAt} > ${dips.verdictAt}))`;

export const standingVerdict: SQL<"open" | "proposed" | "settled"> = sql<
  "open" | "proposed" | "settled"
>`if(${byTrail}, ${trails.verdict}, ${dips.verdict})`;

/** Beside the verdict, in the same query: its words, who and when, and whether it is the trail's. */
export const standing = {
  verdict: standingVerdict,
  verdictText: sql<string>`if(${byTrail}, ${trails.verdictText}, ${dips.verdictText})`,
  verdictBy: sql<number | null>`if(${byTrail}, ${trails.verdictBy}, ${dips.verdictBy})`,
  verdictAt: sql<Date | null>`if(${byTrail}, ${trails.verdictAt}, ${dips.verdictAt})`.mapWith(dips.verdictAt),
  byTrail: sql<boolean>`${byTrail}`.mapWith(Boolean),
};
