import { lookup } from "node:dns/promises";
import type { LookupFunction } from "node:net";
import { isPublicAddress } from "./addresses.ts";
import { hostOf, isLiteral, PRIVATE } from "./judge.ts";

export interface Resolved {
  address: string;
  family: number;
}

/** Looks a name up: every address that it has. */
export type Resolve = (host: string) => Promise<Resolved[]>;

export const resolveByDns: Resolve = (host) => lookup(host, { all: true, verbatim: true });

/** The addresses of a judged URL, every one of them public, or why it is not asked; throws where the name has none. */
export async function addressesOf(
  url: URL,
  resolve: Resolve,
  exempt?: string,
): Promise<{ addresses: Resolved[] } | { problem: string }> {
  const host = hostOf(url);
  const found = isLiteral(host)
    ? [{ address: host, family: host.includes(":") ? 6 : 4 }]
    : await resolve(host);
  if (found.length === 0) throw new Error(`${host} has no address.`);
  // A name with one private address among public ones is no honest name.
  const judged = url.origin === exempt || found.every(({ address }) => isPublicAddress(address));
  return judged ? { addresses: found } : { problem: PRIVATE };
}

/** For a connection that must go to these addresses and look nothing up by itself. */
export function pinnedTo(addresses: Resolved[]): LookupFunction {
  return (_host, options, callback) => {
    if (options.all) callback(null, addresses);
    else callback(null, addresses[0].address, addresses[0].family);
  };
}
