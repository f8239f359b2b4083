import ipaddr from "ipaddr.js";

/**
 * Which addresses on the network are anybody's to ask. Pure. Sources: the special-purpose address registries of RFC 6890
 * (kept by IANA); RFC 4291 2.5.5 for IPv4 inside IPv6; RFC 9637 for documentation; RFC 6052 and 8215 for NAT64.
 */

/** `address` as a resolver or a socket gives it. What is no address is not public. */
export function isPublicAddress(address: string): boolean {
  // A zone belongs to one link of this machine.
  if (address.includes("%") || !ipaddr.isValid(address)) return false;
  const parsed = ipaddr.parse(address);
  if (parsed.range() !== "unicast") return false;
  if (parsed.kind() === "ipv4")
    return !isIn(parsed, SPECIAL_IPV4) && ipaddr.IPv4.isValidFourPartDecimal(address);
  return isIn(parsed, [GLOBAL_IPV6]) && !isIn(parsed, SPECIAL_IPV6);
}

function isIn(address: ipaddr.IPv4 | ipaddr.IPv6, ranges: readonly string[]): boolean {
  return ranges.some((range) => address.match(ipaddr.parseCIDR(range)));
}

/** All that is given out for global unicast (RFC 4291 2.4): loopback, mapped, unique local and link local are outside. */
const GLOBAL_IPV6 = "2000::/3";

/** Named again although the library knows most of them: an update of it must not open one. */
const SPECIAL_IPV4 = [
  "0.0.0.0/8",
  "10.0.0.0/8",
  "100.64.0.0/10",
  "127.0.0.0/8",
  "169.254.0.0/16",
  "172.16.0.0/12",
  "192.0.0.0/24",
  "192.0.2.0/24",
  "192.31.196.0/24",
  "192.52.193.0/24",
  "192.88.99.0/24",
  "192.168.0.0/16",
  "192.175.48.0/24",
  "198.18.0.0/15",
  "198.51.100.0/24",
  "203.0.113.0/24",
  "224.0.0.0/4",
  "240.0.0.0/4",
];
/** IETF protocol assignments with Teredo, benchmarking and ORCHID; documentation; 6to4; direct delegation AS112. */
const SPECIAL_IPV6 = ["2001::/23", "2001:db8::/32", "2002::/16", "2620:4f:8000::/48", "3fff::/20"];
