import { describe, expect, it } from "vitest";
import {
  gammaOf,
  SMITH_RADIUS,
  smithGrid,
  smithLabels,
  smithSpot,
  swrRadius,
} from "../../app/charts/smith.ts";
import { windowIn } from "../../app/charts/smith-figure.ts";
import { smithTrace, traceTicks } from "../../app/charts/smith-trace.ts";
import { gammaToSwr } from "../../app/measurement/reflection.ts";
import { pathNumbers } from "./sample.ts";

/**
 * Truth: closed forms. A circle of resistance r has its middle at r/(1+r) and radius 1/(1+r), one of reactance x at 1 + j/x and 1/abs(x);
 * check values of Γ from REFERENCE section 2 (Z in 50 Ω).
 */
const GAMMAS: [number, number, number, number][] = [
  [0.5, 0, -1 / 3, 0],
  [2, 0, 1 / 3, 0],
  [1, 1, 0.2, 0.4],
  [1.46, 0.85, 0.273704, 0.250956],
  [0.7, -0.4, -0.114754, -0.262295],
  [4, -6, 0.836066, -0.196721],
  [0, 1, 0, 1],
];

describe("the plane of Γ", () => {
  it.each(GAMMAS)("puts z = %f + j%f where its Γ is", (r, x, re, im) => {
    const gamma = gammaOf(r, x);
    expect(gamma.re).toBeCloseTo(re, 6);
    expect(gamma.im).toBeCloseTo(im, 6);
    expect(smithSpot(gamma).x).toBeCloseTo(re * SMITH_RADIUS, 3);
    expect(smithSpot(gamma).y).toBeCloseTo(-im * SMITH_RADIUS, 3);
  });

  it("draws each arc of the grid on its circle, the short or the long way as it should", () => {
    const arcs = smithGrid();
    expect(arcs).toHaveLength(15);
    for (const { kind, value, path } of arcs) {
      for (const { x, y } of pointsOnArcs(path)) {
        const gamma = { re: x / SMITH_RADIUS, im: -y / SMITH_RADIUS };
        const middle = kind === "r" ? { re: value / (1 + value), im: 0 } : { re: 1, im: 1 / value };
        const radius = kind === "r" ? 1 / (1 + value) : 1 / Math.abs(value);
        expect(Math.hypot(gamma.re - middle.re, gamma.im - middle.im)).toBeCloseTo(radius, 3);
        expect(Math.hypot(gamma.re, gamma.im)).toBeLessThan(1.0005);
      }
    }
  });

  it("labels in ohms of the reference and draws the circle of an SWR where that SWR is", () => {
    expect(smithLabels(75).map(({ text }) => text)).toContain("−j150");
    expect(smithLabels(50).map(({ text }) => text)).toEqual(
      expect.arrayContaining(["10", "25", "50", "j250"]),
    );
    for (const swr of [1.5, 2, 3]) expect(gammaToSwr(swrRadius(swr) / SMITH_RADIUS)).toBeCloseTo(swr, 12);
  });
});

