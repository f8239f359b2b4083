import { type Interval, student95, swrInterval } from "../uncertainty.ts";

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
   * 95 % half-width: noise carried through the parabola, and what another choice of ordinate gives,
   * combined.
   */
  frequencyHalfHz: number;
  /** 95 % interval of the lowest SWR. */
  swr: Interval;
  /** Of the square of its half-width downwards: what the frequency step adds. */
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
  let frequency = (COVER * step.x) ** 2;
  let depth = 0;
  for (let i = 0; i < 3 && noise > 0; i++) {
    const shifted = [...loss];
    shifted[i] -= noise * SMALL;
    const moved = parabolaTop(x, shifted);
    if (!moved) continue;
    frequency += (((moved.x - top.x) / SMALL) * COVER) ** 2;
    depth += (((moved.y - top.y) / SMALL) * COVER) ** 2;
  }
  return {
    frequencyHz: top.x,
    returnLossDb: top.y,
    frequencyHalfHz: Math.min((x[2] - x[0]) / 2, Math.sqrt(frequency)),
    ...limitsOf(top.y, step.power, Math.sqrt(depth), loss[1] - COVER * noise),
  };
}

/**
 * The interval of the lowest SWR, in abs Γ². The distance to another choice tells the size of the step's error
 * as a standard deviation does. Downwards the vertex of the power may lie under 0: then SWR 1. Upwards no further than the lowest sample (`sampleDb`, scatter
 * included): the dip is no higher.
 */
function limitsOf(lossDb: number, stepPower: number, noiseDb: number, sampleDb: number) {
  const power = 10 ** (-lossDb / 10);
  const step = COVER * stepPower;
  const noise = { down: power * (1 - 10 ** (-noiseDb / 10)), up: power * (10 ** (noiseDb / 10) - 1) };
  const most = Math.max(power, 10 ** (-sampleDb / 10));
  const up = Math.min(most - power, Math.hypot(noise.up, step));
  const down = Math.hypot(noise.down, step);
  const swr = swrInterval(power, down, up) ?? { low: 1, high: Number.POSITIVE_INFINITY };
  return { swr, stepShare: down > 0 ? (step / down) ** 2 : 0 };
}

function stepPart(f: Float64Array, magnitude: Float64Array, index: number, vertex: Vertex) {
  const { x, power } = around(f, magnitude, index, 1);
  const byPower = parabolaTop(
    x,
    power.map((p) => -p),
  );
  const wide = around(f, magnitude, index, 2);
  const far = parabolaTop(wide.x, wide.loss);
  const known = [
    byPower && { x: byPower.x, power: -byPower.y },
    far && { x: far.x, power: 10 ** (-far.y / 10) },
  ].filter((one) => one !== null);
  const lowest = 10 ** (-vertex.y / 10);
  if (known.length === 0) return { x: (x[2] - x[0]) / 2, power: lowest };
  return {
    x: Math.max(...known.map((one) => Math.abs(one.x - vertex.x))),
    power: Math.max(...known.map((one) => Math.abs(one.power - lowest))),
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
/**
 * Half-width over standard deviation: what the step adds is told by two distances, and where noise counts an
 * unlucky estimate of σ from few samples kept a fit away. Two degrees of freedom.
 */
const COVER = student95(2);
