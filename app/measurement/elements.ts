import type { Antenna, AntennaElement, ElementKind } from "./antenna.ts";
import {
  COVERED,
  LOOP_K,
  LOOSE,
  PARASITE,
  RARE,
  RULES,
  type Rule,
  type Series,
  WIRE_K,
} from "./element-rules.ts";
import { SPEED_OF_LIGHT } from "./feedline.ts";
import { formatLength, type LengthUnit } from "./lengths.ts";
import { formatFrequency } from "./units.ts";

export type { Series } from "./element-rules.ts";

/** A frequency at which a part of the antenna may resonate. */
export interface Prediction {
  /** An element's key, or FEEDLINE. */
  part: string;
  name: string;
  /** What carries the wave: quarter waves, half waves, or whole waves around a loop. */
  series: Series;
  /** How many of them, from 1. */
  order: number;
  /** "3 × quarter wave". */
  what: string;
  /** What has to be so: "if its foot is insulated"; empty for the usual case. */
  condition: string;
  frequencyHz: number;
  /** What k's usual range and the surroundings make of it; about the 95 % of cases. */
  lowHz: number;
  highHz: number;
  /** Distance of this series' predictions from each other, Hz. */
  spacingHz: number;
  /** How usual the case is, 0 to 1. */
  weight: number;
  /** Metres that the wave runs along, for the change with length. */
  pathM: number;
  /** Another part that the path goes on through, and the share of that part's length in it. */
  joined: { part: string; share: number } | null;
  /** "3 × 0.983 × c/(4 × 10.07 m) = 21.94 MHz". */
  arithmetic: string;
}

/** A part that nothing can be predicted for. */
export interface NotJudged {
  part: string;
  name: string;
  reason: string;
}

/**
 * Resonances of every part of the antenna that reach into `fromHz`..`upToHz` (Hz), ascending: n·k·c/(4L) with odd n for a wire grounded at one end,
 * n·k·c/(2L) for one that is free at both or fed in the middle, n·k·c/L for a loop. Parts without a sensible length are left
 * out: `notJudged` names them. No order over MOST_ORDER.
 *
 * k at order 1: handbook lengths 234/f and 468/f ft, so 0.951 (on-the-numbers.co.uk/useful-info.html, seen), loops 1005/f ft, so
 * 1.022 (ARRL Antenna Book; from memory, not seen). At order n the open ends take the same share of one half wave: k = 1 − (1 −
 * k1)/n, after the long-wire rule L = 492·(n − 0.05)/f ft (ARRL Antenna Book; from memory, not seen).
 */
export function predictionsOf(
  antenna: Antenna,
  upToHz: number,
  unit: LengthUnit = "metres",
  fromHz = 0,
): Prediction[] {
  const range = { fromHz, upToHz, unit };
  const parts = antenna.elements
    .filter(({ lengthM }) => isLength(lengthM))
    .flatMap((element) => RULES[element.kind].flatMap((rule) => seriesOf(ofElement(element, rule), range)));
  return [...parts, ...ofFeedline(antenna, range)].sort((a, b) => a.frequencyHz - b.frequencyHz);
}

/** Which predictions are wanted: of frequencies from, to, Hz, and how lengths are written. */
interface Wanted {
  fromHz: number;
  upToHz: number;
  unit: LengthUnit;
}

/** The parts that make no predictions, and why. */
export function notJudged({ elements, feedline }: Antenna): NotJudged[] {
  const missing = elements
    .filter(({ lengthM }) => !isLength(lengthM))
    .map(({ key, name, kind, lengthM }) => ({ part: key, name: name || kind, reason: reasonOf(lengthM) }));
  if (!feedline) return [...missing, { part: FEEDLINE, name: FEEDLINE_NAME, reason: "no feedline said" }];
  if (isLength(feedline.lengthM)) return missing;
  return [...missing, { part: FEEDLINE, name: FEEDLINE_NAME, reason: reasonOf(feedline.lengthM) }];
}

interface Part extends Rule {
  part: string;
  name: string;
  pathM: number;
  joined?: { part: string; share: number };
  k: number;
  /** How the path's length is written. */
  path?: (unit: LengthUnit) => string;
}

function ofElement({ key, name, kind, lengthM, insulated }: AntennaElement, rule: Rule): Part {
  const k = (rule.series === "loop" ? LOOP_K : WIRE_K) * (insulated ? COVERED : 1);
  return { ...rule, part: key, name: name || kind, pathM: lengthM as number, k };
}

/**
 * The outside of the feedline as a wire: its far end grounded or free, so any number of quarter waves; without a choke also on
 * through half of a dipole, or a radial, to that one's end.
 */