describe("the line over it", () => {
  it("lifts the pen at a gap, dashes what lies beyond the rim and counts it", () => {
    const re = [0, 0.5, Number.NaN, 0.9, 1.05, 0.9, 3];
    const trace = smithTrace({ frequencyHz: [1, 2, 3, 4, 5, 6, 7], re, im: re.map(() => 0) });
    expect(trace.over).toBe(2);
    expect(trace.inside.match(/M/g)).toHaveLength(3);
    expect(trace.outside.match(/M/g)).toHaveLength(2);
    for (const path of [trace.inside, trace.outside]) {
      for (const n of pathNumbers(path)) expect(Math.abs(n)).toBeLessThanOrEqual(230);
    }
    expect(smithTrace({ frequencyHz: [], re: [], im: [] })).toEqual({ inside: "", outside: "", over: 0 });
    expect(smithTrace({ frequencyHz: [1], re: [0.3], im: [0] }).inside).toContain("h0.01");
  });

  it("passes within a third of a unit of each point it left out", () => {
    const n = 5000;
    const angle = (i: number) => (2 * Math.PI * i) / n;
    const re = Array.from({ length: n }, (_, i) => 0.5 * Math.cos(angle(i)));
    const im = Array.from({ length: n }, (_, i) => 0.5 * Math.sin(angle(i)));
    const { inside } = smithTrace({ frequencyHz: re.map((_, i) => i), re, im });
    const numbers = pathNumbers(inside);
    expect(numbers.length / 2).toBeLessThan(1100);
    for (let i = 0; i < numbers.length; i += 2) {
      expect(Math.hypot(numbers[i], numbers[i + 1])).toBeCloseTo(100, 0);
    }
  });

  it("writes round frequencies at their place and keeps labels apart", () => {
    // Γ runs straight from −1 to 1 over 10 to 20 MHz: 12 MHz lies at −0.6.
    const frequencyHz = Array.from({ length: 101 }, (_, i) => 10e6 + i * 1e5);
    const re = frequencyHz.map((hz) => (hz - 15e6) / 5e6);
    const ticks = traceTicks({ frequencyHz, re, im: re.map(() => 0) }, 5);
    expect(ticks.map(({ label }) => label)).toEqual(["10", "12", "14", "16", "18", "20"]);
    expect(ticks[1].x).toBeCloseTo(-0.6 * SMITH_RADIUS, 6);
    expect(ticks[1].y).toBeCloseTo(0, 6);
    const crowded = traceTicks({ frequencyHz, re: re.map((x) => x / 50), im: re.map(() => 0) }, 10);
    expect(crowded.filter(({ shown }) => shown).length).toBeLessThan(3);
    expect(traceTicks({ frequencyHz: [1], re: [0], im: [0] }, 5)).toEqual([]);
  });

  it("zooms to the square that holds what was asked for, inside the whole", () => {
    const ask = (a: number, b: number, c: number, d: number) =>
      windowIn({ "xaxis.range[0]": a, "xaxis.range[1]": b, "yaxis.range[0]": c, "yaxis.range[1]": d });
    expect(ask(0, 0.2, 0, 0.1)).toEqual({ re: 0.1, im: 0.05, half: 0.1 });
    expect(ask(-5, 5, -5, 5)).toEqual({ re: 0, im: 0, half: 1.18 });
    expect(ask(1.1, 1.3, 0, 0.2)?.re).toBeCloseTo(1.08, 9);
    expect(windowIn({ "xaxis.range[0]": 1 })).toBeNull();
  });
});

/** Points along every arc of a path, by SVG's own rule for an arc's middle (SVG 1.1, appendix F.6.5; from memory, not seen). */
function pointsOnArcs(path: string) {
  const points: { x: number; y: number }[] = [];
  let [x, y] = [0, 0];
  for (const [, command, rest] of path.matchAll(/([MA])([^MA]*)/g)) {
    const n = pathNumbers(rest);
    if (command === "M") [x, y] = n;
    else {
      const [radius, , , large, sweep, toX, toY] = n;
      const half = { x: (x - toX) / 2, y: (y - toY) / 2 };
      const square = Math.max(0, radius ** 2 / (half.x ** 2 + half.y ** 2) - 1);
      const sign = large === sweep ? -1 : 1;
      const middle = {
        x: sign * Math.sqrt(square) * half.y + (x + toX) / 2,
        y: -sign * Math.sqrt(square) * half.x + (y + toY) / 2,
      };
      const from = Math.atan2(y - middle.y, x - middle.x);
      let turn = Math.atan2(toY - middle.y, toX - middle.x) - from;
      if (sweep && turn < 0) turn += 2 * Math.PI;
      if (!sweep && turn > 0) turn -= 2 * Math.PI;
      for (let k = 0; k <= 8; k++) {
        const angle = from + (turn * k) / 8;
        points.push({ x: middle.x + radius * Math.cos(angle), y: middle.y + radius * Math.sin(angle) });
      }
      [x, y] = [toX, toY];
    }
  }
  return points;
}
