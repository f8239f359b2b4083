import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { frequencyScale } from "../../app/charts/axis.ts";
import { decimate } from "../../app/charts/decimate.ts";
import { points } from "./sample.ts";

const whole = frequencyScale("linear", 1e6, 30e6);

describe("decimate", () => {
  it("keeps a dip of one sample in a hundred thousand", () => {
    const runs = decimate(
      points(100_001, (index) => (index === 61_803 ? 0.01 : 0.9)),
      whole,
      400,
    );
    expect(Math.min(...runs[0].magnitudes)).toBe(0.01);
    expect(runs[0].magnitudes.length).toBeLessThanOrEqual(400 * 5 + 2);
  });

  it("keeps every point where there are few", () => {
    const runs = decimate(
      points(20, (index) => index / 40),
      whole,
      400,
    );
    expect(runs).toHaveLength(1);
    expect(runs[0].magnitudes).toHaveLength(20);
  });

  it("ends a run at a gap, also at one sample among many", () => {
    const runs = decimate(
      points(50_000, (index) => (index === 25_000 ? Number.NaN : 0.5)),
      whole,
      300,
    );
    expect(runs).toHaveLength(2);
  });

  it("reaches the edges of a stretch between two samples on the straight line", () => {
    const scale = frequencyScale("linear", 4e6, 6e6);
    const runs = decimate({ frequencyHz: [3e6, 5e6, 7e6], magnitude: [0.2, 0.4, 0.8] }, scale, 100);
    expect(runs[0].fractions).toEqual([0, 0.5, 1]);
    expect(runs[0].magnitudes[0]).toBeCloseTo(0.3, 12);
    expect(runs[0].magnitudes[2]).toBeCloseTo(0.6, 12);
  });

  it("draws a stretch that lies between two samples", () => {
    const scale = frequencyScale("linear", 4e6, 4.5e6);
    const runs = decimate({ frequencyHz: [3e6, 5e6], magnitude: [0.2, 0.4] }, scale, 100);
    expect(runs[0].fractions).toEqual([0, 1]);
  });

  it("gives nothing for no points, for gaps only, and for a stretch outside", () => {
    expect(
      decimate(
        points(0, () => 0),
        whole,
        100,
      ),
    ).toEqual([]);
    expect(
      decimate(
        points(50, () => Number.NaN),
        whole,
        100,
      ),
    ).toEqual([]);
    expect(
      decimate(
        points(50, () => 0.5),
        frequencyScale("linear", 40e6, 50e6),
        100,
      ),
    ).toEqual([]);
  });

  it("stays inside the plot, in order, and never invents a value", () => {
    const values = fc.array(fc.oneof(fc.double({ min: 0, max: 1.2, noNaN: true }), fc.constant(Number.NaN)), {
      maxLength: 600,
    });
    fc.assert(
      fc.property(
        values,
        fc.double({ min: 0, max: 0.9, noNaN: true }),
        fc.double({ min: 0.01, max: 1, noNaN: true }),
        fc.constantFrom("linear" as const, "log" as const),
        (magnitudes, start, width, kind) => {
          const sweep = points(magnitudes.length, (index) => magnitudes[index]);
          const scale = frequencyScale(kind, 1e6 + start * 29e6, 1e6 + Math.min(1, start + width) * 29e6);
          const finite = magnitudes.filter((value) => !Number.isNaN(value));
          for (const run of decimate(sweep, scale, 40)) {
            expect(run.fractions.length).toBe(run.magnitudes.length);
            for (const [index, fraction] of run.fractions.entries()) {
              expect(fraction).toBeGreaterThanOrEqual(index === 0 ? 0 : run.fractions[index - 1]);
              expect(fraction).toBeLessThanOrEqual(1);
              expect(run.magnitudes[index]).toBeGreaterThanOrEqual(Math.min(...finite) - 1e-12);
              expect(run.magnitudes[index]).toBeLessThanOrEqual(Math.max(...finite) + 1e-12);
            }
          }
        },
      ),
    );
  });
});
