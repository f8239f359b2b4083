import { type ColorCandidate, findColors } from "./colors.ts";
import { coverageOf } from "./coverage.ts";
import type { FoundFrame } from "./frame.ts";
import { findGround, type Ground } from "./ground.ts";
import { hexOf, lookApart, type Rgb } from "./oklab.ts";
import type { Picture, Stage } from "./picture.ts";
import { readTrace, type Trace } from "./trace.ts";

/** A trace colour with what following it gave. */
export interface ColoredTrace {
  color: Rgb;
  hex: string;
  trace: Trace;
  /** Higher is likelier to be the sweep. */
  score: number;
}

export interface FoundTraces extends Stage {
  /** Likeliest first; empty where nothing but ground and grid was seen. */
  traces: ColoredTrace[];
}

/** Difference from the ground from which a colour is as visible as a trace is meant to be. */
const PLAIN_TO_SEE = 0.3;
/** A tenth of the columns with jumps halves a colour's score. */
const JUMP_WEIGHT = 5;
/** Weight of a colour that grid lines leave beside them. */
const GRID_RESIDUE = 0.3;
/** A given colour this near to one that was found is that one. */
const SAME_AS_GIVEN = 0.12;
/** Share of the plot's height over which a trace must range to count fully as a sweep. */
const LIVELY = 0.1;

/**
 * Finds the traces inside a frame, likeliest first.
 *
 * A sweep is followed through most columns and moves up and down; limit lines and references are flat.
 * With `given` that colour comes first, whatever the others are.
 */
export function findTraces(picture: Picture, found: FoundFrame, given: Rgb | null): FoundTraces {
  const ground = findGround(picture, found);
  const { top, bottom } = found.frame;
  const candidates: ColorCandidate[] = findColors(picture, ground);
  const follow = (color: Rgb): ColoredTrace => {
    const trace = readTrace(coverageOf(picture, ground, color), top, bottom);
    const lively = Math.min(1, trace.extent / (LIVELY * (bottom - top)));
    const score =
      trace.share < 0.02
        ? 0
        : trace.explained *
          (0.35 + 0.65 * lively) *
          Math.min(1, 0.3 + trace.share * 2) *
          plainness(color, ground.color) *
          (0.25 + 0.75 * trace.fullness) *
          Math.max(0.2, 1 - JUMP_WEIGHT * trace.jumps) *
          (isPaleGrid(color, ground) ? GRID_RESIDUE : 1);
    return { color, hex: hexOf(color), trace, score };
  };
  const followed = (some: ColorCandidate[]) =>
    some
      .map((c) => follow(c.color))
      .filter((t) => t.score > 0.02)
      .sort((a, b) => b.score - a.score);
  const isMeant = (c: ColorCandidate) => given !== null && lookApart(c.color, given) < SAME_AS_GIVEN;
  // With a colour given the others are only named, to be chosen instead: following costs most of the time.
  const traces = given
    ? [
        followed(candidates.filter(isMeant))[0] ?? follow(given),
        ...candidates.filter((c) => !isMeant(c) && !isPaleGrid(c.color, ground)).map(unfollowed),
      ]
    : followed(candidates);
  const chosen = traces[0];
  if (!chosen) return { traces, confidence: 0, saw: "No trace was found inside the frame." };
  const rival = traces[1] && !given ? traces[1].score / chosen.score : 0;
  const confidence = Math.min(1, chosen.trace.explained) * (rival > 0.85 ? 0.7 : 1);
  const saw = `The trace ${chosen.hex} was followed through ${Math.round(100 * chosen.trace.share)} % of the columns${traces.length > 1 ? `; ${traces.length - 1} other colour${traces.length > 2 ? "s" : ""} in view` : ""}.`;
  return { traces, confidence, saw };
}

/** A colour in view that is not the one asked for. */
function unfollowed({ color, columnShare }: ColorCandidate): ColoredTrace {
  const none = new Float64Array();
  const trace: Trace = {
    left: 0,
    row: none,
    uncertainty: none,
    thickness: 0,
    share: columnShare,
    explained: 0,
    fullness: 0,
    extent: 0,
    jumps: 0,
  };
  return { color, hex: hexOf(color), trace, score: 0 };
}

/** Halos of compression are hardly different from the ground. */
function plainness(color: Rgb, ground: Rgb): number {
  return 0.4 + 0.6 * Math.min(1, lookApart(color, ground) / PLAIN_TO_SEE);
}

/** What is left beside a grid line lies between the ground's colour and the line's. */
function isPaleGrid(color: Rgb, ground: Ground): boolean {
  const lines = [ground.grid, ground.outline].filter((c) => c !== null);
  return lines.some((line) => {
    const full = line.map((v, i) => v - ground.color[i]);
    const square = full.reduce((sum, v) => sum + v * v, 0);
    const along = color.reduce((sum, v, i) => sum + (v - ground.color[i]) * full[i], 0) / square;
    const mix = ground.color.map((v, i) => v + along * full[i]) as Rgb;
    return along > 0 && along < 1.05 && lookApart(mix, color) < 0.05;
  });
}
