import { sql } from "drizzle-orm";
import { db } from "./client.server.ts";

/** One round trip; throws when the database does not answer. */
export async function ping(): Promise<void> {
  await db.execute(sql`select 1`);
}
