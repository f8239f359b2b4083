import { describe, expect, it } from "vitest";
import type { Picture } from "~/readers/screenshot/picture";
import { cornersOf, flatPlot, homography, mapPoint, rectify } from "~/readers/screenshot/rectify";

const SQUARE = [
  { x: 0, y: 0 },
  { x: 100, y: 0 },
  { x: 100, y: 100 },
  { x: 0, y: 100 },
];
const TILTED = [
  { x: 80, y: 60 },
  { x: 610, y: 110 },
  { x: 560, y: 470 },
  { x: 40, y: 400 },
];

describe("homography", () => {
  it("takes the four points to the four others", () => {
    const h = homography(SQUARE, TILTED);
    SQUARE.forEach((point, i) => {
      const at = h && mapPoint(h, point);
      expect(at?.x).toBeCloseTo(TILTED[i].x, 8);
      expect(at?.y).toBeCloseTo(TILTED[i].y, 8);
    });
  });

  it("agrees with a projective map that is known", () => {
    const known = Float64Array.from([1.2, 0.1, 30, -0.2, 0.9, 80, 0.0004, -0.0007, 1]);
    const found = homography(
      SQUARE,
      SQUARE.map((point) => mapPoint(known, point)),
    );
    known.forEach((value, i) => {
      expect(found?.[i]).toBeCloseTo(value, 9);
    });
  });

  it("keeps straight lines straight and is undone by its opposite", () => {
    const there = homography(SQUARE, TILTED);
    const back = homography(TILTED, SQUARE);
    if (!there || !back) throw new Error("no map");
    const [a, b, c] = [10, 40, 90].map((t) => mapPoint(there, { x: t, y: 20 + t / 2 }));
    expect((b.x - a.x) * (c.y - a.y) - (b.y - a.y) * (c.x - a.x)).toBeCloseTo(0, 6);
    const again = mapPoint(back, mapPoint(there, { x: 33, y: 71 }));
    expect(again.x).toBeCloseTo(33, 8);
    expect(again.y).toBeCloseTo(71, 8);
  });

  it("is not there for three points in a line", () => {
    expect(homography([SQUARE[0], { x: 50, y: 0 }, SQUARE[1], SQUARE[3]], SQUARE)).toBeNull();
  });
});

describe("flatPlot", () => {
  it("is as large as the plot in the picture, with room for the print around it", () => {
    const plot = flatPlot([
      { x: 100, y: 50 },
      { x: 500, y: 50 },
      { x: 500, y: 300 },
      { x: 100, y: 300 },
    ]);
    expect(plot && plot.frame.right - plot.frame.left).toBe(400);
    expect(plot && plot.frame.bottom - plot.frame.top).toBe(250);
    expect(plot?.frame.left).toBeGreaterThan(60);
  });

  it("refuses corners out of order, crossed, hollow or too close", () => {
    const [a, b, c, d] = TILTED;
    expect(flatPlot([a, d, c, b])).toBeNull();
    expect(flatPlot([a, c, b, d])).toBeNull();
    expect(flatPlot([a, b, { x: 200, y: 150 }, d])).toBeNull();
    expect(flatPlot(SQUARE.map(({ x, y }) => ({ x: x / 4, y: y / 4 })))).toBeNull();
    expect(flatPlot([a, b, c])).toBeNull();
    expect(flatPlot([a, b, { x: Number.NaN, y: 3 }, d])).toBeNull();
  });

  it("is bounded however large the photograph", () => {
    const plot = flatPlot(SQUARE.map(({ x, y }) => ({ x: x * 70, y: y * 50 })));
    expect(plot?.width).toBeLessThan(2400);
  });
});

/** Brightness that is smooth and known everywhere. */
const shade = (x: number, y: number) => 128 + 60 * Math.sin(x / 25) + 50 * Math.cos(y / 19);

function painted(width: number, height: number): Picture {
  const data = new Uint8ClampedArray(4 * width * height);
  for (let y = 0; y < height; y++)
    for (let x = 0; x < width; x++) data.set([shade(x, y), x % 256, y % 256, 255], 4 * (y * width + x));
  return { width, height, data };
}

describe("rectify", () => {
  it("changes nothing of a plot that is straight", () => {
    const picture = painted(700, 500);
    const box = { left: 200, top: 150, right: 500, bottom: 350 };
    const flat = rectify(picture, cornersOf(box));
    if (!flat) throw new Error("no plot");
    const { frame } = flat.plot;
    for (const [x, y] of [
      [0, 0],
      [17, 40],
      [300, 200],
      [150, 3],
    ]) {
      const from = 4 * ((box.top + y) * 700 + box.left + x);
      const to = 4 * ((frame.top + y) * flat.picture.width + frame.left + x);
      expect([...flat.picture.data.slice(to, to + 4)]).toEqual([...picture.data.slice(from, from + 4)]);
    }
  });

  it("lays a tilted plot flat to within what bilinear samples allow", () => {
    const flat = rectify(painted(700, 500), TILTED);
    if (!flat) throw new Error("no plot");
    const { frame, toPicture } = flat.plot;
    let worst = 0;
    for (let y = frame.top; y <= frame.bottom; y += 7) {
      for (let x = frame.left; x <= frame.right; x += 7) {
        const at = mapPoint(toPicture, { x, y });
        const seen = flat.picture.data[4 * (y * flat.picture.width + x)];
        worst = Math.max(worst, Math.abs(seen - shade(at.x, at.y)));
      }
    }
    expect(worst).toBeLessThan(1.6);
  });

  it("stays inside a small picture and takes its edge's colour beyond", () => {
    const flat = rectify(painted(120, 90), [
      { x: 1, y: 1 },
      { x: 118, y: 2 },
      { x: 119, y: 88 },
      { x: 0, y: 87 },
    ]);
    if (!flat) throw new Error("no plot");
    expect([...flat.picture.data].some(Number.isNaN)).toBe(false);
    expect(flat.picture.data[3]).toBe(255);
  });
});
