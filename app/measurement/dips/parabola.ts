/** The vertex of a parabola through three points. */
export interface Vertex {
  x: number;
  y: number;
}

/**
 * The vertex of the parabola through three points with any spacing; null when they lie on a line or curve the wrong way
 * for a maximum, or when one is not finite. With the middle one the highest the vertex lies between the outer ones.
 * Lagrange's form of the interpolating polynomial.
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
  /** 95 % half-widths: noise carried through the parabola, and what another choice of ordinate gives, combined. */
  frequencyHalfHz: number;
  returnLossHalfDb: number;
}

/**
 * The dip by three points of return loss around sample `index`, which must have a neighbour on each side. `noise`: σ in dB. The part for
 * the frequency step is the distance between the vertex of return loss and that of the reflected power, as
 * the true curve lies between them near a dip. Null when there is no vertex, as
 * on a plateau, or when its bend may be scatter.
 */
export function parabolaDip(
  f: Float64Array,
  magnitude: Float64Array,
  index: number,
  noise: number,
): ParabolaDip | null {
  const at = [index - 1, index, index + 1];
  const x = at.map((i) => f[i]);
  const power = at.map((i) => magnitude[i] ** 2);
  const loss = power.map((p) => -10 * Math.log10(p));
  const top = parabolaTop(x, loss);
  if (!top || loss[1] - (loss[0] + loss[2]) / 2 < CLEAR_OF_NOISE * noise) return null;
  const other = parabolaTop(
    x,
    power.map((p) => -p),
  );
  let frequency = other ? (other.x - top.x) ** 2 : ((x[2] - x[0]) / 4) ** 2;
  let depth = other && other.y < 0 ? (top.y + 10 * Math.log10(-other.y)) ** 2 : (top.y - loss[1]) ** 2;
  const sigma = noise * NORMAL_95;
  for (let i = 0; i < 3 && sigma > 0; i++) {
    const shifted = [...loss];
    shifted[i] -= noise * SMALL;
    const moved = parabolaTop(x, shifted);
    if (!moved) continue;
    frequency += (((moved.x - top.x) / SMALL) * NORMAL_95) ** 2;
    depth += (((moved.y - top.y) / SMALL) * NORMAL_95) ** 2;
  }
  const span = (x[2] - x[0]) / 2;
  return {
    frequencyHz: top.x,
    returnLossDb: top.y,
    frequencyHalfHz: Math.min(span, Math.sqrt(frequency)),
    returnLossHalfDb: Math.sqrt(depth),
  };
}

const NORMAL_95 = 1.959963984540054;
/** In σ: the middle of three scattered points on a line stands out by this in 1 of 1,000. */
const CLEAR_OF_NOISE = 4;
/** Share of σ by which a point is moved to see the effect. */
const SMALL = 1e-2;
