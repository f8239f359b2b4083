import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import { StripMap } from "../../app/charts/StripMap.tsx";
import { buildStripScene, type Strip } from "../../app/charts/strip-scene.ts";
import { assertWellFormed } from "./markup.ts";
import { points } from "./sample.ts";

function strip(index: number): Strip {
  return {
    id: `s${index}`,
    title: index === 0 ? "A title ".repeat(20) : `Sweep ${index}`,
    caption: `${index + 1} Aug 2026`,
    points: points(100, () => 0.8),
    dips: [
      { id: `a${index}`, frequencyHz: (7 + index / 10) * 1e6, returnLossDb: 15 },
      { id: `b${index}`, frequencyHz: 18e6, returnLossDb: 22 },
    ],
    step: index > 0 ? `Step ${index} & more` : null,
  };
}

const strips = [0, 1, 2].map(strip);
const base = {
  strips,
  scale: "linear" as const,
  fromHz: 1e6,
  toHz: 30e6,
  bands: [],
  designBands: [{ name: "40 m", lowHz: 7e6, highHz: 7.2e6 }],
};
const trail = (prefix: string, label: string) => ({
  id: prefix,
  label,
  tone: "heather" as const,
  stops: [0, 1, 2].map((index) => ({
    stripId: `s${index}`,
    dipId: `${prefix}${index}`,
    words: `stop ${index}`,
  })),
});

describe("buildStripScene", () => {
  it("stands the newest on top, the oldest at the bottom, each under its caption", () => {
    const scene = buildStripScene(base);
    expect(scene.strips.map((placed) => placed.strip.id)).toEqual(["s2", "s1", "s0"]);
    for (const [index, placed] of scene.strips.entries()) {
      expect(placed.landY).toBeGreaterThan(placed.captionY);
      if (index > 0) expect(placed.captionY).toBeGreaterThan(scene.strips[index - 1].footY);
    }
    expect(scene.heightPx).toBe(scene.strips[2].footY);
  });

  it("leads a trail through its dips from the newest to the oldest", () => {
    const scene = buildStripScene({ ...base, trails: [trail("a", "7.2 MHz")] });
    const [placed] = scene.trails;
    expect(placed.stops.map((stop) => stop.dipId)).toEqual(["a2", "a1", "a0"]);
    expect(placed.path.match(/L/g)).toHaveLength(2);
    expect(placed.stops[0].fraction).toBeCloseTo(6.2 / 29, 9);
  });

  it("leaves out a stop whose dip is not there", () => {
    const gone = { ...trail("a", "x"), stops: [{ stripId: "s1", dipId: "zz", words: "" }] };
    expect(buildStripScene({ ...base, trails: [gone] }).trails[0]).toMatchObject({
      path: "",
      stops: [],
      name: null,
    });
  });

  it("names trails only where the names do not run into each other", () => {
    const label = "a name that is rather long";
    const twins = [trail("a", label), { ...trail("b", label), stops: trail("a", label).stops }];
    const scene = buildStripScene({ ...base, trails: twins });
    const [first, second] = scene.trails.map((placed) => placed.name);
    expect(first).not.toBeNull();
    expect(second).not.toEqual(first);
  });

  it("has a map of no sweeps", () => {
    expect(buildStripScene({ ...base, strips: [] }).heightPx).toBe(0);
  });
});

describe("StripMap", () => {
  it("is well formed, links every sweep, says steps and stops", () => {
    const scene = buildStripScene({ ...base, trails: [trail("a", "7.2 MHz")] });
    const markup = renderToStaticMarkup(
      <StripMap scene={scene} label="Map" stripHref={(one) => `/${one.id}`} trailHref={() => "/t"} />,
    );
    assertWellFormed(markup);
    expect(markup).not.toMatch(/NaN|undefined/);
    for (const { id } of strips) expect(markup).toContain(`href="/${id}"`);
    expect(markup).toContain("Step 2 &amp; more");
    expect(markup).toContain('aria-label="7.2 MHz: stop 2; stop 1; stop 0"');
  });
});
