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
  expect(back.magnitude[0]).toBeCloseTo(0.123_456_7, 7);
});

test("any other grid travels whole", () => {
  const hz = [1e6, 2e6, 4e6, 8e6];
  expect(packPoints(sweepOf(hz)).grid).toHaveProperty("frequencyHz");
  expect(unpackPoints(packPoints(sweepOf(hz))).frequencyHz).toEqual(Float64Array.from(hz));
});

test("no sweep, one point and two points", () => {
  expect(unpackPoints(packPoints(null))).toEqual({
    frequencyHz: new Float64Array(0),
    magnitude: new Float32Array(0),
  });
  expect([...Array.from(unpackPoints(packPoints(sweepOf([5e6]))).frequencyHz)]).toEqual([5e6]);
  expect([...Array.from(unpackPoints(packPoints(sweepOf([5e6, 6e6]))).frequencyHz)]).toEqual([5e6, 6e6]);
});

test("a picture's limits travel with it", () => {
  const sweep = sweepOf([1e6, 2e6, 3e6]);
  sweep.pictureLimits = {
    frequencyHz: Float64Array.of(1e4, 1e4, 1e4),
    magnitudeLow: Float64Array.of(0.1, 0.25, 0.5),
    magnitudeHigh: Float64Array.of(0.2, 0.5, 0.75),
  };
  const { limits } = unpackPoints(packPoints(sweep));
  expect(Array.from(limits?.low ?? []).slice(1)).toEqual([0.25, 0.5]);
  expect(Array.from(limits?.high ?? []).slice(1)).toEqual([0.5, 0.75]);
});
