import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  gammaToImpedance,
  gammaToMismatchLossDb,
  gammaToReflectedPower,
  gammaToReturnLossDb,
  gammaToSwr,
  impedanceToGamma,
  levelDbToGamma,
  returnLossDbToGamma,
  returnLossDbToSwr,
  swrToGamma,
  swrToReturnLossDb,
} from "../../app/measurement/reflection.ts";

/**
 * SWR, abs Γ, return loss dB, mismatch loss dB, reflected %. The definitions of T. S. Bird, IEEE Antennas
 * Propag. Mag. 51(2), 166-167, 2009, computed apart; rows 2 to 5 agree with the table in the M/A-COM
 * handbook, page 10-4 ("VSWR, Return Loss and Transmission Loss vs. Transmitted Power",
 * cjreal.com/vswr_datasheet_15629069.html).
 */
const TABLE = [
  [1.01, 0.004975, 46.0639, 0.00011, 0.0025],
  [1.05, 0.02439, 32.2557, 0.00258, 0.0595],
  [1.1, 0.047619, 26.4444, 0.00986, 0.2268],
  [1.2, 0.090909, 20.8279, 0.03604, 0.8264],
  [1.25, 0.111111, 19.0849, 0.05395, 1.2346],
  [1.3, 0.130435, 17.6921, 0.07452, 1.7013],
  [1.4, 0.166667, 15.563, 0.12234, 2.7778],
  [1.5, 0.2, 13.9794, 0.17729, 4],
  [1.75, 0.272727, 11.2854, 0.33567, 7.438],
  [2, 0.333333, 9.5424, 0.51153, 11.1111],
  [2.5, 0.428571, 7.3595, 0.88136, 18.3673],
  [3, 0.5, 6.0206, 1.24939, 25],
  [4, 0.6, 4.437, 1.9382, 36],
  [5, 0.666667, 3.5218, 2.55273, 44.4444],
  [5.828427, Math.SQRT1_2, 3.0103, 3.0103, 50],
  [6, 0.714286, 2.9226, 3.09985, 51.0204],
  [8, 0.777778, 2.1829, 4.03335, 60.4938],
  [10, 0.818182, 1.743, 4.80725, 66.9421],
];

/** The same handbook page as printed: SWR, return loss, mismatch loss, abs Γ, % transmitted, % reflected. */
const HANDBOOK = [
  [2, 9.5, 0.512, 0.33, 88.9, 11.1],
  [2.5, 7.4, 0.881, 0.43, 81.6, 18.4],
  [3, 6, 1.249, 0.5, 75, 25],
  [4, 4.4, 1.938, 0.6, 64, 36],
  [5, 3.5, 2.553, 0.67, 55.6, 44.4],
];

/** Return loss dB → SWR as printed by radio-electronics.com, "VSWR return loss table". */
const RETURN_LOSS_TO_SWR = [
  [1, 17.391],
  [2, 8.724],
  [3, 5.848],
  [5, 3.57],
  [6, 3.01],
  [10, 1.925],
  [12, 1.671],
  [14, 1.499],
  [20, 1.222],
  [25, 1.119],
  [30, 1.065],
];

/**
 * R, X, Z0, Re Γ, Im Γ, abs Γ, SWR; computed apart from Γ = (Z−Z0)/(Z+Z0) (Pozar, Microwave Engineering,
 * ch. 2; from memory, not seen).
 */
const IMPEDANCES = [
  [25, 0, 50, -0.333333, 0, 0.333333, 2],
  [100, 0, 50, 0.333333, 0, 0.333333, 2],
  [50, 50, 50, 0.2, 0.4, 0.447214, 2.618034],
  [73, 42.5, 50, 0.273704, 0.250956, 0.371339, 2.18137],
  [36.5, 21.25, 50, -0.09027, 0.267841, 0.282644, 1.78802],
  [35, -20, 50, -0.114754, -0.262295, 0.286299, 1.80229],
  [200, -300, 50, 0.836066, -0.196721, 0.858898, 13.17409],
  [25, 0, 75, -0.5, 0, 0.5, 3],
  [73, 42.5, 75, 0.063696, 0.268871, 0.276313, 1.76363],
  [35, -20, 75, -0.32, -0.24, 0.4, 2.33333],
];

describe("the handbook's table", () => {
  test.each(TABLE)("SWR %d", (swr, gamma, returnLossDb, mismatchLossDb, reflected) => {
    expect(swrToGamma(swr)).toBeCloseTo(gamma, 6);
    expect(gammaToSwr(gamma)).toBeCloseTo(swr, 3);
    expect(swrToReturnLossDb(swr)).toBeCloseTo(returnLossDb, 4);
    expect(returnLossDbToSwr(returnLossDb)).toBeCloseTo(swr, 3);
    expect(gammaToMismatchLossDb(swrToGamma(swr))).toBeCloseTo(mismatchLossDb, 5);
    expect(100 * gammaToReflectedPower(swrToGamma(swr))).toBeCloseTo(reflected, 4);
  });

  test.each(HANDBOOK)("as printed, SWR %d", (swr, returnLossDb, mismatchLossDb, gamma, through, back) => {
    expect(swrToReturnLossDb(swr)).toBeCloseTo(returnLossDb, 1);
    expect(gammaToMismatchLossDb(swrToGamma(swr))).toBeCloseTo(mismatchLossDb, 3);
    expect(swrToGamma(swr)).toBeCloseTo(gamma, 2);
    expect(100 * gammaToReflectedPower(swrToGamma(swr))).toBeCloseTo(back, 1);
    expect(100 - 100 * gammaToReflectedPower(swrToGamma(swr))).toBeCloseTo(through, 1);
  });

  test.each(RETURN_LOSS_TO_SWR)("return loss %d dB is SWR %d", (returnLossDb, swr) => {
    expect(Math.abs(returnLossDbToSwr(returnLossDb) - swr)).toBeLessThanOrEqual(0.001);
  });

  test("SWR 1.3 is about 17.7 dB (common practice, no source)", () => {
    expect(swrToReturnLossDb(1.3)).toBeCloseTo(17.7, 1);
  });
});

