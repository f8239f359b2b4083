import { RateLimiterMemory, RateLimiterMySQL, RateLimiterRes } from "rate-limiter-flexible";
import { pool } from "~/db/client.server";
import { env } from "~/env.server";

/** How often, counted in the database: all processes share one count. */

export type Bucket = keyof typeof LIMITS;

const LIMITS = {
  "api-read": { points: 600, duration: 60 },
  "api-write": { points: 120, duration: 60 },
  /** Codes for signing in: to one address, and asked for from one network, which may be a whole club's. */
  "code-address": { points: 5, duration: 900 },
  "code-from": { points: 100, duration: 900 },
  /** Plates computed again from their originals, by anybody: from one network, which may be a whole club's. */
  "plate-check": { points: 30, duration: 300 },
  report: { points: 30, duration: 24 * 60 * 60 },
  /** Invitations that one person makes: their mails go to people who did not ask. */
  invite: { points: 40, duration: 24 * 60 * 60 },
  /** Mentions that one network sends, and those that make this server ask one host. */
  "mention-from": { points: 60, duration: 60 * 60 },
  "mention-host": { points: 60, duration: 60 * 60 },
};

/** Counts one use; the answer is null while there is room, else the seconds until there is. */
export async function takeOne(bucket: Bucket, key: string): Promise<number | null> {
  try {
    await limiters[bucket].consume(key);
    return null;
  } catch (rejected) {
    if (!(rejected instanceof RateLimiterRes)) throw rejected;
    return Math.max(1, Math.ceil(rejected.msBeforeNext / 1000));
  }
}

const limiters = Object.fromEntries(
  Object.entries(LIMITS).map(([bucket, limit]) => [
    bucket,
    new RateLimiterMySQL({
      ...limit,
      keyPrefix: bucket,
      // The limiter speaks to the driver's own pool, under the one that answers with promises.
      storeClient: pool.pool,
      storeType: "pool",
      dbName: new URL(env.DATABASE_URL).pathname.slice(1),
      tableName: "rate_limits",
      tableCreated: true,
      // A database that can't count for a moment must not stop the work: this process counts by itself.
      insuranceLimiter: new RateLimiterMemory({ ...limit, keyPrefix: bucket }),
    }),
  ]),
) as Record<Bucket, RateLimiterMySQL>;
