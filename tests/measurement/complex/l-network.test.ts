import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { inputImpedance, lNetworks, singleElements } from "../../../app/measurement/complex/l-network.ts";
import { gammaToSwr, impedanceToGamma } from "../../../app/measurement/reflection.ts";

/**
 * Truth: what the port sees, recomputed here by complex division of ladders from the values in henry and farad alone, without the
 * code under test. REFERENCE section 2: X = −40 Ω at 14.1 MHz is 282.1896 pF, +40 Ω is 0.45150 µH.
 */
type Z = [number, number];
const inverse = ([a, b]: Z): Z => [a / (a * a + b * b), -b / (a * a + b * b)];
const sum = ([a, b]: Z, [c, d]: Z): Z => [a + c, b + d];

function seen(elements: { place: string; kind: string; value: number }[], load: Z, hz: number): Z {
  let z = load;
  for (const { place, kind, value } of [...elements].reverse()) {
    const x = kind === "inductor" ? 2 * Math.PI * hz * value : -1 / (2 * Math.PI * hz * value);
    z = place === "series" ? sum(z, [0, x]) : inverse(sum(inverse(z), inverse([0, x])));
  }
  return z;
}

const loads = fc.record({
  re: fc.double({ min: -2, max: 3.5, noNaN: true }).map((power) => 10 ** power),
  im: fc.double({ min: -2000, max: 2000, noNaN: true }),
});
const hertz = fc.double({ min: 5, max: 9.5, noNaN: true }).map((power) => 10 ** power);

describe("L-networks", () => {
  test("match thousands of random loads, as recomputed from their values", () => {
    let solved = 0;
    fc.assert(
      fc.property(loads, hertz, fc.constantFrom(50, 75, 300), (load, hz, z0) => {
        const found = lNetworks(load, z0, hz);
        expect(found.length).toBeGreaterThanOrEqual(2);
        expect(found.length).toBeLessThanOrEqual(4);
        for (const { elements, input } of found) {
          const [re, im] = seen(elements, [load.re, load.im], hz);
          expect(Math.hypot(re - z0, im) / z0).toBeLessThan(1e-6);
          expect(Math.hypot(input.re - re, input.im - im) / z0).toBeLessThan(1e-6);
          expect(elements.every(({ value }) => value > 0 && Number.isFinite(value))).toBe(true);
          solved++;
        }
      }),
      { numRuns: 5000 },
    );
    expect(solved).toBeGreaterThan(10_000);
  });

  test("both orders for a load with R and 1/G under the reference's, one order where only it applies", () => {
    const orders = (re: number, im: number) => lNetworks({ re, im }, 50, 14e6).map(({ order }) => order);
    // 200 Ω: only the shunt element at the load. 10 Ω: only the series one.
    expect(orders(200, 0)).toEqual(["series-first", "series-first"]);
    expect(orders(10, 0)).toEqual(["shunt-first", "shunt-first"]);
    expect(orders(10, 100).sort()).toEqual(["series-first", "series-first", "shunt-first", "shunt-first"]);
  });

  test("a 25 Ω load at 14.1 MHz: 25 Ω in series and 50 Ω across the port", () => {
    // Q = √(50/25 − 1) = 1, so Xs = ±25 Ω and Xp = ∓50 Ω.
    const [first, second] = lNetworks({ re: 25, im: 0 }, 50, 14.1e6);
    const values = [first, second].map(({ elements }) => elements.map(({ reactanceOhm }) => reactanceOhm));
    expect(values[0][0]).toBeCloseTo(-50, 9);
    expect(values[0][1]).toBeCloseTo(25, 9);
    expect(values[1][0]).toBeCloseTo(50, 9);
    expect(values[1][1]).toBeCloseTo(-25, 9);
  });

  test("one element alone where the load lies on the circle, and none where it is matched", () => {
    const found = lNetworks({ re: 50, im: 40 }, 50, 14.1e6);
    const single = found.find(({ elements }) => elements.length === 1);
    expect(single?.elements[0]).toMatchObject({ place: "series", kind: "capacitor" });
    expect((single?.elements[0].value ?? 0) * 1e12).toBeCloseTo(282.1896, 4);
    const coil = singleElements({ re: 50, im: -40 }, 50, 14.1e6)[0];
    expect(coil.element.value * 1e6).toBeCloseTo(0.4515, 5);
    expect(coil.swr).toBeCloseTo(1, 12);
    expect(lNetworks({ re: 50, im: 0 }, 50, 14.1e6)).toEqual([]);
    expect(singleElements({ re: 50, im: 0 }, 50, 14.1e6)).toEqual([]);
  });

  test("nothing for loads that no network can match", () => {
    for (const load of [
      { re: 0, im: 50 },
      { re: -5, im: 0 },
      { re: Number.POSITIVE_INFINITY, im: 0 },
      { re: Number.NaN, im: 0 },
      { re: 25, im: Number.NaN },
    ]) {
      expect(lNetworks(load, 50, 14e6)).toEqual([]);
      expect(singleElements(load, 50, 14e6)).toEqual([]);
    }
    expect(lNetworks({ re: 25, im: 0 }, 50, 0)).toEqual([]);
    expect(lNetworks({ re: 25, im: 0 }, 0, 1e6)).toEqual([]);
  });
});

describe("single elements", () => {
  test("no element of any value does better than the better of the two, and each never harms", () => {
    const swrAt = (load: Z) => {
      const gamma = impedanceToGamma({ re: load[0], im: load[1] }, 50);
      return gammaToSwr(Math.hypot(gamma.re, gamma.im));
    };
    fc.assert(
      fc.property(loads, fc.double({ min: -8, max: 8, noNaN: true }), fc.boolean(), (load, size, series) => {
        fc.pre(Math.abs(load.im) > 1e-3 && size !== 0);
        const [best, other] = singleElements(load, 50, 10e6);
        const x = Math.sign(size) * 10 ** Math.abs(size / 2);
        const tried: Z = series
          ? [load.re, load.im + x]
          : inverse(sum(inverse([load.re, load.im]), inverse([0, x])));
        expect(best.swr).toBeLessThanOrEqual(other.swr);
        expect(swrAt(tried)).toBeGreaterThanOrEqual(best.swr * (1 - 1e-9));
        expect(other.swr).toBeLessThanOrEqual(swrAt([load.re, load.im]) * (1 + 1e-9));
      }),
      { numRuns: 3000 },
    );
  });

  test("what the port sees away from the frequency it was made for", () => {
    const [{ elements }] = lNetworks({ re: 10, im: 100 }, 50, 14e6);
    const [re, im] = seen(elements, [12, 90], 14.5e6);
    const input = inputImpedance(elements, { re: 12, im: 90 }, 14.5e6);
    expect(input.re).toBeCloseTo(re, 9);
    expect(input.im).toBeCloseTo(im, 9);
  });
});