describe("borders", () => {
  test("all reflected, more than all, nothing", () => {
    expect(gammaToSwr(1)).toBe(Number.POSITIVE_INFINITY);
    expect(gammaToSwr(1.2)).toBe(Number.POSITIVE_INFINITY);
    expect(gammaToReturnLossDb(1)).toBe(0);
    expect(Object.is(gammaToReturnLossDb(1), 0)).toBe(true);
    expect(gammaToReturnLossDb(1.1)).toBeLessThan(0);
    expect(gammaToReturnLossDb(0)).toBe(Number.POSITIVE_INFINITY);
    expect(gammaToSwr(0)).toBe(1);
    expect(gammaToMismatchLossDb(1)).toBe(Number.POSITIVE_INFINITY);
    expect(gammaToMismatchLossDb(1.5)).toBe(Number.POSITIVE_INFINITY);
    expect(gammaToMismatchLossDb(0)).toBe(0);
    expect(swrToGamma(Number.POSITIVE_INFINITY)).toBe(1);
    expect(swrToGamma(1)).toBe(0);
    expect(returnLossDbToSwr(Number.POSITIVE_INFINITY)).toBe(1);
    expect(returnLossDbToSwr(0)).toBe(Number.POSITIVE_INFINITY);
    expect(returnLossDbToSwr(-3)).toBe(Number.POSITIVE_INFINITY);
  });

  test("what has no meaning is NaN and never throws", () => {
    expect(gammaToSwr(-0.1)).toBeNaN();
    expect(gammaToSwr(Number.NaN)).toBeNaN();
    expect(swrToGamma(0.9)).toBeNaN();
    expect(gammaToReturnLossDb(-1)).toBeNaN();
    expect(gammaToMismatchLossDb(Number.NaN)).toBeNaN();
    expect(gammaToReflectedPower(-0.5)).toBeNaN();
    expect(impedanceToGamma({ re: 50, im: 0 }, 0).re).toBeNaN();
    expect(impedanceToGamma({ re: -50, im: 0 }, 50).re).toBeNaN();
    expect(gammaToImpedance({ re: Number.NaN, im: 0 }, 50).re).toBeNaN();
  });

  test("a level against the 0 dB line", () => {
    expect(levelDbToGamma(-10.4, -10.4)).toBe(1);
    expect(levelDbToGamma(-30.4, -10.4)).toBeCloseTo(0.1, 14);
    expect(levelDbToGamma(-9.4, -10.4)).toBeGreaterThan(1);
  });
});

describe("impedance", () => {
  test.each(IMPEDANCES)("%d + j%d Ω in %d Ω", (re, im, z0, gammaRe, gammaIm, magnitude, swr) => {
    const gamma = impedanceToGamma({ re, im }, z0);
    expect(gamma.re).toBeCloseTo(gammaRe, 6);
    expect(gamma.im).toBeCloseTo(gammaIm, 6);
    expect(Math.hypot(gamma.re, gamma.im)).toBeCloseTo(magnitude, 6);
    expect(gammaToSwr(Math.hypot(gamma.re, gamma.im))).toBeCloseTo(swr, 4);
    const back = gammaToImpedance(gamma, z0);
    expect(back.re).toBeCloseTo(re, 9);
    expect(back.im).toBeCloseTo(im, 9);
  });

  test("Γ = 0.5 ∠ 60° is 50 + j57.735 Ω in 50 Ω and 75 + j86.603 Ω in 75 Ω", () => {
    const gamma = { re: 0.25, im: 0.5 * Math.sin(Math.PI / 3) };
    expect(gammaToImpedance(gamma, 50).im).toBeCloseTo(57.735027, 6);
    expect(gammaToImpedance(gamma, 75).re).toBeCloseTo(75, 9);
    expect(gammaToImpedance(gamma, 75).im).toBeCloseTo(86.60254, 6);
  });

  test("open, short, a pure reactance", () => {
    expect(impedanceToGamma({ re: Number.POSITIVE_INFINITY, im: 0 }, 50)).toEqual({ re: 1, im: 0 });
    expect(impedanceToGamma({ re: 0, im: 0 }, 50).re).toBe(-1);
    expect(gammaToImpedance({ re: 1, im: 0 }, 50).re).toBe(Number.POSITIVE_INFINITY);
    const reactance = impedanceToGamma({ re: 0, im: 50 }, 50);
    expect(gammaToSwr(Math.hypot(reactance.re, reactance.im))).toBe(Number.POSITIVE_INFINITY);
  });
});

test("there and back within 1e-12", () => {
  fc.assert(
    fc.property(fc.double({ min: 1, max: 1000, noNaN: true }), (swr) => {
      expect(Math.abs(returnLossDbToSwr(swrToReturnLossDb(swr)) / swr - 1)).toBeLessThan(1e-12 * swr);
      expect(Math.abs(gammaToSwr(swrToGamma(swr)) / swr - 1)).toBeLessThan(1e-12);
    }),
  );
  fc.assert(
    fc.property(fc.double({ min: 0.001, max: 1, noNaN: true }), (gamma) => {
      expect(Math.abs(returnLossDbToGamma(gammaToReturnLossDb(gamma)) - gamma)).toBeLessThan(1e-14);
    }),
  );
});
