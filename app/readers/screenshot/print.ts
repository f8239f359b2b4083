import { namedFrequencies } from "./frequency-axis.ts";
import { type InkRegion, inkRegion, turnClockwise } from "./ink.ts";
import { labelsBelow, labelsBeside } from "./label-boxes.ts";
import type { Box, Ocr, Picture, TextKind, Word } from "./picture.ts";

/** Width in pixels to which a picture is enlarged before its text is read. */
const READING_WIDTH = 1600;
const LARGEST_SCALE = 4;
/** Confidence above which a figure is not read again. */
const SURE_WORD = 0.86;
/** Heights of digits, in pixels, at which a doubtful figure is read. */
const VOTING_SIZES = [14, 16, 18, 22, 26, 32];
const BEST_DIGIT_HEIGHT = 18;
/** Weight of the readings that differ from which a 6, 8 or 9 is a zero. */
const WAVERING_SHARE = 0.1;

/**
 * Reads what is printed around a plot, places in pixels of the picture.
 *
 * The plot's inside is left out: markers and legends there say nothing about the axes.
 */
export async function printedWords(picture: Picture, frame: Box, ocr: Ocr): Promise<Word[]> {
  const scale = readingScale(picture);
  const whole = { left: 0, top: 0, right: picture.width - 1, bottom: picture.height - 1 };
  const hide = { left: frame.left - 2, top: frame.top - 2, right: frame.right + 2, bottom: frame.bottom + 2 };
  return readRegion(inkRegion(picture, whole, scale, hide), ocr, "scattered");
}

/** Reads text that runs upwards beside the plot (the name of a vertical axis); order of reading only. */
export async function uprightWords(picture: Picture, box: Box, ocr: Ocr): Promise<string[]> {
  const region = inkRegion(picture, box, readingScale(picture));
  const words = await ocr(turnClockwise(region.grey), "scattered");
  return words.map((w) => w.text);
}

/** Words with the named frequencies read again at several sizes; the number with most support replaces the first. */
export async function rereadFrequencies(
  picture: Picture,
  frame: Box,
  words: Word[],
  ocr: Ocr,
): Promise<Word[]> {
  const named = [...namedFrequencies(words).values()].filter((n) => isDoubtful(n.word));
  if (named.length === 0) return rereadTicks(picture, frame, words, ocr);
  let result = words;
  for (const { word } of named) {
    const better = await vote(picture, word, words, ocr);
    if (better) result = result.map((w) => (w === word ? better : w));
  }
  return result;
}

/** Words with the labels beside the plot read again, each alone and at the size that suits them. */
export async function rereadLabels(picture: Picture, frame: Box, words: Word[], ocr: Ocr): Promise<Word[]> {
  const strip = {
    left: Math.max(0, frame.left - 0.2 * picture.width),
    top: frame.top - 12,
    right: frame.left - 7,
    bottom: frame.bottom + 12,
  };
  return readEach(picture, strip, labelsBeside(picture, strip), words, ocr);
}

async function rereadTicks(picture: Picture, frame: Box, words: Word[], ocr: Ocr): Promise<Word[]> {
  const strip = {
    left: Math.max(0, frame.left - 40),
    top: frame.bottom + 7,
    right: frame.right + 40,
    bottom: frame.bottom + 0.2 * picture.height,
  };
  return readEach(picture, strip, labelsBelow(picture, strip), words, ocr);
}

async function readEach(
  picture: Picture,
  strip: Box,
  boxes: Box[],
  words: Word[],
  ocr: Ocr,
): Promise<Word[]> {
  if (strip.right - strip.left < 8 || boxes.length === 0) return words;
  const fresh: Word[] = [];
  for (const box of boxes) {
    const height = box.bottom - box.top + 1;
    const margin = 0.7 * height;
    const around = {
      left: box.left - margin,
      right: box.right + margin,
      top: box.top - margin,
      bottom: box.bottom + margin,
    };
    const read = await readRegion(
      inkRegion(picture, around, Math.min(6, Math.max(1, BEST_DIGIT_HEIGHT / height))),
      ocr,
      "line",
    );
    const text = read.map((w) => w.text).join("");
    if (text) fresh.push({ ...box, text, confidence: Math.min(...read.map((w) => w.confidence)) });
  }
  const replaced = (w: Word) =>
    boxes.some((b) => w.left < b.right && w.right > b.left && w.top < b.bottom && w.bottom > b.top);
  return [...words.filter((w) => !replaced(w)), ...fresh];
}

