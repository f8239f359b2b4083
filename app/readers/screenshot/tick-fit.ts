import type { Candidate } from "./figures.ts";

/** A printed label with its place along an axis. */
export interface Tick {
  /** Pixels along the axis. */
  position: number;
  candidates: Candidate[];
}

export interface TickFit {
  scale: "linear" | "log";
  /** Value, or its decimal logarithm, at a pixel: intercept + slope · position. */
  intercept: number;
  slope: number;
  /** Labels that agree, and all that had a number. */
  inliers: number;
  total: number;
  /** Sum of the weights of those that agree. */
  weight: number;
  /** Pixels, root mean square over the labels that agree. */
  residual: number;
  /** Positions and values that agree, in order of position. */
  used: { position: number; value: number }[];
}

/** Pixels by which the middle of a label may miss its place. */
const PLACE_TOLERANCE = 3;
/** Votes for a scale whose labels are whole multiples of their distance. */
const EVEN_LABELS = 0.8;
/** Least distance of the two labels that propose a scale, as a share of the axis. */
const LEAST_SPREAD = 0.12;

/**
 * The scale that most labels agree on, each with the number that fits among those it may stand for
 * (consensus of pairs; Fischler & Bolles 1981, Commun. ACM 24(6), all pairs in place of random ones).
 *
 * `length` is the axis in pixels. Null where fewer than two labels agree. A label that has no fitting
 * number costs nothing but its vote; `prior` adds to the votes of a scale that is likelier than others.
 */
export function fitTicks(
  ticks: Tick[],
  length: number,
  scale: "linear" | "log",
  prior: (intercept: number, slope: number) => number = () => 0,
): TickFit | null {
  const usable = ticks
    .map((t) => ({
      position: t.position,
      candidates: t.candidates.filter((c) => (scale === "linear" ? !c.raised : c.value > 0)),
    }))
    .filter((t) => t.candidates.length > 0);
  const along = (value: number) => (scale === "log" ? Math.log10(value) : value);
  let best: TickFit | null = null;
  for (let i = 0; i < usable.length; i++) {
    for (let j = i + 1; j < usable.length; j++) {
      const distance = usable[j].position - usable[i].position;
      if (Math.abs(distance) < LEAST_SPREAD * length) continue;
      for (const a of usable[i].candidates) {
        for (const b of usable[j].candidates) {
          const slope = (along(b.value) - along(a.value)) / distance;
          if (slope === 0) continue;
          const intercept = along(a.value) - slope * usable[i].position;
          const fit = agree(usable, intercept, slope, scale, along);
          if (fit) fit.weight += prior(intercept, slope) + evenness(fit);
          if (fit && (!best || better(fit, best))) best = fit;
        }
      }
    }
  }
  return best && refine(best, along);
}

/** Least distance of two labels that agree, in the axis' unit (decades of a logarithmic one). */
export function labelStep(fit: TickFit): number {
  const values = fit.used
    .map((u) => (fit.scale === "log" ? Math.log10(u.value) : u.value))
    .sort((a, b) => a - b);
  let step = Infinity;
  for (let i = 1; i < values.length; i++)
    if (values[i] > values[i - 1]) step = Math.min(step, values[i] - values[i - 1]);
  return step;
}

/** Labels are mostly whole multiples of their distance. */
function evenness(fit: TickFit): number {
  if (fit.scale === "log" || fit.used.length < 3) return 0;
  const step = labelStep(fit);
  return fit.used.every((u) => Math.abs(u.value / step - Math.round(u.value / step)) < 0.02)
    ? EVEN_LABELS
    : 0;
}

function better(a: TickFit, b: TickFit): boolean {
  if (Math.abs(a.weight - b.weight) > 0.05) return a.weight > b.weight;
  return a.residual < b.residual;
}

function agree(
  ticks: Tick[],
  intercept: number,
  slope: number,
  scale: "linear" | "log",
  along: (value: number) => number,
): TickFit | null {
  const used: { position: number; value: number }[] = [];
  let weight = 0;
  let squares = 0;
  for (const tick of ticks) {
    let chosen: Candidate | null = null;
    let miss = 0;
    for (const candidate of tick.candidates) {
      const d = (along(candidate.value) - intercept) / slope - tick.position;
      if (Math.abs(d) > PLACE_TOLERANCE) continue;
      if (!chosen || candidate.weight > chosen.weight) {
        chosen = candidate;
        miss = d;
      }
    }
    if (!chosen) continue;
    used.push({ position: tick.position, value: chosen.value });
    weight += chosen.weight;
    squares += miss * miss;
  }
  if (new Set(used.map((u) => u.value)).size < 2) return null;
  return {
    scale,
    intercept,
    slope,
    inliers: used.length,
    total: ticks.length,
    weight,
    residual: Math.sqrt(squares / used.length),
    used: used.sort((a, b) => a.position - b.position),
  };
}

/** Straight line through the labels that agree. */
export function refine(fit: TickFit, along: (value: number) => number): TickFit {
  const n = fit.used.length;
  const meanX = fit.used.reduce((s, u) => s + u.position, 0) / n;
  const meanY = fit.used.reduce((s, u) => s + along(u.value), 0) / n;
  let xx = 0;
  let xy = 0;
  for (const u of fit.used) {
    xx += (u.position - meanX) ** 2;
    xy += (u.position - meanX) * (along(u.value) - meanY);
  }
  const slope = xy / xx;
  const intercept = meanY - slope * meanX;
  const squares = fit.used.reduce((s, u) => s + ((along(u.value) - intercept) / slope - u.position) ** 2, 0);
  return { ...fit, slope, intercept, residual: Math.sqrt(squares / n) };
}
