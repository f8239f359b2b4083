import { describe, expect, test } from "vitest";
import { decimate } from "../../app/measurement/decimate.ts";

function sweepOf(values: number[], hz: (i: number) => number = (i) => 1e6 + i * 1e3) {
  return { frequencyHz: Float64Array.from(values, (_, i) => hz(i)), magnitude: Float64Array.from(values) };
}

const wavy = (n: number) =>
  Array.from({ length: n }, (_, i) => 0.6 + 0.3 * Math.sin(i / 40) * Math.cos(i / 700));

describe("few points", () => {
  test("empty, one, and as many as asked for stay as they are", () => {
    expect([...decimate(sweepOf([]), 10)]).toEqual([]);
    expect([...decimate(sweepOf([0.5]), 10)]).toEqual([0]);
    expect([...decimate(sweepOf(wavy(10)), 10)]).toEqual([0, 1, 2, 3, 4, 5, 6, 7, 8, 9]);
  });
});

describe("many points", () => {
  test("ascending, bounded, first and last kept, deepest and highest kept", () => {
    for (const most of [4, 5, 33, 800, 1600]) {
      const sweep = sweepOf(wavy(10_000));
      sweep.magnitude[4321] = 0.01;
      sweep.magnitude[7777] = 1.3;
      const kept = [...decimate(sweep, most)];
      expect(kept.length).toBeLessThanOrEqual(most);
      expect(kept.every((index, k) => k === 0 || index > kept[k - 1])).toBe(true);
      expect(kept[0]).toBe(0);
      expect(kept.at(-1)).toBe(9999);
      expect(kept).toContain(4321);
      if (most > 5) expect(kept).toContain(7777);
    }
  });

  test("every narrow dip of a long sweep is kept at its very sample", () => {
    const values = wavy(200_000).map((v) => v + 0.05);
    const dips = [17, 999, 50_000, 50_003, 123_456, 199_998];
    for (const at of dips) values[at] = 0.02;
    const kept = new Set(decimate(sweepOf(values), 1600));
    for (const at of dips) expect(kept.has(at), `dip at ${at}`).toBe(true);
  });

  test("the envelope follows the trace within a bucket", () => {
    const sweep = sweepOf(wavy(50_000));
    const kept = decimate(sweep, 1000);
    const lowest = Math.min(...Array.from(kept, (i) => sweep.magnitude[i]));
    expect(lowest).toBe(Math.min(...sweep.magnitude));
  });

  test("a gap stays a gap", () => {
    const values = wavy(20_000);
    for (let i = 9000; i < 12_000; i++) values[i] = Number.NaN;
    const sweep = sweepOf(values);
    const kept = [...decimate(sweep, 400)];
    expect(kept.some((i) => Number.isNaN(sweep.magnitude[i]))).toBe(true);
    expect([...decimate(sweepOf(new Array(5000).fill(Number.NaN)), 100)].length).toBeGreaterThan(1);
  });
});

describe("ranges and scales", () => {
  test("a range keeps one neighbour on each side", () => {
    const kept = [...decimate(sweepOf(wavy(1000)), 2000, { fromHz: 1.2e6, toHz: 1.3e6 })];
    expect(kept[0]).toBe(199);
    expect(kept.at(-1)).toBe(301);
    expect([...decimate(sweepOf(wavy(10)), 20, { fromHz: 5e6, toHz: 4e6 })]).toEqual([]);
  });

  test("logarithmic buckets give low frequencies their share", () => {
    const sweep = sweepOf(wavy(100_000), (i) => 1e6 * 1000 ** (i / 99_999));
    const share = (indices: Uint32Array) =>
      indices.filter((i) => sweep.frequencyHz[i] < 30e6).length / indices.length;
    expect(share(decimate(sweep, 1000, undefined, true))).toBeGreaterThan(0.4);
    expect(share(decimate(sweep, 1000))).toBeLessThan(0.2);
  });
});
