import type { Column } from "./columns.ts";

/** What a column holds once heading and values have both been heard. */
export type Kind =
  | "s11-db"
  | "return-loss"
  | "swr"
  | "level"
  | "magnitude"
  | "angle"
  | "real"
  | "imaginary"
  | "resistance"
  | "reactance"
  | "impedance"
  | "other";

export interface Held {
  column: Column;
  kind: Kind;
  /** Plain sentence where the heading alone did not say it. */
  assumed: string | null;
  confidence: number;
}

export interface Hints {
  /** The file speaks of dBm or the like above its table. */
  levels: boolean;
  /** A column of angles stands beside: the instrument measures reflection, not levels. */
  phase: boolean;
  /** Somebody gave the level of the 0 dB line. */
  zeroDbGiven: boolean;
}

/** Highest dB value of a full reflection that still passes for S11; raw levels seen lie at -8 and below. */
const REFLECTION_CREST_DB = -6;
/** The same where the heading speaks of a level or a trace. */
const LEVEL_CREST_DB = -1;
/** Values over this can't be abs Γ or a part of Γ, noise and calibration errors included. */
const GAMMA_LIMIT = 1.5;

/** Decides what a column holds. Never fails; what can't be a reflection is "other". */
export function kindOf(column: Column, hints: Hints): Held {
  const { heading } = column;
  const say = (kind: Kind, assumed: string | null = null, confidence = 1): Held => ({
    column,
    kind,
    assumed,
    confidence,
  });
  if (column.filled === 0 || column.values.length === 0) return say("other");
  if (column.unit !== null && /^db[muc]/.test(column.unit)) return say("level");
  switch (heading.role) {
    case "frequency":
    case "other":
      return say("other");
    case "s11-db":
      return positive(column)
        ? say(
            "return-loss",
            `${name(column)} is positive: taken as return loss, its dip being the largest value.`,
            0.9,
          )
        : say("s11-db");
    case "return-loss":
      return positive(column)
        ? say("return-loss")
        : say("s11-db", `${name(column)} is written with a minus sign: taken as S11 in dB.`, 0.97);
    case "swr":
      return column.median >= 0.99 ? say("swr") : wrong(column, hints, "SWR");
    case "magnitude":
      return column.minimum < -0.5 || column.maximum > 3
        ? wrong(column, hints, "a linear magnitude")
        : say("magnitude");
    case "level":
      return say("level");
    case "decibel":
    case "reflection":
      return decibels(column, hints);
    case "unknown":
      return fromValues(column, hints);
    default:
      return say(heading.role);
  }
}

/** True where the numbers of a dB column are return losses rather than S11. */
export function positive({
  minimum,
  maximum,
  median,
}: {
  minimum: number;
  maximum: number;
  median: number;
}): boolean {
  return median === 0 ? maximum > -minimum : median > 0;
}

function decibels(column: Column, hints: Hints): Held {
  const say = (kind: Kind, assumed: string, confidence: number): Held => ({
    column,
    kind,
    assumed,
    confidence,
  });
  const reflection = column.heading.role === "reflection";
  if (reflection && column.minimum >= 0 && column.maximum <= GAMMA_LIMIT)
    return say("magnitude", `${name(column)} lies between 0 and 1: taken as the magnitude of Γ.`, 0.85);
  if (!reflection && !hints.phase && (hints.levels || hints.zeroDbGiven))
    return say("level", `${name(column)} is taken as a level that needs a 0 dB line.`, 0.9);
  if (positive(column) && column.minimum > -1)
    return say("return-loss", `${name(column)} is positive: taken as return loss.`, 0.7);
  const crest = crestOf(column);
  const worded = /level|pegel|niveau|nivel|livello|trace|spur|hold|power|leistung|trc/i.test(
    column.heading.text,
  );
  if (
    reflection ||
    hints.phase ||
    (column.maximum < 1 && crest > (worded ? LEVEL_CREST_DB : REFLECTION_CREST_DB))
  )
    return say(
      "s11-db",
      `${name(column)} is taken as S11 in dB: its crest lies near 0 dB.`,
      reflection ? 0.95 : 0.7,
    );
  return say(
    "level",
    `${name(column)} is taken as a level: its crest lies at ${crest.toFixed(1)} dB, not near 0 dB.`,
    0.7,
  );
}

/** No heading helps: the range and the shape of the values must. */
function fromValues(column: Column, hints: Hints): Held {
  const say = (kind: Kind, assumed: string, confidence: number): Held => ({
    column,
    kind,
    assumed,
    confidence,
  });
  const { minimum, maximum } = column;
  if (hints.levels || hints.zeroDbGiven || minimum < -0.5) return decibels(column, hints);
  if (minimum >= 0 && maximum <= 1.05)
    return say("magnitude", `${name(column)} lies between 0 and 1: taken as the magnitude of Γ.`, 0.5);
  if (minimum < 0.99)
    return say(
      "return-loss",
      `${name(column)} is positive and falls below 1: taken as return loss in dB.`,
      0.6,
    );
  const [first, last] = [column.values[0], column.values[column.values.length - 1]];
  const ends = Math.min(first, last) > column.median ? 1 : Math.max(first, last) < column.median ? -1 : 0;
  const swr = hollow(column, (v) => (v - 1) / (v + 1));
  const loss = hollow(column, (v) => 10 ** (-v / 20));
  if (ends < 0 || (ends === 0 && loss > swr && loss > 0))
    return say(
      "return-loss",
      `${name(column)} peaks between its ends: taken as return loss in dB, not SWR.`,
      0.5,
    );
  return say(
    "swr",
    `${name(column)} is never below 1 and has hollows between its ends: taken as SWR, not return loss.`,
    0.5,
  );
}

function wrong(column: Column, hints: Hints, promised: string): Held {
  const held = fromValues({ ...column, heading: { ...column.heading, role: "unknown" } }, hints);
  return {
    ...held,
    assumed:
      `${name(column)} can't be ${promised} with values from ${column.minimum} to ${column.maximum}. ${held.assumed ?? ""}`.trim(),
    confidence: 0.4,
  };
}

/** How far the middle value lies toward the crest, -1 to 1: a resonance is a narrow hollow in abs Γ. */
function hollow({ minimum, maximum, median }: Column, toMagnitude: (v: number) => number): number {
  const ends = [toMagnitude(minimum), toMagnitude(maximum)];
  const low = Math.min(...ends);
  const high = Math.max(...ends);
  return high > low ? (2 * (toMagnitude(median) - low)) / (high - low) - 1 : 0;
}

function crestOf(column: Column): number {
  const sorted = Float64Array.from(column.values).sort();
  return sorted[Math.floor(sorted.length * 0.9)] ?? Number.NaN;
}

function name(column: Column): string {
  return column.heading.text ? `The column "${column.heading.text}"` : `Column ${column.index + 1}`;
}
