import { expect, test } from "vitest";
import { withWholeDips } from "../../app/db/whole-dips.server.ts";
import { analyse } from "../../app/measurement/analyse.ts";
import { resonatorSweep } from "../measurement/resonators.ts";

type Row = Parameters<typeof withWholeDips>[0];

test("what an older version stored comes back in today's shape, and what it did not know is null", () => {
  const { dips } = analyse(resonatorSweep({ r: 1.4, q: 12, points: 201, spanHz: 6e6 }));
  const old = dips.map(({ shares, unknown, qLimits, benchFrequencyHalfHz, returnLossLowDb, ...dip }) => ({
    ...dip,
    publicId: "d1",
  }));
  const stored = { analysis: { version: "1", dips: JSON.parse(JSON.stringify(old)) } } as unknown as Row;
  const [dip] = withWholeDips(stored).analysis?.dips ?? [];
  expect(dip).toMatchObject({ shares: [], unknown: [], qLimits: null, publicId: "d1" });
  expect([dip.benchFrequencyHalfHz, dip.returnLossLowDb]).toEqual([null, null]);
  expect(dip.minimumSwr).toBe(dips[0].minimumSwr);
  expect(withWholeDips({ analysis: null })).toEqual({ analysis: null });
});
