import { createHash, randomBytes, timingSafeEqual } from "node:crypto";
import type { Person } from "./people.ts";

export interface Client {
  id: string;
  secret: string;
  /** Where a person may be sent back to: this address or one below it. */
  callback: string;
}

interface Grant {
  clientId: string;
  redirectUri: string;
  scopes: string[];
  person: Person;
  expiresAtMs: number;
  /** The token that the code was exchanged for; used again, the code also ends that token. */
  token?: string;
}

const CODE_LIFETIME_MS = 10 * 60 * 1000;

/** Codes and tokens, in memory: a restart ends them all. `now` is the clock, in milliseconds. */
export class Grants {
  readonly #codes = new Map<string, Grant>();
  readonly #tokens = new Map<string, { person: Person; scopes: string[] }>();
  readonly #now: () => number;

  constructor(now: () => number = Date.now) {
    this.#now = now;
  }

  issueCode(client: Client, redirectUri: string, scopes: string[], person: Person): string {
    const code = randomBytes(20).toString("hex");
    const expiresAtMs = this.#now() + CODE_LIFETIME_MS;
    this.#codes.set(code, { clientId: client.id, redirectUri, scopes, person, expiresAtMs });
    return code;
  }

  /** A token for a code: once, in time, to the client and the address it was made for. */
  exchange(
    client: Client,
    code: string,
    redirectUri: string | null,
  ): { token: string; scopes: string[] } | undefined {
    const grant = this.#codes.get(code);
    if (!grant || grant.clientId !== client.id) return undefined;
    if (grant.token !== undefined) {
      this.#tokens.delete(grant.token);
      return undefined;
    }
    if (grant.expiresAtMs < this.#now() || (redirectUri !== null && redirectUri !== grant.redirectUri))
      return undefined;
    grant.token = `gho_${randomBytes(24).toString("hex")}`;
    this.#tokens.set(grant.token, { person: grant.person, scopes: grant.scopes });
    return { token: grant.token, scopes: grant.scopes };
  }

  holderOf(authorization: string | undefined): { person: Person; scopes: string[] } | undefined {
    const token = /^(?:bearer|token) (\S+)$/i.exec(authorization ?? "")?.[1];
    return token ? this.#tokens.get(token) : undefined;
  }
}

/** Compares in a time that does not tell how much was right. */
export function sameSecret(given: string, wanted: string): boolean {
  const digest = (text: string) => createHash("sha256").update(text).digest();
  return timingSafeEqual(digest(given), digest(wanted));
}

/** The exact address, or one below it on the same origin. */
export function mayReturnTo(client: Client, redirectUri: string): boolean {
  if (!URL.canParse(redirectUri)) return false;
  const given = new URL(redirectUri);
  const wanted = new URL(client.callback);
  if (given.origin !== wanted.origin || given.username || given.hash) return false;
  return (
    given.pathname === wanted.pathname || given.pathname.startsWith(`${wanted.pathname.replace(/\/$/, "")}/`)
  );
}
