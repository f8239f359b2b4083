import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { mergePoints, sameRange, shiftRange, zoomRange } from "../../app/charts/ranges.ts";

const whole = { fromHz: 1e6, toHz: 101e6 };

describe("zoomRange", () => {
  it("halves a linear stretch around its middle", () => {
    expect(zoomRange(whole, whole, "linear", 0.5)).toEqual({ fromHz: 26e6, toHz: 76e6 });
  });

  it("keeps a chosen frequency in the middle where there is room", () => {
    const range = zoomRange(whole, whole, "linear", 0.25, 40e6);
    expect((range.fromHz + range.toHz) / 2).toBeCloseTo(40e6, 3);
    expect(zoomRange(whole, whole, "linear", 0.5, 5e6).fromHz).toBe(1e6);
  });

  it("halves the ratio's logarithm on a logarithmic axis", () => {
    const { fromHz, toHz } = zoomRange(
      { fromHz: 1e6, toHz: 100e6 },
      { fromHz: 1e6, toHz: 100e6 },
      "log",
      0.5,
    );
    expect(toHz / fromHz).toBeCloseTo(10, 6);
  });

  it("zooms out to the whole sweep exactly", () => {
    expect(zoomRange({ fromHz: 20e6, toHz: 90e6 }, whole, "linear", 2)).toEqual(whole);
  });
});

describe("every step", () => {
  it("stays inside the sweep and keeps an order", () => {
    fc.assert(
      fc.property(
        fc.constantFrom("linear" as const, "log" as const),
        fc.double({ min: 0, max: 0.9, noNaN: true }),
        fc.double({ min: 0.001, max: 1, noNaN: true }),
        fc.double({ min: -3, max: 3, noNaN: true }),
        (kind, start, width, by) => {
          const fromHz = 1e6 + start * 100e6;
          const now = { fromHz, toHz: Math.min(101e6, fromHz + width * 100e6) };
          for (const range of [
            shiftRange(now, whole, kind, by),
            zoomRange(now, whole, kind, Math.abs(by) + 0.01),
          ]) {
            expect(range.fromHz).toBeGreaterThanOrEqual(whole.fromHz * (1 - 1e-9));
            expect(range.toHz).toBeLessThanOrEqual(whole.toHz * (1 + 1e-9));
            expect(range.toHz).toBeGreaterThan(range.fromHz);
          }
        },
      ),
    );
  });

  it("goes along by its share and comes back", () => {
    const now = { fromHz: 21e6, toHz: 41e6 };
    const there = shiftRange(now, whole, "linear", 0.5);
    expect(there.fromHz).toBeCloseTo(31e6, 3);
    expect(sameRange(shiftRange(there, whole, "linear", -0.5), now)).toBe(true);
  });
});

describe("mergePoints", () => {
  it("lays the fine stretch into the coarse sweep, ascending, no frequency twice", () => {
    const coarse = { frequencyHz: [1, 2, 3, 4, 5], magnitude: [1, 1, 1, 1, 1] };
    const fine = { frequencyHz: [2, 2.5, 3], magnitude: [0.5, 0.4, 0.5] };
    expect(mergePoints(coarse, fine)).toEqual({
      frequencyHz: [1, 2, 2.5, 3, 4, 5],
      magnitude: [1, 0.5, 0.4, 0.5, 1, 1],
    });
    expect(mergePoints(coarse, { frequencyHz: [], magnitude: [] })).toBe(coarse);
  });
});
