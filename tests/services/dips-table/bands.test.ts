import { expect, test } from "vitest";
import { bandChoices, bandOf, projectBands, stretchesOf } from "~/services/dips-table/bands";

/** Invented design bands beside the allocations of region 1. */
const bands = projectBands(1, [{ name: "40 m", lowHz: 7e6, highHz: 7.1e6 }]);

test("a dip is its design band's first, then an allocation's, else nobody's", () => {
  expect(bandOf(7.05e6, bands)).toEqual({ name: "40 m", design: true });
  expect(bandOf(7.15e6, bands)).toEqual({ name: "40 m", design: false });
  expect(bandOf(14.1e6, bands)).toEqual({ name: "20 m", design: false });
  expect(bandOf(12e6, bands)).toEqual({ name: null, design: false });
  // Edges belong to the band.
  expect(bandOf(7.1e6, bands).design).toBe(true);
});

test("a choice stands for stretches; a name that both have is the design band's", () => {
  expect(stretchesOf("in:40 m", bands)).toEqual({ inside: true, of: [bands.design[0]] });
  expect(stretchesOf("not-design", bands)).toEqual({ inside: false, of: bands.design });
  expect(stretchesOf("outside", bands)?.of).toHaveLength(1 + bands.allocations.length);
  expect([stretchesOf("", bands), stretchesOf("in:41 m", bands)]).toEqual([null, null]);
});

test("every choice that is offered means something, and none about design bands is offered without any", () => {
  for (const { value } of bandChoices(bands).slice(1)) expect(stretchesOf(value, bands)).not.toBeNull();
  const without = bandChoices(projectBands(null, [])).map(({ value }) => value);
  expect(without).not.toContain("design");
  expect(without).toContain("outside");
});
