import { describe, expect, it } from "vitest";
import { sketchOf } from "~/charts/antenna-sketch";
import { type AntennaElement, NO_ANTENNA } from "~/measurement/antenna";

function element(key: string, kind: AntennaElement["kind"], lengthM: number | null, heightM: number | null) {
  return {
    key,
    kind,
    name: "",
    lengthM,
    count: 1,
    heightM,
    diameterMm: null,
    material: "",
    insulated: null,
    where: "",
  };
}

describe("sketchOf", () => {
  it("draws every known length at the scale of its bar", () => {
    const sketch = sketchOf({
      ...NO_ANTENNA,
      elements: [element("a", "vertical", 10, 0), element("b", "dipole", 15, 8)],
    });
    const perMetre = (sketch?.scale?.px ?? 0) / (sketch?.scale?.metres ?? 1);
    const [a, b] = sketch?.slots ?? [];
    const [, from, to] = /^M\S+ (\S+)V(\S+)$/.exec(a.path) ?? [];
    expect(Number(from) - Number(to)).toBeCloseTo(10 * perMetre, 0);
    expect(Number(/h(\S+)$/.exec(b.path)?.[1])).toBeCloseTo(15 * perMetre, 0);
    expect((sketch?.groundY ?? 0) - (b.feed?.y ?? 0)).toBeCloseTo(8 * perMetre, 0);
  });

  it("fits a phone however long the wire is", () => {
    const sketch = sketchOf({ ...NO_ANTENNA, elements: [element("a", "wire", 160, 12)] });
    expect(sketch?.slots[0].widthPx).toBeLessThanOrEqual(340);
  });

  it("dashes what is not known, and has no scale without a length", () => {
    const sketch = sketchOf({
      ...NO_ANTENNA,
      elements: [element("a", "loop", null, null), element("b", "guy", null, null)],
    });
    expect(sketch?.slots.every(({ dashed, heightGuessed }) => dashed && heightGuessed)).toBe(true);
    expect(sketch?.scale).toBeNull();
    expect(JSON.stringify(sketch)).not.toContain("NaN");
    expect(sketchOf(NO_ANTENNA)).toBeNull();
  });
});
