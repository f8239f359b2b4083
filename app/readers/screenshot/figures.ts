import type { Word } from "./picture.ts";

/** A number that a printed word may stand for; `weight` is how well the print supports it, 0 to 1. */
export interface Candidate {
  value: number;
  weight: number;
  /** The value is a power of ten written with raised digits, which only logarithmic axes have. */
  raised?: boolean;
}

const MISTAKEN: Record<string, string> = {
  O: "0",
  o: "0",
  Q: "0",
  D: "0",
  "@": "0",
  e: "0",
  "®": "0",
  "©": "0",
  "°": "0",
  "&": "8",
  l: "1",
  I: "1",
  "|": "1",
  "!": "1",
  i: "1",
  "]": "1",
  s: "5",
  S: "5",
  B: "8",
  Z: "2",
  z: "2",
  b: "6",
  A: "4",
};
/** What small raised digits are taken for. */
const RAISED: Record<string, number[]> = {
  "°": [0],
  º: [0],
  "®": [0],
  o: [0],
  O: [0],
  "0": [0],
  "9": [0, 9],
  "'": [1],
  "’": [1],
  "!": [1],
  "‘": [1],
  "1": [1],
  "*": [1, 4],
  "?": [2, 7],
  "²": [2],
  "2": [2],
  "7": [2],
  "³": [3],
  "3": [3],
  "4": [4],
  "5": [5],
  "6": [6],
};
/** Width of a digit and of a decimal point, in heights of a digit: proportional and fixed fonts lie around these. */
const DIGIT_WIDTH = 0.8;
const POINT_WIDTH = 0.4;

/** Pixels within which an axis ends at a label, or at a rounder number. */
const LABEL_PIXELS = 1.6;
const ROUND_PIXELS = 0.8;

/** Share of an axis' labels with a decimal point from which all are taken to have one. */
const LEAST_POINTED = 0.25;

/** Dashes of all kinds become a minus sign, tick marks behind the figure go. */
export function cleanFigure(text: string): string {
  return text
    .replace(/[—–−~_¬]/g, "-")
    .replace(/,/g, ".")
    .replace(/(\d)[-=.:']+$/, "$1")
    .replace(/^[-]+/, "-")
    .replace(/^[([{'"‘“]+/, "");
}

/** A plain number, or null where the word is none. */
export function plainNumber(text: string): number | null {
  const clean = cleanFigure(text);
  if (!/^-?(\d+\.?\d*|\.\d+)$/.test(clean)) return null;
  return Number(clean);
}

/** The same with letters that are often taken for digits put back. Null unless half of it was digits. */
export function repairedNumber(text: string): number | null {
  const plain = plainNumber(text);
  if (plain !== null) return plain;
  const clean = cleanFigure(text);
  const digits = (clean.match(/\d/g) ?? []).length;
  if (clean.length > 9 || digits * 2 < clean.replace(/[-.]/g, "").length) return null;
  return plainNumber([...clean].map((c) => MISTAKEN[c] ?? c).join(""));
}

/** All numbers that a tick label may stand for: as read, with a lost decimal point (likely among `decimals`), with a lost minus. */
export function tickCandidates(word: Word, decimals = false): Candidate[] {
  const power = powerOfTen(word);
  if (power.length > 0) return power;
  const value = repairedNumber(word.text);
  if (value === null) return [];
  const certain = plainNumber(word.text) !== null ? 1 : 0.6;
  const clean = cleanFigure(word.text);
  const found: Candidate[] = [{ value, weight: certain }];
  if (!clean.includes(".")) {
    const digits = clean.replace("-", "").length;
    const width = (word.right - word.left) / Math.max(1, word.bottom - word.top);
    const room = width - (digits * DIGIT_WIDTH - 0.1);
    const wide = decimals || (!clean.startsWith("-") && room > POINT_WIDTH / 2);
    if (digits >= 2) {
      found[0].weight *= decimals ? 0.5 : wide ? 0.75 : 1;
      found.push({ value: value / 10, weight: certain * (wide ? 0.9 : 0.4) });
    }
    if (digits >= 3) found.push({ value: value / 100, weight: certain * 0.25 });
  }
  const unslashed = clean.replace(/(\.\d*?)[68]/g, "$10");
  if (unslashed !== clean) found.push({ value: Number(unslashed), weight: certain * 0.5 });
  if (value > 0) found.push({ value: -value, weight: certain * 0.35 });
  return found;
}

/** Whether an axis' labels have decimals: then one without a point has lost it. */
export function haveDecimals(words: Word[]): boolean {
  const figures = words.filter((w) => plainNumber(w.text) !== null);
  const pointed = figures.filter((w) => /\d[.,]\d/.test(w.text)).length;
  return pointed >= 2 && pointed >= LEAST_POINTED * figures.length;
}

/** "10²" comes as 102, 10?, 10*; "3×10¹" as 3x10!. */
function powerOfTen(word: Word): Candidate[] {
  const match = /^(?:(\d(?:\.\d)?)\s*[xX×*]\s*)?10(\D|\d)?$/.exec(word.text.replace(/\s/g, ""));
  if (!match) return [];
  const mantissa = match[1] ? Number(match[1]) : 1;
  const raised = match[2] ? (RAISED[match[2]] ?? []) : [];
  const found: Candidate[] = [];
  if (!match[1]) {
    const plain = plainNumber(word.text);
    if (plain !== null) found.push({ value: plain, weight: match[2] ? 0.8 : 1 });
  }
  if (match[2] || match[1]) {
    for (let e = 0; e <= 9; e++) {
      found.push({
        value: mantissa * 10 ** e,
        weight: raised.includes(e) ? 0.9 : 0.3 - 0.02 * e,
        raised: true,
      });
    }
  }
  return found;
}

/** The number with the fewest digits within `tolerance` of a value. */
function roundest(value: number, tolerance: number): number {
  if (!(tolerance > 0)) return value;
  const start = Math.ceil(Math.log10(Math.max(Math.abs(value), tolerance, 1e-12))) + 1;
  for (let power = start; power > start - 14; power--) {
    for (const unit of [10, 5, 2.5, 2]) {
      const step = unit * 10 ** (power - 1);
      const near = Math.round(value / step) * step;
      if (Math.abs(near - value) <= tolerance) return Number(near.toPrecision(12));
    }
  }
  return value;
}

/** The value at the end of an axis: a label's multiple if it is near, else the number with the fewest digits. */
export function endValue(value: number, step: number, pixel: number): number {
  const multiple = Math.round(value / step) * step;
  if (Math.abs(multiple - value) <= LABEL_PIXELS * pixel) return Number(multiple.toPrecision(12));
  return roundest(value, ROUND_PIXELS * pixel);
}
