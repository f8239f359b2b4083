import { describe, expect, it } from "vitest";
import { brightness, transpose } from "../../../app/readers/screenshot/picture.ts";
import { tickMarks } from "../../../app/readers/screenshot/tick-marks.ts";
import { fill, paper } from "./paint.ts";

const BOX = { left: 40, top: 20, right: 240, bottom: 150 };

describe("tickMarks", () => {
  it.each([
    ["inside", 144, 149],
    ["outside", 151, 156],
  ] as const)("finds marks %s the bottom line", (_, first, last) => {
    const p = paper(300, 200, [255, 255, 255]);
    fill(p, 40, 150, 240, 150, [0, 0, 0]);
    for (const x of [80, 120, 160, 200]) fill(p, x, first, x, last, [0, 0, 0]);
    expect(tickMarks(brightness(p), p.width, BOX, -1)).toEqual([80, 120, 160, 200]);
  });

  it("finds marks along the left line through the transposed numbers", () => {
    const p = paper(300, 200, [0, 0, 0]);
    fill(p, 40, 20, 40, 150, [200, 200, 200]);
    for (const y of [50, 90, 120]) fill(p, 41, y, 46, y, [200, 200, 200]);
    const turned = transpose(brightness(p), p.width, p.height);
    expect(tickMarks(turned, p.height, { left: 20, right: 150, top: 240, bottom: 40 }, 1)).toEqual([
      50, 90, 120,
    ]);
  });

  it("takes no wide area for a mark, and finds none on a bare line", () => {
    const p = paper(300, 200, [255, 255, 255]);
    fill(p, 40, 150, 240, 150, [0, 0, 0]);
    expect(tickMarks(brightness(p), p.width, BOX, -1)).toEqual([]);
    fill(p, 100, 140, 130, 149, [0, 0, 0]);
    expect(tickMarks(brightness(p), p.width, BOX, -1)).toEqual([]);
  });
});
