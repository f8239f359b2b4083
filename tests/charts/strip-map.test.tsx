import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import { StripMap } from "../../app/charts/StripMap.tsx";
import { buildStripScene, type Strip, type StripSceneInput } from "../../app/charts/strip-scene.ts";
import type { Trail } from "../../app/charts/strip-trails.ts";
import { assertWellFormed } from "./markup.ts";
import { points } from "./sample.ts";

function strip(index: number): Strip {
  return {
    id: `s${index}`,
    title: index === 0 ? "A title ".repeat(20) : `Sweep ${index} & more`,
    caption: `${index + 1} Aug`,
    points: points(100, () => 0.8),
    dips: [
      { id: `a${index}`, frequencyHz: (7 + index / 10) * 1e6, returnLossDb: 15 },
      { id: `b${index}`, frequencyHz: 18e6, returnLossDb: 22 },
    ],
  };
}

const strips = [0, 1, 2, 3].map(strip);
const step = (id: string, before: string | null, planned = false) => ({
  id,
  title: `Step ${id}`,
  caption: "3 Aug",
  planned,
  before,
});
const base: StripSceneInput = {
  strips,
  steps: [],
  trails: [],
  scale: "linear",
  fromHz: 1e6,
  toHz: 30e6,
  bands: [],
  designBands: [{ name: "40 m", lowHz: 7e6, highHz: 7.2e6 }],
};
const trail = (prefix: string, label: string, of = [0, 1, 2, 3]): Trail => ({
  id: prefix,
  label,
  detail: "",
  tone: "heather",
  stops: of.map((index) => ({ stripId: `s${index}`, dipId: `${prefix}${index}`, words: `stop ${index}` })),
  ghosts: [],
});

