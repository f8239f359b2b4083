import { alignToLines } from "./align.ts";
import {
  type Candidate,
  cleanFigure,
  endValue,
  haveDecimals,
  repairedNumber,
  tickCandidates,
} from "./figures.ts";
import type { Frame } from "./frame.ts";
import type { Word } from "./picture.ts";
import { lettersApart, type Row, rowsOf } from "./rows.ts";
import { fitTicks, labelStep, refine, type TickFit } from "./tick-fit.ts";

export interface FrequencyAxis {
  startHz: number;
  stopHz: number;
  scale: "linear" | "log";
  confidence: number;
  saw: string;
  assumed: string[];
}

const UNITS: [RegExp, number][] = [
  [/g\s?h[z2:]/i, 1e9],
  [/m\s?h[z2:]/i, 1e6],
  [/k\s?h[z2:]/i, 1e3],
  [/\bh[z2]\b/i, 1],
];
/** Words of an instrument's own settings, which also carry frequencies. */
const SETTINGS = /\b(r\s?bw|v\s?bw|if\s?bw|bandwidth|marker|mkr|step)\b/i;
const KEYS = ["start", "stop", "center", "centre", "span", "from", "to", "end"] as const;
type Key = (typeof KEYS)[number];

/** The unit that a piece of text names, in Hz, or null. */
export function unitOf(text: string): number | null {
  for (const [pattern, factor] of UNITS) if (pattern.test(text)) return factor;
  return null;
}

/** Numbers that printed words give to "start", "stop", "centre" and "span", with the words they stand in. */
export function namedFrequencies(words: Word[]): Map<Key, { hz: number; word: Word; unitSeen: boolean }> {
  const found = new Map<Key, { hz: number; word: Word; unitSeen: boolean }>();
  for (const row of rowsOf(words)) {
    let key: Key | null = null;
    for (let i = 0; i < row.words.length; i++) {
      const word = row.words[i];
      const named = keyOf(word.text);
      if (named) key = named;
      const figure = named ? word.text.replace(/^[a-z]+[:=.]?/i, "") : word.text;
      if (!key || found.has(key) || SETTINGS.test(word.text)) continue;
      const value = numberWithUnit(figure);
      if (value === null) continue;
      const own = unitOf(figure) ?? unitOf(row.words[i + 1]?.text ?? "");
      found.set(key, { hz: value * (own ?? 1e6), word, unitSeen: own !== null });
      key = null;
    }
  }
  return found;
}

/** Start and stop from their printed names, or null. */
export function namedAxis(words: Word[]): FrequencyAxis | null {
  const named = namedFrequencies(words);
  const get = (...keys: Key[]) => keys.map((k) => named.get(k)).find((n) => n !== undefined);
  const start = get("start", "from");
  const stop = get("stop", "end");
  const centre = get("center", "centre");
  const span = get("span");
  let limits: [number, number] | null = null;
  let saw = "";
  let used: ({ hz: number; word: Word; unitSeen: boolean } | undefined)[] = [];
  if (start && stop && stop.hz > start.hz) {
    limits = [start.hz, stop.hz];
    saw = "Start and stop are printed.";
    used = [start, stop];
  } else if (centre && span && span.hz > 0 && centre.hz * 2 >= span.hz) {
    limits = [centre.hz - span.hz / 2, centre.hz + span.hz / 2];
    saw = "Centre and span are printed.";
    used = [centre, span];
  }
  if (!limits) return null;
  const clarity = Math.min(...used.map((u) => u?.word.confidence ?? 0));
  const assumed = used.some((u) => !u?.unitSeen)
    ? ["The frequencies were taken as MHz: no unit was read."]
    : [];
  return {
    startHz: limits[0],
    stopHz: limits[1],
    scale: "linear",
    confidence: 0.5 + 0.5 * clarity,
    saw,
    assumed,
  };
}

/** A number with its unit below each of the plot's lower corners, with no name. */
export function cornerAxis(words: Word[], frame: Frame): FrequencyAxis | null {
  const reach = 0.2 * (frame.right - frame.left);
  const below = rowsOf(words.filter((w) => w.top > frame.bottom - 3));
  for (const row of below) {
    if (SETTINGS.test(row.text)) continue;
    const ends = [
      row.words.filter((w) => w.left < frame.left + reach),
      row.words.filter((w) => w.right > frame.right - reach),
    ];
    const values = ends.map((side) => {
      const text = side.map((w) => w.text).join(" ");
      const unit = unitOf(text);
      const number = side.map((w) => numberWithUnit(w.text)).find((v) => v !== null);
      return unit !== null && number !== undefined && number !== null ? number * unit : null;
    });
    const [startHz, stopHz] = values;
    if (startHz !== null && stopHz !== null && stopHz > startHz) {
      return {
        startHz,
        stopHz,
        scale: "linear",
        confidence: 0.6,
        saw: "A frequency is printed below each corner.",
        assumed: ["The frequencies below the plot's corners were taken as start and stop."],
      };
    }
  }
  return null;
}

