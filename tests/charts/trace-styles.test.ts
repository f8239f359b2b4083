import { describe, expect, it } from "vitest";
import { PAPER_PALETTE, PEAT_PALETTE } from "~/charts/palette";
import { MOST_TRACES, traceStyle } from "~/charts/trace-styles";

/**
 * Linear RGB as it is seen without one kind of cone: Machado, Oliveira & Fernandes, IEEE Trans. Vis. Comput. Graph. 15(6),
 * 2009, severity 1 (from memory, not seen; each row sums to 1, so that grey stays grey).
 */
const SIGHT: Record<string, number[][]> = {
  full: [
    [1, 0, 0],
    [0, 1, 0],
    [0, 0, 1],
  ],
  protanopia: [
    [0.152286, 1.052583, -0.204868],
    [0.114503, 0.786281, 0.099216],
    [-0.003882, -0.048116, 1.051998],
  ],
  deuteranopia: [
    [0.367322, 0.860646, -0.227968],
    [0.280085, 0.672501, 0.047413],
    [-0.01182, 0.04294, 0.968881],
  ],
  tritanopia: [
    [1.255528, -0.076749, -0.178779],
    [-0.078411, 0.930809, 0.147602],
    [0.004733, 0.691367, 0.3039],
  ],
};

/** Distance in the Oklab space, times 100 (B. Ottosson 2020; from memory, not seen): 2 is about what an eye just tells apart. */
function distance(a: string, b: string, sight: number[][]): number {
  const [p, q] = [a, b].map((colour) => oklab(through(sight, linear(colour))));
  return 100 * Math.hypot(...p.map((value, i) => value - q[i]));
}

function linear(colour: string): number[] {
  return [1, 3, 5].map((at) => {
    const part = Number.parseInt(colour.slice(at, at + 2), 16) / 255;
    return part <= 0.04045 ? part / 12.92 : ((part + 0.055) / 1.055) ** 2.4;
  });
}

function through(sight: number[][], rgb: number[]): number[] {
  return sight.map((row) =>
    Math.min(
      1,
      Math.max(
        0,
        row.reduce((sum, part, i) => sum + part * rgb[i], 0),
      ),
    ),
  );
}

function oklab([r, g, b]: number[]): number[] {
  const l = Math.cbrt(0.4122214708 * r + 0.5363325363 * g + 0.0514459929 * b);
  const m = Math.cbrt(0.2119034982 * r + 0.6806995451 * g + 0.1073969566 * b);
  const s = Math.cbrt(0.0883024619 * r + 0.2817188376 * g + 0.6299787005 * b);
  return [
    0.2104542553 * l + 0.793617785 * m - 0.0040720468 * s,
    1.9779984951 * l - 2.428592205 * m + 0.4505937099 * s,
    0.0259040371 * l + 0.7827717662 * m - 0.808675766 * s,
  ];
}

const styles = Array.from({ length: MOST_TRACES }, (_, i) => traceStyle(i));

describe.each([
  ["light", PAPER_PALETTE],
  ["dark", PEAT_PALETTE],
] as const)("the colours of lines, %s", (_, palette) => {
  const colours = [...new Set(styles.map(({ colour }) => colour))].map(
    (token) => palette[token.match(/--color-(\w+)/)?.[1] as keyof typeof palette],
  );

  it.each(Object.entries(SIGHT))("stay apart: %s", (_name, sight) => {
    for (const [i, a] of colours.entries())
      for (const b of colours.slice(i + 1)) expect(distance(a, b, sight)).toBeGreaterThan(9);
  });
});

describe("traceStyle", () => {
  it("gives each of twelve lines a dash of its own", () => {
    expect(MOST_TRACES).toBe(12);
    expect(new Set(styles.map(({ dash }) => dash)).size).toBe(12);
  });

  it("begins again after the last", () => {
    expect(traceStyle(12)).toEqual(traceStyle(0));
  });
});

describe("the measure itself", () => {
  it("is 100 between black and white, and finds red and green alike without green cones", () => {
    expect(distance("#000000", "#ffffff", SIGHT.full)).toBeCloseTo(100, 1);
    const [full, without] = ["full", "deuteranopia"].map((kind) =>
      distance("#994a25", "#4f6827", SIGHT[kind]),
    );
    expect(without).toBeLessThan(full / 3);
  });
});
