import { describe, expect, test } from "vitest";
import { analyse } from "../../../app/measurement/analyse.ts";
import { slopeQ } from "../../../app/measurement/complex/slope-q.ts";
import { renormalise } from "../../../app/measurement/renormalise.ts";
import truth from "../../fixtures/measurement/nec-q/truth.json";
import { even, impedanceSweep, necSweep, seriesResonator } from "./sweeps.ts";

/**
 * Truth: a series resonator's own Q; NEC-2 (decks beside the fixtures, tests/reference/nec_slope_q.py) with scipy's splines for the
 * slope and for the matched 2:1 band. REFERENCE section 3 has the first two from another run: dipole 10.36, monopole 8.29.
 */
const decks = import.meta.glob("../../fixtures/measurement/nec-q/*.csv", {
  query: "?raw",
  import: "default",
  eager: true,
}) as Record<string, string>;

describe("Q by slope", () => {
  test.each([3, 12, 80, 400])("a series resonator of Q %i", (q) => {
    const span = (14.15e6 * 3) / q;
    const sweep = impedanceSweep(even(14.15e6 - span, 14.15e6 + span, 601), seriesResonator(30, q, 14.15e6));
    const slope = slopeQ(sweep, 14.15e6);
    // The 1/f in a resonator's reactance is no parabola: at Q 3 that makes 0.2 %.
    expect(Math.abs((slope?.q ?? 0) / q - 1)).toBeLessThan(0.02 / q ** 2 + 1e-5);
    expect(slope?.resistanceOhm).toBeCloseTo(30, 6);
    expect((slope?.reactanceSlope ?? 0) / ((2 * 30 * q) / 14.15e6)).toBeCloseTo(1, 2);
    // Above resonance a series capacitor would tune it: Q of the tuned antenna is f/(2R)·(X' + X/f) = Q·f/f0, from X = RQ(f/f0 − f0/f).
    const hz = 14.15e6 * (1 + 0.3 / q);
    expect((slopeQ(sweep, hz)?.q ?? 0) / ((q * hz) / 14.15e6)).toBeCloseTo(1, 2);
  });

  test("ten NEC-2 antennas: against scipy's slope within 1 %, against the fitted Q within 3 %", () => {
    const rows = Object.entries(truth).map(([name, known]) => {
      const sweep = necSweep(decks[`../../fixtures/measurement/nec-q/${name}.csv`]);
      const slope = slopeQ(sweep, known.zeroMhz * 1e6)?.q ?? Number.NaN;
      const matched = renormalise(sweep, known.ohm);
      const scalar = { ...matched, gammaRe: undefined, gammaIm: undefined };
      const dip = analyse(scalar).dips.find(({ edge }) => !edge);
      return { name, slope, scipy: known.slopeQ, band: known.bandQ, fitted: dip?.q ?? Number.NaN };
    });
    for (const { name, slope, scipy, fitted } of rows) {
      expect(Math.abs(slope / scipy - 1), name).toBeLessThan(0.01);
      expect(Math.abs(slope / fitted - 1), name).toBeLessThan(0.03);
    }
    expect(rows).toHaveLength(10);
    if (process.env.SHOW_TABLE) process.stdout.write(tableOf(rows));
  });

  test("under noise the interval covers the truth, and narrows with less of it", () => {
    for (const sigma of [0.0005, 0.005]) {
      let covered = 0;
      const trials = 500;
      for (let start = 1; start <= trials; start++) {
        const sweep = impedanceSweep(even(13e6, 15.3e6, 301), seriesResonator(40, 12, 14.15e6), {
          sigma,
          start,
        });
        const slope = slopeQ(sweep, 14.15e6);
        if (slope && Math.abs(slope.q - 12) <= slope.halfWidth) covered++;
      }
      expect(covered / trials).toBeGreaterThan(0.92);
    }
    const half = (sigma: number) =>
      slopeQ(impedanceSweep(even(13e6, 15.3e6, 301), seriesResonator(40, 12, 14.15e6), { sigma }), 14.15e6)
        ?.halfWidth ?? 0;
    expect(half(0.0005)).toBeLessThan(half(0.005) / 3);
  });

  test("null without phase, outside, beside a gap, in a few points, and for no resistance", () => {
    const sweep = impedanceSweep(even(13e6, 15e6, 201), seriesResonator(50, 10, 14e6));
    expect(slopeQ({ ...sweep, gammaRe: undefined, gammaIm: undefined }, 14e6)).toBeNull();
    expect(slopeQ(sweep, 12.9e6)).toBeNull();
    expect(slopeQ(sweep, Number.NaN)).toBeNull();
    expect(slopeQ(impedanceSweep(even(13e6, 15e6, 2), seriesResonator(50, 10, 14e6)), 14e6)).toBeNull();
    expect(
      slopeQ(
        impedanceSweep(even(13e6, 15e6, 201), (hz) => ({ re: 0, im: hz / 1e6 })),
        14e6,
      ),
    ).toBeNull();
    const gap = { ...sweep, gammaRe: sweep.gammaRe?.slice() };
    gap.gammaRe?.fill(Number.NaN, 100, 101);
    expect(slopeQ(gap, 14e6)).toBeNull();
  });
});

interface Row {
  name: string;
  slope: number;
  scipy: number;
  band: number;
  fitted: number;
}

function tableOf(rows: Row[]): string {
  const line = (...cells: string[]) =>
    `${cells[0].padEnd(17)}${cells
      .slice(1)
      .map((cell) => cell.padStart(11))
      .join("")}\n`;
  const number = (value: number) => value.toFixed(3);
  return (
    line("antenna", "slope", "scipy", "fitted", "band", "slope/fit") +
    rows
      .map((row) =>
        line(
          row.name,
          number(row.slope),
          number(row.scipy),
          number(row.fitted),
          number(row.band),
          number(row.slope / row.fitted),
        ),
      )
      .join("")
  );
}
