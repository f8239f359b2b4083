import { expect, test } from "vitest";
import { analyse } from "../../../app/measurement/analyse.ts";
import { completeDip } from "../../../app/measurement/dips/complete.ts";
import { resonatorSweep } from "../resonators.ts";

const [dip] = analyse(resonatorSweep({ r: 1.4, q: 12, points: 201, spanHz: 6e6 })).dips;

test("a dip of today comes back from JSON as it went", () => {
  expect(completeDip(JSON.parse(JSON.stringify({ ...dip, publicId: "a" })))).toEqual({
    ...dip,
    publicId: "a",
  });
});

test("a dip of the first version: what it did not know is null or empty, the rest is kept", () => {
  const { returnLossLowDb, returnLossHighDb, benchFrequencyHalfHz, qLimits, shares, unknown, ...old } = dip;
  const band = dip.bandwidth as NonNullable<typeof dip.bandwidth>;
  const { widthLowHz, widthHighHz, lowEdge, highEdge, ...oldBand } = band;
  const whole = completeDip({ ...old, bandwidth: oldBand });
  expect(whole.frequencyHz).toBe(dip.frequencyHz);
  expect([whole.returnLossLowDb, whole.benchFrequencyHalfHz, whole.qLimits]).toEqual([null, null, null]);
  expect([whole.shares, whole.unknown]).toEqual([[], []]);
  expect(whole.bandwidth).toMatchObject({ widthHz: band.widthHz, widthLowHz: null, lowEdge: null });
  expect(completeDip({ ...old, bandwidth: null }).bandwidth).toBeNull();
});

test("an SWR without a number is null in JSON and infinite here; one that is not known stays null", () => {
  const endless = { ...dip, minimumSwr: Number.POSITIVE_INFINITY, minimumSwrLow: 9, minimumSwrHigh: null };
  const whole = completeDip(JSON.parse(JSON.stringify(endless)));
  expect([whole.minimumSwr, whole.minimumSwrHigh]).toEqual([
    Number.POSITIVE_INFINITY,
    Number.POSITIVE_INFINITY,
  ]);
  expect(completeDip({ ...dip, minimumSwrLow: null, minimumSwrHigh: null }).minimumSwrHigh).toBeNull();
});
