import { alignToLines } from "./align.ts";
import { cleanFigure, endValue, haveDecimals, repairedNumber, tickCandidates } from "./figures.ts";
import type { Frame } from "./frame.ts";
import type { Word } from "./picture.ts";
import { lettersApart, rowsOf } from "./rows.ts";
import { fitTicks, labelStep, refine } from "./tick-fit.ts";

export type PictureQuantity = "s11-db" | "return-loss" | "swr" | "level";

export interface ValueAxis {
  top: number;
  bottom: number;
  confidence: number;
  saw: string;
  assumed: string[];
}

/** Divisions that are taken where none can be seen. */
const USUAL_ROWS = 10;

/** Votes for an SWR axis that begins at 1, as nearly all do. */
const SWR_FROM_ONE = 1.5;

/** What the printed words say the plot shows; null where nothing does. */
export function namedQuantity(texts: string[]): { quantity: PictureQuantity; decibel: boolean } | null {
  const all = texts.join(" ");
  if (/\bdB\s?m\b/i.test(all)) return { quantity: "level", decibel: true };
  if (/v?swr/i.test(all) || texts.some((t) => lettersApart(t.toLowerCase(), "swr") <= 1 && t.length === 3)) {
    return { quantity: "swr", decibel: false };
  }
  if (/return\s*l|\bR\.?L\.?\b/i.test(all)) return { quantity: "return-loss", decibel: true };
  if (/s\s?\(?[1l|I]\s?,?\s?[1l|I]\b|gamma|refl/i.test(all)) return { quantity: "s11-db", decibel: true };
  if (/\blevel\b|\bpower\b/i.test(all)) return { quantity: "level", decibel: true };
  return null;
}

/** Top and bottom from the labels left or right of the plot. */
export function labelledAxis(
  words: Word[],
  frame: Frame,
  places: number[],
  quantity: PictureQuantity | null,
): ValueAxis | null {
  const left = words.filter(
    (w) => w.right < frame.left + 4 && w.left > frame.left - 0.2 * (frame.right - frame.left),
  );
  const right = words.filter(
    (w) => w.left > frame.right - 4 && w.right < frame.right + 0.15 * (frame.right - frame.left),
  );
  const axes = [left, right]
    .map((side) => fromLabels(side, frame, places, quantity))
    .filter((a) => a !== null);
  return axes.sort((a, b) => b.confidence - a.confidence)[0] ?? null;
}

function fromLabels(
  side: Word[],
  frame: Frame,
  places: number[],
  quantity: PictureQuantity | null,
): ValueAxis | null {
  const within = side.filter((w) => w.bottom > frame.top - 8 && w.top < frame.bottom + 8);
  const decimals = haveDecimals(within);
  const ticks = within.map((w) => ({
    position: (w.top + w.bottom) / 2,
    candidates: tickCandidates(w, decimals).filter((c) => quantity !== "swr" || c.value >= 0),
  }));
  const fromOne = (intercept: number, slope: number) => {
    const low = Math.min(intercept + slope * frame.top, intercept + slope * frame.bottom);
    return quantity === "swr" && Math.abs(low - 1) < 3 * Math.abs(slope) ? SWR_FROM_ONE : 0;
  };
  const fit = fitTicks(ticks, frame.bottom - frame.top, "linear", fromOne);
  if (!fit || fit.weight < 1.2) return null;
  const height = Math.max(...within.map((w) => w.bottom - w.top));
  const all = [...places, frame.top, frame.bottom];
  const aligned = refine({ ...fit, used: alignToLines(fit.used, all, Math.min(6, 0.5 * height)) }, (v) => v);
  let { intercept, slope } = aligned;
  const lowest = Math.min(intercept + slope * frame.top, intercept + slope * frame.bottom);
  if (quantity === "swr" && lowest > 6) {
    intercept /= 10;
    slope /= 10;
  }
  const step = labelStep(fit) * (slope / aligned.slope);
  const at = (y: number) => endValue(intercept + slope * y, step, Math.abs(slope));
  const share = fit.inliers / Math.max(1, fit.total);
  const confidence = Math.min(0.98, 0.3 + 0.09 * Math.min(5, fit.weight) + 0.25 * share);
  return {
    top: at(frame.top),
    bottom: at(frame.bottom),
    confidence,
    saw: `${fit.inliers} of ${fit.total} value labels agree.`,
    assumed: [],
  };
}

/** Top and bottom from a printed reference level and decibels per division. The reference is the top line. */
export function referencedAxis(words: Word[], frame: Frame): ValueAxis | null {
  let reference: number | null = null;
  let perDivision: number | null = null;
  let clarity = 1;
  for (const row of rowsOf(words)) {
    for (let i = 0; i < row.words.length; i++) {
      const text = row.words[i].text;
      const next = row.words[i + 1];
      const named = /^ref(?:erence)?\.?[:=]?(-?[\d.]+)?$/i.exec(cleanFigure(text));
      if (named && reference === null) {
        const figure = named[1] ?? next?.text ?? "";
        reference = repairedNumber(figure.replace(/dB.*$/i, ""));
        clarity = Math.min(clarity, (named[1] ? row.words[i] : next)?.confidence ?? 0);
      }
      const division = /^([\d.]*)\s*dB\s*\/(?:div|d)?/i.exec(text);
      if (division && perDivision === null) {
        const figure = division[1] || row.words[i - 1]?.text || "";
        perDivision = repairedNumber(figure);
        clarity = Math.min(clarity, (division[1] ? row.words[i] : row.words[i - 1])?.confidence ?? 0);
      }
    }
  }
  if (reference === null || perDivision === null || perDivision <= 0) return null;
  const assumed = ["The reference level was taken as the top line."];
  if (frame.rows === null) assumed.push(`The divisions could not be counted; ${USUAL_ROWS} were taken.`);
  const bottom = reference - (frame.rows ?? USUAL_ROWS) * perDivision;
  const confidence = (frame.rows === null ? 0.3 : 0.9) * (0.5 + 0.5 * clarity);
  return {
    top: reference,
    bottom,
    confidence,
    saw: `The reference ${reference} dB and ${perDivision} dB per division are printed.`,
    assumed,
  };
}

/** Limits of an SWR axis printed as "SWR 1 to 6". */
export function rangedAxis(words: Word[]): ValueAxis | null {
  for (const row of rowsOf(words)) {
    const match = /swr\s*[:(]?\s*([1l|I](?:\.0+)?)\s*(?:to|-|\.\.+)\s*(\S+)/i.exec(row.text);
    const top = match && repairedNumber(match[2].replace(/\)$/, ""));
    if (top && top > 1 && top <= 100) {
      return { top, bottom: 1, confidence: 0.75, saw: `SWR from 1 to ${top} is printed.`, assumed: [] };
    }
  }
  return null;
}
