import { renderToStaticMarkup } from "react-dom/server";
import sharp from "sharp";
import { describe, expect, it } from "vitest";
import type { ChartDip } from "../../app/charts/chart-types.ts";
import { dipsWithCards, HollowCards } from "../../app/charts/HollowCards.tsx";
import { LiveSweepChart } from "../../app/charts/LiveSweepChart.tsx";
import { Profile } from "../../app/charts/Profile.tsx";
import { PAPER_PALETTE } from "../../app/charts/palette.ts";
import { SweepChart, SweepFigure } from "../../app/charts/SweepChart.tsx";
import { buildSweepScene, type SceneInput } from "../../app/charts/scene.ts";
import { assertWellFormed } from "./markup.ts";
import { chartDip, points } from "./sample.ts";

const base: SceneInput = {
  points: points(300, (index) => (Math.abs(index - 63) < 4 ? 0.1 : 0.9)),
  dips: [chartDip({ noteCount: 3, latestNote: "<b>“Wet” & windy</b>" })],
  bands: [{ name: "40 m", lowHz: 7e6, highHz: 7.2e6 }],
  designBands: [{ name: "40 m", lowHz: 7e6, highHz: 7.2e6 }],
  view: { quantity: "rl", scale: "log", fromHz: 1e6, toHz: 30e6 },
  swrLimit: 2,
};
const dipHref = (dip: ChartDip) => `?dip=${dip.id}`;

function page(input: SceneInput): string {
  const scene = buildSweepScene(input);
  return renderToStaticMarkup(
    <>
      <SweepChart
        scene={scene}
        label="Chart"
        leaders={dipsWithCards(scene)}
        dipHref={dipHref}
        chosenDipId="dip-a"
      />
      <HollowCards scene={scene} designBands={input.designBands} dipHref={dipHref} />
    </>,
  );
}

function forty(): ChartDip[] {
  return Array.from({ length: 40 }, (_, index) =>
    chartDip({ id: `dip-${index}`, frequencyHz: (1.5 + index * 0.7) * 1e6, noteCount: index % 7 }),
  );
}

