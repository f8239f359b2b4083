import type { Axes } from "../readers/screenshot/axes.ts";
import type { CorrectedResult } from "../readers/screenshot/correct.ts";

/** What was seen in a picture, small enough for a page: places in pixels of the upright picture. */
export interface SeenPicture {
  width: number;
  height: number;
  corners: { x: number; y: number }[] | null;
  /** The followed trace in pieces, one for each stretch without a gap. */
  line: { x: number; y: number }[][];
  traces: { color: string; share: number; chosen: boolean }[];
  axes: Axes | null;
  stages: Record<"frame" | "axes" | "trace", { confidence: number; saw: string }>;
  /** Highest level of the trace, in the axis' own unit; null where it is not known. */
  crest: number | null;
}

export function seenPicture({ picture, corners }: CorrectedResult): SeenPicture {
  const { width, height, axes, stages, traces } = picture;
  const value = picture.points?.value;
  const crest = value?.length ? value.reduce((most, one) => Math.max(most, one)) : null;
  return { width, height, corners, line: piecesOf(picture.line), traces, axes, stages, crest };
}

/** The stages of a picture's reading in our words. */
export const STAGES = ["decoded", "frame", "axes", "trace", "dips"] as const;
export type PictureStage = (typeof STAGES)[number];

function piecesOf(line: { x: Float64Array; y: Float64Array } | null): { x: number; y: number }[][] {
  const pieces: { x: number; y: number }[][] = [];
  let open: { x: number; y: number }[] | null = null;
  for (let i = 0; line && i < line.x.length; i++) {
    if (!Number.isFinite(line.y[i]) || !Number.isFinite(line.x[i])) {
      open = null;
      continue;
    }
    if (!open) {
      open = [];
      pieces.push(open);
    }
    open.push({ x: round(line.x[i]), y: round(line.y[i]) });
  }
  return pieces;
}

function round(value: number): number {
  return Math.round(value * 10) / 10;
}
