import { describe, expect, test } from "vitest";
import { analyse } from "../../../app/measurement/analyse.ts";
import { pointLimits } from "../../../app/measurement/limits/point-limits.ts";
import { sharesOf, shareWords } from "../../../app/measurement/limits/shares.ts";
import { shownLimits, trueLimits } from "../../../app/measurement/limits/worst-case.ts";
import { repeatDips } from "../../../app/measurement/repeat-dips.ts";
import { averageRepeats } from "../../../app/measurement/repeats.ts";
import { ENOUGH, faultsOf, LEAST } from "../../../scripts/coverage.ts";
import { coverage } from "../../../scripts/trials/coverage.ts";
import { resonatorSweep } from "../resonators.ts";

const db = (gamma: number) => -20 * Math.log10(gamma);

/** Directivity alone: |Γm| ± d, table of limits of return loss computed apart. */
test.each([
  [20, 10, 7.61, 13.3],
  [30, 20, 17.61, 23.3],
  [40, 30, 27.61, 33.3],
  [45, 40, 36.12, 47.18],
])("directivity %d dB, return loss %d dB: %d to %d dB", (d, loss, low, high) => {
  const errors = { directivity: 10 ** (-d / 20), tracking: 0, match: 0 };
  const limits = trueLimits(10 ** (-loss / 20), errors);
  expect(db(limits.high)).toBeCloseTo(low, 2);
  expect(db(limits.low)).toBeCloseTo(high, 2);
});

test("what the bench may show and what may be true are each other's inverse", () => {
  const errors = { directivity: 0.02, tracking: 0.01, match: 0.05 };
  for (const gamma of [0.1, 0.4, 0.8]) {
    expect(trueLimits(shownLimits(gamma, errors).high, errors).low).toBeCloseTo(gamma, 12);
    expect(trueLimits(shownLimits(gamma, errors).low, errors).high).toBeCloseTo(gamma, 12);
  }
});

describe("dips", () => {
  const sweep = resonatorSweep({ r: 1.4, q: 12, points: 201, spanHz: 6e6 });
  const even = (value: number) => new Float64Array(201).fill(value);
  const bench = { directivity: even(0.01), tracking: even(0), match: even(0) };

  test("directivity 40 dB at SWR 1.4", () => {
    const [dip] = analyse({ ...sweep, benchLimits: bench }).dips;
    const swr = (g: number) => (1 + g) / (1 - g);
    expect(dip.minimumSwrLow).toBeCloseTo(swr(1 / 6 - 0.01), 6);
    expect(dip.minimumSwrHigh).toBeCloseTo(swr(1 / 6 + 0.01), 6);
    expect(dip.shares[0]).toMatchObject({ source: "directivity" });
    expect(dip.bandwidth?.widthLowHz ?? 9e9).toBeLessThan(dip.bandwidth?.widthHz ?? 0);
    expect(dip.bandwidth?.widthHighHz ?? 0).toBeGreaterThan(dip.bandwidth?.widthHz ?? 0);
    expect(dip.qLimits?.low ?? 9e9).toBeLessThan(dip.qLow ?? 0);
  });

  test("what a feedline's loss adds to the tracking is told apart, and the shares stay whole", () => {
    const limits = { ...bench, tracking: even(0.03), feedline: even(0.02) };
    const { shares } = analyse({ ...sweep, benchLimits: limits }).dips[0];
    const of = (source: string) => shares.find((share) => share.source === source)?.share ?? 0;
    expect(of("feedline") / of("tracking")).toBeCloseTo(2, 9);
    expect(of("feedline") / of("directivity")).toBeCloseTo(0.02 / 6 / 0.01, 6);
    expect(shares.reduce((sum, { share }) => sum + share, 0)).toBeCloseTo(1, 12);
  });

  test("one error that is not known makes the limits unknown, and says which sweep is missing", () => {
    const [dip] = analyse({ ...sweep, benchLimits: { ...bench, directivity: even(Number.NaN) } }).dips;
    expect([dip.minimumSwrLow, dip.benchFrequencyHalfHz, dip.shares.length]).toEqual([null, null, 0]);
    expect(dip.unknown).toEqual([
      { source: "directivity", remedy: "a load sweep of the bench would make it known" },
    ]);
  });

  test("per point: around the trace, unknown without a bench", () => {
    const { low, high, known } = pointLimits({ ...sweep, benchLimits: bench }, { db: 0, gamma: 0 });
    expect(known).toBe(true);
    expect(high[100] - low[100]).toBeCloseTo(0.02, 12);
    expect(pointLimits(sweep, { db: 0, gamma: 0 }).known).toBe(false);
  });
});

test("shares in words add up to 100 %", () => {
  expect(shareWords(sharesOf({ directivity: 3 }, { noise: 3, step: 4 }))).toBe(
    "step 40 %, directivity 38 %, noise 22 %",
  );
  expect(shareWords([])).toBe("");
});

test("repeats: mean, spread by hand, and a change said aloud", () => {
  const one = resonatorSweep({ r: 1.4, q: 12, points: 201, spanHz: 6e6 });
  const scaled = [0.98, 1, 1.02].map((k) => ({ ...one, magnitude: one.magnitude.map((v) => v * k) }));
  const repeats = averageRepeats(scaled);
  expect(repeats?.spread[7]).toBeCloseTo(0.02 * one.magnitude[7], 12);
  expect((repeats?.halfWidth[7] ?? 0) / (0.02 * one.magnitude[7])).toBeCloseTo(4.3027 / Math.sqrt(3), 3);
  const moved = { ...one, frequencyHz: one.frequencyHz.map((hz) => hz * 1.002) };
  const [dip] = repeatDips([analyse(one), analyse(moved)]);
  expect(dip.warnings.map((w) => w.code)).toEqual(["repeats-differ"]);
  expect(repeatDips([analyse(one), analyse(one)])[0].warnings).toEqual([]);
});

test("the truth is inside as often as is claimed", { timeout: 120_000 }, () => {
  expect(coverage(2000, 9, LEAST, ENOUGH).flatMap(faultsOf)).toEqual([]);
});
