/**
 * A closed-form antenna: series resonators in parallel, Z_i = R_i (1 + jQ_i (f/f_i - f_i/f)). All of it is invented data.
 */

export interface Element {
  mhz: number;
  ohm: number;
  q: number;
}

export interface Model {
  elements: Element[];
  startMhz: number;
  stopMhz: number;
  points: number;
  referenceOhm: number;
}

export interface Point {
  mhz: number;
  re: number;
  im: number;
  r: number;
  x: number;
}

export interface TruthDip {
  mhz: number;
  swr: number;
  return_loss_db: number;
  prominence_db: number;
  low_mhz: number | null;
  high_mhz: number | null;
}

export const HF: Model = {
  elements: [
    { mhz: 7.12, ohm: 42, q: 11 },
    { mhz: 13.9, ohm: 63, q: 14 },
  ],
  startMhz: 5,
  stopMhz: 16,
  points: 276,
  referenceOhm: 50,
};
export const VHF: Model = {
  elements: [{ mhz: 145.3, ohm: 38, q: 16 }],
  startMhz: 130,
  stopMhz: 160,
  points: 151,
  referenceOhm: 50,
};
export const UHF: Model = {
  elements: [{ mhz: 433.2, ohm: 61, q: 24 }],
  startMhz: 410,
  stopMhz: 460,
  points: 126,
  referenceOhm: 50,
};
export const TOPBAND: Model = {
  elements: [{ mhz: 1.86, ohm: 33, q: 22 }],
  startMhz: 1.7,
  stopMhz: 2.05,
  points: 141,
  referenceOhm: 50,
};

/** The model at one frequency: Γ in its reference, and Z. */
export function at({ elements, referenceOhm: z0 }: Model, mhz: number): Point {
  let g = 0;
  let b = 0;
  for (const { mhz: f0, ohm, q } of elements) {
    const u = q * (mhz / f0 - f0 / mhz);
    const below = ohm * (1 + u * u);
    g += 1 / below;
    b -= u / below;
  }
  const r = g / (g * g + b * b);
  const x = -b / (g * g + b * b);
  const below = (r + z0) ** 2 + x * x;
  return { mhz, r, x, re: (r * r - z0 * z0 + x * x) / below, im: (2 * z0 * x) / below };
}

export function points(model: Model): Point[] {
  const step = (model.stopMhz - model.startMhz) / (model.points - 1);
  return Array.from({ length: model.points }, (_, i) =>
    at(model, Number((model.startMhz + i * step).toFixed(9))),
  );
}

export const magnitude = ({ re, im }: { re: number; im: number }) => Math.hypot(re, im);
export const s11Db = (p: Point) => 20 * Math.log10(magnitude(p));
export const swr = (p: Point) => (1 + magnitude(p)) / (1 - magnitude(p));
export const angleDeg = ({ re, im }: { re: number; im: number }) => (Math.atan2(im, re) * 180) / Math.PI;

const DENSE = 40_000;

/** Dips of the model between its ends, from a dense evaluation of the closed form; edges at SWR 2. */
export function dips(model: Model): TruthDip[] {
  const step = (model.stopMhz - model.startMhz) / DENSE;
  const grid = Array.from({ length: DENSE + 1 }, (_, i) => model.startMhz + i * step);
  const m = grid.map((f) => magnitude(at(model, f)));
  const found: TruthDip[] = [];
  for (let i = 1; i < DENSE; i++) {
    if (!(m[i] < m[i - 1] && m[i] <= m[i + 1])) continue;
    const crest = (direction: number) => {
      let most = 0;
      for (let k = i; k >= 0 && k <= DENSE && m[k] >= m[i]; k += direction) most = Math.max(most, m[k]);
      return most;
    };
    const depth = 20 * Math.log10(Math.min(crest(1), crest(-1)) / m[i]);
    if (depth < 2) continue;
    const edge = (direction: number) => {
      if (m[i] > 1 / 3) return null;
      let k = i;
      while (k >= 0 && k <= DENSE && m[k] <= 1 / 3) k += direction;
      return k < 0 || k > DENSE ? null : grid[k];
    };
    found.push({
      mhz: grid[i],
      swr: (1 + m[i]) / (1 - m[i]),
      return_loss_db: -20 * Math.log10(m[i]),
      prominence_db: depth,
      low_mhz: edge(-1),
      high_mhz: edge(1),
    });
  }
  return found;
}
