import { describe, expect, test } from "vitest";
import { analyse } from "../../../app/measurement/analyse.ts";
import { qualityOf } from "../../../app/measurement/dips/quality.ts";
import type { Bandwidth, Sweep } from "../../../app/measurement/sweep.ts";
import { resonatorSweep, truthOf } from "../resonators.ts";

const inner = (sweep: Sweep, swrLimit = 2) => analyse(sweep, { swrLimit }).dips.filter((dip) => !dip.edge);

/**
 * r → naive Q, (s−1)/√s over FBW, divided by the true Q at s = 2. From Q·FBW = √((s−r)(rs−1)/s)/r (A. D.
 * Yaghjian & S. R. Best, IEEE Trans. Antennas Propag. 53(4), 2005; same form in H. F. Pues & A. R. Van de
 * Capelle, IEEE TAP 37(11), 1989, from memory, not seen), computed apart.
 */
const NAIVE_OVER_TRUE = [
  [0.5714, 1.2649],
  [0.6667, 1],
  [0.7143, 0.9623],
  [0.8, 0.9428],
  [0.9, 0.9594],
  [1, 1],
  [1.1, 1.0585],
  [1.25, 1.1785],
  [1.4, 1.3472],
  [1.5, 1.5],
  [1.75, 2.2136],
  [1.9, 3.5907],
];

function bandOf(r: number, q: number, s = 2): Bandwidth {
  const truth = truthOf({ r, q }, s);
  const width = { lowHz: truth.lowHz, highHz: truth.highHz, widthHz: truth.widthHz as number };
  const fractional = width.widthHz / 14.15e6;
  const limits = {
    widthUncertaintyHz: null,
    widthLowHz: null,
    widthHighHz: null,
    lowEdge: null,
    highEdge: null,
  };
  return { limitSwr: s, ...width, ...limits, open: false, shared: false, fractional };
}

describe("from the bandwidth", () => {
  test.each(NAIVE_OVER_TRUE)(
    "r = %d: the naive Q is %d of the true one, which is in the range",
    (r, factor) => {
      const sweep = resonatorSweep({ r, q: 12, points: 41, spanHz: 4e6 });
      const bandwidth = bandOf(r, 12);
      const naive = Math.SQRT1_2 / (bandwidth.fractional as number);
      expect(Math.abs(naive / 12 - factor)).toBeLessThan(0.002);
      const minimumSwr = Math.max(r, 1 / r);
      const { q, qLow, qHigh } = qualityOf({
        sweep,
        index: 20,
        frequencyHz: 14.15e6,
        minimumSwr,
        bandwidth,
        fit: null,
      });
      expect(Math.min(Math.abs((qLow ?? 0) - 12), Math.abs((qHigh ?? 0) - 12))).toBeLessThan(1e-6);
      expect((qHigh ?? 0) / (qLow ?? 1)).toBeCloseTo(minimumSwr, 6);
      expect(q === null).toBe(minimumSwr > 1.02);
    },
  );

  test("lowest SWR 1.4: between the naive Q over 1.347 and over 0.962", () => {
    const [dip] = inner(resonatorSweep({ r: 1.4, q: 12, points: 401, spanHz: 6e6 }));
    const naive = Math.SQRT1_2 / (dip.bandwidth?.fractional as number);
    expect(naive / (dip.qLow ?? 1)).toBeCloseTo(1.347, 3);
    expect(naive / (dip.qHigh ?? 1)).toBeCloseTo(0.962, 3);
    expect(dip.q).toBeNull();
  });

  /** √(f+·f−) gives 12 exactly, the arithmetic centre 12.005207. */
  test("at a match Q is one number, by the geometric mean of the edges", () => {
    for (const s of [1.5, 2, 3]) {
      const [dip] = inner(resonatorSweep({ r: 1, q: 12, points: 401, spanHz: 8e6 }), s);
      expect(dip.q).toBeCloseTo(12, 5);
    }
    const [low] = inner(resonatorSweep({ r: 1, q: 3, f0Hz: 100e6, points: 301, spanHz: 120e6 }));
    expect(low.q).toBeCloseTo(3, 5);
  });
});

