import { inTransaction, isDuplicate } from "~/db/client.server";
import * as people from "~/db/people.server";
import * as sessions from "~/db/sessions.server";

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

/** Says whether the name is free; false leaves everything as it was. */
export async function renameMember(id: number, userName: string, name: string): Promise<boolean> {
  try {
    await people.update(id, { userName, name });
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
