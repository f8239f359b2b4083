/** The line of a sweep with phase over the plane of Γ, and the frequencies written along it. */
import { niceStep } from "./axis.ts";
import { SMITH_RADIUS, type Spot, smithSpot } from "./smith.ts";

export interface ComplexPoints {
  /** Hz, ascending. */
  frequencyHz: ArrayLike<number>;
  /** Γ; NaN is a gap. */
  re: ArrayLike<number>;
  im: ArrayLike<number>;
}

export interface SmithTrace {
  /** Within the rim, and beyond it (abs Γ over 1), where the line is dashed. */
  inside: string;
  outside: string;
  /** Points with abs Γ over 1. */
  over: number;
}

/** Points nearer than STILL to the last drawn one are left out; a gap lifts the pen; far beyond the rim the line is held back. */
export function smithTrace({ re, im }: ComplexPoints): SmithTrace {
  const trace = { inside: "", outside: "", over: 0 };
  let last: Spot | null = null;
  let pen: "inside" | "outside" | null = null;
  for (let i = 0; i < re.length; i++) {
    const size = Math.hypot(re[i], im[i]);
    if (!Number.isFinite(size)) {
      last = null;
      pen = null;
      continue;
    }
    if (size > 1) trace.over++;
    const held = size > FARTHEST ? FARTHEST / size : 1;
    const spot = smithSpot({ re: re[i] * held, im: im[i] * held });
    const ends = i === re.length - 1 || Number.isNaN(re[i + 1]);
    const into = size > 1 + ON_RIM ? "outside" : "inside";
    if (last && !ends && into === pen && Math.hypot(spot.x - last.x, spot.y - last.y) < STILL) continue;
    // The first point beyond the rim still belongs to the line within, so that no gap is left.
    if (last && pen !== into) trace[into] += `M${at(last)}L${at(spot)}`;
    else trace[into] += `${last ? "L" : "M"}${at(spot)}${last || !ends ? "" : "h0.01"}`;
    pen = into;
    last = spot;
  }
  return trace;
}

export interface TraceTick extends Spot {
  hz: number;
  label: string;
  /** Unit vector across the line, away from the middle of the plane's right or left half. */
  across: Spot;
  /** False where the label would lie on another. */
  shown: boolean;
}

/**
 * Round frequencies along the trace, about `most` of them; `taken` are places that labels keep clear of. Seen `zoom` times larger,
 * labels of the same size need so much less of the drawing.
 */
export function traceTicks(
  points: ComplexPoints,
  most: number,
  taken: readonly Spot[] = [],
  zoom = 1,
): TraceTick[] {
  const { frequencyHz } = points;
  const n = frequencyHz.length;
  if (n < 2) return [];
  const [fromHz, toHz] = [frequencyHz[0], frequencyHz[n - 1]];
  const step = niceStep((toHz - fromHz) / most);
  const decimals = Math.max(0, 6 - Math.floor(Math.log10(step) + 1e-9));
  const labelled: Spot[] = [...taken];
  const ticks: TraceTick[] = [];
  let right = 1;
  for (let k = Math.ceil(fromHz / step - 1e-9); k * step <= toHz * (1 + 1e-12); k++) {
    const hz = k * step;
    while (right < n - 1 && frequencyHz[right] < hz) right++;
    const spot = spotAt(points, right, hz);
    if (!spot) continue;
    const across = acrossAt(points, right, spot);
    const place = { x: spot.x + (across.x * LABEL_AWAY) / zoom, y: spot.y + (across.y * LABEL_AWAY) / zoom };
    const shown =
      labelled.every((other) => clear(place, other, zoom)) &&
      Math.hypot(place.x, place.y) < SMITH_RADIUS * 1.12;
    if (shown) labelled.push(place);
    ticks.push({ ...spot, hz, label: (hz / 1e6).toFixed(decimals), across, shown });
  }
  return ticks;
}

function spotAt({ frequencyHz, re, im }: ComplexPoints, right: number, hz: number): Spot | null {
  const span = frequencyHz[right] - frequencyHz[right - 1];
  const share = span > 0 ? (hz - frequencyHz[right - 1]) / span : 0;
  const gamma = {
    re: re[right - 1] + share * (re[right] - re[right - 1]),
    im: im[right - 1] + share * (im[right] - im[right - 1]),
  };
  return Number.isNaN(gamma.re + gamma.im) || Math.hypot(gamma.re, gamma.im) > FARTHEST
    ? null
    : smithSpot(gamma);
}

function acrossAt({ re, im }: ComplexPoints, right: number, spot: Spot): Spot {
  const [dx, dy] = [re[right] - re[right - 1], im[right - 1] - im[right]];
  const size = Math.hypot(dx, dy);
  const normal = size > 0 ? { x: -dy / size, y: dx / size } : { x: 0, y: -1 };
  // Inwards where the line runs along the rim, else away from the middle.
  const outwards = normal.x * spot.x + normal.y * spot.y >= 0;
  const wanted = Math.hypot(spot.x, spot.y) < SMITH_RADIUS * NEAR_RIM;
  return outwards === wanted ? normal : { x: -normal.x, y: -normal.y };
}

function clear(a: Spot, b: Spot, zoom: number): boolean {
  return Math.abs(a.x - b.x) * zoom > LABEL_WIDTH || Math.abs(a.y - b.y) * zoom > LABEL_HEIGHT;
}

function at({ x, y }: Spot): string {
  return `${Math.round(x * 10) / 10} ${Math.round(y * 10) / 10}`;
}

/** Of the radius: noise and calibration errors seen on real sweeps stay below 1.1. */
const FARTHEST = 1.15;
const ON_RIM = 1e-6;
const STILL = 0.6;
const NEAR_RIM = 0.85;
const LABEL_AWAY = 15;
const LABEL_WIDTH = 40;
const LABEL_HEIGHT = 15;
