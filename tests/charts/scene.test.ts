import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { buildSweepScene, type SceneInput } from "../../app/charts/scene.ts";
import { chartDip, pathNumbers, points } from "./sample.ts";

const base: SceneInput = {
  points: points(30, () => 0.9),
  dips: [],
  bands: [
    { name: "40 m", lowHz: 7e6, highHz: 7.2e6 },
    { name: "20 m", lowHz: 14e6, highHz: 14.35e6 },
  ],
  designBands: [],
  view: { quantity: "rl", scale: "linear", fromHz: 1e6, toHz: 30e6 },
  swrLimit: 2,
};

describe("buildSweepScene", () => {
  it("draws abs Γ = 0.1 at 20 dB of the axis, in both quantities", () => {
    const sweep = { frequencyHz: [1e6, 15.5e6, 30e6], magnitude: [1, 0.1, 1] };
    const scene = buildSweepScene({ ...base, points: sweep, plotWidthPx: 290, plotHeightPx: 300 });
    // Bottom of the axis: 20 dB with its room, rounded up to 30 dB. 20 dB is then at 200 px.
    expect(scene.line).toBe("M0 0L145 200L290 0");
    expect(scene.land).toBe("M0 300L0 0L145 200L290 0L290 300Z");
    const swr = buildSweepScene({
      ...base,
      points: sweep,
      plotWidthPx: 290,
      view: { ...base.view, quantity: "swr" },
    });
    const y = 256 * (1 - Math.log10(1.1 / 0.9));
    expect(pathNumbers(swr.line)).toEqual(expect.arrayContaining([145, Math.round(y * 100) / 100]));
  });

  it("puts the limit line at the return loss of its SWR: 9.542 dB for 2", () => {
    const scene = buildSweepScene({ ...base, plotHeightPx: 300 });
    expect(scene.limit?.label).toBe("SWR 2");
    // 20 dB axis: 300 px / 20 dB.
    expect(scene.limit?.y).toBeCloseTo(9.5424 * 15, 2);
  });

  it("fills the hollow between the bandwidth's edges and marks which edges were found", () => {
    const dip = chartDip({ frequencyHz: 7.1e6 });
    const open = chartDip({
      id: "b",
      frequencyHz: 29e6,
      bandwidth: {
        limitSwr: 2,
        lowHz: 28e6,
        highHz: null,
        widthHz: 2e6,
        widthUncertaintyHz: null,
        widthLowHz: null,
        widthHighHz: null,
        lowEdge: null,
        highEdge: null,
        open: true,
        shared: false,
        fractional: null,
      },
    });
    const scene = buildSweepScene({
      ...base,
      points: points(2901, (index) => (Math.abs(index - 610) < 10 ? 0.1 : index > 2700 ? 0.2 : 0.9)),
      dips: [dip, open],
    });
    expect(scene.waters).toHaveLength(2);
    const [closed, tail] = scene.waters;
    expect(closed.from).toBeCloseTo(6 / 29, 9);
    expect(closed.to).toBeCloseTo(6.2 / 29, 9);
    expect([closed.lowOpen, closed.highOpen]).toEqual([false, false]);
    expect(tail.to).toBe(1);
    expect(tail.highOpen).toBe(true);
    expect(closed.path).toMatch(/^M.*Z$/);
  });

  it("fills a stretch shared by two dips once", () => {
    const dips = [chartDip(), chartDip({ id: "b", frequencyHz: 7.15e6 })];
    expect(buildSweepScene({ ...base, dips }).waters).toHaveLength(1);
  });

  it("leaves gaps open", () => {
    const scene = buildSweepScene({
      ...base,
      points: points(30, (index) => (index === 10 ? Number.NaN : 0.5)),
    });
    expect(scene.line.match(/M/g)).toHaveLength(2);
    expect(scene.land.match(/Z/g)).toHaveLength(2);
  });

  it("says what is off the scale and takes it out of the pen line", () => {
    const scene = buildSweepScene({
      ...base,
      view: { ...base.view, quantity: "swr" },
      points: points(30, () => 0.99),
    });
    expect(scene.line).toBe("");
    expect(scene.offScale).not.toBe("");
    expect(scene.remarks).toEqual(["SWR over 10, off the scale"]);
    expect(buildSweepScene(base).remarks).toEqual([]);
  });

  it("grows cairns with the notes, up to five stones, inside the plot", () => {
    const dips = [0, 1, 5, 40].map((noteCount, index) =>
      chartDip({ id: `d${index}`, noteCount, frequencyHz: (index + 2) * 1e6 }),
    );
    const scene = buildSweepScene({ ...base, dips });
    expect(scene.dips.map((dip) => dip.stones)).toEqual([0, 1, 5, 5]);
    for (const dip of scene.dips) {
      expect(dip.cairnY).toBeGreaterThan(dip.y);
      expect(dip.cairnY + dip.stones * 6).toBeLessThanOrEqual(scene.plotHeightPx);
    }
  });

  it("hangs a dip off the ribbon by how far outside it is", () => {
    const designBands = [{ name: "20 m", lowHz: 14e6, highHz: 14.35e6 }];
    const hang = (frequencyHz: number, inDesignBand: boolean | null) =>
      buildSweepScene({ ...base, designBands, dips: [chartDip({ frequencyHz, inDesignBand })] }).dips[0].hang;
    expect(hang(14.2e6, true)).toBeNull();
    expect(hang(7.1e6, false)).toBe("outside-design");
    expect(hang(9e6, false)).toBe("outside-all");
    expect(buildSweepScene({ ...base, bands: [], dips: [chartDip()] }).dips[0].hang).toBeNull();
  });

  it("knows where the line ends over a dip that the fit puts deeper than its samples", () => {
    const sweep = points(300, (index) => (Math.abs(index - 63) < 3 ? 0.1 : 0.9));
    const deep = buildSweepScene({ ...base, points: sweep, dips: [chartDip({ returnLossDb: 34 })] });
    // 50 dB axis over 300 px.
    expect(deep.dips[0].y).toBeCloseTo(34 * 6, 6);
    expect(deep.dips[0].lineY).toBeCloseTo(20 * 6, 6);
    const there = buildSweepScene({ ...base, points: sweep, dips: [chartDip({ returnLossDb: 20 })] });
    expect(there.dips[0].lineY).toBeCloseTo(there.dips[0].y, 6);
  });

  it("keeps the axis as it is when the view moves off the deepest dip", () => {
    const dips = [chartDip({ returnLossDb: 33 })];
    const away = buildSweepScene({ ...base, dips, view: { ...base.view, fromHz: 20e6 } });
    expect(away.dips).toEqual([]);
    expect(away.valueTicks).toEqual(buildSweepScene({ ...base, dips }).valueTicks);
  });

  it("names a design band once where an allocation has the same name", () => {
    const scene = buildSweepScene({ ...base, designBands: [base.bands[0]] });
    const named = scene.ribbon.filter((band) => band.name === "40 m" && band.tier !== null);
    expect(named.map((band) => band.design)).toEqual([true]);
  });

  it("speaks each dip's numbers", () => {
    const dip = chartDip({
      noteCount: 2,
      verdict: "settled",
      verdictText: "the 40 m element",
      inDesignBand: true,
    });
    expect(buildSweepScene({ ...base, dips: [dip] }).dips[0].spoken).toMatch(
      /^Dip at 7\.1000 megahertz, lowest SWR 1\.22, under SWR 2 over 200.kHz, settled: the 40 m element, 2 notes$/,
    );
  });

  it("has a drawing for no points, one point, gaps only and a flat line", () => {
    const empty = buildSweepScene({ ...base, points: points(0, () => 0) });
    expect(empty.empty).toBe(true);
    expect(buildSweepScene({ ...base, points: points(20, () => Number.NaN) }).empty).toBe(true);
    const one = buildSweepScene({
      ...base,
      points: points(1, () => 0.5, 7e6),
      view: { ...base.view, fromHz: 7e6, toHz: 7e6 },
    });
    expect(one.empty).toBe(false);
    expect(one.line).toMatch(/h0\.01$/);
    expect(buildSweepScene(base).land).not.toBe("");
  });

  it("never has NaN in a path nor a point outside the plot, whatever the sweep", () => {
    const value = fc.oneof(
      fc.double({ min: 0, max: 1.5, noNaN: true }),
      fc.constantFrom(0, 1, Number.NaN, Number.POSITIVE_INFINITY, 1e-12),
    );
    fc.assert(
      fc.property(
        fc.array(value, { maxLength: 200 }),
        fc.constantFrom("rl" as const, "swr" as const),
        fc.constantFrom("linear" as const, "log" as const),
        fc.double({ min: 0, max: 29e6, noNaN: true }),
        fc.double({ min: 1.01, max: 8, noNaN: true }),
        (magnitudes, quantity, scale, fromHz, swrLimit) => {
          const sweep = points(magnitudes.length, (index) => magnitudes[index]);
          const dips = [chartDip({ returnLossDb: Number.POSITIVE_INFINITY }), chartDip({ id: "b" })];
          const scene = buildSweepScene({
            ...base,
            dips,
            points: sweep,
            limits: { low: sweep.magnitude, high: sweep.magnitude },
            view: { quantity, scale, fromHz, toHz: 30e6 },
            swrLimit,
          });
          const paths = [
            scene.land,
            scene.line,
            scene.offScale,
            scene.limits,
            ...scene.waters.map((w) => w.path),
          ];
          for (const path of paths) {
            expect(path).not.toMatch(/NaN|Infinity|undefined/);
            const numbers = pathNumbers(path.replaceAll("h0.01", ""));
            for (let index = 0; index < numbers.length; index += 2) {
              expect(numbers[index]).toBeGreaterThanOrEqual(0);
              expect(numbers[index]).toBeLessThanOrEqual(scene.pathWidth);
              expect(numbers[index + 1]).toBeGreaterThanOrEqual(0);
              expect(numbers[index + 1]).toBeLessThanOrEqual(scene.plotHeightPx);
            }
          }
          for (const dip of scene.dips)
            expect(Number.isFinite(dip.y) && Number.isFinite(dip.cairnY)).toBe(true);
        },
      ),
    );
  });
});

describe("a stretch outside the correction", () => {
  it("is drawn as measured where the corrected line is not, and widens the axis to hold it", () => {
    const corrected = points(30, (i) => (i < 20 ? 0.9 : Number.NaN));
    const measured = Float64Array.from({ length: 30 }, (_, i) => (i < 20 ? Number.NaN : 0.01));
    const scene = buildSweepScene({ ...base, points: corrected, measured, plotWidthPx: 290 });
    const across = (path: string) => pathNumbers(path).filter((_, i) => i % 2 === 0);
    expect(Math.max(...across(scene.line))).toBeLessThanOrEqual(190);
    expect(Math.min(...across(scene.measured))).toBeGreaterThanOrEqual(199);
    // 40 dB deep: inside the axis.
    expect(scene.offScale).toBe("");
    expect(scene.yOfMagnitude(0.01)).toBeLessThanOrEqual(scene.plotHeightPx);
    expect(scene.empty).toBe(false);
    expect(buildSweepScene({ ...base, points: corrected }).measured).toBe("");
  });
});
