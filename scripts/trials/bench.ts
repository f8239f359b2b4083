import type { Complex } from "../../app/measurement/reflection.ts";

/**
 * An antenna seen through an imperfect bench, in closed form: invented, and known to the last bit.
 *
 * The antenna is a series R-L-C behind a constant loss: Γ = a·(r−1+ju)/(r+1+ju), u = r·Q·(f/f0 − f0/f). The
 * bench shows Γm = D + (1+T)·Γ/(1−M·Γ) with constant sizes and phases that turn with frequency.
 */
export interface Scene {
  f0Hz: number;
  r: number;
  q: number;
  loss: number;
  directivity: Turning;
  tracking: Turning;
  match: Turning;
}

/** A vector whose phase turns steadily: `size`·e^j(phase + turn·(f − f0)/f0). */
export interface Turning {
  size: number;
  phase: number;
  turn: number;
}

export function antennaGamma({ f0Hz, r, q, loss }: Scene, hz: number): Complex {
  const u = r * q * (hz / f0Hz - f0Hz / hz);
  const power = (r + 1) ** 2 + u * u;
  return { re: (loss * (r * r - 1 + u * u)) / power, im: (loss * 2 * u) / power };
}

export function benchGamma(scene: Scene, hz: number): Complex {
  const gamma = antennaGamma(scene, hz);
  const at = (hz - scene.f0Hz) / scene.f0Hz;
  const [d, t, m] = [scene.directivity, scene.tracking, scene.match].map(({ size, phase, turn }) => ({
    re: size * Math.cos(phase + turn * at),
    im: size * Math.sin(phase + turn * at),
  }));
  const bottom = minus({ re: 1, im: 0 }, times(m, gamma));
  const power = bottom.re ** 2 + bottom.im ** 2;
  const share = times(gamma, { re: bottom.re / power, im: -bottom.im / power });
  const tracked = times({ re: 1 + t.re, im: t.im }, share);
  return { re: d.re + tracked.re, im: d.im + tracked.im };
}

/** The lowest abs Γ of a curve and where, and the edges at `level`; NaN where it does not get there. */
export interface Hollow {
  hz: number;
  magnitude: number;
  lowHz: number;
  highHz: number;
}

/** `at` has one lowest point within `reachHz` of `middleHz`, as far as a grid of 400 tells. */
export function hollowOf(
  at: (hz: number) => number,
  middleHz: number,
  reachHz: number,
  level: number,
): Hollow {
  const step = reachHz / GRID;
  let best = middleHz;
  for (let k = -GRID; k <= GRID; k++) if (at(middleHz + k * step) < at(best)) best = middleHz + k * step;
  const hz = lowestBetween(at, best - step, best + step);
  const edge = (direction: 1 | -1) => {
    if (at(hz) > level) return Number.NaN;
    let inside = hz;
    while (at(inside + direction * step) <= level) {
      inside += direction * step;
      if (Math.abs(inside - hz) > 4 * reachHz) return Number.NaN;
    }
    let outside = inside + direction * step;
    for (let i = 0; i < HALVINGS; i++) {
      const middle = (inside + outside) / 2;
      if (at(middle) <= level) inside = middle;
      else outside = middle;
    }
    return inside;
  };
  return { hz, magnitude: at(hz), lowHz: edge(-1), highHz: edge(1) };
}

/** Golden section search. */
function lowestBetween(at: (hz: number) => number, from: number, to: number): number {
  let [low, high] = [from, to];
  for (let i = 0; i < HALVINGS; i++) {
    const a = high - GOLDEN * (high - low);
    const b = low + GOLDEN * (high - low);
    if (at(a) < at(b)) high = b;
    else low = a;
  }
  return (low + high) / 2;
}

function times(a: Complex, b: Complex): Complex {
  return { re: a.re * b.re - a.im * b.im, im: a.re * b.im + a.im * b.re };
}

function minus(a: Complex, b: Complex): Complex {
  return { re: a.re - b.re, im: a.im - b.im };
}

const GRID = 100;
const HALVINGS = 40;
const GOLDEN = (Math.sqrt(5) - 1) / 2;
