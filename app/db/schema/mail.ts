import { index, int, json, mediumtext, mysqlTable, text, uniqueIndex, varchar } from "drizzle-orm/mysql-core";
import { publicId, rowId, rowRef, sha256, utc } from "./columns.ts";
import { users } from "./people.ts";
import { projects } from "./projects.ts";

/** A mail on its way, written in the transaction that caused it and sent by any process. */
export const outbox = mysqlTable(
  "outbox",
  {
    id: rowId(),
    publicId: publicId(),
    /** Given once, kept over every attempt. */
    messageId: varchar("message_id", { length: 190 }).notNull().unique(),
    /** What may be written only once, e.g. "digest:user:day". */
    onceKey: varchar("once_key", { length: 190 }),
    toAddress: varchar("to_address", { length: 254 }).notNull(),
    userId: rowRef("user_id").references(() => users.id, { onDelete: "set null" }),
    subject: varchar("subject", { length: 300 }).notNull(),
    text: mediumtext("text").notNull(),
    html: mediumtext("html").notNull(),
    headers: json("headers").$type<Record<string, string>>().notNull(),
    /** waiting → sending → sent, or given up; "sending" with a past `lockedUntil` may or may not have arrived. */
    state: varchar("state", { length: 8, enum: ["waiting", "sending", "sent", "failed"] }).notNull(),
    attempts: int("attempts").notNull().default(0),
    nextAt: utc("next_at").notNull(),
    lockedUntil: utc("locked_until"),
    lastError: text("last_error"),
    createdAt: utc("created_at").notNull(),
    sentAt: utc("sent_at"),
  },
  (t) => [uniqueIndex("outbox_once").on(t.onceKey), index("outbox_due").on(t.state, t.nextAt)],
);

/** How a person wants mail: for a project, or (project null in the address of `scope`) for all others. */
export const mailChoices = mysqlTable(
  "mail_choices",
  {
    id: rowId(),
    userId: rowRef("user_id")
      .notNull()
      .references(() => users.id, { onDelete: "cascade" }),
    projectId: rowRef("project_id").references(() => projects.id, { onDelete: "cascade" }),
    /** "all" or the project's public id: what makes a row unique. */
    scope: varchar("scope", { length: 16 }).notNull(),
    mode: varchar("mode", { length: 6, enum: ["once", "hourly", "daily", "none"] }).notNull(),
    at: utc("at").notNull(),
  },
  (t) => [uniqueIndex("mail_choices_scope").on(t.userId, t.scope)],
);

/** Lets the reader of a mail stop it without signing in (RFC 8058). Only the hash is kept. */
export const unsubscribeTokens = mysqlTable(
  "unsubscribe_tokens",
  {
    tokenHash: sha256("token_hash").primaryKey(),
    userId: rowRef("user_id")
      .notNull()
      .references(() => users.id, { onDelete: "cascade" }),
    projectId: rowRef("project_id").references(() => projects.id, { onDelete: "cascade" }),
    createdAt: utc("created_at").notNull(),
    usedAt: utc("used_at"),
  },
  (t) => [index("unsubscribe_tokens_user").on(t.userId)],
);
