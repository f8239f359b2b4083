import { readFileSync } from "node:fs";
import { join } from "node:path";
import { flatPlot } from "../../app/readers/screenshot/rectify.ts";
import { readPictureFile } from "../../app/services/picture.server.ts";
import type { Place } from "./camera.ts";
import type { PhotographTruth } from "./photographs.ts";
import { randomFrom } from "./random.ts";
import { givenFor, type PictureScore, scoreResult, traceRight } from "./score.ts";

/** Reads a photograph by its corners and axes; misses in pixels of the plot laid flat. */
export async function scorePhotograph(
  folder: string,
  truth: PhotographTruth,
  corners: Place[],
): Promise<PictureScore> {
  const bytes = readFileSync(join(folder, truth.file));
  const screenshot = { ...givenFor(truth, true), corners };
  const result = await readPictureFile({ name: truth.file, bytes }, { screenshot });
  const flat = flatPlot(corners);
  if (!flat) throw new Error(`${truth.file}: its corners enclose no plot.`);
  return scoreResult({ ...truth, plot: { ...truth.plot, ...flat.frame } }, result, true);
}

/** Corners as a person sets them: each one pixel off in both directions, which way by the picture's number. */
export function shaken(corners: Place[], number: number): Place[] {
  const random = randomFrom(15485863 * (number + 1));
  const off = () => (random.chance(0.5) ? 1 : -1);
  return corners.map(({ x, y }) => ({ x: x + off(), y: y + off() }));
}

/** Shares over a set, 0 to 1, and the median of the medians; what is accepted and compared. */
export function photographTotals(scores: PictureScore[]): { trace: number; dips: number; medianPx: number } {
  const share = (right: (s: PictureScore) => boolean) => scores.filter(right).length / scores.length;
  const medians = scores.map((s) => s.traceMedianPx ?? Number.POSITIVE_INFINITY).sort((a, b) => a - b);
  return {
    trace: share(traceRight),
    dips: share((s) => s.dipsRight),
    medianPx: medians[medians.length >> 1],
  };
}
