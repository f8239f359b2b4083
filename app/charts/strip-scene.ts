/**
 * The strip map: every sweep of a project as a strip of the same country on one frequency axis, oldest at the
 * bottom. Fractions across, px down.
 */
import {
  type FrequencyAxis,
  type FrequencyScale,
  type FrequencyScaleKind,
  frequencyAxis,
  frequencyScale,
} from "./axis.ts";
import type { ChartBand } from "./chart-types.ts";
import { type ChartPoints, decimate } from "./decimate.ts";
import { profilePaths } from "./paths.ts";
import { type RibbonBand, ribbonBands } from "./ribbon.ts";
import { type PlacedTrail, placeTrails } from "./trail-names.ts";
import { valueAxis } from "./value-axis.ts";

export interface Strip {
  id: string;
  title: string;
  /** A date, or what else tells it apart. */
  caption: string;
  points: ChartPoints;
  dips: readonly { id: string; frequencyHz: number; returnLossDb: number }[];
  /** What was changed before this sweep, since the one under it. */
  step: string | null;
}

export interface Trail {
  id: string;
  label: string;
  tone: "heather" | "clay";
  /** One dip of some of the strips, in any order. */
  stops: readonly { stripId: string; dipId: string; words: string }[];
}

export interface StripSceneInput {
  /** Oldest first. */
  strips: readonly Strip[];
  trails?: readonly Trail[];
  scale: FrequencyScaleKind;
  fromHz: number;
  toHz: number;
  bands: readonly ChartBand[];
  designBands: readonly ChartBand[];
}

export interface PlacedStrip {
  strip: Strip;
  /** Top of the caption line, top of the land, and the land's foot. */
  captionY: number;
  landY: number;
  footY: number;
  land: string;
  line: string;
  /** Top of the line with the step that led here; null without one. */
  stepY: number | null;
  dips: { id: string; fraction: number; y: number }[];
}

export interface StripScene {
  scale: FrequencyScale;
  frequency: FrequencyAxis;
  ribbon: RibbonBand[];
  /** Newest first, as they stand from the top. */
  strips: PlacedStrip[];
  trails: PlacedTrail[];
  heightPx: number;
  pathWidth: number;
}

const CAPTION_PX = 22;
const LAND_PX = 64;
const STEP_PX = 22;
const PATH_WIDTH = 1000;
const COLUMNS = 300;
/** All strips share one depth, so that a deeper hollow is deeper in truth. */
const DEEPEST_MAGNITUDE = 10 ** (-30 / 20);

export function buildStripScene(input: StripSceneInput): StripScene {
  const scale = frequencyScale(input.scale, input.fromHz, input.toHz);
  const axis = valueAxis("rl", LAND_PX, { lowestMagnitude: DEEPEST_MAGNITUDE, highestMagnitude: 1 });
  const box = { width: PATH_WIDTH, heightPx: LAND_PX, yOfMagnitude: axis.yOfMagnitude };
  let y = 0;
  const strips = [...input.strips].reverse().map((strip): PlacedStrip => {
    const paths = profilePaths(decimate(strip.points, scale, COLUMNS), box);
    const captionY = y;
    const landY = captionY + CAPTION_PX;
    const footY = landY + LAND_PX;
    y = footY + (strip.step ? STEP_PX : 0);
    const dips = strip.dips
      .filter((dip) => dip.frequencyHz >= scale.fromHz && dip.frequencyHz <= scale.toHz)
      .map((dip) => ({
        id: dip.id,
        fraction: scale.fractionOf(dip.frequencyHz),
        y: landY + Math.min(LAND_PX, Math.max(0, axis.yOfMagnitude(10 ** (-dip.returnLossDb / 20)))),
      }));
    return {
      strip,
      captionY,
      landY,
      footY,
      land: paths.land,
      line: paths.line + paths.offScale,
      stepY: strip.step ? footY : null,
      dips,
    };
  });
  return {
    scale,
    frequency: frequencyAxis(scale),
    ribbon: ribbonBands(scale, input.bands, input.designBands),
    strips,
    trails: placeTrails(input.trails ?? [], strips, PATH_WIDTH),
    heightPx: y,
    pathWidth: PATH_WIDTH,
  };
}
