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
/** Null where none may be, cut off, wrong or out of range, too long, breaking a constraint such as that JSON is JSON. */
const UNFIT_ERRNOS = new Set([1048, 1265, 1292, 1366, 1264, 1406, 4025]);
/** The server is stopping, or the query or its connection was killed. */
const LOST_ERRNOS = new Set([1053, 1317, 1927]);

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

/** A value that its column does not take: out of range, too long, no date, nested too deep, missing. */
export function isUnfit(error: unknown): boolean {
  return UNFIT_ERRNOS.has(errnoOf(error) ?? 0);
}

/**
 * Whether the connection went while the database was asked: what was written may stand all the same, where only the answer to
 * its commit was lost. Whoever cleans up after such a fault has to look first.
 */
export function isOutcomeUnknown(error: unknown): boolean {
  type Fault = { fatal?: boolean; errno?: number; cause?: unknown };
  for (let e = error as Fault | undefined; e; e = e.cause as Fault | undefined) {
    if (e.fatal === true || LOST_ERRNOS.has(e.errno ?? 0)) return true;
  }
  return false;
}

/** The unique key that a row met another row at; undefined for any other fault. */
export function keyOfDuplicate(error: unknown): string | undefined {
  const fault = faultOf(error);
  if (fault?.errno !== DUPLICATE_ERRNO) return undefined;
  return /for key '([^']+)'$/.exec(fault.message ?? "")?.[1] ?? "";
}

function errnoOf(error: unknown): number | undefined {
  return faultOf(error)?.errno;
}

/** What the database said, however deep the driver wrapped it. */
function faultOf(error: unknown): { errno?: number; message?: string } | undefined {
  type Fault = { errno?: number; message?: string; cause?: unknown };
  for (let e = error as Fault | undefined; e; e = e.cause as Fault | undefined) {
    if (typeof e.errno === "number") return e;
  }
  return undefined;
}
