import { expect, test } from "vitest";
import { packPoints, unpackPoints } from "~/charts/sent-points";
import type { Sweep } from "~/measurement/sweep";

function sweepOf(frequencyHz: number[]): Sweep {
  return {
    frequencyHz: Float64Array.from(frequencyHz),
    magnitude: Float64Array.from(frequencyHz, (_, i) => (i === 2 ? Number.NaN : 0.123_456_7 + i / 1000)),
    referenceOhm: 50,
    plane: "instrument",
  };
}

test("an even grid travels as its ends and comes back as it was", () => {
  const hz = Array.from({ length: 401 }, (_, i) => 1e6 + i * 72_500);
  const sent = packPoints(sweepOf(hz));
  expect(sent.grid).toEqual({ startHz: 1e6, stopHz: 30e6 });
  const back = unpackPoints(sent);
  for (const [i, value] of Array.from(back.frequencyHz).entries()) expect(value).toBeCloseTo(hz[i], 3);
  expect(back.magnitude[2]).toBeNaN();
  expect(back.magnitude[0]).toBe(0.12346);
});

test("any other grid travels whole", () => {
  const hz = [1e6, 2e6, 4e6, 8e6];
  expect(packPoints(sweepOf(hz)).grid).toEqual({ frequencyHz: hz });
  expect(unpackPoints(packPoints(sweepOf(hz))).frequencyHz).toEqual(hz);
});

test("no sweep, one point and two points", () => {
  expect(unpackPoints(packPoints(null))).toEqual({ frequencyHz: [], magnitude: [] });
  expect(unpackPoints(packPoints(sweepOf([5e6]))).frequencyHz).toEqual([5e6]);
  expect(unpackPoints(packPoints(sweepOf([5e6, 6e6]))).frequencyHz).toEqual([5e6, 6e6]);
});
