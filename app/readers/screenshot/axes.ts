import type { AxisSource, ScreenshotSpec } from "../reading.ts";
import type { FoundFrame } from "./frame.ts";
import { cornerAxis, type FrequencyAxis, namedAxis, namedFrequencies, tickAxis } from "./frequency-axis.ts";
import type { Ocr, Picture, Stage, Word } from "./picture.ts";
import { isDoubtful, printedWords, rereadFrequencies, rereadLabels, uprightWords } from "./print.ts";
import {
  labelledAxis,
  namedQuantity,
  type PictureQuantity,
  rangedAxis,
  referencedAxis,
  type ValueAxis,
} from "./value-axis.ts";

/** The axes of a plot; null is what could not be found. */
export interface Axes {
  startHz: number | null;
  stopHz: number | null;
  scale: "linear" | "log";
  /** In the quantity's own unit, at the frame's top and bottom line. */
  top: number | null;
  bottom: number | null;
  quantity: PictureQuantity;
  sources: Record<"startHz" | "stopHz" | "scale" | "top" | "bottom" | "quantity", AxisSource>;
}

export interface FoundAxes extends Stage {
  axes: Axes;
  assumed: string[];
  /** All words that were read around the plot. */
  words: Word[];
}

/** Below this a stage is asked for again with larger print. */
const GOOD_ENOUGH = 0.88;

/**
 * Finds both axes from the printed text; what is given is taken as it is and not looked for.
 *
 * Text is recognised by `ocr`; with everything given it is not called. Never throws for missing text:
 * what is not found is null.
 */
export async function findAxes(
  picture: Picture,
  found: FoundFrame,
  ocr: Ocr,
  given: ScreenshotSpec,
): Promise<FoundAxes> {
  const { frame } = found;
  const needFrequency = given.startHz === undefined || given.stopHz === undefined;
  const needValue = given.top === undefined || given.bottom === undefined;
  const needQuantity = given.quantity === undefined;
  let words: Word[] = [];
  if (needFrequency || needValue || needQuantity) words = await printedWords(picture, frame, ocr);

  let frequency = needFrequency ? frequencyFrom(words, found) : null;
  const doubtful = [...namedFrequencies(words).values()].some((n) => isDoubtful(n.word));
  if (needFrequency && (doubtful || (frequency?.confidence ?? 0) < GOOD_ENOUGH)) {
    const again = frequencyFrom(await rereadFrequencies(picture, frame, words, ocr), found);
    frequency = doubtful ? (again ?? frequency) : sounder(frequency, again);
  }
  let named = needQuantity ? namedQuantity(words.map((w) => w.text)) : null;
  if (needQuantity && !named) {
    const beside = { left: 0, top: 0, right: frame.left - 2, bottom: picture.height - 1 };
    named = namedQuantity(beside.right > 12 ? await uprightWords(picture, beside, ocr) : []);
  }
  const hinted = given.quantity ?? named?.quantity ?? null;
  let value = needValue ? valueFrom(words, found, hinted) : null;
  if (needValue && (value?.confidence ?? 0) < GOOD_ENOUGH) {
    value = sounder(value, valueFrom(await rereadLabels(picture, frame, words, ocr), found, hinted));
  }
  return combine(given, frequency, value, named?.quantity ?? null, words);
}

function sounder<T extends { confidence: number }>(a: T | null, b: T | null): T | null {
  return b && (!a || b.confidence > a.confidence) ? b : a;
}

function frequencyFrom(words: Word[], found: FoundFrame): FrequencyAxis | null {
  return (
    namedAxis(words) ?? tickAxis(words, found.frame, placesAcross(found)) ?? cornerAxis(words, found.frame)
  );
}

/** Where labels may belong: lines across the plot and the marks on its outer lines. */
function placesAcross({ vertical, ticks }: FoundFrame): number[] {
  return [...vertical.map((l) => l.position), ...ticks.columns];
}

function placesDown({ horizontal, ticks }: FoundFrame): number[] {
  return [...horizontal.map((l) => l.position), ...ticks.rows];
}

