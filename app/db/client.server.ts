import { drizzle, type MySql2Database } from "drizzle-orm/mysql2";
import mysql from "mysql2/promise";
import { env } from "~/env.server";
import * as schema from "./schema/index.ts";

export type Database = MySql2Database<typeof schema>;
export type Transaction = Parameters<Parameters<Database["transaction"]>[0]>[0];
/** What every query takes last: a transaction where there is one, else the pool. */
export type Queryable = Database | Transaction;

export const pool = mysql.createPool({
  uri: env.DATABASE_URL,
  timezone: "Z",
  charset: "utf8mb4",
  connectionLimit: 12,
  enableKeepAlive: true,
});

export const db: Database = drizzle(pool, { schema, mode: "default" });

const RETRIES = 5;
/** Deadlock, lock wait timeout, certification failure of a cluster. Tested by errno: names differ. */
const RETRY_ERRNOS = new Set([1205, 1213, 1047, 1020]);
const DUPLICATE_ERRNO = 1062;
/** What a new row points at is not there. */
const BROKEN_REFERENCE_ERRNO = 1452;

/** Runs `work` in one transaction and again when the database asks for it: `work` must be repeatable. */
export async function inTransaction<T>(work: (tx: Transaction) => Promise<T>): Promise<T> {
  for (let attempt = 1; ; attempt++) {
    try {
      return await db.transaction(work);
    } catch (error) {
      if (attempt >= RETRIES || !RETRY_ERRNOS.has(errnoOf(error) ?? 0)) throw error;
      await new Promise((resolve) => setTimeout(resolve, 10 * 2 ** attempt * (0.5 + Math.random())));
    }
  }
}

export function isDuplicate(error: unknown): boolean {
  return errnoOf(error) === DUPLICATE_ERRNO;
}

export function isReferenceBroken(error: unknown): boolean {
  return errnoOf(error) === BROKEN_REFERENCE_ERRNO;
}

/** The database's error number, however deep the driver wrapped it. */
function errnoOf(error: unknown): number | undefined {
  for (let e = error as { errno?: number; cause?: unknown } | undefined; e; e = e.cause as typeof e) {
    if (typeof e.errno === "number") return e.errno;
  }
  return undefined;
}
