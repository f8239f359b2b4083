import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { analyse } from "../../app/measurement/analyse.ts";
import type { Dip } from "../../app/measurement/sweep.ts";
import type { ScreenshotSpec } from "../../app/readers/reading.ts";
import type { PictureResult } from "../../app/readers/screenshot/read-picture.ts";
import { readPictureFile } from "../../app/services/picture.server.ts";
import type { Truth } from "./picture.ts";

/** How well one picture was read, against what was drawn. */
export interface PictureScore {
  file: string;
  skin: string;
  degraded: string[];
  /** Largest miss of the four outer lines, pixels; null without a frame. */
  framePx: number | null;
  axesRight: boolean;
  /** Miss of the trace in rows where it is not steep; null without comparable points. */
  traceMedianPx: number | null;
  traceP95Px: number | null;
  dipsRight: boolean;
  dipsFound: number;
  dipsTrue: number;
  dipsExtra: number;
  error: string | null;
}

/** Frame within 2 px; trace within 0.75 px (median) and 2.5 px (95th percentile); a dip within 1.5 columns. */
export const LIMITS = { framePx: 2, medianPx: 0.75, p95Px: 2.5, dipColumns: 1.5 };

/** The truths of a folder, in order of their names. */
export function truthsIn(folder: string): Truth[] {
  const names = readdirSync(folder).filter((name) => name.endsWith(".json"));
  return names.sort().map((name) => JSON.parse(readFileSync(join(folder, name), "utf8")));
}

/** Reads one picture with nothing given (but the 0 dB line of raw levels), or with its axes given. */
export async function scorePicture(folder: string, truth: Truth, axesGiven: boolean): Promise<PictureScore> {
  const bytes = readFileSync(join(folder, truth.file));
  const result = await readPictureFile(
    { name: truth.file, bytes },
    { screenshot: givenFor(truth, axesGiven) },
  );
  return scoreResult(truth, result, axesGiven);
}

/** What was read against what was drawn; `truth.plot` in pixels of the picture that the trace was followed in. */
export function scoreResult(truth: Truth, result: PictureResult, axesGiven: boolean): PictureScore {
  const { frame, axes, points } = result.picture;
  const must = truth.dips.filter((d) => d.prominence_db >= SURE_PROMINENCE);
  const score: PictureScore = {
    file: truth.file,
    skin: truth.skin,
    degraded: truth.degraded,
    framePx: null,
    axesRight: false,
    traceMedianPx: null,
    traceP95Px: null,
    dipsRight: false,
    dipsFound: 0,
    dipsTrue: must.length,
    dipsExtra: 0,
    error: result.ok ? null : result.problem.message,
  };
  if (frame) score.framePx = Math.max(...SIDES.map((side) => Math.abs(frame[side] - truth.plot[side])));
  if (!result.ok || !axes || !points) return score;
  const { start_mhz, stop_mhz, scale, y_top, y_bottom } = truth.axis;
  const span = (stop_mhz - start_mhz) * 1e6;
  const near = (value: number | null, wanted: number, tolerance: number) =>
    value !== null && Math.abs(value - wanted) < tolerance;
  const height = Math.abs(y_top - y_bottom);
  score.axesRight =
    near(axes.startHz, start_mhz * 1e6, 0.003 * span) &&
    near(axes.stopHz, stop_mhz * 1e6, 0.003 * span) &&
    axes.scale === scale &&
    near(axes.top, y_top, 0.02 * height) &&
    near(axes.bottom, y_bottom, 0.02 * height);
  if (!score.axesRight && !axesGiven) return score;
  const misses = traceMisses(truth, points);
  if (misses.length > 0) {
    score.traceMedianPx = misses[misses.length >> 1];
    score.traceP95Px = misses[Math.floor(misses.length * 0.95)];
  }
  return { ...score, ...scoreDips(truth, analyse(result.sweep).dips) };
}

/** Shares over a set, 0 to 1: what is accepted and compared. */
export function totals(scores: PictureScore[]): Record<"frame" | "axes" | "trace" | "dips", number> {
  const share = (right: (s: PictureScore) => boolean, of = scores) =>
    of.filter(right).length / Math.max(1, of.length);
  const comparable = scores.filter((s) => s.traceMedianPx !== null || !s.dipsRight);
  return {
    frame: share((s) => s.framePx !== null && s.framePx <= LIMITS.framePx),
    axes: share((s) => s.axesRight),
    trace: share((s) => traceRight(s), comparable),
    dips: share((s) => s.dipsRight),
  };
}

export function traceRight(score: PictureScore): boolean {
  return (
    score.traceMedianPx !== null &&
    score.traceP95Px !== null &&
    score.traceMedianPx <= LIMITS.medianPx &&
    score.traceP95Px <= LIMITS.p95Px
  );
}

