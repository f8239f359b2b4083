import { describe, expect, it } from "vitest";
import type { ScreenshotSpec } from "~/readers/reading";
import { readCorrected } from "~/readers/screenshot/correct";
import { lineInPicture, placeInPicture } from "~/readers/screenshot/in-picture";
import { countingOcr, drawnPlot, FRAME, SPEC } from "./drawn-plot.ts";

const QUANTITIES: { spec: ScreenshotSpec; row: number }[] = [
  { spec: { ...SPEC }, row: 140 },
  { spec: { ...SPEC, quantity: "return-loss", top: 0, bottom: 50 }, row: 140 },
  { spec: { ...SPEC, quantity: "level", top: -12, bottom: -62, zeroDb: -12 }, row: 140 },
  { spec: { ...SPEC, quantity: "swr", top: 5, bottom: 1 }, row: 276.11 },
];

describe("placeInPicture", () => {
  it.each(QUANTITIES)(
    "puts a reflection of -20 dB where the axis of $spec.quantity has it",
    ({ spec, row }) => {
      expect(placeInPicture(spec)?.rowOf(0.1)).toBeCloseTo(row, 1);
    },
  );

  it("puts frequencies on linear and logarithmic axes", () => {
    expect(placeInPicture(SPEC)?.columnOf(16e6)).toBeCloseTo(260, 9);
    const log = placeInPicture({ ...SPEC, scale: "log", startHz: 1e6, stopHz: 1e8 });
    expect(log?.columnOf(1e7)).toBeCloseTo(260, 9);
    expect(log?.halfColumnHz).toBeCloseTo(1e7 * (100 ** (0.5 / 400) - 1), -3);
  });

  it("says half a pixel both ways", () => {
    const place = placeInPicture(SPEC);
    expect(place?.halfColumnHz).toBeCloseTo(30e6 / 800, 6);
    expect(place?.halfRow).toBeCloseTo(0.1, 9);
  });

  it("is not there without axes, and has no rows against another trace", () => {
    const { startHz: _, ...rest } = SPEC;
    expect(placeInPicture(rest)).toBeNull();
    expect(placeInPicture({ ...SPEC, zeroTrace: "#ffffff" })?.rowOf(0.1)).toBeNaN();
  });

  it("is the opposite of reading", async () => {
    const result = await readCorrected(drawnPlot(), countingOcr().ocr, {
      ...SPEC,
      masked: [{ fromX: 200, toX: 210 }],
    });
    const place = placeInPicture(SPEC);
    if (!result.ok || !place) throw new Error("not read");
    const pieces = lineInPicture(result.sweep, place);
    expect(pieces).toHaveLength(2);
    const { line } = result.picture;
    for (const { x, y } of pieces.flat()) {
      const seen = line?.y[Math.round(x) - (line?.x[0] ?? FRAME.left)] ?? Number.NaN;
      expect(Math.abs(y - seen)).toBeLessThan(0.1);
    }
  });
});
