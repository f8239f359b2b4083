import { describe, expect, it } from "vitest";
import { findLines } from "../../../app/readers/screenshot/lines.ts";
import { brightness, transpose } from "../../../app/readers/screenshot/picture.ts";
import { dab, fill, paper } from "./paint.ts";

const lines = (p: ReturnType<typeof paper>) => findLines(brightness(p), p.width, p.height);

describe("findLines", () => {
  it("finds nothing on blank paper", () => {
    expect(lines(paper(200, 100, [20, 20, 20]))).toEqual([]);
  });

  it("places a stroke with both its ends", () => {
    const p = paper(300, 100, [10, 10, 10]);
    fill(p, 40, 50, 259, 50, [80, 80, 80]);
    const [line] = lines(p);
    expect(line).toMatchObject({ kind: "stroke", from: 40, to: 259 });
    expect(line.position).toBeCloseTo(50, 1);
  });

  it("places a stroke between two rows by its intensity", () => {
    const p = paper(300, 100, [0, 0, 0]);
    for (let x = 30; x < 270; x++) {
      dab(p, x, 60, [200, 200, 200], 0.25);
      dab(p, x, 61, [200, 200, 200], 0.75);
    }
    expect(lines(p)[0].position).toBeCloseTo(60.75, 1);
  });

  it("finds a dotted line and the border of two areas", () => {
    const p = paper(320, 200, [250, 250, 250]);
    for (let x = 20; x < 300; x += 4) dab(p, x, 40, [120, 120, 120]);
    fill(p, 0, 120, 319, 199, [225, 225, 225]);
    const found = lines(p);
    expect(found).toHaveLength(2);
    expect(found[0].position).toBeCloseTo(40, 1);
    expect(found[1]).toMatchObject({ kind: "edge" });
    expect(found[1].position).toBeCloseTo(119.5, 1);
  });

  it("ends a line where the printed label beside it begins", () => {
    const p = paper(300, 100, [255, 255, 255]);
    fill(p, 60, 50, 280, 50, [0, 0, 0]);
    for (const x of [40, 44, 48, 52]) fill(p, x, 47, x + 1, 53, [0, 0, 0]);
    expect(lines(p).find((l) => l.to === 280)?.from).toBe(60);
  });

  it("takes no column of labels for a line", () => {
    const p = paper(400, 120, [255, 255, 255]);
    for (let x = 20; x < 380; x += 30) fill(p, x, 50, x + 8, 60, [0, 0, 0]);
    expect(lines(p)).toEqual([]);
  });

  it("gives the same for columns through the transposed numbers", () => {
    const p = paper(120, 300, [0, 0, 0]);
    fill(p, 70, 20, 70, 280, [90, 90, 90]);
    const found = findLines(transpose(brightness(p), p.width, p.height), p.height, p.width);
    expect(found[0]).toMatchObject({ from: 20, to: 280 });
    expect(found[0].position).toBeCloseTo(70, 1);
  });
});