const SIDES = ["left", "top", "right", "bottom"] as const;
/** Dips of less prominence (dB) may be found or not. */
const SURE_PROMINENCE = 4;
/** Rows a column above which a stretch is too steep to compare. */
const STEEP = 4;
/** Share of the axis at its ends where a trace is cut off. */
const CUT_OFF = 0.004;
const QUANTITIES = {
  swr: "swr",
  level: "level",
  return_loss_up: "return-loss",
  return_loss_down: "s11-db",
} as const;

/** What is given of a picture: the 0 dB line of raw levels, and its axes on demand. */
export function givenFor({ axis }: Truth, axesGiven: boolean): ScreenshotSpec {
  const zero = axis.unit === "dBm" ? { zeroDb: axis.zero_db_at } : {};
  if (!axesGiven) return zero;
  const quantity = QUANTITIES[axis.quantity as keyof typeof QUANTITIES];
  return {
    ...zero,
    startHz: axis.start_mhz * 1e6,
    stopHz: axis.stop_mhz * 1e6,
    scale: axis.scale,
    top: axis.y_top,
    bottom: axis.y_bottom,
    quantity,
  };
}

function traceMisses(
  { axis, plot, drawn }: Truth,
  points: { frequencyHz: Float64Array; value: Float64Array },
): number[] {
  const rowsPerUnit = Math.abs(plot.bottom - plot.top) / Math.abs(axis.y_top - axis.y_bottom);
  const low = Math.min(axis.y_top, axis.y_bottom);
  const high = Math.max(axis.y_top, axis.y_bottom);
  const margin = CUT_OFF * (high - low);
  const { frequencyHz, value } = points;
  const misses: number[] = [];
  if (frequencyHz.length < 4) return misses;
  for (let i = 1; i + 1 < drawn.mhz.length; i++) {
    const hz = drawn.mhz[i] * 1e6;
    const wanted = drawn.value[i];
    if (wanted <= low + margin || wanted >= high - margin) continue;
    if (hz < frequencyHz[0] || hz > frequencyHz[frequencyHz.length - 1]) continue;
    const columns =
      ((drawn.mhz[i + 1] - drawn.mhz[i - 1]) / (axis.stop_mhz - axis.start_mhz)) * (plot.right - plot.left);
    if ((Math.abs(drawn.value[i + 1] - drawn.value[i - 1]) * rowsPerUnit) / columns > STEEP) continue;
    misses.push(Math.abs(valueAt(frequencyHz, value, hz) - wanted) * rowsPerUnit);
  }
  return misses.sort((a, b) => a - b);
}

function valueAt(xs: ArrayLike<number>, ys: ArrayLike<number>, x: number): number {
  let high = 1;
  while (high < xs.length - 1 && xs[high] < x) high++;
  const t = (x - xs[high - 1]) / (xs[high] - xs[high - 1] || 1);
  return ys[high - 1] + t * (ys[high] - ys[high - 1]);
}

function scoreDips(
  truth: Truth,
  found: Dip[],
): Pick<PictureScore, "dipsRight" | "dipsFound" | "dipsTrue" | "dipsExtra"> {
  const { axis, plot, drawn } = truth;
  const low = Math.min(axis.y_top, axis.y_bottom);
  const high = Math.max(axis.y_top, axis.y_bottom);
  const margin = CUT_OFF * (high - low);
  const tolerance = (LIMITS.dipColumns / (plot.right - plot.left)) * (axis.stop_mhz - axis.start_mhz) * 1e6;
  const isVisible = (mhz: number) => {
    const v = valueAt(drawn.mhz, drawn.value, mhz);
    return v > low + margin && v < high - margin;
  };
  const visible = truth.dips.filter((d) => isVisible(d.mhz));
  const hidden = truth.dips.filter((d) => !visible.includes(d));
  const free = new Set(found);
  let close = 0;
  let wanted = 0;
  for (const dip of visible) {
    const miss = (d: Dip) => Math.abs(d.frequencyHz - dip.mhz * 1e6);
    const best = [...free].filter((d) => miss(d) <= 3 * tolerance).sort((a, b) => miss(a) - miss(b))[0];
    if (!best && dip.prominence_db < SURE_PROMINENCE) continue;
    wanted++;
    if (!best) continue;
    free.delete(best);
    if (miss(best) <= tolerance) close++;
  }
  const extra = [...free].filter(
    (d) => !d.edge && hidden.every((h) => Math.abs(d.frequencyHz - h.mhz * 1e6) > 6 * tolerance),
  ).length;
  return { dipsRight: close === wanted && extra === 0, dipsFound: close, dipsTrue: wanted, dipsExtra: extra };
}
