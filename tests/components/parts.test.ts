import { describe, expect, it } from "vitest";
import { writeNoteSchema } from "../../app/components/notes/notes.schema.ts";
import { mhzOf, percentOf, regionBetween, stretchWords } from "../../app/components/notes/parts.ts";

describe("regionBetween", () => {
  it.each([
    [
      { x: 0.2, y: 0.3 },
      { x: 0.6, y: 0.4 },
    ],
    [
      { x: 0.6, y: 0.4 },
      { x: 0.2, y: 0.3 },
    ],
    [
      { x: 0.2, y: 0.4 },
      { x: 0.6, y: 0.3 },
    ],
  ])("is the same whichever corner came first", (a, b) => {
    const { x, y, width, height } = regionBetween(a, b);
    expect([x, y, width, height].map((share) => Number(share.toFixed(9)))).toEqual([0.2, 0.3, 0.4, 0.1]);
  });

  it("stays inside", () => {
    expect(regionBetween({ x: -1, y: 0.5 }, { x: 2, y: 3 })).toEqual({ x: 0, y: 0.5, width: 1, height: 0.5 });
  });
});

it("writes figures as they are typed", () => {
  expect(stretchWords({ fromHz: 7_000_000, toHz: 7_200_049 })).toBe("7–7.2 MHz");
  expect(mhzOf(7_081_200)).toBe("7.0812");
  expect(percentOf(1 / 3)).toBe("33.3");
});

describe("the figures of a note's form", () => {
  const parse = (figures: Record<string, string>) => writeNoteSchema.safeParse({ body: "x", ...figures });

  it("take a comma, and nothing for an empty field", () => {
    expect(parse({ fromMhz: " 7,05 ", toMhz: "" }).data).toMatchObject({ fromMhz: 7.05 });
    expect(parse({ fromMhz: "" }).data?.fromMhz).toBeUndefined();
  });

  it.each<Record<string, string>>([
    { fromMhz: "seven" },
    { fromMhz: "-1" },
    { toMhz: "1e9" },
    { regionLeft: "101" },
    { regionTop: "x" },
  ])("refuse %j", (figures) => {
    expect(parse(figures).success).toBe(false);
  });
});
