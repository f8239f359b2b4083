import { NORMAL_95 } from "../uncertainty.ts";

/** The vertex of a parabola through three points. */
export interface Vertex {
  x: number;
  y: number;
}

/**
 * The vertex of the parabola through three points with any spacing; null when they lie on a line or curve
 * the wrong way for a maximum, or when one is not finite. With the middle one the highest the vertex lies
 * between the outer ones. Lagrange's form of the interpolating polynomial.
 */
export function parabolaTop(x: readonly number[], y: readonly number[]): Vertex | null {
  const [left, right] = [x[0] - x[1], x[2] - x[1]];
  const [below, above] = [(y[0] - y[1]) / left, (y[2] - y[1]) / right];
  const bend = (above - below) / (right - left);
  if (!(bend < 0) || !Number.isFinite(bend)) return null;
  const slope = below - bend * left;
  const at = -slope / (2 * bend);
  return { x: x[1] + at, y: y[1] + slope * at + bend * at * at };
}

export interface ParabolaDip {
  frequencyHz: number;
  returnLossDb: number;
  /**
   * 95 % half-widths: noise carried through the parabola, and what another choice of ordinate gives,
   * combined.
   */
  frequencyHalfHz: number;
  returnLossHalfDb: number;
  /** Of the square of that of the return loss: what the frequency step adds. */
  stepShare: number;
}

/**
 * The dip by three points of return loss around sample `index`, which must have a neighbour on each side.
 * `noise`: σ in dB. Null when there is no vertex, as on a plateau, or when its bend may be scatter. The
 * part for the frequency step is the largest distance to the vertex by another choice: the reflected power
 * as ordinate, or samples twice as far away (whose error is about four times that of the near ones, as it
 * goes with the square of the step).
 */
export function parabolaDip(
  f: Float64Array,
  magnitude: Float64Array,
  index: number,
  noise: number,
): ParabolaDip | null {
  const { x, loss } = around(f, magnitude, index, 1);
  const top = parabolaTop(x, loss);
  if (!top || loss[1] - (loss[0] + loss[2]) / 2 < CLEAR_OF_NOISE * noise) return null;
  const step = stepPart(f, magnitude, index, top);
  let frequency = step.x ** 2;
  let depth = step.y ** 2 + (top.y - loss[1]) ** 2;
  for (let i = 0; i < 3 && noise > 0; i++) {
    const shifted = [...loss];
    shifted[i] -= noise * SMALL;
    const moved = parabolaTop(x, shifted);
    if (!moved) continue;
    frequency += (((moved.x - top.x) / SMALL) * NORMAL_95) ** 2;
    depth += (((moved.y - top.y) / SMALL) * NORMAL_95) ** 2;
  }
  return {
    frequencyHz: top.x,
    returnLossDb: top.y,
    frequencyHalfHz: Math.min((x[2] - x[0]) / 2, Math.sqrt(frequency)),
    returnLossHalfDb: Math.sqrt(depth),
    stepShare: depth > 0 ? (step.y ** 2 + (top.y - loss[1]) ** 2) / depth : 0,
  };
}

function stepPart(f: Float64Array, magnitude: Float64Array, index: number, vertex: Vertex): Vertex {
  const { x, power, loss } = around(f, magnitude, index, 1);
  const byPower = parabolaTop(
    x,
    power.map((p) => -p),
  );
  const wide = around(f, magnitude, index, 2);
  const known = [
    byPower && { x: byPower.x, y: byPower.y < 0 ? -10 * Math.log10(-byPower.y) : loss[1] },
    parabolaTop(wide.x, wide.loss),
  ].filter((one) => one !== null);
  if (known.length === 0) return { x: (x[2] - x[0]) / 2, y: vertex.y - loss[1] };
  return {
    x: Math.max(...known.map((one) => Math.abs(one.x - vertex.x))),
    y: Math.max(...known.map((one) => Math.abs(one.y - vertex.y))),
  };
}

function around(f: Float64Array, magnitude: Float64Array, index: number, reach: number) {
  const at = [index - reach, index, index + reach];
  const power = at.map((i) => magnitude[i] ** 2);
  return { x: at.map((i) => f[i]), power, loss: power.map((p) => -10 * Math.log10(p)) };
}

/** In σ: the middle of three scattered points on a line stands out by this in 1 of 1,000. */
const CLEAR_OF_NOISE = 4;
/** Share of σ by which a point is moved to see the effect. */
const SMALL = 1e-2;