describe("with phase", () => {
  test.each([0.6, 0.8, 1, 1.4, 1.8])("r = %d is told from its inverse", (r) => {
    const [dip] = inner(resonatorSweep({ r, q: 12, points: 801, spanHz: 6e6, complex: true }));
    expect(Math.abs((dip.q ?? 0) / 12 - 1)).toBeLessThan(1e-5);
    expect(Math.abs((dip.qLow ?? 0) / 12 - 1)).toBeLessThan(0.005);
    expect(Math.abs((dip.qHigh ?? 0) / 12 - 1)).toBeLessThan(0.005);
  });

  test("behind a length of line slope and band disagree: a range, and it says so", () => {
    const sweep = resonatorSweep({ r: 1.4, q: 12, points: 801, spanHz: 6e6, complex: true });
    const { gammaRe, gammaIm, frequencyHz } = sweep as Required<Sweep>;
    for (let i = 0; i < 801; i++) {
      const turn = (-4 * Math.PI * frequencyHz[i] * 10) / (0.66 * 299_792_458);
      const [re, im] = [gammaRe[i], gammaIm[i]];
      gammaRe[i] = re * Math.cos(turn) - im * Math.sin(turn);
      gammaIm[i] = re * Math.sin(turn) + im * Math.cos(turn);
    }
    const analysis = analyse(sweep);
    const [dip] = analysis.dips.filter((d) => !d.edge);
    expect(dip.q).toBeNull();
    expect(dip.qHigh ?? 0).toBeGreaterThan(1.15 * (dip.qLow ?? 0));
    expect(analysis.warnings.map((w) => w.code)).toContain("q-not-of-antenna");
  });
});

describe("none", () => {
  test("never under the limit, or a lossy line: no Q, or one that says it is not the antenna's", () => {
    const [high] = inner(resonatorSweep({ r: 2.2, q: 12, points: 201, spanHz: 6e6 }));
    expect([high.q, high.qLow, high.qHigh]).toEqual([null, null, null]);
    const lossy = analyse(resonatorSweep({ r: 1.3, q: 12, a: 0.8, points: 201, spanHz: 6e6 }));
    expect(lossy.warnings.map((w) => w.code)).toContain("q-not-of-antenna");
    expect(lossy.dips.find((d) => !d.edge)?.qLow).toBeGreaterThan(0);
  });

  /**
   * Shape and figures of a measured resonator: A. P. Gregory, NPL Report MAT 58 (2021), data of its figure
   * 27: 201 points, 3.639545 to 3.666415 GHz, lowest abs S11 0.63637 at 3.652980 GHz (SWR 4.500); published
   * fit f 3.652938 GHz, loaded Q 708. It never comes near SWR 2: its bandwidth is none. The samples here
   * are made from those figures.
   */
  test("a resonator that never reaches SWR 2 has no bandwidth and no Q, but a frequency", () => {
    const rho = 0.63637;
    const r = (1 - rho) / (1 + rho);
    // The loaded Q is that of R-L-C with Z0 in series, so the unloaded one is (1 + 1/r) times as large.
    const sweep = resonatorSweep({ r, q: 708 * (1 + 1 / r), f0Hz: 3.652938e9, points: 201, spanHz: 26.87e6 });
    const [dip] = inner(sweep);
    expect(dip.minimumSwr).toBeCloseTo(4.5, 2);
    expect(Math.abs(dip.frequencyHz / 3.652938e9 - 1)).toBeLessThan(1e-8);
    expect(dip.bandwidth).toBeNull();
    expect([dip.q, dip.qLow, dip.qHigh]).toEqual([null, null, null]);
    const [wide] = inner(sweep, 5);
    expect(wide.bandwidth?.widthHz).toBeGreaterThan(0);
  });
});
