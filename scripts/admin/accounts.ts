import { inTransaction } from "~/db/client.server";
import * as people from "~/db/people.server";
import { makeToken } from "~/services/tokens.server";
import { PlainFailure } from "../steps.mjs";

/** Makes a member, or an administrator, and says what was made. */
export function createUser(given: { email: string; name: string; administrator: boolean }): Promise<string> {
  const { email, name, administrator } = given;
  if (!/^[^\s@]+@[^\s@]+$/.test(email) || email.length > 254) {
    throw new PlainFailure(`${email} is not an e-mail address. Nobody was added.`);
  }
  return inTransaction(async (tx) => {
    const there = await people.findByEmail(email, tx);
    if (there) throw new PlainFailure(`${email} belongs to ${there.userName} already. Nobody was added.`);
    const userName = await people.freeUserName(email.split("@")[0], tx);
    const id = await people.insert({ userName, name: name.slice(0, 120), email, administrator }, tx);
    // Signs in by a code that is mailed there.
    await people.insertIdentity(id, "email", email.toLowerCase(), tx);
    return `${administrator ? "Administrator" : "Member"} ${userName} <${email}> was made.`;
  });
}

/** Makes a token for the member with this address; its text is shown this once. */
export async function createToken(email: string, scope: "read" | "write", label: string): Promise<string> {
  const user = await people.findByEmail(email);
  if (!user) throw new PlainFailure(`Nobody here has the address ${email}. No token was made.`);
  return makeToken(user.id, label.slice(0, 80), scope);
}
