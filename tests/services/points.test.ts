import { expect, test } from "vitest";
import type { Sweep } from "~/measurement/sweep";
import { decodePoints, encodePoints, pickPoints } from "~/services/points.server";

function sweepOf(n: number, kind: "scalar" | "complex" | "picture"): Sweep {
  const column = (f: (i: number) => number) => Float64Array.from({ length: n }, (_, i) => f(i));
  const sweep: Sweep = {
    frequencyHz: column((i) => 1e6 + i * 50_000.5),
    magnitude: column((i) =>
      i % 97 === 5 ? Number.NaN : Math.abs(Math.sin(i / 7)) + (i % 31 === 0 ? 0.02 : 0),
    ),
    referenceOhm: 75,
    plane: "instrument",
  };
  if (kind === "complex") {
    sweep.gammaRe = column((i) => Math.cos(i) / 3);
    sweep.gammaIm = column((i) => -Math.sin(i) / 3);
  }
  if (kind === "picture") {
    sweep.pictureLimits = {
      frequencyHz: column(() => 12_500),
      magnitudeLow: column((i) => i / n),
      magnitudeHigh: column((i) => i / n + 0.01),
    };
  }
  return sweep;
}

test.each(["scalar", "complex", "picture"] as const)("a %s sweep comes back bit for bit", (kind) => {
  for (const n of [0, 1, 2, 1001]) {
    const sweep = sweepOf(n, kind);
    expect(decodePoints(encodePoints(sweep))).toEqual(sweep);
  }
});

test("a long sweep is stored in parts, each far below the usual packet of 16 MB", () => {
  const sweep = sweepOf(300_001, "complex");
  const parts = encodePoints(sweep);
  expect(parts).toHaveLength(3);
  expect(Math.max(...parts.map((part) => part.length))).toBeLessThan(8 * 1024 * 1024);
  const back = decodePoints(parts);
  const bytesOf = (column?: Float64Array) => Buffer.from(column?.buffer ?? new ArrayBuffer(0));
  for (const name of ["frequencyHz", "magnitude", "gammaRe", "gammaIm"] as const) {
    expect(bytesOf(back[name]).equals(bytesOf(sweep[name])), name).toBe(true);
  }
});

test("points are picked column by column", () => {
  const sweep = sweepOf(50, "complex");
  const picked = pickPoints(sweep, [0, 7, 49]);
  expect([...picked.frequencyHz]).toEqual([
    sweep.frequencyHz[0],
    sweep.frequencyHz[7],
    sweep.frequencyHz[49],
  ]);
  expect(picked.gammaIm?.[1]).toBe(sweep.gammaIm?.[7]);
  expect(picked.referenceOhm).toBe(75);
});

test("bytes that are not ours are refused, not misread", () => {
  const [part] = encodePoints(sweepOf(10, "scalar"));
  part.writeUInt8(9, 0);
  expect(() => decodePoints([part])).toThrow("unknown format");
  expect(() => decodePoints([])).toThrow("No points");
});
