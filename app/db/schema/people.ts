import {
  boolean,
  index,
  json,
  mysqlTable,
  primaryKey,
  tinyint,
  uniqueIndex,
  varchar,
} from "drizzle-orm/mysql-core";
import { publicId, rowId, rowRef, sha256, utc } from "./columns.ts";

export const users = mysqlTable("users", {
  id: rowId(),
  publicId: publicId(),
  /** Lower-case letters, digits and hyphens; how others find a person. */
  userName: varchar("user_name", { length: 40 }).notNull().unique(),
  name: varchar("name", { length: 120 }).notNull(),
  email: varchar("email", { length: 254 }),
  administrator: boolean("administrator").notNull().default(false),
  createdAt: utc("created_at").notNull(),
  lastSeenAt: utc("last_seen_at"),
  suspendedAt: utc("suspended_at"),
  /** Lengths shown in metres or feet. */
  lengthUnit: varchar("length_unit", { length: 4, enum: ["m", "ft"] })
    .notNull()
    .default("m"),
  /** As the person writes it; checked against nothing. */
  callSign: varchar("call_sign", { length: 20 }).notNull().default(""),
  ituRegion: tinyint("itu_region"),
  /** IANA name; mail and digests keep its days. */
  timeZone: varchar("time_zone", { length: 60 }).notNull().default("UTC"),
  /** Closed by the person: no sign-in, shown as "former member". */
  closedAt: utc("closed_at"),
});

/** An e-mail sign-in under way. Only the code's hash is kept; single use. */
export const emailCodes = mysqlTable(
  "email_codes",
  {
    id: rowId(),
    /** Of the random value in the browser's cookie that asked. */
    askHash: sha256("ask_hash").notNull().unique(),
    email: varchar("email", { length: 254 }).notNull(),
    codeHash: sha256("code_hash").notNull(),
    attempts: tinyint("attempts").notNull().default(0),
    /** Set when an account that is signed in adds this address to itself. */
    forUserId: rowRef("for_user_id").references(() => users.id, { onDelete: "cascade" }),
    createdAt: utc("created_at").notNull(),
    expiresAt: utc("expires_at").notNull(),
    usedAt: utc("used_at"),
  },
  (t) => [index("email_codes_expires").on(t.expiresAt)],
);

/** `blockerId` does not hear from `blockedId` any more: no mentions, no invitations. */
export const blocks = mysqlTable(
  "blocks",
  {
    blockerId: rowRef("blocker_id")
      .notNull()
      .references(() => users.id, { onDelete: "cascade" }),
    blockedId: rowRef("blocked_id")
      .notNull()
      .references(() => users.id, { onDelete: "cascade" }),
    at: utc("at").notNull(),
  },
  (t) => [primaryKey({ columns: [t.blockerId, t.blockedId] }), index("blocks_blocked").on(t.blockedId)],
);

/** One way of signing in, e.g. provider "github" with its numeric id. */
export const identities = mysqlTable(
  "identities",
  {
    id: rowId(),
    userId: rowRef("user_id")
      .notNull()
      .references(() => users.id, { onDelete: "cascade" }),
    provider: varchar("provider", { length: 20 }).notNull(),
    subject: varchar("subject", { length: 190 }).notNull(),
    createdAt: utc("created_at").notNull(),
  },
  (t) => [uniqueIndex("identities_provider_subject").on(t.provider, t.subject)],
);

/** The id is the hash of what the cookie holds: a leaked table opens no session. */
export const sessions = mysqlTable(
  "sessions",
  {
    id: sha256("id").primaryKey(),
    userId: rowRef("user_id").references(() => users.id, { onDelete: "cascade" }),
    data: json("data").notNull(),
    userAgent: varchar("user_agent", { length: 200 }),
    createdAt: utc("created_at").notNull(),
    lastSeenAt: utc("last_seen_at").notNull(),
    expiresAt: utc("expires_at").notNull(),
  },
  (t) => [index("sessions_user").on(t.userId), index("sessions_expires").on(t.expiresAt)],
);

export const apiTokens = mysqlTable(
  "api_tokens",
  {
    id: rowId(),
    publicId: publicId(),
    userId: rowRef("user_id")
      .notNull()
      .references(() => users.id, { onDelete: "cascade" }),
    label: varchar("label", { length: 80 }).notNull(),
    scope: varchar("scope", { length: 10, enum: ["read", "write"] }).notNull(),
    tokenHash: sha256("token_hash").notNull().unique(),
    createdAt: utc("created_at").notNull(),
    lastUsedAt: utc("last_used_at"),
    revokedAt: utc("revoked_at"),
  },
  (t) => [index("api_tokens_user").on(t.userId)],
);

/** Cautions a person has read and put away, one row each. */
export const dismissals = mysqlTable(
  "dismissals",
  {
    userId: rowRef("user_id")
      .notNull()
      .references(() => users.id, { onDelete: "cascade" }),
    caution: varchar("caution", { length: 40 }).notNull(),
    at: utc("at").notNull(),
  },
  (t) => [primaryKey({ columns: [t.userId, t.caution] })],
);
