import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { frequencyAxis, frequencyScale, niceStep } from "../../app/charts/axis.ts";
import { TIER_PLOT_WIDTHS_PX } from "../../app/charts/tiers.ts";

describe("frequencyScale", () => {
  it("puts the arithmetic middle in the middle of a linear axis", () => {
    expect(frequencyScale("linear", 2e6, 10e6).fractionOf(6e6)).toBeCloseTo(0.5, 12);
  });

  it("puts the geometric middle in the middle of a logarithmic axis", () => {
    expect(frequencyScale("log", 2e6, 8e6).fractionOf(4e6)).toBeCloseTo(0.5, 12);
  });

  it("falls back to linear where a logarithmic axis would begin at zero", () => {
    expect(frequencyScale("log", 0, 8e6).kind).toBe("linear");
  });

  it("widens a single frequency so that it stands in the middle", () => {
    for (const kind of ["linear", "log"] as const) {
      expect(frequencyScale(kind, 7e6, 7e6).fractionOf(7e6)).toBeCloseTo(0.5, 2);
    }
    expect(frequencyScale("linear", 0, 0).fractionOf(0)).toBe(0.5);
  });

  it("leads back from a fraction to its frequency", () => {
    fc.assert(
      fc.property(
        fc.constantFrom("linear" as const, "log" as const),
        fc.double({ min: 1, max: 1e9, noNaN: true }),
        fc.double({ min: 1.01, max: 1e4, noNaN: true }),
        fc.double({ min: 0, max: 1, noNaN: true }),
        (kind, fromHz, ratio, fraction) => {
          const scale = frequencyScale(kind, fromHz, fromHz * ratio);
          expect(scale.fractionOf(scale.hzAt(fraction))).toBeCloseTo(fraction, 6);
        },
      ),
    );
  });
});

describe("frequencyAxis", () => {
  const labels = (kind: "linear" | "log", fromHz: number, toHz: number, tier: number) =>
    frequencyAxis(frequencyScale(kind, fromHz, toHz))
      .ticks.filter((tick) => tick.label !== null && tick.tier <= tier)
      .map((tick) => tick.label);

  it("counts 1 to 30 MHz in even steps at every width", () => {
    expect(labels("linear", 1e6, 30e6, 0)).toEqual(["10", "20", "30"]);
    const even = Array.from({ length: 15 }, (_, index) => String(2 * index + 2));
    expect(labels("linear", 1e6, 30e6, 2)).toEqual(even);
  });

  it("names its unit", () => {
    expect(frequencyAxis(frequencyScale("linear", 1e6, 30e6)).caption).toBe("MHz");
    expect(frequencyAxis(frequencyScale("log", 1e6, 30e6)).caption).toBe("MHz log");
    expect(frequencyAxis(frequencyScale("linear", 400e6, 3e9)).caption).toBe("GHz");
    expect(frequencyAxis(frequencyScale("linear", 100e3, 500e3)).caption).toBe("kHz");
    expect(frequencyAxis(frequencyScale("linear", 0, 900)).caption).toBe("Hz");
  });

  it("labels 1, 2, 5 first on a logarithmic axis", () => {
    expect(labels("log", 1e6, 100e6, 0)).toEqual(expect.arrayContaining(["1", "10", "100"]));
    expect(labels("log", 1e6, 100e6, 2)).toEqual(expect.arrayContaining(["2", "5", "20", "50"]));
  });

  it("keeps the decimals that a narrow stretch needs", () => {
    expect(labels("linear", 18.0e6, 18.2e6, 2)).toContain("18.10");
  });

  it("never lets two labels run into each other, stays inside, and widening only adds labels", () => {
    fc.assert(
      fc.property(
        fc.constantFrom("linear" as const, "log" as const),
        fc.double({ min: 1e3, max: 1e9, noNaN: true }),
        fc.double({ min: 1.0001, max: 3000, noNaN: true }),
        (kind, fromHz, ratio) => {
          const { ticks } = frequencyAxis(frequencyScale(kind, fromHz, fromHz * ratio));
          expect(ticks.length).toBeLessThan(80);
          for (const tick of ticks) {
            expect(tick.fraction).toBeGreaterThan(-1e-6);
            expect(tick.fraction).toBeLessThan(1 + 1e-6);
          }
          for (const [tier, widthPx] of TIER_PLOT_WIDTHS_PX.entries()) {
            const shown = ticks.filter((tick) => tick.label !== null && tick.tier <= tier);
            for (let index = 1; index < shown.length; index++) {
              const gapPx = (shown[index].fraction - shown[index - 1].fraction) * widthPx;
              const half = ((shown[index].label ?? "").length + (shown[index - 1].label ?? "").length) * 3.6;
              expect(gapPx).toBeGreaterThanOrEqual(half);
            }
          }
        },
      ),
    );
  });

  it("has labels at every width for spans met in practice", () => {
    for (const [fromHz, toHz] of [
      [1e6, 30e6],
      [2e6, 120e6],
      [18.0e6, 18.2e6],
      [100e3, 500e6],
      [7e6, 7.001e6],
    ]) {
      for (const kind of ["linear", "log"] as const) {
        expect(labels(kind, fromHz, toHz, 0).length).toBeGreaterThanOrEqual(2);
      }
    }
  });
});

describe("niceStep", () => {
  it("rounds up to 1, 2, 5 and their tens", () => {
    expect([0.9, 1, 1.1, 2.1, 5.5, 10].map(niceStep)).toEqual([1, 1, 2, 5, 10, 10]);
  });
});
