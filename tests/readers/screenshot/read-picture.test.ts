import { describe, expect, it } from "vitest";
import { analyse } from "../../../app/measurement/analyse.ts";
import type { ScreenshotSpec } from "../../../app/readers/reading.ts";
import type { Ocr } from "../../../app/readers/screenshot/picture.ts";
import { readPicture } from "../../../app/readers/screenshot/read-picture.ts";
import { curve, grid, outline, type Paper, paper } from "./paint.ts";

const blind: Ocr = async () => [];
const unused: Ocr = async () => {
  throw new Error("Text recognition was called though everything is given.");
};
const AXES: ScreenshotSpec = {
  startHz: 1e6,
  stopHz: 31e6,
  scale: "linear",
  top: 0,
  bottom: -40,
  quantity: "s11-db",
};

/** Return loss of one resonance, dB, at a frequency in MHz. */
function lossAt(mhz: number): number {
  const u = 0.8 * 20 * (mhz / 14.2 - 14.2 / mhz);
  return -10 * Math.log10(0.96 * ((0.2 ** 2 + u * u) / (1.8 ** 2 + u * u)));
}

function picture(): Paper {
  const p = paper(480, 320, [255, 255, 255]);
  grid(p, [50, 40, 450, 280], 10, 8, [215, 215, 215]);
  outline(p, 50, 40, 450, 280, [60, 60, 60]);
  curve(p, 51, 449, (x) => 40 + (lossAt(1 + ((x - 50) / 400) * 30) / 40) * 240, [190, 20, 60]);
  return p;
}

describe("readPicture", () => {
  it("makes a sweep whose dip is where it was drawn, without text where all is given", async () => {
    const result = await readPicture(picture(), unused, AXES);
    if (!result.ok) throw new Error(result.problem.message);
    const { sweep } = result;
    expect(sweep.frequencyHz.length).toBeGreaterThan(395);
    for (let i = 1; i < sweep.frequencyHz.length; i++)
      expect(sweep.frequencyHz[i]).toBeGreaterThan(sweep.frequencyHz[i - 1]);
    const [dip] = analyse(sweep).dips.filter((d) => !d.edge);
    expect(Math.abs(dip.frequencyHz - 14.2e6)).toBeLessThan(75e3);
    expect(Math.abs(dip.returnLossDb - lossAt(14.2))).toBeLessThan(0.6);
  });

  it("carries half a pixel in both directions", async () => {
    const result = await readPicture(picture(), unused, AXES);
    if (!result.ok || !result.sweep.pictureLimits) throw new Error("no limits");
    const { frequencyHz, magnitudeLow, magnitudeHigh } = result.sweep.pictureLimits;
    expect(frequencyHz[10]).toBeCloseTo(37.5e3, -3);
    result.sweep.magnitude.forEach((m, i) => {
      expect(magnitudeLow[i]).toBeLessThanOrEqual(m);
      expect(magnitudeHigh[i]).toBeGreaterThanOrEqual(m);
    });
    expect(20 * Math.log10(magnitudeHigh[0] / magnitudeLow[0])).toBeGreaterThanOrEqual((0.99 * 40) / 240);
  });

  it("reads the same pixels to the same sweep when its own reading is given back", async () => {
    const first = await readPicture(picture(), unused, AXES);
    if (!first.ok) throw new Error(first.problem.message);
    const second = await readPicture(picture(), unused, first.reading.spec.screenshot);
    if (!second.ok) throw new Error(second.problem.message);
    expect(second.sweep).toEqual(first.sweep);
    expect(second.reading.spec).toEqual(first.reading.spec);
  });

  it("says what is missing where nothing could be read, and shows what it saw", async () => {
    const result = await readPicture(picture(), blind);
    if (result.ok) throw new Error("read without axes");
    expect(result.problem.code).toBe("axes-needed");
    expect(result.problem.message).toContain("start and stop frequency");
    expect(result.picture.frame).toMatchObject({ columns: 10, rows: 8 });
    expect(result.picture.traces[0]).toMatchObject({ chosen: true });
    expect(result.picture.axes?.sources.startHz).toBe("assumed");
  });

  it("asks for the 0 dB line of raw levels and takes it", async () => {
    const level: ScreenshotSpec = { ...AXES, quantity: "level", top: -10, bottom: -50 };
    const asked = await readPicture(picture(), unused, level);
    expect(asked.ok ? "" : asked.problem.code).toBe("zero-db-needed");
    expect(asked.ok ? [] : asked.reading?.questions.map((q) => q.id)).toContain("zero-db");
    const given = await readPicture(picture(), unused, { ...level, zeroDb: -10 });
    const plain = await readPicture(picture(), unused, AXES);
    if (!given.ok || !plain.ok) throw new Error("not read");
    expect(given.sweep.magnitude[200]).toBeCloseTo(plain.sweep.magnitude[200], 9);
  });

  it("refuses axes that make no scale, and pictures with no plot in them", async () => {
    const wrong = await readPicture(picture(), unused, { ...AXES, stopHz: 1e6 });
    expect(wrong.ok ? "" : wrong.problem.code).toBe("axes-wrong");
    const empty = await readPicture(paper(300, 200, [0, 0, 0]), unused, AXES);
    expect(empty.ok ? "" : empty.problem.code).toBe("no-frame");
    const tiny = await readPicture(paper(8, 8, [0, 0, 0]), unused, AXES);
    expect(tiny.ok ? "" : tiny.problem.code).toBe("no-frame");
  });

  it("tells its progress stage by stage", async () => {
    const stages: string[] = [];
    await readPicture(picture(), unused, AXES, (stage) => stages.push(stage));
    expect(stages).toEqual(["frame", "axes", "trace"]);
  });

  it.each([
    ["swr", 6, 1],
    ["return-loss", 40, 0],
  ] as const)("reads a %s axis", async (quantity, top, bottom) => {
    const result = await readPicture(picture(), unused, { ...AXES, quantity, top, bottom });
    if (!result.ok) throw new Error(result.problem.message);
    expect([...result.sweep.magnitude].every((m) => Number.isNaN(m) || m >= 0)).toBe(true);
    expect(result.reading.quantity).toBe(quantity);
  });
});
