/**
 * The strip map: every sweep of a project as a strip of the same country on one frequency axis, oldest at the bottom.
 * Fractions across, px down. What comes out is plain data: the server reckons it and sends it with the page.
 */
import { type FrequencyAxis, type FrequencyScaleKind, frequencyAxis, frequencyScale } from "./axis.ts";
import type { ChartBand } from "./chart-types.ts";
import { type ChartPoints, decimate, lowerBound } from "./decimate.ts";
import type { PlacedSteps, PlacedStrip } from "./placed-strip.ts";
import type { PlacedTrail } from "./placed-trail.ts";
import { type RibbonBand, ribbonBands } from "./ribbon.ts";
import { stripPath } from "./strip-path.ts";
import { placeTrails, type Trail } from "./strip-trails.ts";

export interface Strip {
  id: string;
  title: string;
  /** A date, or what else tells it apart. */
  caption: string;
  points: ChartPoints;
  dips: readonly { id: string; frequencyHz: number; returnLossDb: number }[];
}

export interface StripStep {
  id: string;
  title: string;
  caption: string;
  planned: boolean;
  /** The strip that came after it; null while there is none. */
  before: string | null;
}

export interface StripSceneInput {
  /** Oldest first. */
  strips: readonly Strip[];
  /** In order of time. */
  steps: readonly StripStep[];
  trails: readonly Trail[];
  scale: FrequencyScaleKind;
  fromHz: number;
  toHz: number;
  bands: readonly ChartBand[];
  designBands: readonly ChartBand[];
}

export interface StripScene {
  scale: { kind: FrequencyScaleKind; fromHz: number; toHz: number };
  frequency: FrequencyAxis;
  ribbon: RibbonBand[];
  /** Newest first, as they stand from the top. */
  strips: PlacedStrip[];
  steps: PlacedSteps[];
  trails: PlacedTrail[];
  heightPx: number;
}

const STEP_PX = 24;
const PLANNED_PX = 46;
/** Land under the deepest hollow, where the caption stands. */
const GROUND_PX = 21;
/** All strips share one depth, so that a deeper hollow is deeper in truth. */
const DEEPEST_DB = 30;
/** Depth of the hollows by how many strips there are; more of them are drawn lower, never narrower. */
const DEPTHS_PX: readonly [most: number, px: number][] = [
  [10, 68],
  [20, 54],
  [40, 40],
  [Number.POSITIVE_INFINITY, 30],
];
/** Columns of a strip: a dip narrower than one keeps its lowest point. */
const COLUMNS = 700;
/** Where a dip's own samples lie, as a share of its frequency. */
const NEAR_SHARE = 0.004;

export function buildStripScene(input: StripSceneInput): StripScene {
  const scale = frequencyScale(input.scale, input.fromHz, input.toHz);
  const depthPx = DEPTHS_PX.find(([most]) => input.strips.length <= most)?.[1] ?? STEP_PX;
  const yOfDb = (db: number) => Math.min(depthPx, Math.max(0, (db / DEEPEST_DB) * depthPx));
  const steps: PlacedSteps[] = [];
  let y = 0;
  const addSteps = (before: string | null, planned: boolean) => {
    const own = input.steps.filter((step) => step.before === before && step.planned === planned);
    if (own.length === 0) return;
    const heightPx = planned ? PLANNED_PX : STEP_PX;
    const shown = own.map(({ id, title, caption }) => ({ id, title, caption, planned }));
    steps.push({ y, heightPx, planned, steps: shown });
    y += heightPx;
  };
  addSteps(null, true);
  addSteps(null, false);
  const strips = [...input.strips].reverse().map((strip): PlacedStrip => {
    const landY = y;
    const footY = landY + depthPx + GROUND_PX;
    y = footY;
    addSteps(strip.id, false);
    const runs = decimate(strip.points, scale, COLUMNS);
    return {
      id: strip.id,
      title: strip.title,
      caption: strip.caption,
      landY,
      footY,
      path: stripPath(runs, (m) => yOfDb(-20 * Math.log10(m)), depthPx, depthPx + GROUND_PX),
      dips: strip.dips
        .filter((dip) => dip.frequencyHz >= scale.fromHz && dip.frequencyHz <= scale.toHz)
        .map((dip) => ({
          id: dip.id,
          fraction: thousandths(scale.fractionOf(dip.frequencyHz)),
          y: Math.round(
            landY + Math.min(yOfDb(dip.returnLossDb), lineY(strip.points, dip.frequencyHz, yOfDb)),
          ),
        })),
    };
  });
  const trails = placeTrails(input.trails, strips, steps, scale);
  const onTrails = new Set(trails.flatMap(({ stops }) => stops.map(({ dipId }) => dipId)));
  return {
    scale: { kind: scale.kind, fromHz: scale.fromHz, toHz: scale.toHz },
    frequency: frequencyAxis(scale),
    ribbon: ribbonBands(scale, input.bands, input.designBands),
    strips: strips.map((strip) => ({ ...strip, dips: strip.dips.filter(({ id }) => !onTrails.has(id)) })),
    steps,
    trails,
    heightPx: y,
  };
}

/** How deep the line goes at a dip: a fitted one may be deeper than every sample, and its mark stays on the line. */
function lineY({ frequencyHz, magnitude }: ChartPoints, hz: number, yOfDb: (db: number) => number): number {
  let lowest = Number.POSITIVE_INFINITY;
  for (let i = lowerBound(frequencyHz, hz * (1 - NEAR_SHARE)); i < frequencyHz.length; i++) {
    if (frequencyHz[i] > hz * (1 + NEAR_SHARE)) break;
    if (magnitude[i] < lowest) lowest = magnitude[i];
  }
  return lowest === Number.POSITIVE_INFINITY ? lowest : yOfDb(-20 * Math.log10(lowest));
}

function thousandths(fraction: number): number {
  return Math.round(fraction * 1e5) / 1e5;
}
