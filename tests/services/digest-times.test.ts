import { describe, expect, it } from "vitest";
import { digestDue } from "~/services/digest-times";

const daily = (zone: string, now: string) => {
  const { key, before } = digestDue("daily", zone, new Date(now));
  return [key, before.toISOString()];
};

describe("digestDue", () => {
  it("takes along what came before the full hour", () => {
    const { key, before } = digestDue("hourly", "UTC", new Date("2026-05-01T12:59:59.999Z"));
    expect([key, before.toISOString()]).toEqual(["2026-05-01T12", "2026-05-01T12:00:00.000Z"]);
  });

  // Offsets of the time zone database, as Intl of this Node.js has it.
  it.each([
    ["UTC", "2026-05-01T06:59:59Z", "2026-04-30", "2026-04-30T07:00:00.000Z"],
    ["UTC", "2026-05-01T07:00:00Z", "2026-05-01", "2026-05-01T07:00:00.000Z"],
    ["Asia/Kathmandu", "2026-05-01T01:15:00Z", "2026-05-01", "2026-05-01T01:15:00.000Z"],
    ["Asia/Kathmandu", "2026-05-01T01:14:00Z", "2026-04-30", "2026-04-30T01:15:00.000Z"],
    ["Pacific/Auckland", "2026-01-01T20:00:00Z", "2026-01-02", "2026-01-01T18:00:00.000Z"],
    ["America/Los_Angeles", "2026-03-08T13:59:00Z", "2026-03-07", "2026-03-07T15:00:00.000Z"],
    ["America/Los_Angeles", "2026-03-08T14:00:00Z", "2026-03-08", "2026-03-08T14:00:00.000Z"],
    ["Europe/Berlin", "2026-10-25T06:00:00Z", "2026-10-25", "2026-10-25T06:00:00.000Z"],
    ["No/Such", "2026-05-01T08:00:00Z", "2026-05-01", "2026-05-01T07:00:00.000Z"],
  ])("knows seven in the morning in %s at %s", (zone, now, key, before) => {
    expect(daily(zone, now)).toEqual([key, before]);
  });
});
