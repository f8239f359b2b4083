import { describe, expect, it } from "vitest";
import { differenceOf } from "~/measurement/difference";

/** abs Γ whose return loss is a + b·f dB: a straight line in dB, so that drawing straight between points is exact. */
function ramp(frequencyHz: number[], a: number, b: number) {
  return {
    frequencyHz: Float64Array.from(frequencyHz),
    magnitude: Float64Array.from(frequencyHz, (hz) => 10 ** (-(a + b * hz) / 20)),
  };
}

describe("differenceOf", () => {
  it("is after less before, over the range of both, on the finer grid", () => {
    const { frequencyHz, db } = differenceOf(ramp([0, 10, 20], 5, 1), ramp([5, 8, 11, 14, 30], 2, 3));
    expect([...frequencyHz]).toEqual([5, 8, 11, 14]);
    for (const [i, hz] of frequencyHz.entries()) expect(db[i]).toBeCloseTo(2 + 3 * hz - (5 + hz), 9);
  });

  it("keeps gaps as gaps", () => {
    const before = ramp([0, 1, 2, 3], 5, 0);
    before.magnitude[1] = Number.NaN;
    const { db } = differenceOf(before, ramp([0, 1, 2, 3], 8, 0));
    expect([...db].map((value) => Math.round(value * 1e9) / 1e9)).toEqual([3, Number.NaN, 3, 3]);
  });

  it("is empty without a range in common", () => {
    expect(differenceOf(ramp([0, 1], 1, 0), ramp([2, 3], 1, 0)).frequencyHz).toHaveLength(0);
    expect(differenceOf(ramp([], 1, 0), ramp([2, 3], 1, 0)).frequencyHz).toHaveLength(0);
  });
});
