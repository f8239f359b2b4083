import { type SQL, sql } from "drizzle-orm";
import { dips } from "./schema/index.ts";

/** Numbers out of a dip's stored ones without fetching them all: the first of these that is known, else null. */
export function dipNumber(...paths: string[]): SQL<number | null> {
  const values = paths.map((path) => sql`json_value(${dips.numbers}, ${sql.raw(`'$.${path}'`)})`);
  return sql<number | null>`coalesce(${sql.join(values, sql`, `)})`.mapWith(Number);
}
