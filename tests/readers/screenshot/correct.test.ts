import { describe, expect, it } from "vitest";
import { readCorrected, reusableSpec } from "~/readers/screenshot/correct";
import type { Picture } from "~/readers/screenshot/picture";
import { cornersOf, homography, mapPoint } from "~/readers/screenshot/rectify";
import { countingOcr, drawnPlot, FRAME, levelAt, SPEC } from "./drawn-plot.ts";

const lossAt = (magnitude: number) => 20 * Math.log10(magnitude);

/** Median and 95th percentile of the error over all columns, in pixels of the plot. */
function errors(frequencyHz: Float64Array, magnitude: Float64Array) {
  const perPixel = (SPEC.top - SPEC.bottom) / (FRAME.bottom - FRAME.top);
  const all = Array.from(frequencyHz, (hz, i) => {
    const share = (hz - SPEC.startHz) / (SPEC.stopHz - SPEC.startHz);
    const truth = levelAt(FRAME.left + share * (FRAME.right - FRAME.left));
    return Math.abs(lossAt(magnitude[i]) - truth) / perPixel;
  })
    .filter((error) => !Number.isNaN(error))
    .sort((a, b) => a - b);
  return { median: all[all.length >> 1], most: all[Math.floor(all.length * 0.95)], count: all.length };
}

/** The picture as a camera sees it from the side. */
function photographed(picture: Picture, corners: { x: number; y: number }[]): Picture {
  const back = homography(corners, cornersOf(FRAME));
  if (!back) throw new Error("no map");
  const [width, height] = [700, 520];
  const data = new Uint8ClampedArray(4 * width * height).fill(255);
  for (let y = 0; y < height; y++) {
    for (let x = 0; x < width; x++) {
      const sum = [0, 0, 0];
      for (let s = 0; s < 9; s++) {
        const at = mapPoint(back, { x: x + (s % 3) / 3 - 1 / 3, y: y + Math.floor(s / 3) / 3 - 1 / 3 });
        const px = Math.min(picture.width - 1, Math.max(0, Math.round(at.x)));
        const py = Math.min(picture.height - 1, Math.max(0, Math.round(at.y)));
        for (let c = 0; c < 3; c++) sum[c] += picture.data[4 * (py * picture.width + px) + c] / 9;
      }
      data.set(sum, 4 * (y * width + x));
    }
  }
  return { width, height, data };
}

