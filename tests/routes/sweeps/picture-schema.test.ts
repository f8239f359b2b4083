import { describe, expect, it } from "vitest";
import { cornersIn, plotOf, stretchDrawn, withCorner } from "~/routes/sweeps/components/picture/corners";
import { choicesFrom, fieldsOf, stretchesIn, stretchText } from "~/routes/sweeps/picture.schema";

const RESOLVED = {
  frame: { left: 39.72357844086642, top: 49.74325168560317, right: 411.6603430299309, bottom: 286.678700002 },
  startHz: 1234567.8912345,
  stopHz: 31.5e6,
  scale: "linear",
  top: 6,
  bottom: 1,
  quantity: "swr",
  referenceOhm: 50,
  traceColor: "#b43a53",
} as const;

const SIZE = { width: 480, height: 320 };

function specOf(fields: Record<string, string>, resolved: object = RESOLVED) {
  const result = choicesFrom(fields, resolved);
  if ("errors" in result) throw new Error(JSON.stringify(result.errors));
  return result.choices;
}

describe("the choices of a picture's form", () => {
  it("give back what was resolved, to the last digit, when nothing is changed", () => {
    expect(specOf(fieldsOf(RESOLVED)).spec).toEqual(RESOLVED);
    const { frame: _, ...rest } = RESOLVED;
    const corners = [
      { x: 10.123456, y: 20.5 },
      { x: 400, y: 25 },
      { x: 390, y: 280 },
      { x: 12, y: 270.98765 },
    ];
    const tilted = { ...rest, corners, masked: [{ fromX: 3, toX: 9, top: 1, bottom: 4 }] };
    expect(specOf(fieldsOf(tilted), tilted).spec).toEqual(tilted);
  });

  it("take a comma, a long minus and another unit", () => {
    const fields = { ...fieldsOf(RESOLVED), unit: "kHz", start: "7000,5", stop: "7200", bottom: "−40,5" };
    const { spec } = specOf(fields);
    expect(spec).toMatchObject({ startHz: 7000500, stopHz: 7200000, bottom: -40.5 });
  });

  it("leave out what is not known", () => {
    const { spec } = specOf(fieldsOf({}), {});
    expect(spec).toEqual({ scale: "linear", quantity: "s11-db", referenceOhm: 50 });
  });

  it("take the 0 dB line for levels only, in one of its three ways", () => {
    const level = { ...fieldsOf(RESOLVED), quantity: "level", zeroDb: "-12" };
    expect(specOf(level).spec.zeroDb).toBe(-12);
    expect(specOf({ ...level, zeroFrom: "crest" })).toMatchObject({ zeroAtCrest: true });
    expect(specOf({ ...level, zeroFrom: "crest" }).spec.zeroDb).toBeUndefined();
    const byTrace = specOf({ ...level, zeroFrom: "trace", zeroTrace: "#00FF00" }).spec;
    expect(byTrace).toMatchObject({ zeroTrace: "#00ff00" });
    expect(specOf({ ...level, quantity: "swr" }).spec.zeroDb).toBeUndefined();
  });

  it("work where the form had no 0 dB line", () => {
    const { zeroFrom: _a, zeroDb: _b, zeroTrace: _c, ...fields } = fieldsOf(RESOLVED);
    expect(specOf(fields).spec).toEqual(RESOLVED);
  });

  it("say what is wrong, field by field", () => {
    const fields = { ...fieldsOf(RESOLVED), start: "seven", traceColor: "red", masked: "3 to 9" };
    const result = choicesFrom(fields, RESOLVED);
    expect("errors" in result && Object.keys(result.errors).sort()).toEqual([
      "masked",
      "start",
      "traceColor",
    ]);
  });
});

describe("stretches", () => {
  it("are a line each, in any order of their ends", () => {
    expect(stretchesIn("120 80\n5-9, 40, 20\n\nnonsense\n1 2 3")).toEqual([
      { fromX: 80, toX: 120 },
      { fromX: 5, toX: 9, top: 20, bottom: 40 },
    ]);
    expect(stretchText({ fromX: 5.2, toX: 9, top: 20, bottom: 40 })).toBe("5 9 20 40");
  });

  it("drawn in a tilted picture are those of the plot laid flat", () => {
    const fields = { ...fieldsOf(RESOLVED), seenAs: "angle" as const };
    const plot = plotOf(fields, SIZE);
    if (!plot) throw new Error("no plot");
    const corners = cornersIn(fields, SIZE);
    const whole = stretchDrawn(corners[0], corners[2], plot, true);
    expect(whole.fromX).toBe(plot.frame.left);
    expect(whole.toX).toBe(plot.frame.right);
    expect(whole.bottom).toBe(plot.frame.bottom);
    expect(stretchDrawn({ x: 9, y: 1 }, { x: 4, y: 8 }, null, false)).toEqual({ fromX: 4, toX: 9 });
  });
});

describe("a corner that is moved", () => {
  it("takes its two sides along on a straight picture, and goes alone on a tilted one", () => {
    const straight = withCorner(fieldsOf(RESOLVED), SIZE, 0, { x: 30, y: 40 });
    expect(straight).toMatchObject({ x0: "30.00", y0: "40.00", x3: "30.00", y1: "40.00", x1: "411.66" });
    const tilted = withCorner({ ...fieldsOf(RESOLVED), seenAs: "angle" }, SIZE, 0, { x: 30, y: 40 });
    expect(tilted).toMatchObject({ x0: "30.00", y0: "40.00", x3: "39.72", y1: "49.74" });
  });

  it("stays inside the picture, and begins well inside where no plot was found", () => {
    expect(withCorner(fieldsOf(RESOLVED), SIZE, 2, { x: 9999, y: -5 })).toMatchObject({
      x2: "479.00",
      y2: "0.00",
    });
    expect(cornersIn(fieldsOf({}), SIZE)[0]).toEqual({ x: 72, y: 48 });
  });
});
