import { bigint, index, int, json, mysqlTable, text, varchar } from "drizzle-orm/mysql-core";
import { rowId, utc } from "./columns.ts";

/** Background work, claimed with `for update skip locked` by any process. */
export const jobs = mysqlTable(
  "jobs",
  {
    id: rowId(),
    kind: varchar("kind", { length: 40 }).notNull(),
    payload: json("payload").notNull(),
    runAt: utc("run_at").notNull(),
    attempts: int("attempts").notNull().default(0),
    lockedUntil: utc("locked_until"),
    lastError: text("last_error"),
    createdAt: utc("created_at").notNull(),
  },
  (t) => [index("jobs_due").on(t.runAt)],
);

/** Shared by all processes; the shape that rate-limiter-flexible expects. */
export const rateLimits = mysqlTable("rate_limits", {
  key: varchar("key", { length: 255 }).primaryKey(),
  points: int("points").notNull().default(0),
  expire: bigint("expire", { mode: "number", unsigned: true }),
});

/** Small facts about this installation, e.g. that the demo was built. */
export const facts = mysqlTable("facts", {
  name: varchar("name", { length: 60 }).primaryKey(),
  value: json("value").notNull(),
  at: utc("at").notNull(),
});
