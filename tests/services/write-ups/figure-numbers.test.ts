import { describe, expect, it } from "vitest";
import type { Dip } from "~/measurement/sweep";
import { sweepTable } from "~/services/write-ups/figure-numbers";

const dip = (low: number | null, high: number | null) =>
  ({
    frequencyHz: 7.12e6,
    frequencyUncertaintyHz: 900,
    minimumSwr: 1.27,
    minimumSwrLow: low,
    minimumSwrHigh: high,
    bandwidth: null,
  }) as Dip;

describe("the numbers under a figure of a sweep", () => {
  it("say the limits of the SWR, also that they are not known", () => {
    const words = sweepTable([dip(1.2, 1.35), dip(null, null)])?.rows.map((row) => row[1]);
    expect(words).toEqual(["1.27 (1.20–1.35)", "1.27 (limits unknown)"]);
  });
});
