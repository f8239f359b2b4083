import { createHash, randomBytes } from "node:crypto";
import * as blocks from "~/db/blocks.server";
import { inTransaction, isDuplicate, type Transaction } from "~/db/client.server";
import * as invitations from "~/db/invitations.server";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import { env } from "~/env.server";
import { formatDate } from "./dates.ts";
import { record } from "./events.server.ts";
import { queueMail } from "./outbox.server.ts";
import { takeOne } from "./rate-limit.server.ts";

/**
 * Doors into a project. A link may be taken by anyone who has it until it ends. One by mail is taken once, by whoever holds
 * its address: somebody new may sign in with another e-mail address than the one it went to. Who took it is shown to the
 * owners, and told to whoever sent it.
 */

export interface Invite {
  project: { id: number; title: string };
  by: { id: number; name: string };
  role: invitations.InvitedRole;
  /** Null: a link. */
  email: string | null;
  days: number;
}

export type Invited = { kind: "made"; path: string } | { kind: "wait"; seconds: number };

/** Makes one; the answer holds the only copy of the link's secret. */
export async function invite({ project, by, role, email, days }: Invite): Promise<Invited> {
  const seconds = await takeOne("invite", String(by.id));
  if (seconds !== null) return { kind: "wait", seconds };
  const token = randomBytes(24).toString("base64url");
  const path = `/invitations/${token}`;
  const expiresAt = new Date(Date.now() + days * DAY_MS);
  await inTransaction(async (tx) => {
    const row = { projectId: project.id, role, email, tokenHash: hashOf(token), expiresAt, createdBy: by.id };
    await invitations.insert(row, tx);
    if (email !== null && !(await isUnwanted(email, by.id, tx))) {
      await queueMail(mailOf({ project, by, role, email, path, expiresAt }), tx);
    }
  });
  return { kind: "made", path };
}

export type Door = NonNullable<Awaited<ReturnType<typeof invitations.findByTokenHash>>>;
export type DoorState = "open" | "ended" | "revoked" | "taken";

export async function findDoor(token: string): Promise<(Door & { state: DoorState }) | undefined> {
  const found = await invitations.findByTokenHash(hashOf(token));
  return found && { ...found, state: stateOf(found.invitation) };
}

export function stateOf(row: invitations.Invitation): DoorState {
  if (row.revokedAt) return "revoked";
  if (row.acceptedAt) return "taken";
  return row.expiresAt.getTime() < Date.now() ? "ended" : "open";
}

export type Accepted = "joined" | "already" | "over";

/** Makes the person a member. A member already stays what they are, and uses nothing up. */
export async function acceptInvitation(door: Door, person: people.User): Promise<Accepted> {
  try {
    return await inTransaction(async (tx) => {
      await projects.lock(door.project.id, tx);
      const row = await invitations.lock(door.invitation.id, tx);
      if (await projects.lockMember(door.project.id, person.id, tx)) return "already";
      if (!row || stateOf(row) !== "open") return "over";
      await projects.insertMember(row.projectId, person.id, row.role, tx);
      await invitations.countUse(row.id, row.email === null ? null : person.id, tx);
      const about = { title: person.name };
      await record({ projectId: row.projectId, kind: "member.joined", actorId: person.id, about }, tx);
      if (row.email !== null) await tellSender(door, row.email, person, tx);
      return "joined";
    });
  } catch (error) {
    if (isDuplicate(error)) return "already";
    throw error;
  }
}

/** Only where it was not the address it was sent to: a forwarded mail should surprise nobody. */
async function tellSender(door: Door, email: string, person: people.User, tx: Transaction): Promise<void> {
  if (!door.by?.email || person.email?.toLowerCase() === email) return;
  const heading = "Your invitation was taken with another address";
  const words = {
    heading,
    parts: [
      {
        kind: "text" as const,
        text: `${person.name} (${person.userName}) took the invitation to “${door.project.title}” that you sent to ${email}, and signs in with another address. If that is not who you meant, remove this member.`,
      },
      { kind: "link" as const, label: "Members", href: membersPage(door.project.publicId) },
    ],
    footer: [{ kind: "text" as const, text: "This mail comes because you sent the invitation." }],
  };
  await queueMail({ toAddress: door.by.email, userId: door.by.id, subject: heading, words }, tx);
}

/** Somebody who blocked the sender hears nothing; the sender is not told so. */
async function isUnwanted(email: string, byId: number, tx: Transaction): Promise<boolean> {
  const user = (await people.findByIdentity("email", email, tx)) ?? (await people.findByEmail(email, tx));
  return user !== undefined && (await blocks.exists(user.id, byId, tx));
}

function mailOf(invite: Omit<Invite, "days"> & { email: string; path: string; expiresAt: Date }) {
  const { project, by, role, email, path, expiresAt } = invite;
  const until = formatDate(expiresAt);
  return {
    toAddress: email,
    subject: `${by.name} invites you to “${project.title}”`,
    words: {
      heading: `An invitation to “${project.title}”`,
      parts: [
        {
          kind: "text" as const,
          text: `${by.name} invites you to this project on Swale, where antenna experimenters share sweeps and what they found. You would be its ${role}.`,
        },
        { kind: "link" as const, label: "See the invitation", href: `${env.BASE_URL}${path}` },
        {
          kind: "text" as const,
          text: `It works once, until ${until}. Whoever holds this address can take it, so do not pass it on. You may sign in with this address, another one, or GitHub.`,
        },
      ],
      footer: [
        {
          kind: "text" as const,
          text: "You do not know what this is about? Then throw it away: nothing happens, and no more mails come.",
        },
      ],
    },
  };
}

function membersPage(project: string): string {
  return `${env.BASE_URL}/projects/${project}/members`;
}

function hashOf(token: string): string {
  return createHash("sha256").update(token).digest("hex");
}

const DAY_MS = 24 * 60 * 60 * 1000;
