import { createHash, randomBytes } from "node:crypto";
import type { User } from "~/db/people.server";
import * as tokens from "~/db/tokens.server";

/** Tokens for scripts: shown once, kept as a hash. */

export interface TokenHolder {
  user: User;
  token: { id: number; publicId: string; scope: tokens.TokenScope };
}

/** Makes a token and answers its text, which is not kept and can't be shown again. */
export async function makeToken(userId: number, label: string, scope: tokens.TokenScope): Promise<string> {
  const text = `${PREFIX}${randomBytes(32).toString("base64url")}`;
  await tokens.insert({ userId, label, scope, tokenHash: hashOfToken(text) });
  return text;
}

/** Whose token this is; undefined for one that is unknown, revoked or of a suspended account. */
export async function findTokenHolder(text: string): Promise<TokenHolder | undefined> {
  if (!text.startsWith(PREFIX) || text.length > 200) return undefined;
  const found = await tokens.findByHash(hashOfToken(text));
  if (!found || found.user.suspendedAt) return undefined;
  const lastMs = found.token.lastUsedAt?.getTime() ?? 0;
  if (Date.now() - lastMs > NOTED_EVERY_MS) await tokens.updateLastUsed(found.token.id);
  return found;
}

export function hashOfToken(text: string): string {
  return createHash("sha256").update(text).digest("hex");
}

/** Lets a token that leaked into a file be recognised as one. */
const PREFIX = "swale_";
const NOTED_EVERY_MS = 60_000;
