import { describe, expect, it } from "vitest";
import { evenLight } from "../../../app/readers/screenshot/even-light.ts";

const SIZE = 200;
const PLOT = { left: 20, top: 20, right: 180, bottom: 180 };

/** A ground that brightens from left to right by 80, with a stroke 50 darker in row 100. */
function slanting() {
  const data = new Uint8ClampedArray(4 * SIZE * SIZE).fill(255);
  for (let y = 0; y < SIZE; y++)
    for (let x = 0; x < SIZE; x++)
      data.fill(120 + (80 * x) / SIZE - (y === 100 ? 50 : 0), 4 * (y * SIZE + x), 4 * (y * SIZE + x) + 3);
  return { width: SIZE, height: SIZE, data };
}

describe("evenLight", () => {
  it("makes the ground one colour and keeps the stroke's difference from it", () => {
    const { data } = evenLight(slanting(), PLOT);
    const row = (y: number) => Array.from({ length: 121 }, (_, i) => data[4 * (y * SIZE + 40 + i)]);
    expect(Math.max(...row(60)) - Math.min(...row(60))).toBeLessThanOrEqual(3);
    expect(row(60)[50] - row(100)[50]).toBeGreaterThanOrEqual(48);
  });

  it("leaves the given picture and its alpha alone", () => {
    const picture = slanting();
    const before = picture.data.slice();
    const out = evenLight(picture, PLOT);
    expect(picture.data).toEqual(before);
    expect(out.data[3]).toBe(255);
  });

  it("gives a plot smaller than its window back as it is", () => {
    const picture = slanting();
    expect(evenLight(picture, { left: 0, top: 0, right: 30, bottom: 30 })).toBe(picture);
  });
});