describe("readCorrected", () => {
  it("reads a drawn plot whose choices are all given, without asking for text", async () => {
    const { ocr, asked } = countingOcr();
    const result = await readCorrected(drawnPlot(), ocr, SPEC);
    if (!result.ok) throw new Error(result.problem.message);
    const { median, most, count } = errors(result.sweep.frequencyHz, result.sweep.magnitude);
    expect(count).toBeGreaterThan(395);
    expect(median).toBeLessThan(0.5);
    expect(most).toBeLessThan(2.5);
    expect(asked.times).toBe(0);
  });

  it("gives the same bytes for the choices that it gave back", async () => {
    const { ocr, asked } = countingOcr();
    const first = await readCorrected(drawnPlot(), ocr, { ...SPEC, masked: [{ fromX: 100, toX: 120 }] });
    if (!first.ok) throw new Error(first.problem.message);
    const again = await readCorrected(drawnPlot(), ocr, first.reading.spec.screenshot);
    if (!again.ok) throw new Error(again.problem.message);
    expect(again.sweep).toEqual(first.sweep);
    expect(again.reading.spec).toEqual(first.reading.spec);
    expect(asked.times).toBe(0);
  });

  it("reads a photograph by its four corners", async () => {
    const corners = [
      { x: 90, y: 70 },
      { x: 610, y: 120 },
      { x: 570, y: 450 },
      { x: 60, y: 400 },
    ];
    const { frame: _, ...axes } = SPEC;
    const photo = photographed(drawnPlot(), corners);
    const { ocr, asked } = countingOcr();
    const result = await readCorrected(photo, ocr, { ...axes, corners });
    if (!result.ok) throw new Error(result.problem.message);
    const { median, most } = errors(result.sweep.frequencyHz, result.sweep.magnitude);
    expect(median).toBeLessThan(0.75);
    expect(most).toBeLessThan(2.5);
    expect(asked.times).toBe(0);
    expect(result.reading.spec.screenshot?.corners).toEqual(corners);
    expect(result.reading.spec.screenshot?.frame).toBeUndefined();
    const again = await readCorrected(photo, ocr, result.reading.spec.screenshot);
    expect(again.ok && again.sweep).toEqual(result.sweep);
    expect(result.corners).toEqual(corners);
    const inside = result.picture.line?.y.filter((y) => y > 60 && y < 460).length ?? 0;
    expect(inside).toBeGreaterThan(400);
  });

  it("says so when the corners enclose nothing", async () => {
    const { frame: _, ...axes } = SPEC;
    const corners = cornersOf(FRAME).reverse();
    const result = await readCorrected(drawnPlot(), countingOcr().ocr, { ...axes, corners });
    expect(result.ok ? "" : result.problem.code).toBe("corners-wrong");
  });

  it("leaves a gap where a stretch was misread", async () => {
    const masked = [{ fromX: 200, toX: 240 }];
    const result = await readCorrected(drawnPlot(), countingOcr().ocr, { ...SPEC, masked });
    if (!result.ok) throw new Error(result.problem.message);
    const columns = Array.from(
      result.sweep.frequencyHz,
      (hz) => FRAME.left + ((hz - 1e6) / 30e6) * (FRAME.right - FRAME.left),
    );
    columns.forEach((x, i) => {
      expect(Number.isNaN(result.sweep.magnitude[i])).toBe(x > 199.5 && x < 240.5);
    });
    expect(Number.isNaN(result.sweep.pictureLimits?.magnitudeLow[columns.findIndex((x) => x > 210)])).toBe(
      true,
    );
  });

  it("passes over ink that was painted away, and finds the trace under it", async () => {
    const masked = [{ fromX: 326, toX: 355, top: 70, bottom: 205 }];
    const blotted = drawnPlot({ blot: true });
    const result = await readCorrected(blotted, countingOcr().ocr, { ...SPEC, masked });
    if (!result.ok) throw new Error(result.problem.message);
    expect(errors(result.sweep.frequencyHz, result.sweep.magnitude).most).toBeLessThan(2.5);
    expect(blotted.data[4 * (120 * blotted.width + 340)]).toBe(255);
  });

  it("takes a second trace for the 0 dB line", async () => {
    const picture = drawnPlot({ second: (x) => -2 - x / 400 });
    const given = { ...SPEC, quantity: "level", zeroTrace: "#50a0ff" } as const;
    const result = await readCorrected(picture, countingOcr().ocr, given);
    if (!result.ok) throw new Error(result.problem.message);
    const at = 100;
    const x = FRAME.left + at;
    const i = result.sweep.frequencyHz.findIndex((hz) => hz >= 1e6 + (at / 400) * 30e6 - 1);
    expect(lossAt(result.sweep.magnitude[i])).toBeCloseTo(levelAt(x) + 2 + x / 400, 0);
    const limits = result.sweep.pictureLimits;
    expect(limits && limits.magnitudeLow[i] < limits.magnitudeHigh[i]).toBe(true);
    const again = await readCorrected(picture, countingOcr().ocr, result.reading.spec.screenshot);
    expect(again.ok && again.sweep).toEqual(result.sweep);
    expect(result.reading.questions.map((question) => question.id)).not.toContain("zero-db");
  });

  it("says so when that second trace is not there", async () => {
    const given = { ...SPEC, quantity: "level", zeroTrace: "#ff00ff" } as const;
    const result = await readCorrected(drawnPlot(), countingOcr().ocr, given);
    expect(result.ok ? "" : result.problem.code).toBe("no-zero-trace");
  });

  it("gives a reading to correct even where no plot was found", async () => {
    const blank = { width: 200, height: 150, data: new Uint8Array(4 * 200 * 150).fill(255) };
    const result = await readCorrected(blank, countingOcr().ocr);
    expect(result.ok ? "" : result.problem.code).toBe("no-frame");
    expect(result.reading?.format).toBe("screenshot");
  });
});

describe("reusableSpec", () => {
  it("keeps what belongs to the screen and leaves what belongs to the sweep", () => {
    const spec = { ...SPEC, zeroDb: -12, corners: [], masked: [{ fromX: 1, toX: 2 }] };
    expect(reusableSpec(spec).screenshot).toEqual({
      quantity: "s11-db",
      zeroDb: -12,
      traceColor: "#ffd040",
      referenceOhm: 50,
    });
  });
});