/** Start and stop from the labels of ticks below or above the plot. */
export function tickAxis(words: Word[], frame: Frame, places: number[]): FrequencyAxis | null {
  const length = frame.right - frame.left;
  let best: { fit: TickFit; row: Row } | null = null;
  const outside = words.filter((w) => w.top > frame.bottom - 4 || w.bottom < frame.top + 4);
  for (const row of rowsOf(outside)) {
    if (SETTINGS.test(row.text)) continue;
    const decimals = haveDecimals(row.words);
    const ticks = row.words
      .filter((w) => w.right > frame.left - 30 && w.left < frame.right + 30)
      .map((w) => ({ position: (w.left + w.right) / 2, candidates: frequencyCandidates(w, decimals) }));
    for (const scale of ["linear", "log"] as const) {
      const fit = fitTicks(ticks, length, scale);
      if (!fit || fit.slope < 0) continue;
      const bonus = scale === "linear" ? 0.3 : 0;
      if (!best || fit.weight + bonus > best.fit.weight + (best.fit.scale === "linear" ? 0.3 : 0))
        best = { fit, row };
    }
  }
  if (!best || best.fit.weight < 1.2) return null;
  return settle(best.fit, best.row, words, frame, places);
}

function settle(fit: TickFit, row: Row, words: Word[], frame: Frame, places: number[]): FrequencyAxis {
  const along = (v: number) => (fit.scale === "log" ? Math.log10(v) : v);
  const height = Math.max(...row.words.map((w) => w.bottom - w.top));
  const aligned = refine(
    {
      ...fit,
      used: alignToLines(fit.used, [...places, frame.left, frame.right], 0.8 * height),
    },
    along,
  );
  const pixel = Math.abs(aligned.slope);
  const at = (x: number) => {
    const value = aligned.intercept + aligned.slope * x;
    if (fit.scale === "linear") return endValue(value, labelStep(fit), pixel);
    const decade = Math.round(value);
    if (Math.abs(decade - value) < 1.6 * pixel) return 10 ** decade;
    const plain = 10 ** value;
    return endValue(plain, Number.POSITIVE_INFINITY, plain * Math.LN10 * pixel);
  };
  const named = rowsOf(words)
    .filter((r) => (r.top > frame.bottom || r.bottom < frame.top) && !SETTINGS.test(r.text))
    .map((r) => unitOf(r.text))
    .find((u) => u !== null);
  const power = words.map((w) => /^1e([3-9])$/i.exec(w.text)?.[1]).find((p) => p !== undefined);
  const unit = (named ?? 1e6) * (power ? 10 ** Number(power) : 1);
  const assumed = named ? [] : ["The frequencies were taken as MHz: no unit was read."];
  const share = fit.inliers / Math.max(1, fit.total);
  const confidence = Math.min(0.98, 0.35 + 0.1 * Math.min(4, fit.weight) + 0.25 * share) * (named ? 1 : 0.8);
  return {
    startHz: at(frame.left) * unit,
    stopHz: at(frame.right) * unit,
    scale: fit.scale,
    confidence,
    saw: `${fit.inliers} of ${fit.total} frequency labels agree on a ${fit.scale === "log" ? "logarithmic" : "linear"} axis.`,
    assumed,
  };
}

function frequencyCandidates(word: Word, decimals: boolean): Candidate[] {
  const bare = { ...word, text: word.text.replace(/[kMG]?H[z2:]$/i, "") };
  return tickCandidates(bare, decimals).filter((c) => c.value >= 0);
}

function keyOf(text: string): Key | null {
  const letters = /^[a-z5]+/i.exec(text)?.[0].toLowerCase().replace("5", "s") ?? "";
  if (letters.length < 3) return null;
  return (
    KEYS.find(
      (k) => letters === k || (k.length >= 4 && letters.length >= 4 && lettersApart(letters, k) <= 1),
    ) ?? null
  );
}

function numberWithUnit(text: string): number | null {
  const bare = cleanFigure(text).replace(/[kMG]?H[z2:]?$/i, "");
  if (!/\d/.test(bare)) return null;
  return repairedNumber(bare);
}