describe("a chart on a page", () => {
  it("is well formed, without NaN, for every odd sweep", () => {
    const inputs: SceneInput[] = [
      base,
      { ...base, dips: [] },
      { ...base, dips: forty() },
      { ...base, points: points(1, () => 0.4, 7e6), dips: [] },
      { ...base, points: points(100, () => Number.NaN) },
      { ...base, points: points(0, () => 0), dips: [], bands: [], designBands: [] },
      { ...base, view: { ...base.view, quantity: "swr", scale: "linear" } },
      { ...base, view: { ...base.view, fromHz: 7.0e6, toHz: 7.2e6 } },
    ];
    for (const input of inputs) {
      const markup = page(input);
      assertWellFormed(markup);
      expect(markup).not.toMatch(/NaN|Infinity|undefined/);
    }
  });

  it("gives every dip a link with its numbers in words, on the chart and below it", () => {
    const markup = page({ ...base, dips: forty() });
    for (const dip of forty()) {
      expect(markup.match(new RegExp(`href="\\?dip=${dip.id}"`, "g"))).toHaveLength(2);
    }
    expect(markup).toContain('aria-label="Dip at 1.5000 megahertz, lowest SWR 1.22');
    expect(markup.match(/class="hollow-card/g)).toHaveLength(6);
  });

  it("marks the chosen dip", () => {
    expect(page(base)).toContain('aria-current="true"');
  });

  it("shows a note's words as words", () => {
    expect(page(base)).toContain("&lt;b&gt;“Wet” &amp; windy&lt;/b&gt;");
  });

  it("says of a dip that has no bandwidth that it has none", () => {
    const markup = page({ ...base, dips: [chartDip({ bandwidth: null, minimumSwr: 2.6 })] });
    expect(markup).toContain("never under the limit");
    expect(markup).not.toContain("2:1 over");
  });

  it("has no cards where there are no dips", () => {
    expect(page({ ...base, dips: [] })).not.toContain("hollow-card");
  });
});

describe("a live chart before scripts run", () => {
  const live = (view: SceneInput["view"]) =>
    renderToStaticMarkup(
      <LiveSweepChart
        {...base}
        view={view}
        whole={{ fromHz: 1e6, toHz: 30e6 }}
        label="Chart"
        dipHref={dipHref}
        rangeHref={({ fromHz, toHz }) => `?from=${fromHz}&to=${toHz}`}
        onRange={() => undefined}
      />,
    );

  it("has its line, its cards and its links to other stretches, and no buttons that need scripts", () => {
    const markup = live({ ...base.view, scale: "linear", fromHz: 5e6, toHz: 15e6 });
    assertWellFormed(markup);
    expect(markup).toContain(`stroke="var(--color-ink)"`);
    expect(markup).toContain("hollow-card");
    expect(markup).toContain('href="?from=7500000&amp;to=12500000"');
    expect(markup).toContain('href="?from=1000000&amp;to=30000000"');
    expect(markup).not.toContain("<button");
  });

  it("offers of the whole sweep only to zoom in", () => {
    expect(live(base.view).match(/href="\?from/g)).toHaveLength(1);
  });
});

describe("a chart as a picture", () => {
  const figure = (input: SceneInput) =>
    renderToStaticMarkup(
      <SweepFigure scene={buildSweepScene({ ...input, plotWidthPx: 640 })} title="A & B" id="f" />,
    );

  it("needs no style sheet: colours and fonts are written out, nothing is in per cent", () => {
    const markup = figure(base);
    assertWellFormed(markup);
    expect(markup).not.toContain("var(--");
    expect(markup).not.toMatch(/="[\d.]+%"/);
    expect(markup).toContain(PAPER_PALETTE.land);
  });

  it("becomes the land that was drawn", async () => {
    const input: SceneInput = { ...base, dips: [], bands: [], designBands: [], plotHeightPx: 300 };
    const flat = { ...input, points: points(50, () => 10 ** (-10 / 20)) };
    const { data, info } = await sharp(Buffer.from(figure(flat)))
      .raw()
      .toBuffer({ resolveWithObject: true });
    const colourAt = (x: number, y: number) => {
      const from = (y * info.width + x) * info.channels;
      return `#${[...data.subarray(from, from + 3)].map((part) => part.toString(16).padStart(2, "0")).join("")}`;
    };
    expect([info.width, info.height]).toEqual([640 + 60 + 24, 10 + 300 + 64]);
    // 10 dB of 20: the line lies in the middle of the plot, air over it, land under it.
    expect(colourAt(400, 10 + 140)).toBe(PAPER_PALETTE.paper);
    // The pen is 1.6 px wide: its pixels are ink mixed with a little of what lies beside.
    expect(colourAt(400, 10 + 150)).toMatch(/^#[1-4].[2-5].[2-5].$/);
    expect(colourAt(400, 10 + 260)).toBe(PAPER_PALETTE.land);
  });
});

describe("a profile", () => {
  it("is well formed for a sweep, one point and none", () => {
    for (const count of [300, 1, 0]) {
      const markup = renderToStaticMarkup(<Profile points={points(count, () => 0.5)} dips={[chartDip()]} />);
      assertWellFormed(markup);
      expect(markup).not.toMatch(/NaN|Infinity/);
    }
  });

  it("has a dot for each dip inside its stretch", () => {
    const dips = [chartDip(), chartDip({ frequencyHz: 50e6 })];
    const markup = renderToStaticMarkup(<Profile points={points(300, () => 0.5)} dips={dips} />);
    expect(markup.match(/<circle/g)).toHaveLength(1);
  });
});

describe("the check of markup itself", () => {
  it("sees what is wrong", () => {
    for (const wrong of ["<a><b></a></b>", "<a>", "a & b", '<a x="1" x="2"/>', "<a>< b"]) {
      expect(() => assertWellFormed(wrong)).toThrow();
    }
  });
});
