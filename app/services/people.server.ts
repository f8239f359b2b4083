import { inTransaction, isDuplicate, type Transaction } from "~/db/client.server";
import * as people from "~/db/people.server";
import * as sessions from "~/db/sessions.server";
import { env } from "~/env.server";
import { queueMail } from "./outbox.server.ts";

/** A way of signing in, as the provider vouches for it. */
export interface Way {
  provider: "github" | "email";
  subject: string;
  /** An address that is confirmed, if any. */
  email: string | null;
}

export interface Identity {
  provider: string;
  subject: string;
  login: string;
  name: string;
  email: string | null;
}

/**
 * Who this identity belongs to; someone new becomes a member. Found by the identity alone: an equal e-mail
 * address opens nobody's account, and a member's address is not given to a second account.
 */
export async function findOrCreateByIdentity(identity: Identity): Promise<people.User> {
  for (let attempt = 1; ; attempt++) {
    const known = await people.findByIdentity(identity.provider, identity.subject);
    if (known) return known;
    try {
      return await createMember(identity);
    } catch (error) {
      // Two first sign-ins at once, or a user name taken in between: the next look finds it.
      if (attempt >= ATTEMPTS || !isDuplicate(error)) throw error;
    }
  }
}

function createMember(identity: Identity): Promise<people.User> {
  return inTransaction(async (tx) => {
    const taken = identity.email ? await people.findByEmail(identity.email, tx) : undefined;
    const id = await people.insert(
      {
        userName: await people.freeUserName(identity.login, tx),
        name: identity.name.slice(0, 120),
        email: taken ? null : identity.email,
      },
      tx,
    );
    await people.insertIdentity(id, identity.provider, identity.subject, tx);
    const user = await people.findById(id, tx);
    if (!user) throw new Error("The new member is not there.");
    return user;
  });
}

/** Adds a way of signing in to an account, and tells the person. Throws where it is somebody else's. */
export async function addIdentity(userId: number, way: Way, tx: Transaction): Promise<void> {
  const owner = await people.findByIdentity(way.provider, way.subject, tx);
  if (owner?.id === userId) return;
  const user = await people.lock(userId, tx);
  if (!user) throw new Error("The member is not there.");
  await people.insertIdentity(userId, way.provider, way.subject, tx);
  await tellOfWay(user, way, "added", tx);
  if (!user.email && way.email && !(await people.findByEmail(way.email, tx))) {
    await people.update(userId, { email: way.email }, tx);
  }
}

export type WayAdded = "added" | "taken";

/** The same for a way that the provider just confirmed, in a write of its own. */
export async function addWay(userId: number, way: Way): Promise<WayAdded> {
  try {
    await inTransaction((tx) => addIdentity(userId, way, tx));
    return "added";
  } catch (error) {
    if (isDuplicate(error)) return "taken";
    throw error;
  }
}

/** Takes a way away, never the last one. Mails then go to another address of the person's, or nowhere. */
export function removeWay(userId: number, provider: string, subject: string): Promise<"done" | "last"> {
  return inTransaction(async (tx) => {
    const user = await people.lock(userId, tx);
    const ways = await people.findIdentities(userId, tx);
    const isIt = (way: { provider: string; subject: string }) =>
      way.provider === provider && way.subject === subject;
    if (!user || !ways.some(isIt)) return "done";
    if (ways.length === 1) return "last";
    await people.deleteIdentity(userId, provider, subject, tx);
    await tellOfWay(user, { provider, subject }, "removed", tx);
    if (provider === "email" && user.email?.toLowerCase() === subject) {
      const other = ways.find((way) => way.provider === "email" && !isIt(way));
      await people.update(userId, { email: other?.subject ?? null }, tx);
    }
    return "done";
  });
}

/** Mails go to one of the addresses that sign the person in; false for any other. */
export async function chooseAddress(userId: number, email: string): Promise<boolean> {
  const ways = await people.findIdentities(userId);
  if (!ways.some((way) => way.provider === "email" && way.subject === email)) return false;
  await people.update(userId, { email });
  return true;
}

async function tellOfWay(
  user: people.User,
  { provider, subject }: { provider: string; subject: string },
  change: "added" | "removed",
  tx: Transaction,
): Promise<void> {
  if (!user.email) return;
  const way = provider === "email" ? `codes mailed to ${subject}` : "GitHub";
  const words = {
    heading: `A way to sign in was ${change}`,
    parts: [
      { kind: "text" as const, text: `For your account ${user.userName}: ${way}.` },
      { kind: "link" as const, label: "How you sign in", href: `${env.BASE_URL}/settings/sign-in` },
    ],
    footer: [
      {
        kind: "text" as const,
        text: "This mail always comes. If it was not you, sign in, take away what is not yours, and end all other sessions under Settings.",
      },
    ],
  };
  await queueMail({ toAddress: user.email, userId: user.id, subject: words.heading, words }, tx);
}

export type Profile = Pick<people.User, "userName" | "name" | "callSign" | "ituRegion" | "timeZone">;

/** Says whether the user name is free; false leaves everything as it was. */
export async function changeProfile(id: number, profile: Profile): Promise<boolean> {
  try {
    await people.update(id, profile);
    return true;
  } catch (error) {
    if (isDuplicate(error)) return false;
    throw error;
  }
}

export type AdministratorChange = "suspend" | "restore" | "promote" | "demote";

/** Changes an account; the last administrator who can sign in stays one. Answers whether it was done. */
export function changeAccount(id: number, change: AdministratorChange): Promise<boolean> {
  return inTransaction(async (tx) => {
    const administrators = await people.lockAdministrators(tx);
    const leaves = change === "suspend" || change === "demote";
    if (leaves && administrators.length === 1 && administrators[0].id === id) return false;
    switch (change) {
      case "suspend":
        await people.update(id, { suspendedAt: new Date() }, tx);
        await sessions.deleteAllByUser(id, tx);
        break;
      case "restore":
        await people.update(id, { suspendedAt: null }, tx);
        break;
      case "promote":
        await people.update(id, { administrator: true }, tx);
        break;
      case "demote":
        await people.update(id, { administrator: false }, tx);
        break;
      default:
        change satisfies never;
    }
    return true;
  });
}

const ATTEMPTS = 4;