describe("buildStripScene", () => {
  it("stands the newest on top, the oldest at the bottom, none over another", () => {
    const scene = buildStripScene(base);
    expect(scene.strips.map(({ id }) => id)).toEqual(["s3", "s2", "s1", "s0"]);
    for (const [index, placed] of scene.strips.entries()) {
      expect(placed.footY).toBeGreaterThan(placed.landY);
      if (index > 0) expect(placed.landY).toBeGreaterThanOrEqual(scene.strips[index - 1].footY);
    }
    expect(scene.heightPx).toBe(scene.strips[3].footY);
  });

  it("writes steps under the strip that came after them, planned ones over everything", () => {
    const scene = buildStripScene({
      ...base,
      steps: [step("x", "s1"), step("y", "s1"), step("z", null), step("p", null, true)],
    });
    expect(scene.steps.map(({ steps, planned }) => [steps.map(({ id }) => id).join(" "), planned])).toEqual([
      ["p", true],
      ["z", false],
      ["x y", false],
    ]);
    const [s1, s0] = [scene.strips[2], scene.strips[3]];
    expect(scene.steps[2].y).toBe(s1.footY);
    expect(s0.landY).toBe(s1.footY + scene.steps[2].heightPx);
    expect(scene.strips[0].landY).toBe(scene.steps[0].heightPx + scene.steps[1].heightPx);
  });

  it("is plain data: what is sent is what was reckoned", () => {
    const scene = buildStripScene({ ...base, trails: [trail("a", "7 MHz")] });
    expect(JSON.parse(JSON.stringify(scene))).toEqual(scene);
  });

  it("shows only dips in view", () => {
    const scene = buildStripScene({
      ...base,
      fromHz: 10e6,
      trails: [trail("a", "7 MHz"), trail("b", "18 MHz")],
    });
    expect(scene.trails.map(({ stops }) => stops.length)).toEqual([0, 4]);
    expect(scene.strips[0].dips).toEqual([]);
    const { strips: bare } = buildStripScene({ ...base, fromHz: 10e6 });
    expect(bare[0].dips.map(({ id }) => id)).toEqual(["b3"]);
  });

  it("draws a trail on where strips follow one another, and apart where one between does not show it", () => {
    const [whole, gap] = buildStripScene({
      ...base,
      trails: [trail("a", "7 MHz"), trail("b", "18 MHz", [0, 1, 3])],
    }).trails;
    expect(whole.way.match(/M/g)).toHaveLength(1);
    expect(whole.gaps).toBe("");
    expect(gap.way.match(/L/g)).toHaveLength(1);
    expect(gap.gaps.match(/L/g)).toHaveLength(1);
  });

  it("leaves out a stop whose dip is not there", () => {
    const gone = { ...trail("a", "x"), stops: [{ stripId: "s1", dipId: "zz", words: "" }] };
    expect(buildStripScene({ ...base, trails: [gone] }).trails[0]).toMatchObject({
      way: "",
      stops: [],
      name: null,
    });
  });

  it("stands a planned ghost in its step's row and one that was met beside its dip", () => {
    const ghost = { frequencyHz: 7.5e6, lowHz: 7.4e6, highHz: null, words: "expected" };
    const ghosts = [
      { ...ghost, stepId: "p", stripId: null },
      { ...ghost, stepId: "x", stripId: "s1", highHz: 99e6 },
      { ...ghost, stepId: "x", stripId: "s1", frequencyHz: 70e6 },
    ];
    const scene = buildStripScene({
      ...base,
      steps: [step("x", "s1"), step("p", null, true)],
      trails: [{ ...trail("a", "7 MHz"), ghosts }],
    });
    const [placed] = scene.trails;
    expect(placed.ghosts).toHaveLength(2);
    expect(placed.ghosts[0]).toMatchObject({ planned: true, high: null });
    expect(placed.ghosts[0].y).toBeLessThan(scene.steps[0].heightPx);
    expect(placed.ghosts[1]).toMatchObject({ planned: false, high: 1, y: placed.stops[2].y });
    expect(placed.ahead).toContain(`L${Math.round(placed.ghosts[0].fraction * 10000) / 10} `);
  });

  it("names trails only where the names do not run into each other", () => {
    const label = "a name that is rather long";
    const twins = [trail("a", label), { ...trail("b", label), stops: trail("a", label).stops }];
    const [first, second] = buildStripScene({ ...base, trails: twins }).trails.map(({ name }) => name);
    expect(first).not.toBeNull();
    expect(second).not.toEqual(first);
  });

  it("takes the detail along only at widths with room for it", () => {
    const detail = "of some length";
    const [one] = buildStripScene({ ...base, trails: [{ ...trail("b", "18 MHz"), detail }] }).trails;
    expect(one.name).toMatchObject({ tier: 0, detailTier: 1 });
  });

  it("loses no dip of 10,001 points, however narrow, and stays small", () => {
    const magnitude = (index: number) => (index % 1000 === 357 ? 0.1 : 0.97 + 0.02 * Math.sin(index / 90));
    const fine = { ...strip(1), points: points(10_001, magnitude), dips: [] };
    for (const scale of ["linear", "log"] as const) {
      const [placed] = buildStripScene({ ...base, strips: [fine], scale }).strips;
      const depths = depthsOf(placed.path.land);
      // 20 dB of 30 on the depth of a lone strip.
      expect(depths.filter((y) => Math.abs(y - (680 * 20) / 30) < 5)).toHaveLength(10);
      expect(placed.path.land.length).toBeLessThan(6000);
    }
  });

  it("keeps gaps and the ends of short sweeps free of land", () => {
    const gappy = points(100, (index) => (index > 40 && index < 60 ? Number.NaN : 0.8));
    const [placed] = buildStripScene({ ...base, strips: [{ ...strip(1), points: gappy }] }).strips;
    expect(placed.path.line?.match(/M/g)).toHaveLength(2);
    expect(placed.path.land.match(/Z/g)).toHaveLength(2);
    const [short] = buildStripScene({ ...base, toHz: 60e6 }).strips;
    expect(short.path.line).not.toBeNull();
    expect(buildStripScene(base).strips[0].path.line).toBeNull();
  });

  it("has a map of no sweeps and of a sweep without points", () => {
    expect(buildStripScene({ ...base, strips: [] }).heightPx).toBe(0);
    const none = { ...strip(1), points: { frequencyHz: [], magnitude: [] } };
    expect(buildStripScene({ ...base, strips: [none] }).strips[0].path).toEqual({ land: "", line: "" });
  });
});

