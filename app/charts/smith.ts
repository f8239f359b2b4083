/**
 * The plane of Γ as it is drawn: a disc of radius `SMITH_RADIUS` about the origin, Γ's imaginary part upwards, and on it the
 * circles of even resistance and reactance (P. H. Smith, Electronics 12(1), 29-31, 1939; from memory, not seen): r lies on a circle
 * about r/(1+r) of radius 1/(1+r), x on one about 1 + j/x of radius 1/abs(x), both in units of the reference.
 */
import type { Complex } from "../measurement/reflection.ts";

export const SMITH_RADIUS = 200;

export interface Spot {
  x: number;
  y: number;
}

/** Γ → a place on the drawing. */
export function smithSpot({ re, im }: Complex): Spot {
  return { x: re * SMITH_RADIUS, y: -im * SMITH_RADIUS };
}

/** z = r + jx in units of the reference → Γ. */
export function gammaOf(r: number, x: number): Complex {
  const below = (r + 1) ** 2 + x * x;
  return { re: (r * r - 1 + x * x) / below, im: (2 * x) / below };
}

export interface GridArc {
  kind: "r" | "x";
  /** In units of the reference. */
  value: number;
  path: string;
}

/** The grid, thinned towards the right, where all circles meet: each is drawn as far as its neighbours leave it room. */
export function smithGrid(): GridArc[] {
  const arcs: GridArc[] = RESISTANCES.map(({ value, reach }) => ({
    kind: "r",
    value,
    path:
      reach === Infinity
        ? circlePath(value)
        : arcPath(gammaOf(value, -reach), gammaOf(value, reach), 1 / (1 + value), value, reach),
  }));
  for (const { value, reach } of REACTANCES) {
    for (const x of [value, -value]) {
      const end = reach === Infinity ? { re: 1, im: 0 } : gammaOf(reach, x);
      arcs.push({ kind: "x", value: x, path: shortArc(gammaOf(0, x), end, 1 / value, x > 0 ? 0 : 1) });
    }
  }
  return arcs;
}

export interface GridLabel extends Spot {
  text: string;
  /** Where the text begins to stand from its spot. */
  anchor: "start" | "middle" | "end";
}

/** Ω along the real axis and around the rim. */
export function smithLabels(referenceOhm: number): GridLabel[] {
  const ohms = (value: number) => String(Number((value * referenceOhm).toPrecision(3)));
  const onAxis = RESISTANCES.map(({ value }) => {
    const { x } = smithSpot(gammaOf(value, 0));
    return { x: x + 3, y: -4, text: ohms(value), anchor: "start" as const };
  });
  const onRim = REACTANCES.flatMap(({ value }) =>
    [value, -value].map((x) => {
      const gamma = gammaOf(0, x);
      const spot = smithSpot({ re: gamma.re * RIM_LABEL, im: gamma.im * RIM_LABEL });
      const anchor = Math.abs(gamma.re) < 0.3 ? "middle" : gamma.re < 0 ? "end" : "start";
      return { x: spot.x, y: spot.y + 4, text: `${x < 0 ? "−" : ""}j${ohms(value)}`, anchor } as const;
    }),
  );
  return [...onAxis, ...onRim];
}

/** The circle of an SWR about the middle: its radius. */
export function swrRadius(swr: number): number {
  return ((swr - 1) / (swr + 1)) * SMITH_RADIUS;
}

function circlePath(r: number): string {
  const radius = round(SMITH_RADIUS / (1 + r));
  const left = round(smithSpot(gammaOf(r, 0)).x);
  return `M${left} 0A${radius} ${radius} 0 1 1 ${SMITH_RADIUS} 0A${radius} ${radius} 0 1 1 ${left} 0`;
}

/** A circle of resistance from −reach to +reach by way of the real axis, on its left. */
function arcPath(from: Complex, to: Complex, radius: number, r: number, reach: number): string {
  // More than half of the circle once its ends lie right of its middle.
  const large = gammaOf(r, reach).re > r / (1 + r) ? 1 : 0;
  return segment(from, to, radius, large, 1);
}

function shortArc(from: Complex, to: Complex, radius: number, sweep: number): string {
  return segment(from, to, radius, 0, sweep);
}

function segment(from: Complex, to: Complex, radius: number, large: number, sweep: number): string {
  const [a, b] = [smithSpot(from), smithSpot(to)];
  const size = round(radius * SMITH_RADIUS);
  return `M${round(a.x)} ${round(a.y)}A${size} ${size} 0 ${large} ${sweep} ${round(b.x)} ${round(b.y)}`;
}

function round(value: number): number {
  return Math.round(value * 100) / 100 || 0;
}

/** Values of even resistance with the reactance up to which each is drawn. */
const RESISTANCES = [
  { value: 0.2, reach: 2 },
  { value: 0.5, reach: 2 },
  { value: 1, reach: Infinity },
  { value: 2, reach: 5 },
  { value: 5, reach: Infinity },
];
/** Values of even reactance, both signs, with the resistance up to which each is drawn. */
const REACTANCES = [
  { value: 0.2, reach: 1 },
  { value: 0.5, reach: 2 },
  { value: 1, reach: 5 },
  { value: 2, reach: 5 },
  { value: 5, reach: Infinity },
];
const RIM_LABEL = 1.045;
