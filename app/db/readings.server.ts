import { and, desc, eq, ne, sql } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { readings, sweeps } from "./schema/index.ts";

/** The 0 dB lines that other levels of the project were read with, newest first. */
export async function findZeroLines(projectId: number, exceptSweepId: number, tx: Queryable = db) {
  const zeroDb = sql<number | null>`coalesce(
    json_value(${readings.reading}, '$.spec.screenshot.zeroDb'),
    json_value(${readings.reading}, '$.spec.text.zeroDb')
  )`.mapWith(Number);
  return tx
    .select({ title: sweeps.title, publicId: sweeps.publicId, zeroDb })
    .from(sweeps)
    .innerJoin(readings, eq(readings.id, sweeps.readingId))
    .where(
      and(
        eq(sweeps.projectId, projectId),
        ne(sweeps.id, exceptSweepId),
        sql`json_value(${readings.reading}, '$.quantity') = 'level'`,
        sql`${zeroDb} is not null`,
      ),
    )
    .orderBy(desc(readings.id))
    .limit(20);
}
