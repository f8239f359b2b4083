import { describe, expect, it } from "vitest";
import { PAPER_PALETTE } from "../../app/charts/palette.ts";
import { axisHz, axisValue, figureLayout, figureLine, pointWords } from "../../app/charts/plotly-figure.ts";
import { buildSweepScene } from "../../app/charts/scene.ts";
import { pathNumbers } from "./sample.ts";

const sweep = { frequencyHz: [1e6, 5e6, 10e6, 20e6, 100e6], magnitude: [1, 1, 0.1, Number.NaN, 0.5] };

describe("figureLine", () => {
  it("lies on the drawing: the same px from the bottom, nothing in gaps and off the scale", () => {
    for (const quantity of ["rl", "swr"] as const) {
      const view = { quantity, scale: "log" as const, fromHz: 1e6, toHz: 100e6 };
      const scene = buildSweepScene({
        points: sweep,
        dips: [],
        bands: [],
        designBands: [],
        view,
        swrLimit: 2,
      });
      const line = figureLine(sweep, "log", scene.yOfMagnitude, scene.plotHeightPx);
      expect(line.y[3]).toBeNull();
      expect(line.readY[3]).toBeNull();
      expect(line.y[0]).toBe(quantity === "rl" ? scene.plotHeightPx : null);
      expect(line.y[1]).toBe(scene.plotHeightPx);
      expect(line.readY[0]).toBe(scene.plotHeightPx);
      const drawn = pathNumbers(scene.land);
      expect(drawn).toContain(Math.round((scene.plotHeightPx - (line.y[2] ?? 0)) * 100) / 100);
      expect(line.x[2]).toBe(7);
    }
  });
});

describe("pointWords", () => {
  it("says frequency, SWR and return loss", () => {
    expect(pointWords(10e6, 0.1).replaceAll("\u2009", " ")).toBe("10 MHz<br>SWR 1.22<br>return loss 20.0 dB");
    expect(pointWords(10e6, 1).replaceAll("\u2009", " ")).toContain("SWR ∞");
  });
});

describe("axisValue", () => {
  it("leads to the axis and back", () => {
    expect(axisValue(1e6, "log")).toBe(6);
    expect(axisHz(axisValue(7.1e6, "log"), "log")).toBeCloseTo(7.1e6, 3);
    expect(axisHz(axisValue(7.1e6, "linear"), "linear")).toBe(7.1e6);
  });
});

describe("figureLayout", () => {
  it("has no margins, so that it fits the plot, and cannot leave the sweep", () => {
    const layout = figureLayout({
      range: { fromHz: 1e6, toHz: 10e6 },
      whole: { fromHz: 1e6, toHz: 100e6 },
      scale: "log",
      plotHeightPx: 300,
      drag: "zoom",
      palette: PAPER_PALETTE,
    });
    expect(layout.margin).toEqual({ l: 0, r: 0, t: 0, b: 0 });
    expect(layout.xaxis).toMatchObject({ range: [6, 7], minallowed: 6, maxallowed: 8 });
    expect(layout.yaxis).toMatchObject({ range: [0, 300], fixedrange: true });
  });
});