function valueFrom(words: Word[], found: FoundFrame, quantity: PictureQuantity | null): ValueAxis | null {
  const labels = labelledAxis(words, found.frame, placesDown(found), quantity);
  const other = referencedAxis(words, found.frame) ?? rangedAxis(words);
  if (!labels || !other) return labels ?? other;
  const span = Math.abs(labels.top - labels.bottom);
  const agree =
    Math.abs(labels.top - other.top) < 0.01 * span && Math.abs(labels.bottom - other.bottom) < 0.01 * span;
  if (agree) return { ...other, confidence: 0.98, saw: `${labels.saw} ${other.saw}` };
  return labels.confidence >= other.confidence ? labels : other;
}

function combine(
  given: ScreenshotSpec,
  frequency: FrequencyAxis | null,
  value: ValueAxis | null,
  named: PictureQuantity | null,
  words: Word[],
): FoundAxes {
  const top = given.top ?? value?.top ?? null;
  const bottom = given.bottom ?? value?.bottom ?? null;
  const assumed = [...(frequency?.assumed ?? []), ...(value?.assumed ?? [])];
  const quantity = given.quantity ?? settleQuantity(named, top, bottom, given.zeroDb !== undefined);
  if (given.quantity === undefined && named !== quantity) assumed.push(quantitySentence(quantity));
  const source = (fixed: unknown, read: unknown): AxisSource =>
    fixed !== undefined ? "given" : read !== null && read !== undefined ? "printed" : "assumed";
  const axes: Axes = {
    startHz: given.startHz ?? frequency?.startHz ?? null,
    stopHz: given.stopHz ?? frequency?.stopHz ?? null,
    scale: given.scale ?? frequency?.scale ?? "linear",
    top,
    bottom,
    quantity,
    sources: {
      startHz: source(given.startHz, frequency),
      stopHz: source(given.stopHz, frequency),
      scale: source(given.scale, frequency),
      top: source(given.top, value),
      bottom: source(given.bottom, value),
      quantity: given.quantity !== undefined ? "given" : named === quantity ? "printed" : "assumed",
    },
  };
  const missing = axes.startHz === null || axes.stopHz === null || top === null || bottom === null;
  const parts = [
    given.startHz !== undefined && given.stopHz !== undefined ? 1 : (frequency?.confidence ?? 0),
    given.top !== undefined && given.bottom !== undefined ? 1 : (value?.confidence ?? 0),
  ];
  const saw = [
    frequency?.saw ?? (parts[0] === 1 ? "The frequency axis was given." : "No frequency axis was read."),
    value?.saw ?? (parts[1] === 1 ? "The vertical axis was given." : "No vertical axis was read."),
  ].join(" ");
  return {
    axes,
    assumed,
    words,
    confidence: missing ? 0 : Math.min(...parts) * (axes.sources.quantity === "assumed" ? 0.85 : 1),
    saw,
  };
}

/** What the numbers of the axis allow the name to mean. */
function settleQuantity(
  named: PictureQuantity | null,
  top: number | null,
  bottom: number | null,
  zeroGiven: boolean,
): PictureQuantity {
  if (named === "swr" || named === "level") return named;
  if (zeroGiven) return "level";
  if (top === null || bottom === null) return named ?? "s11-db";
  const low = Math.min(top, bottom);
  const high = Math.max(top, bottom);
  if (named === null && low >= 0.9 && low <= 1.05 && high > 1.2) return "swr";
  // A passive load has no return loss below zero: an axis that goes there shows S11, unless it is named otherwise.
  const below = named === "return-loss" ? -low > high : low < 0;
  return below ? "s11-db" : "return-loss";
}

function quantitySentence(quantity: PictureQuantity): string {
  const names = { "s11-db": "S11 in dB", "return-loss": "return loss", swr: "SWR", level: "a raw level" };
  return `The vertical axis was taken as ${names[quantity]} by its numbers.`;
}
