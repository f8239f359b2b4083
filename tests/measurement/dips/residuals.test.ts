import { describe, expect, test } from "vitest";
import { credibleDips } from "../../../app/measurement/dips/credible.ts";
import { findDips } from "../../../app/measurement/dips/find.ts";
import {
  residualsOf,
  smallEnough,
  successive,
  unbiased,
  whiteEnough,
} from "../../../app/measurement/dips/residuals.ts";
import { resonatorPower } from "../../../app/measurement/dips/resonator.ts";
import { likelier } from "../../../app/measurement/dips/weighing.ts";
import { noiseGamma } from "../../../app/measurement/noise.ts";
import { normals, resonatorSweep } from "../resonators.ts";

const P = Float64Array.of(0.95, 0, Math.log(7), 0.98);

/** abs Γ² of the resonator P with a scatter of abs Γ or of decibels. */
function points(n: number, scatter: "even" | "decibel", sigma: number, start = 5) {
  const normal = normals(start);
  const gradient = new Float64Array(4);
  const x = Float64Array.from({ length: n }, (_, i) => -0.12 + (0.24 * i) / (n - 1));
  const y = x.map((at) => {
    const gamma = Math.sqrt(resonatorPower(P)(at, gradient));
    return scatter === "even"
      ? (gamma + sigma * normal()) ** 2
      : gamma ** 2 * 10 ** ((sigma * normal()) / 10);
  });
  return { x, y, weight: x.map(() => 1) };
}

describe("two kinds of scatter", () => {
  test.each([
    ["even", 0.01],
    ["even", 0.03],
    ["decibel", 0.1],
    ["decibel", 0.4],
  ] as const)("%s of %d is told by kind and size", (scatter, sigma) => {
    const data = points(400, scatter, sigma);
    const best = likelier(data, P, {
      free: 4,
      complex: false,
      noise: { db: sigma, gamma: sigma, sweepDb: scatter === "decibel" ? sigma : 0.1 },
    });
    expect(best?.residuals.scatter).toBe(scatter);
    expect(Math.abs((best?.residuals.sigma ?? 0) / sigma - 1)).toBeLessThan(0.12);
  });

  test("the bias of the mean is taken off: over many samples the resonator's own values are left", () => {
    for (const [scatter, sigma] of [
      ["even", 0.05],
      ["decibel", 1],
    ] as const) {
      const { x, y } = points(60_000, scatter, sigma);
      const residuals = residualsOf(x, y, P, 4, scatter);
      expect(residuals).not.toBeNull();
      if (!residuals) continue;
      const gradient = new Float64Array(4);
      const mean = (values: Float64Array) => values.reduce((sum, v) => sum + v, 0) / values.length;
      const truth = mean(x.map((at) => resonatorPower(P)(at, gradient)));
      const raw = mean(y) - truth;
      const left = mean(unbiased(y, residuals, false)) - truth;
      // A normal abs Γ has σ², a complex Γ 2σ²; the middle leaves half a σ² at most.
      expect(Math.abs(left)).toBeLessThan(scatter === "even" ? 0.7 * sigma * sigma : 0.2 * Math.abs(raw));
    }
  });

  test("numbers that are not finite give none", () => {
    const { x, y } = points(20, "even", 0.01);
    y[3] = Number.NaN;
    expect(residualsOf(x, y, P, 4, "even")).toBeNull();
  });
});

describe("when a fit is refused", () => {
  test("von Neumann's ratio: 2 for scatter, near 0 for a shape, 2 for nothing left", () => {
    const normal = normals(9);
    expect(successive(Float64Array.from({ length: 4000 }, normal))).toBeCloseTo(2, 0);
    expect(successive(Float64Array.from({ length: 400 }, (_, i) => Math.sin(i / 30)))).toBeLessThan(0.01);
    expect(successive(Float64Array.from([1, -1, 1, -1]))).toBe(3);
    expect(successive(new Float64Array(5))).toBe(2);
  });

  test("scatter passes in at least 99 of 100, a bend of its own size does not", () => {
    let passed = 0;
    let bent = 0;
    for (let k = 0; k < 200; k++) {
      const { x, y } = points(60, "even", 0.01, 100 + k);
      const residuals = residualsOf(x, y, P, 4, "even");
      if (residuals && whiteEnough(residuals, 4) && smallEnough(residuals, { db: 0.09, gamma: 0.01 }))
        passed++;
      const wrong = residualsOf(
        x,
        y.map((v, i) => v + 0.03 * Math.sin(i / 6)),
        P,
        4,
        "even",
      );
      if (wrong && whiteEnough(wrong, 4)) bent++;
    }
    expect(passed).toBeGreaterThanOrEqual(198);
    expect(bent).toBeLessThanOrEqual(2);
  });

  test("more than twice the noise is too much, rounding never is", () => {
    const { x, y } = points(40, "even", 0.05);
    const residuals = residualsOf(x, y, P, 4, "even");
    expect(residuals && smallEnough(residuals, { db: 0.1, gamma: 0.01 })).toBe(false);
    const exact = points(40, "even", 0);
    const none = residualsOf(exact.x, exact.y, P, 4, "even");
    expect(none && smallEnough(none, { db: 0, gamma: 0 }) && whiteEnough(none, 4)).toBe(true);
  });
});

describe("dips that scatter makes", () => {
  const noisy = (sigma: number, kind: "even" | "decibel") => {
    const normal = normals(77);
    const { magnitude } = resonatorSweep({ r: 1.06, q: 12, points: 901, spanHz: 6e6 });
    return magnitude.map((v) =>
      kind === "even"
        ? Math.hypot(v + sigma * normal(), sigma * normal())
        : v * 10 ** ((sigma * normal()) / 20),
    );
  };

  test("an even scatter splits a deep dip; one is left", () => {
    const magnitude = noisy(0.02, "even");
    const found = findDips(magnitude, 3);
    expect(found.length).toBeGreaterThan(3);
    const kept = credibleDips(magnitude, found, noiseGamma(magnitude)).filter((dip) => !dip.edge);
    expect(kept).toHaveLength(1);
    expect(kept[0].prominenceDb).toBe(Math.max(...found.map((dip) => dip.prominenceDb)));
  });

  test("a scatter in decibels takes nothing away", () => {
    const magnitude = noisy(0.2, "decibel");
    const found = findDips(magnitude, 3);
    expect(credibleDips(magnitude, found, noiseGamma(magnitude))).toEqual(found);
  });

  test("without noise, or without dips, all stays", () => {
    const { magnitude } = resonatorSweep({ r: 1.06, q: 12, points: 901, spanHz: 6e6 });
    const found = findDips(magnitude, 3);
    expect(credibleDips(magnitude, found, 0)).toBe(found);
    expect(credibleDips(magnitude, [], 0.1)).toEqual([]);
  });
});
