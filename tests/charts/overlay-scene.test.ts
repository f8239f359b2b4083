import { describe, expect, it } from "vitest";
import { frequencyScale } from "~/charts/axis";
import { differencePath, differenceTicks } from "~/charts/difference-path";
import { buildDifferenceScene } from "~/charts/difference-scene";
import { buildOverlayScene } from "~/charts/overlay-scene";

/** abs Γ with one dip of 20 dB at `dipHz` on an even grid. */
function trace(id: string, dipHz: number, fromHz = 1e6, toHz = 9e6) {
  const frequencyHz = Array.from({ length: 801 }, (_, i) => fromHz + ((toHz - fromHz) * i) / 800);
  const magnitude = frequencyHz.map((hz) => 10 ** (-(0.5 + 19.5 / (1 + ((hz - dipHz) / 1e5) ** 2)) / 20));
  return { id, label: id, points: { frequencyHz, magnitude } };
}

const VIEW = { quantity: "rl" as const, scale: "linear" as const, fromHz: 1e6, toHz: 9e6 };

function scene(more = {}) {
  const traces = [trace("before", 4e6), trace("after", 6e6)];
  return buildOverlayScene({ traces, bands: [], designBands: [], view: VIEW, ...more });
}

describe("buildOverlayScene", () => {
  it("puts every trace and its dips on one axis", () => {
    const links = [
      {
        id: "0",
        stops: [
          { traceId: "before", frequencyHz: 4e6, returnLossDb: 20 },
          { traceId: "after", frequencyHz: 6e6, returnLossDb: 20 },
        ],
      },
    ];
    const { links: placed, traces } = scene({ links });
    expect(placed[0].stops.map(({ style, fraction }) => [style, fraction])).toEqual([
      [0, 3 / 8],
      [1, 5 / 8],
    ]);
    const lowest = (path: string) => Math.max(...[...path.matchAll(/ ([\d.]+)/g)].map(([, y]) => Number(y)));
    for (const { line } of traces) expect(lowest(line)).toBeCloseTo(placed[0].stops[0].y, 0);
  });

  it("names lines that end together apart", () => {
    const ends = scene().traces.map(({ end }) => end?.y ?? Number.NaN);
    expect(Math.abs(ends[0] - ends[1])).toBeGreaterThanOrEqual(14);
  });

  it("has no place for a trace out of view, nor for its dips", () => {
    const links = [{ id: "0", stops: [{ traceId: "after", frequencyHz: 20e6, returnLossDb: 20 }] }];
    const traces = [trace("before", 4e6), trace("after", 20e6, 15e6, 25e6)];
    const out = scene({ traces, links });
    expect(out.traces[1]).toMatchObject({ line: "", end: null });
    expect(out.links[0].stops).toEqual([]);
  });
});

describe("the difference's path", () => {
  const scale = frequencyScale("linear", 0, 100);
  it("keeps a spike that one of ten thousand points is", () => {
    const hz = Array.from({ length: 10_001 }, (_, i) => i / 100);
    const db = hz.map((_, i) => (i === 5003 ? 7.5 : 0));
    const { yOf } = differenceTicks(db, 100);
    const { line } = differencePath(hz, db, scale, 1000, yOf);
    expect(line).toContain(` ${Math.round(yOf(7.5) * 100) / 100}`);
    expect(line.length).toBeLessThan(20_000);
  });

  it("breaks at gaps and closes its area on the level line", () => {
    const { yOf } = differenceTicks([1, Number.NaN, -2], 100);
    const { line, area } = differencePath([0, 50, 100], [1, Number.NaN, -2], scale, 1000, yOf);
    expect(line.match(/M/g)).toHaveLength(2);
    expect(area).toContain(`L0 ${yOf(0)}Z`);
  });

  it("has room for everything, and at least three decibels", () => {
    expect(differenceTicks([0.1, -0.2], 100).ticks[0].label).toBe("+4 dB");
    for (const most of [0.5, 3, 7, 13, 39]) {
      const { yOf } = differenceTicks([most, -most], 100);
      expect(yOf(most)).toBeGreaterThanOrEqual(0);
      expect(yOf(-most)).toBeLessThanOrEqual(100);
      expect(yOf(most)).toBeCloseTo(100 - yOf(-most), 9);
    }
  });
});

describe("buildDifferenceScene", () => {
  const scale = frequencyScale("linear", 1e6, 9e6);
  const line = (id: string, style: number, db: number[]) => ({
    id,
    label: id,
    short: id,
    style,
    frequencyHz: db.map((_, i) => 1e6 + (8e6 * i) / (db.length - 1)),
    db,
  });

  it("lays lines around a level line at 0 dB, each with the look of its sweep", () => {
    const scene = buildDifferenceScene([line("b", 1, [0, 4, 0]), line("d", 3, [0, -4, 0])], scale);
    expect(scene.levelY).toBe(scene.plotHeightPx / 2);
    expect(scene.traces.map(({ style }) => style)).toEqual([1, 3]);
    const ys = scene.traces.map(({ line: path }) =>
      [...path.matchAll(/ ([\d.]+)/g)].map(([, y]) => Number(y)),
    );
    // 4 dB up and 4 dB down lie as far from the level line.
    expect(scene.plotHeightPx / 2 - Math.min(...ys[0])).toBeCloseTo(
      Math.max(...ys[1]) - scene.plotHeightPx / 2,
    );
    expect(Math.min(...ys[0])).toBeLessThan(scene.plotHeightPx / 2);
  });

  it("breaks a line at a gap and keeps a spike", () => {
    const db = Array.from({ length: 5000 }, (_, i) =>
      i === 2503 ? 9 : i > 3000 && i < 3100 ? Number.NaN : 0,
    );
    const { traces, valueTicks } = buildDifferenceScene([line("b", 1, db)], scale);
    expect(traces[0].line.split("M").length - 1).toBe(2);
    expect(valueTicks.map(({ label }) => label)).toContain("+12 dB");
  });

  it("draws nothing of nothing", () => {
    expect(buildDifferenceScene([], scale).traces).toEqual([]);
  });
});
