import { and, asc, eq, gt, type SQL } from "drizzle-orm";
import type { MySqlColumn, MySqlTable } from "drizzle-orm/mysql-core";
import type { Queryable } from "./client.server.ts";
import * as t from "./schema/index.ts";

/** All that is kept of one person, a kind a file. What is secret (hashes of tokens and sessions) stays out. */

export interface MineKind {
  name: string;
  /** Rows in their order, some at a time. */
  read: (userId: number, tx: Queryable) => AsyncGenerator<Record<string, unknown>[]>;
}

export const MINE_KINDS: readonly MineKind[] = [
  one("profile", async (userId, tx) =>
    tx
      .select({
        id: t.users.publicId,
        userName: t.users.userName,
        name: t.users.name,
        email: t.users.email,
        callSign: t.users.callSign,
        ituRegion: t.users.ituRegion,
        lengthUnit: t.users.lengthUnit,
        timeZone: t.users.timeZone,
        administrator: t.users.administrator,
        createdAt: t.users.createdAt,
        lastSeenAt: t.users.lastSeenAt,
      })
      .from(t.users)
      .where(eq(t.users.id, userId))
      .limit(1),
  ),
  one("ways-to-sign-in", async (userId, tx) =>
    tx
      .select({
        provider: t.identities.provider,
        subject: t.identities.subject,
        createdAt: t.identities.createdAt,
      })
      .from(t.identities)
      .where(eq(t.identities.userId, userId))
      .limit(MOST),
  ),
  one("sessions", async (userId, tx) =>
    tx
      .select({
        userAgent: t.sessions.userAgent,
        createdAt: t.sessions.createdAt,
        lastSeenAt: t.sessions.lastSeenAt,
        expiresAt: t.sessions.expiresAt,
      })
      .from(t.sessions)
      .where(eq(t.sessions.userId, userId))
      .limit(MOST),
  ),
  one("tokens", async (userId, tx) =>
    tx
      .select({
        label: t.apiTokens.label,
        scope: t.apiTokens.scope,
        createdAt: t.apiTokens.createdAt,
        lastUsedAt: t.apiTokens.lastUsedAt,
        revokedAt: t.apiTokens.revokedAt,
      })
      .from(t.apiTokens)
      .where(eq(t.apiTokens.userId, userId))
      .limit(MOST),
  ),
  one("memberships", async (userId, tx) =>
    tx
      .select({
        project: t.projects.publicId,
        title: t.projects.title,
        role: t.memberships.role,
        since: t.memberships.createdAt,
        lastActiveAt: t.memberships.lastActiveAt,
      })
      .from(t.memberships)
      .innerJoin(t.projects, eq(t.projects.id, t.memberships.projectId))
      .where(eq(t.memberships.userId, userId))
      .limit(MOST),
  ),
  one("follows", async (userId, tx) =>
    tx
      .select({ kind: t.follows.kind, subject: t.follows.subject, muted: t.follows.muted, at: t.follows.at })
      .from(t.follows)
      .where(eq(t.follows.userId, userId))
      .limit(MOST),
  ),
  one("mail-choices", async (userId, tx) =>
    tx
      .select({ scope: t.mailChoices.scope, mode: t.mailChoices.mode, at: t.mailChoices.at })
      .from(t.mailChoices)
      .where(eq(t.mailChoices.userId, userId))
      .limit(MOST),
  ),
  one("feeds", async (userId, tx) =>
    tx
      .select({
        project: t.projects.publicId,
        createdAt: t.feedTokens.createdAt,
        lastUsedAt: t.feedTokens.lastUsedAt,
        revokedAt: t.feedTokens.revokedAt,
      })
      .from(t.feedTokens)
      .innerJoin(t.projects, eq(t.projects.id, t.feedTokens.projectId))
      .where(eq(t.feedTokens.userId, userId))
      .limit(MOST),
  ),
  one("blocked", async (userId, tx) =>
    tx
      .select({ userName: t.users.userName, at: t.blocks.at })
      .from(t.blocks)
      .innerJoin(t.users, eq(t.users.id, t.blocks.blockedId))
      .where(eq(t.blocks.blockerId, userId))
      .limit(MOST),
  ),
  one("cautions-put-away", async (userId, tx) =>
    tx
      .select({ caution: t.dismissals.caution, at: t.dismissals.at })
      .from(t.dismissals)
      .where(eq(t.dismissals.userId, userId))
      .limit(MOST),
  ),
  inProject("inbox", t.notices, t.notices.userId, t.notices.projectId, {
    reason: t.notices.reason,
    createdAt: t.notices.createdAt,
    readAt: t.notices.readAt,
  }),
  inProject("notes", t.notes, t.notes.authorId, t.notes.projectId, {
    id: t.notes.publicId,
    body: t.notes.body,
    createdAt: t.notes.createdAt,
    editedAt: t.notes.editedAt,
    removedAt: t.notes.removedAt,
  }),
  inProject("verdicts", t.verdictEvents, t.verdictEvents.by, t.verdictEvents.projectId, {
    id: t.verdictEvents.publicId,
    verdict: t.verdictEvents.verdict,
    text: t.verdictEvents.text,
    evidence: t.verdictEvents.evidence,
    at: t.verdictEvents.at,
  }),
  inProject("steps", t.steps, t.steps.createdBy, t.steps.projectId, {
    id: t.steps.publicId,
    title: t.steps.title,
    body: t.steps.body,
    at: t.steps.at,
    createdAt: t.steps.createdAt,
  }),
  inProject("plates", t.plates, t.plates.createdBy, t.plates.projectId, {
    id: t.plates.publicId,
    title: t.plates.title,
    caption: t.plates.caption,
    createdAt: t.plates.createdAt,
  }),
  inProject("write-ups", t.writeUps, t.writeUps.createdBy, t.writeUps.projectId, {
    id: t.writeUps.publicId,
    title: t.writeUps.title,
    body: t.writeUps.body,
    createdAt: t.writeUps.createdAt,
  }),
  inProject("originals", t.files, t.files.uploadedBy, t.files.projectId, fileColumns(t.files)),
  inProject("photographs", t.photographs, t.photographs.createdBy, t.photographs.projectId, {
    ...fileColumns(t.photographs),
    caption: t.photographs.caption,
  }),
  inProject(
    "attachments",
    t.attachments,
    t.attachments.uploadedBy,
    t.attachments.projectId,
    fileColumns(t.attachments),
  ),
];

