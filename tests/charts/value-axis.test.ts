import { describe, expect, it } from "vitest";
import { valueAxis } from "../../app/charts/value-axis.ts";

const range = (deepestDb: number, highestMagnitude = 1) => ({
  lowestMagnitude: 10 ** (-deepestDb / 20),
  highestMagnitude,
});

describe("return loss axis", () => {
  it("has 0 dB at the top and goes down to a round number under the deepest point", () => {
    const axis = valueAxis("rl", 300, range(23));
    expect(axis.ticks.map((tick) => tick.label)).toEqual(["0", "10", "20", "30 dB"]);
    expect(axis.yOfMagnitude(1)).toBeCloseTo(0, 12);
    expect(axis.yOfMagnitude(10 ** (-15 / 20))).toBeCloseTo(150, 9);
  });

  it("leaves room under the deepest point for its cairn", () => {
    for (let deepestDb = 3; deepestDb <= 50; deepestDb++) {
      const axis = valueAxis("rl", 300, range(deepestDb));
      expect(300 - axis.yOfMagnitude(10 ** (-deepestDb / 20))).toBeGreaterThanOrEqual(38);
    }
  });

  it("stops at 60 dB and says what lies deeper", () => {
    const axis = valueAxis("rl", 300, range(200));
    expect(axis.ticks.at(-1)?.label).toBe("60 dB");
    expect(axis.yOfMagnitude(1e-10)).toBeGreaterThan(300);
    expect(axis.beyondBottom).toContain("60 dB");
  });

  it("makes room over the 0 dB line for gain", () => {
    const axis = valueAxis("rl", 300, range(20, 1.3));
    expect(axis.yOfMagnitude(1.3)).toBeGreaterThanOrEqual(0);
    expect(axis.yOfMagnitude(1)).toBeGreaterThan(0);
  });

  it("is drawn for a sweep without a number", () => {
    const axis = valueAxis("rl", 300, { lowestMagnitude: Number.NaN, highestMagnitude: Number.NaN });
    expect(axis.ticks.every((tick) => Number.isFinite(tick.y))).toBe(true);
    expect(axis.ticks.at(-1)?.label).toBe("20 dB");
  });
});

describe("SWR axis", () => {
  const axis = valueAxis("swr", 300, range(20));
  const yOfSwr = (swr: number) => axis.yOfMagnitude((swr - 1) / (swr + 1));

  it("has 10 at the top and 1 above a strip of ground", () => {
    expect(yOfSwr(10)).toBeCloseTo(0, 9);
    expect(300 - yOfSwr(1)).toBe(44);
  });

  it("gives 1 to 3 nearly half of its height", () => {
    expect((yOfSwr(1) - yOfSwr(3)) / yOfSwr(1)).toBeCloseTo(Math.log10(3), 9);
  });

  it("puts what has no finite SWR beyond the top, and says so", () => {
    expect(axis.yOfMagnitude(1)).toBe(Number.NEGATIVE_INFINITY);
    expect(axis.yOfMagnitude(1.2)).toBe(Number.NEGATIVE_INFINITY);
    expect(axis.yOfMagnitude(Number.NaN)).toBeNaN();
    expect(axis.beyondTop).toContain("SWR over 10");
  });
});