/** Zeros with a stroke or dot inside are taken for 6 and 8. */
export function isDoubtful(word: Word): boolean {
  return word.confidence < SURE_WORD || /\.\d*[68]/.test(word.text);
}

async function vote(picture: Picture, word: Word, words: Word[], ocr: Ocr): Promise<Word | null> {
  const height = word.bottom - word.top;
  const mates = words.filter(
    (w) => Math.abs(w.top + w.bottom - word.top - word.bottom) < height && isNear(w, word, 3 * height),
  );
  const box = {
    left: Math.min(...mates.map((w) => w.left)) - height,
    right: Math.max(...mates.map((w) => w.right)) + height,
    top: word.top - 0.6 * height,
    bottom: word.bottom + 0.6 * height,
  };
  const figure = /\d[\d.]*/.exec(word.text)?.[0] ?? "";
  const reads = [{ figure, confidence: word.confidence }];
  for (const size of VOTING_SIZES) {
    for (const read of await readRegion(inkRegion(picture, box, Math.min(6, size / height)), ocr, "line")) {
      const again = /\d[\d.]*/.exec(read.text)?.[0];
      const middle = (read.left + read.right) / 2;
      const same = again && shapeOf(again) === shapeOf(figure) && middle > word.left && middle < word.right;
      if (same) reads.push({ figure: again, confidence: read.confidence });
    }
  }
  if (reads.length < 2) return null;
  const elected = [...figure].map((_, i) =>
    electDigit(reads.map((r) => ({ digit: r.figure[i], weight: r.confidence ** 2 }))),
  );
  const sure = Math.min(...elected.map((e) => e.share));
  return {
    ...word,
    text: word.text.replace(figure, elected.map((e) => e.digit).join("")),
    confidence: Math.max(0.5, sure),
  };
}

function isNear(a: Word, b: Word, reach: number): boolean {
  return a.left < b.right + reach && a.right > b.left - reach;
}

/**
 * The digit with most weight. A zero with a stroke inside is read as 6, 8 or 9, now one, now another; a true
 * 6, 8 or 9 is read the same way each time: readings that waver among these are a zero.
 */
function electDigit(reads: { digit: string; weight: number }[]): { digit: string; share: number } {
  const votes = new Map<string, number>();
  let total = 0;
  for (const { digit, weight } of reads) {
    votes.set(digit, (votes.get(digit) ?? 0) + weight);
    total += weight;
  }
  const [first] = [...votes].sort((a, b) => b[1] - a[1]);
  const round = ["0", "6", "8", "9"].reduce((sum, digit) => sum + (votes.get(digit) ?? 0), 0);
  const wavers = /[0689]/.test(first[0]) && round - first[1] > WAVERING_SHARE * total;
  return wavers ? { digit: "0", share: round / total } : { digit: first[0], share: first[1] / total };
}

/** Digits before and behind the point. */
function shapeOf(figure: string): string {
  return figure
    .split(".")
    .map((part) => part.length)
    .join(".");
}

function readingScale(picture: Picture): number {
  return Math.min(LARGEST_SCALE, Math.max(1, READING_WIDTH / picture.width));
}

async function readRegion(region: InkRegion, ocr: Ocr, kind: TextKind): Promise<Word[]> {
  const { scale, left, top } = region;
  const words = await ocr(region.grey, kind);
  return words
    .map((w) => ({
      text: w.text.trim(),
      confidence: w.confidence,
      left: left + w.left / scale - 0.5,
      right: left + w.right / scale - 0.5,
      top: top + w.top / scale - 0.5,
      bottom: top + w.bottom / scale - 0.5,
    }))
    .filter((w) => w.text.length > 0);
}
