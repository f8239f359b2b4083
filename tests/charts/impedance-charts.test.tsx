import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import { frequencyScale } from "../../app/charts/axis.ts";
import { ImpedanceChart } from "../../app/charts/ImpedanceChart.tsx";
import { degreeAxis, ohmAxis } from "../../app/charts/impedance-axis.ts";
import { PhaseChart } from "../../app/charts/PhaseChart.tsx";
import { SmithChart } from "../../app/charts/SmithChart.tsx";
import { packComplex, unpackComplex } from "../../app/charts/sent-complex.ts";
import { assertWellFormed } from "./markup.ts";
import { chartDip } from "./sample.ts";

/** Truth: the axes' own promises (zero where it should be, order, room between labels) and markup that holds no NaN. */
const scale = frequencyScale("linear", 1e6, 3e6);
const frequencyHz = [1e6, 2e6, 3e6];

describe("axes", () => {
  it("ohms: in order, room between labels, nothing drawn off the scale up to its ends", () => {
    const { yOf, ticks } = ohmAxis(
      [
        [10, 3000],
        [-700, 40],
      ],
      50,
      220,
    );
    expect(ticks.map(({ label }) => label)).toContain("0");
    expect(ticks.at(-1)?.label).toBe("5000 Ω");
    for (let i = 1; i < ticks.length; i++) expect(ticks[i - 1].y - ticks[i].y).toBeGreaterThanOrEqual(15);
    expect(yOf(3000)).toBeGreaterThan(0);
    expect(yOf(-700)).toBeLessThan(220);
    expect(yOf(5000)).toBeCloseTo(0, 9);
    expect(ohmAxis([[]], 50, 220).ticks.length).toBeGreaterThan(0);
    expect(ohmAxis([[5, 20]], 50, 220).yOf(0)).toBeCloseTo(220, 9);
  });

  it("degrees: steps of a part of a turn over whatever was turned", () => {
    expect(degreeAxis([[-170, 170]], 130).ticks.map(({ label }) => label)).toEqual(
      expect.arrayContaining(["180°", "0°", "−180°"]),
    );
    const many = degreeAxis([[-4000, 100]], 130).ticks;
    expect(many.length).toBeLessThan(9);
    expect(degreeAxis([[20, 20]], 130).ticks.length).toBeGreaterThan(1);
    expect(degreeAxis([[Number.NaN]], 130).ticks.every(({ y }) => Number.isFinite(y))).toBe(true);
  });
});

describe("the drawings", () => {
  it("are well formed, without NaN, for gaps, infinities, one point and none", () => {
    const odd: [number[], number[]][] = [
      [
        [30, 50, 70],
        [-10, 0, 10],
      ],
      [
        [Number.NaN, Number.POSITIVE_INFINITY, 70],
        [Number.NaN, 0, 10],
      ],
      [[30], [5]],
      [[], []],
    ];
    for (const [resistanceOhm, reactanceOhm] of odd) {
      const hz = frequencyHz.slice(0, resistanceOhm.length);
      const markup = renderToStaticMarkup(
        <>
          <ImpedanceChart
            {...{ resistanceOhm, reactanceOhm, scale }}
            frequencyHz={hz}
            referenceOhm={50}
            marksHz={[2e6]}
            label="R and X"
          />
          <PhaseChart frequencyHz={hz} phaseDeg={reactanceOhm} scale={scale} marksHz={[]} label="Phase" />
          <SmithChart
            points={{ frequencyHz: hz, re: resistanceOhm.map((r) => r / 100), im: reactanceOhm }}
            dips={[]}
            referenceOhm={50}
            swrLimit={2}
            label="Plane"
          />
        </>,
      );
      assertWellFormed(markup);
      expect(markup).not.toMatch(/NaN|Infinity/);
    }
  });

  it("the plane's dips are links with spoken numbers, and zooming keeps their size", () => {
    const one = { dip: chartDip({ noteCount: 2 }), gamma: { re: -0.1, im: 0.05 } };
    const common = { dips: [one], referenceOhm: 50, swrLimit: 2, label: "Plane", dipHref: () => "?dip=a" };
    const points = { frequencyHz, re: [0.5, -0.1, 0.5], im: [-0.5, 0.05, 0.5] };
    const markup = renderToStaticMarkup(<SmithChart points={points} {...common} />);
    expect(markup).toContain('href="?dip=a"');
    expect(markup).toMatch(/aria-label="Dip at 7.1000 megahertz/);
    expect(markup).toContain("translate(-20 -10) scale(1)");
    const near = renderToStaticMarkup(
      <SmithChart points={points} {...common} window={{ re: -0.1, im: 0.05, half: 0.118 }} />,
    );
    expect(near).toContain("scale(0.1)");
    expect(near).toContain('viewBox="-43.6 -33.6 47.2 47.2"');
  });

  it("points survive the way to the page", () => {
    const sent = packComplex({
      frequencyHz: Float64Array.of(14_074_000.123, 14_074_001.5),
      re: Float64Array.of(0.25, Number.NaN),
      im: Float64Array.of(-0.5, 0),
      phaseDeg: Float64Array.of(-360.5, 0),
    });
    const back = unpackComplex(sent);
    expect(back.frequencyHz[0]).toBe(14_074_000.123);
    expect(back.re[0]).toBe(0.25);
    expect(back.re[1]).toBeNaN();
    expect(back.phaseDeg[0]).toBe(-360.5);
  });
});