type FileTable = typeof t.files | typeof t.photographs | typeof t.attachments;

function fileColumns(table: FileTable) {
  return {
    id: table.publicId,
    name: table.name,
    sizeBytes: table.sizeBytes,
    sha256: table.sha256,
    storageKey: table.storageKey,
    createdAt: table.createdAt,
  };
}

function one(
  name: string,
  read: (userId: number, tx: Queryable) => Promise<Record<string, unknown>[]>,
): MineKind {
  return {
    name,
    read: async function* (userId, tx) {
      yield await read(userId, tx);
    },
  };
}

/** Rows of a person in projects, with the project's id and title; also of projects the person has left. */
function inProject(
  name: string,
  table: MySqlTable & { id: MySqlColumn },
  whose: MySqlColumn,
  project: MySqlColumn,
  columns: Record<string, MySqlColumn>,
): MineKind {
  return {
    name,
    read: async function* (userId, tx) {
      for (let last = 0; ; ) {
        const which: SQL | undefined = and(eq(whose, userId), gt(table.id, last));
        const rows = await tx
          .select({
            rowId: table.id,
            project: t.projects.publicId,
            projectTitle: t.projects.title,
            ...columns,
          })
          .from(table)
          .leftJoin(t.projects, eq(t.projects.id, project))
          .where(which)
          .orderBy(asc(table.id))
          .limit(PAGE);
        if (rows.length > 0) {
          last = Number((rows[rows.length - 1] as { rowId: unknown }).rowId);
          yield rows.map(({ rowId: _, ...row }: Record<string, unknown>) => row);
        }
        if (rows.length < PAGE) return;
      }
    },
  };
}

const PAGE = 200;
const MOST = 10_000;
