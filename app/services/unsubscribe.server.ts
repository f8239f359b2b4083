import { randomBytes } from "node:crypto";
import { inTransaction, type Transaction } from "~/db/client.server";
import * as mailChoices from "~/db/mail-choices.server";
import * as unsubscribe from "~/db/unsubscribe.server";
import { env } from "~/env.server";
import { hashOfToken } from "./tokens.server.ts";

/** A mail's own way out, good without signing in (RFC 8058); only its hash is kept. */
export async function makeWayOut(userId: number, projectId: number, tx: Transaction) {
  const token = randomBytes(24).toString("base64url");
  await unsubscribe.insert(hashOfToken(token), userId, projectId, tx);
  const href = `${env.BASE_URL}/unsubscribe/${token}`;
  const headers = { "List-Unsubscribe": `<${href}>`, "List-Unsubscribe-Post": "List-Unsubscribe=One-Click" };
  return { href, headers };
}

/** Whether the address is one of ours; nothing of the project is told by it. */
export async function isWayOut(token: string): Promise<boolean> {
  return token.length < 100 && (await unsubscribe.findByHash(hashOfToken(token))) !== undefined;
}

/** No more mails about the project, or about any. Done twice it is done. */
export async function takeWayOut(token: string, what: "project" | "all"): Promise<"done" | "missing"> {
  if (token.length >= 100) return "missing";
  const found = await unsubscribe.findByHash(hashOfToken(token));
  if (!found) return "missing";
  await inTransaction(async (tx) => {
    const { userId, tokenHash } = found.token;
    if (what === "all") {
      for (const { scope } of await mailChoices.findAllByUser(userId, tx)) {
        if (scope !== mailChoices.ALL) await mailChoices.remove(userId, scope, tx);
      }
    }
    await mailChoices.set(userId, what === "all" ? null : found.project, "none", tx);
    await unsubscribe.setUsed(tokenHash, tx);
  });
  return "done";
}
