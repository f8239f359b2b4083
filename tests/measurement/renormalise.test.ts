import { describe, expect, it } from "vitest";
import { renormalise } from "../../app/measurement/renormalise.ts";
import type { Sweep } from "../../app/measurement/sweep.ts";

/** Z, Γ in 50 Ω and Γ in 75 Ω, computed from Γ = (Z - Z0)/(Z + Z0) with independent code, six digits. */
const CASES = [
  { z: "25", in50: [-1 / 3, 0], in75: [-0.5, 0] },
  { z: "73+j42.5", in50: [0.273704, 0.250956], in75: [0.063696, 0.268871] },
  { z: "35-j20", in50: [-0.114754, -0.262295], in75: [-0.32, -0.24] },
];

function sweep(points: number[][], referenceOhm: number): Sweep {
  return {
    frequencyHz: Float64Array.from(points, (_, i) => 1e6 * (i + 1)),
    magnitude: Float64Array.from(points, ([re, im]) => Math.hypot(re, im)),
    gammaRe: Float64Array.from(points, ([re]) => re),
    gammaIm: Float64Array.from(points, ([, im]) => im),
    referenceOhm,
    plane: "instrument",
  };
}

describe("renormalise", () => {
  it.each(CASES)("turns Γ of $z from 50 Ω to 75 Ω and back", ({ in50, in75 }) => {
    const there = renormalise(sweep([in50], 50), 75);
    expect(there.referenceOhm).toBe(75);
    expect(there.gammaRe?.[0]).toBeCloseTo(in75[0], 5);
    expect(there.gammaIm?.[0]).toBeCloseTo(in75[1], 5);
    expect(there.magnitude[0]).toBeCloseTo(Math.hypot(in75[0], in75[1]), 5);
    const back = renormalise(there, 50);
    expect(back.gammaRe?.[0]).toBeCloseTo(in50[0], 12);
    expect(back.gammaIm?.[0]).toBeCloseTo(in50[1], 12);
  });

  it("keeps full reflection full, and gaps gaps", () => {
    const there = renormalise(
      sweep(
        [
          [1, 0],
          [-1, 0],
          [0, 1],
          [Number.NaN, Number.NaN],
        ],
        50,
      ),
      75,
    );
    expect([...there.magnitude.subarray(0, 3)].map((m) => Number(m.toFixed(12)))).toEqual([1, 1, 1]);
    expect(there.magnitude[3]).toBeNaN();
  });

  it("leaves a scalar sweep and one of the same reference as they are", () => {
    const complex = sweep([[0.1, 0.2]], 50);
    const scalar: Sweep = { ...complex, gammaRe: undefined, gammaIm: undefined };
    expect(renormalise(complex, 50)).toBe(complex);
    expect(renormalise(scalar, 75)).toBe(scalar);
  });

  it("takes an empty sweep", () => {
    expect(renormalise(sweep([], 50), 75).magnitude).toHaveLength(0);
  });
});
