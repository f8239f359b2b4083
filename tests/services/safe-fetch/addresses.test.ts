import { describe, expect, it } from "vitest";
import { isPublicAddress } from "~/services/safe-fetch/addresses";

/** One address at least of every row of the IANA special-purpose registries (RFC 6890) that is not globally reachable. */
const PRIVATE = [
  ["0.0.0.0", "this host"],
  ["0.1.2.3", "this network"],
  ["10.0.0.1", "private"],
  ["10.255.255.255", "private"],
  ["100.64.0.1", "shared by carriers"],
  ["100.127.255.254", "shared by carriers"],
  ["127.0.0.1", "loopback"],
  ["127.255.255.254", "loopback"],
  ["169.254.169.254", "link local, where clouds tell secrets"],
  ["172.16.0.1", "private"],
  ["172.31.255.255", "private"],
  ["192.0.0.8", "IETF"],
  ["192.0.2.1", "documentation"],
  ["192.31.196.1", "AS112"],
  ["192.52.193.1", "AMT"],
  ["192.88.99.1", "6to4 relay"],
  ["192.168.1.1", "private"],
  ["192.175.48.1", "AS112"],
  ["198.18.0.1", "benchmarking"],
  ["198.19.255.255", "benchmarking"],
  ["198.51.100.7", "documentation"],
  ["203.0.113.7", "documentation"],
  ["224.0.0.1", "multicast"],
  ["239.255.255.250", "multicast"],
  ["240.0.0.1", "reserved"],
  ["255.255.255.255", "broadcast"],
  ["::", "unspecified"],
  ["::1", "loopback"],
  ["::7f00:1", "compatible with IPv4"],
  ["::ffff:127.0.0.1", "mapped"],
  ["::ffff:8.8.8.8", "mapped, whatever is inside"],
  ["::ffff:0:7f00:1", "translated"],
  ["64:ff9b::7f00:1", "NAT64"],
  ["64:ff9b:1::1", "NAT64 of the place"],
  ["100::1", "discard"],
  ["2001::1", "Teredo"],
  ["2001:2::1", "benchmarking"],
  ["2001:10::1", "ORCHID"],
  ["2001:20::1", "ORCHIDv2"],
  ["2001:db8::1", "documentation"],
  ["2002:7f00:1::", "6to4"],
  ["3fff::1", "documentation"],
  ["5f00::1", "segment routing"],
  ["2620:4f:8000::1", "AS112"],
  ["fc00::1", "unique local"],
  ["fd12:3456::1", "unique local"],
  ["fe80::1", "link local"],
  ["fe80::1%eth0", "link local with a zone"],
  ["2600::1%eth0", "a zone"],
  ["fec0::1", "site local, of old"],
  ["ff02::1", "multicast"],
  ["4000::1", "not given out"],
] as const;

describe("isPublicAddress", () => {
  it.each(PRIVATE)("%s is not (%s)", (address) => expect(isPublicAddress(address)).toBe(false));

  it.each([
    "8.8.8.8",
    "1.1.1.1",
    "100.63.255.255",
    "100.128.0.1",
    "172.15.255.255",
    "172.32.0.1",
    "198.20.0.1",
  ])("%s is", (address) => expect(isPublicAddress(address)).toBe(true));

  it.each(["2600::1", "2a00:1450:4001::1", "2003::1"])("%s is", (address) =>
    expect(isPublicAddress(address)).toBe(true),
  );

  it.each(["", "localhost", "0x7f.1", "2130706433", "0177.0.0.1", "8.8.8", "8.8.8.8 ", "[2600::1]"])(
    "%j is no address as a socket says one",
    (text) => expect(isPublicAddress(text)).toBe(false),
  );
});