function ofFeedline({ feedline, choke, elements }: Antenna, range: Wanted): Prediction[] {
  if (!feedline || !isLength(feedline.lengthM)) return [];
  const lengthM = feedline.lengthM as number;
  const condition = choke ? "if the choke does not stop it there" : "";
  const weight = choke ? RARE : PARASITE;
  const base = { part: FEEDLINE, name: FEEDLINE_NAME, k: WIRE_K, spread: LOOSE, step: 2 as const };
  const alone: Part[] = [
    { ...base, series: "quarter", first: 1, weight, condition, pathM: lengthM },
    { ...base, series: "half", first: 1, step: 1, weight, condition, pathM: lengthM },
  ];
  const arm = choke ? null : armOf(elements);
  if (arm) {
    const path = (u: LengthUnit) => `(${formatLength(lengthM, u)} + ${formatLength(arm.lengthM, u)})`;
    const joined = {
      ...base,
      pathM: lengthM + arm.lengthM,
      path,
      weight: PARASITE,
      condition: `together with ${arm.name}`,
      joined: arm.joined,
    };
    alone.push({ ...joined, series: "quarter", first: 1 }, { ...joined, series: "half", first: 1, step: 1 });
  }
  return alone.flatMap((part) => seriesOf(part, range));
}

/** What the feedline's outside joins: half of the longest dipole, else a radial. */
function armOf(elements: readonly AntennaElement[]) {
  const longest = (kind: ElementKind) =>
    elements
      .filter((e) => e.kind === kind && isLength(e.lengthM))
      .sort((a, b) => (b.lengthM ?? 0) - (a.lengthM ?? 0))[0];
  const dipole = longest("dipole");
  const arm = dipole ?? longest("radial");
  if (!arm) return null;
  const share = dipole ? 0.5 : 1;
  const name = dipole ? `half of ${arm.name || "the dipole"}` : arm.name || "a radial";
  return { name, lengthM: share * (arm.lengthM ?? 0), joined: { part: arm.key, share } };
}

function seriesOf(part: Part, { fromHz, upToHz, unit }: Wanted): Prediction[] {
  const base = SPEED_OF_LIGHT / (DIVISOR[part.series] * part.pathM);
  const made: Prediction[] = [];
  for (let order: number = part.first; order <= MOST_ORDER; order += part.step) {
    const k = part.series === "loop" ? 1 + (part.k - 1) / order : 1 - (1 - part.k) / order;
    const frequencyHz = order * k * base;
    const half = order * base * (part.spread / order + SURROUNDINGS * (1 - 1 / order));
    if (!(frequencyHz - half <= upToHz)) break;
    if (frequencyHz + half < fromHz) continue;
    const spacingHz = part.step * base;
    const arithmetic = arithmeticOf(part, order, k, frequencyHz, unit);
    const { name, series, condition, weight, pathM, joined = null } = part;
    const what = order === 1 ? WAVE[series] : `${order} × ${WAVE[series]}`;
    const range = { frequencyHz, lowHz: frequencyHz - half, highHz: frequencyHz + half, spacingHz };
    made.push({
      part: part.part,
      name,
      series,
      order,
      what,
      condition,
      ...range,
      weight,
      pathM,
      joined,
      arithmetic,
    });
  }
  return made;
}

function arithmeticOf(part: Part, order: number, k: number, frequencyHz: number, unit: LengthUnit): string {
  const length = part.path ? part.path(unit) : formatLength(part.pathM, unit);
  const below = part.series === "loop" ? length : `(${DIVISOR[part.series]} × ${length})`;
  return `${order === 1 ? "" : `${order} × `}${k.toFixed(3)} × c/${below} = ${formatFrequency(Number(frequencyHz.toPrecision(4)))}`;
}

function isLength(lengthM: number | null): boolean {
  return lengthM !== null && Number.isFinite(lengthM) && lengthM > 0;
}

function reasonOf(lengthM: number | null): string {
  return lengthM === null || Number.isNaN(lengthM) ? "length not said" : "length is not more than zero";
}

/** The feedline's key among the parts, as steps point at it. */
export const FEEDLINE = "feedline";
const FEEDLINE_NAME = "the feedline's outer surface";
const DIVISOR: Record<Series, number> = { quarter: 4, half: 2, loop: 1 };
const WAVE: Record<Series, string> = { quarter: "quarter wave", half: "half wave", loop: "wave around" };

/** What neighbouring conductors and ground move a resonance by, 95 %: 0 to 3 % in the models of tests/fixtures/nec. */
const SURROUNDINGS = 0.02;
/** 20 times the lowest design frequency is order 20 of its element; the outside of a long feedline goes further. */
const MOST_ORDER = 80;
