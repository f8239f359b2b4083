import * as sweeps from "~/db/sweeps.server";
import { formatFrequency } from "~/measurement/units";
import { SMALLEST_SHARE } from "~/services/note-parts";
import { type NotePart, NoteProblem } from "~/services/notes.server";

/** The figures of a note's form that say of which part of a sweep it speaks. */
export interface PartFigures {
  sweep?: string;
  fromMhz?: number;
  toMhz?: number;
  regionLeft?: number;
  regionTop?: number;
  regionWidth?: number;
  regionHeight?: number;
}

/** The part that the figures name, undefined for none; a `NoteProblem` where they make no part of the sweep. */
export async function requirePart(figures: PartFigures): Promise<NotePart | undefined> {
  const { fromMhz, toMhz, regionLeft, regionTop, regionWidth, regionHeight } = figures;
  const region = [regionLeft, regionTop, regionWidth, regionHeight];
  const [anyStretch, anyRegion] = [fromMhz ?? toMhz, region.find((one) => one !== undefined)];
  if (anyStretch === undefined && anyRegion === undefined) return undefined;
  const found = figures.sweep ? await sweeps.findByPublicId(figures.sweep) : undefined;
  if (!found) throw new NoteProblem("Only a note on a sweep speaks of a part of it. Nothing was stored.");
  if (anyStretch !== undefined && anyRegion !== undefined) throw new NoteProblem(ONE_PART);
  if (anyStretch !== undefined) return stretchOf(found, fromMhz, toMhz);
  return regionOf(found, region);
}

function stretchOf({ sweep }: sweeps.FoundSweep, fromMhz?: number, toMhz?: number): NotePart {
  const { startHz, stopHz } = sweep;
  if (fromMhz === undefined || toMhz === undefined || !(fromMhz < toMhz)) throw new NoteProblem(NO_STRETCH);
  const [fromHz, toHz] = [fromMhz * 1e6, toMhz * 1e6];
  if (startHz === null || stopHz === null || toHz <= startHz || fromHz >= stopHz) {
    const ends = `${formatFrequency(startHz)} to ${formatFrequency(stopHz)}`;
    throw new NoteProblem(`The stretch lies outside the sweep, which goes from ${ends}. Nothing was stored.`);
  }
  return { fromHz: Math.max(fromHz, startHz), toHz: Math.min(toHz, stopHz) };
}

function regionOf({ reading }: sweeps.FoundSweep, percent: (number | undefined)[]): NotePart {
  const [x, y, width, height] = percent.map((one) => (one === undefined ? Number.NaN : one / 100));
  if (reading?.reading?.format !== "screenshot") throw new NoteProblem(NO_PICTURE);
  const inside = x + width <= 1 + ROUNDING && y + height <= 1 + ROUNDING;
  if (!(width >= SMALLEST_SHARE && height >= SMALLEST_SHARE && inside)) throw new NoteProblem(NO_REGION);
  return { region: { x, y, width: Math.min(width, 1 - x), height: Math.min(height, 1 - y) } };
}

/** Fields show tenths of a per cent. */
const ROUNDING = 0.002;
const ONE_PART = "Give a stretch or a region, not both. Nothing was stored.";
const NO_STRETCH =
  "A stretch needs both ends, the lower one first, as from 7.0 to 7.2 MHz. Nothing was stored.";
const NO_PICTURE = "This sweep has no picture, so a note can't speak of a part of it. Nothing was stored.";
const NO_REGION =
  "A region needs left, top, width and height in per cent, and lies inside the picture. Nothing was stored.";