/** Absolute depths of a land path, in its units. */
function depthsOf(path: string): number[] {
  const [, start, way] = /V(-?\d+)h\d+l(.*)h\d+V/.exec(path) ?? [];
  const numbers = (way.match(/-?\d+/g) ?? []).map(Number);
  let y = Number(start);
  return numbers.filter((_, index) => index % 2 === 1).map((dy) => (y += dy));
}

describe("StripMap", () => {
  const draw = (change: Partial<StripSceneInput>, activeTrail: string | null = null) =>
    renderToStaticMarkup(
      <StripMap
        scene={buildStripScene({ ...base, ...change })}
        label="Map"
        stripHref={(id) => `/sweeps/${id}`}
        stepHref={(id) => `/steps/${id}`}
        trailHref={(id) => `/trails/${id}`}
        dipHref={(id) => `/dips/${id}`}
        activeTrail={activeTrail}
      />,
    );

  it("is well formed, links every sweep, step, trail and dip", () => {
    const ghost = {
      stepId: "p",
      stripId: null,
      frequencyHz: 7.5e6,
      lowHz: 7.4e6,
      highHz: 7.6e6,
      words: "expected <there>",
    };
    const markup = draw({
      steps: [step("x", "s1"), step("p", null, true)],
      trails: [{ ...trail("a", "7.2 MHz"), ghosts: [ghost] }],
    });
    assertWellFormed(markup);
    expect(markup).not.toMatch(/NaN|undefined|Infinity/);
    for (const { id } of strips) expect(markup).toContain(`href="/sweeps/${id}"`);
    for (const href of ["/steps/x", "/steps/p", "/trails/a", "/dips/a0", "/dips/a3"])
      expect(markup).toContain(`href="${href}"`);
    expect(markup).toContain("Sweep 2 &amp; more");
    expect(markup).toContain("expected &lt;there&gt;");
    expect(markup).toContain('aria-label="Trail 7.2 MHz, in 4 sweeps"');
  });

  it("is one stop of the Tab key for each trail, whatever its length", () => {
    const markup = draw({ trails: [trail("a", "7.2 MHz")] });
    expect(markup.match(/class="trail-stop" tabindex="-1"/g)).toHaveLength(4);
  });

  it("draws the dots of a trail as one path, each where its link is pressed", () => {
    const markup = draw({ trails: [trail("a", "7.2 MHz")] });
    const [, path] = markup.match(/d="([^"]*)" class="trail-dots"/) ?? [];
    const dots = [...path.matchAll(/M([\d.]+) (\d+)h/g)].map(([, x, y]) => [Number(x) / 10, Number(y)]);
    const pressed = [...markup.matchAll(/<circle cx="([\d.]+)%" cy="(\d+)" r="10"/g)];
    expect(dots).toHaveLength(4);
    for (const [i, [, x, y]] of pressed.entries()) {
      expect(dots[i][0]).toBeCloseTo(Number(x), 1);
      expect(dots[i][1]).toBe(Number(y));
    }
  });

  it("writes frequency and SWR along the way of the trail that is looked at", () => {
    const words = {
      ...trail("b", "18 MHz"),
      stops: [{ stripId: "s1", dipId: "b1", words: "18.1 MHz, SWR 1.2, Sweep 1" }],
    };
    expect(draw({ trails: [words] })).not.toContain(">18.1 MHz, SWR 1.2<");
    expect(draw({ trails: [words] }, "b")).toContain(">18.1 MHz, SWR 1.2<");
  });
});
