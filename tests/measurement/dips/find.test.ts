import { describe, expect, test } from "vitest";
import { findDips } from "../../../app/measurement/dips/find.ts";
import scipy from "../../fixtures/measurement/scipy.json";

/** Return loss in hundredths of a dB → abs Γ. */
const gamma = (hundredths: number[]) => Float64Array.from(hundredths, (h) => 10 ** (-h / 2000));

/**
 * Truth: scipy.signal.find_peaks and peak_prominences on the same return losses
 * (tests/reference/scipy_dips.py).
 */
describe("as scipy has it", () => {
  test("252 curves: the same dips with the same prominences", () => {
    expect(scipy.curves.length).toBeGreaterThanOrEqual(200);
    let checked = 0;
    for (const { rl, peaks, prominences } of scipy.curves) {
      const found = findDips(gamma(rl), 0).filter((dip) => !dip.edge);
      expect(found.map((dip) => dip.index)).toEqual(peaks);
      for (const [k, dip] of found.entries()) {
        expect(Math.abs(dip.prominenceDb - prominences[k] / 100)).toBeLessThan(1e-9);
        checked++;
      }
    }
    expect(checked).toBeGreaterThan(4000);
  });

  test("of 3 dB and more: the same", () => {
    for (const { rl, prominent } of scipy.curves) {
      const found = findDips(gamma(rl), 3).filter((dip) => !dip.edge);
      expect(found.map((dip) => dip.index)).toEqual(prominent);
    }
  });

  test("a gap parts a curve into two that know nothing of each other", () => {
    for (let k = 0; k + 1 < 60; k += 2) {
      const [a, b] = [scipy.curves[k], scipy.curves[k + 1]];
      const both = Float64Array.of(...gamma(a.rl), Number.NaN, Number.NaN, ...gamma(b.rl));
      const expected = [...a.prominent, ...b.prominent.map((i) => i + a.rl.length + 2)];
      const found = findDips(both, 3).filter((dip) => !dip.edge);
      expect(found.map((dip) => dip.index)).toEqual(expected);
    }
  });
});

const dips = (values: number[], db = 3) => findDips(Float64Array.from(values), db);

describe("shapes by hand", () => {
  test.each([
    ["empty", []],
    ["one point", [0.1]],
    ["only gaps", [Number.NaN, Number.NaN]],
    ["flat", [0.5, 0.5, 0.5, 0.5]],
    ["a step down and a step back that is no dip of 3 dB", [0.5, 0.4, 0.5]],
    ["one finite point between gaps", [Number.NaN, 0.1, Number.NaN]],
  ])("%s has none", (_, values) => {
    expect(dips(values)).toEqual([]);
  });

  test("a plateau counts once, in its middle", () => {
    expect(dips([0.9, 0.2, 0.2, 0.2, 0.9]).map((d) => d.index)).toEqual([2]);
    expect(dips([0.9, 0.2, 0.2, 0.9]).map((d) => d.index)).toEqual([1]);
  });

  test("a shoulder on a flank is no dip", () => {
    expect(dips([0.9, 0.5, 0.5, 0.5, 0.1, 0.9]).map((d) => d.index)).toEqual([4]);
    expect(dips([0.9, 0.1, 0.5, 0.5, 0.6, 0.9]).map((d) => d.index)).toEqual([1]);
  });

  test("two equal dips both have the crest between them as lower crest or the outer one", () => {
    const found = dips([0.8, 0.1, 0.4, 0.1, 0.6]);
    expect(found.map((d) => d.index)).toEqual([1, 3]);
    // As in scipy an equal dip is no boundary: both reach to the outer crests.
    for (const dip of found) expect(dip.prominenceDb).toBeCloseTo(20 * Math.log10(0.6 / 0.1), 9);
  });

  test("ends of the sweep and sides of a gap are edge dips with the one crest there is", () => {
    const found = dips([0.1, 0.8, 0.3, Number.NaN, 0.2, 0.9, 0.9]);
    expect(found).toEqual([
      { index: 0, prominenceDb: 20 * Math.log10(0.8 / 0.1), edge: true },
      { index: 2, prominenceDb: 20 * Math.log10(0.8 / 0.3), edge: true },
      { index: 4, prominenceDb: 20 * Math.log10(0.9 / 0.2), edge: true },
    ]);
  });

  test("an edge dip is the end of a nearer dip's reach", () => {
    const found = dips([0.1, 0.7, 0.3, 0.9]);
    expect(found[1]).toMatchObject({ index: 2, edge: false });
    expect(found[1].prominenceDb).toBeCloseTo(20 * Math.log10(0.7 / 0.3), 12);
  });

  test("more than all reflected is a crest and never a dip", () => {
    expect(dips([5, 1.2, 5])).toEqual([]);
    expect(dips([1.5, 0.5, 1.4]).map((d) => d.index)).toEqual([1]);
  });

  test("a perfect match has no end to its depth", () => {
    expect(dips([0.9, 0, 0.9])).toEqual([{ index: 1, prominenceDb: Number.POSITIVE_INFINITY, edge: false }]);
  });

  test("a prominence that equals the asked one counts", () => {
    const rise = 10 ** (3 / 20);
    expect(dips([0.3 * rise, 0.3, 0.3 * rise])).toHaveLength(1);
  });

  test("time grows with length, not with its square: 400,000 rising notches", () => {
    const values = Float64Array.from({ length: 800_000 }, (_, i) => 0.001 + i * 1e-6 + (i % 2) * 1e-5);
    const start = performance.now();
    expect(findDips(values, 3).filter((dip) => !dip.edge)).toEqual([]);
    expect(performance.now() - start).toBeLessThan(10_000);
  });
});
