import { isPublicAddress } from "./addresses.ts";

/** May this address of the web be asked at all, before its name is looked up? Pure. */

/** The parsed address, or why not. `exempt`: one origin that tests may ask although it is on this machine. */
export function judgeUrl(text: string, exempt?: string): { url: URL } | { problem: string } {
  if (text.length > LONGEST) return { problem: `The address is longer than ${LONGEST} characters.` };
  let url: URL;
  try {
    url = new URL(text);
  } catch {
    return { problem: "That is no complete address; it begins with http:// or https://." };
  }
  if (url.protocol !== "http:" && url.protocol !== "https:") {
    return { problem: "Only addresses that begin with http:// or https:// are asked." };
  }
  if (url.username !== "" || url.password !== "") {
    return { problem: "An address with a name or a password in it is not asked." };
  }
  if (exempt !== undefined && url.origin === exempt) return { url };
  // The usual port of its scheme is left out of a parsed address.
  if (url.port !== "" && url.port !== "80" && url.port !== "443") {
    return { problem: "Only the ports 80 and 443 are asked." };
  }
  const host = hostOf(url);
  if (isLiteral(host) ? !isPublicAddress(host) : !isPublicName(host)) return { problem: PRIVATE };
  return { url };
}

/** Its host without the brackets of IPv6. */
export function hostOf(url: URL): string {
  return url.hostname.replace(/^\[|\]$/g, "");
}

/** After parsing, every spelling of an IPv4 address (octal, hexadecimal, one number) is four numbers. */
export function isLiteral(host: string): boolean {
  return host.includes(":") || /^[\d.]+$/.test(host);
}

/** Names that stand for no host of the public network: RFC 6761, 6762, 7686, 8375, 9476, and names without a dot. */
function isPublicName(host: string): boolean {
  const name = host.replace(/\.$/, "").toLowerCase();
  return name.includes(".") && !PRIVATE_NAMES.test(name);
}

const PRIVATE_NAMES = /(?:^|\.)(?:localhost|local|internal|onion|alt|test|invalid|home\.arpa)$/;
/** Browsers and servers take about this much (common practice, no source). */
const LONGEST = 2000;
export const PRIVATE = "It is not an address of the public network.";
