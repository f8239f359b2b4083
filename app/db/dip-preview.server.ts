import { eq } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { dips, sweeps } from "./schema/index.ts";

/** What a small drawing of a dip in its sweep needs. */
export async function findPreview(dipId: number, tx: Queryable = db) {
  const rows = await tx
    .select({ numbers: dips.numbers, preview: sweeps.preview, sweepTitle: sweeps.title })
    .from(dips)
    .innerJoin(sweeps, eq(sweeps.id, dips.sweepId))
    .where(eq(dips.id, dipId))
    .limit(1);
  return rows[0];
}
