/**
 * Lengths as people write them, and back. Metres inside; 1 ft = 0.3048 m exactly (international foot, 1959; from
 * memory, not seen).
 */

export type LengthUnit = "metres" | "feet";

export type ParsedLength =
  /** `ask` is a question to put before the length is taken: it is possible, but seldom meant. */
  | { ok: true; metres: number; ask: string | null }
  /** `at`: the character, counted from 0, where the text stops making sense. */
  | { ok: false; message: string; at: number };

/**
 * "10 ft 3 in", `10' 3 1/2"`, "3.1 m", "312 cm", "5,07" → metres. A bare number is in metres, or in feet where
 * `preferred` says so; a decimal comma or point. Zero, negative and unreadable lengths are refused with the place of the
 * fault; over MOST_M or under LEAST_M, or a comma that may part thousands, is asked about. Never throws.
 */
export function parseLength(text: string, preferred: LengthUnit = "metres"): ParsedLength {
  const plain = text
    .replace(/[′’‘`´]/g, "'")
    .replace(/[″“”]/g, '"')
    .replace(/''/g, '" ');
  const parts: { metres: number; unit: string | null; digits: string; at: number }[] = [];
  const end = plain.trimEnd().length;
  let at = plain.length - plain.trimStart().length;
  if (at >= end) return { ok: false, message: "No length is given.", at: 0 };
  while (at < end) {
    const match = PART.exec(plain.slice(at));
    if (!match) return { ok: false, message: faultAt(plain.slice(at, end)), at };
    const [whole, sign, number, fraction, unit] = match;
    if (sign === "-" || sign === "−") return { ok: false, message: "A length can't be negative.", at };
    const value = (number ? Number(number.replace(",", ".")) : 0) + (fraction ? fractionOf(fraction) : 0);
    if (!Number.isFinite(value)) return { ok: false, message: "The fraction divides by zero.", at };
    const name = unit ? UNIT_OF[unit.toLowerCase()] : null;
    if (name === undefined)
      return {
        ok: false,
        message: `"${unit}" is no unit of length here: m, cm, mm, ft or in.`,
        at: at + whole.indexOf(unit),
      };
    const wrong = name && wrongOrder(parts.at(-1)?.unit ?? null, name, parts.length);
    if (wrong) return { ok: false, message: wrong, at };
    parts.push({ metres: value, unit: name, digits: number ?? "", at });
    at += whole.length;
  }
  return summed(parts, preferred);
}

/**
 * Metres → "10.14 m", or "33 ft 3 1/4 in" by the person's setting; null or NaN → "unknown". Metres to the millimetre below
 * 100 m and to the centimetre above; inches to the eighth below 100 ft, whole above: what a tape measure
 * gives.
 */
export function formatLength(metres: number | null, unit: LengthUnit = "metres"): string {
  if (metres === null || Number.isNaN(metres)) return "unknown";
  const size = Math.abs(metres);
  const sign = metres < 0 ? "−" : "";
  if (unit === "metres") return `${sign}${trimmed(size, size < 100 ? 3 : 2)}${THIN}m`;
  return `${sign}${feetAndInches(size, size / FOOT_M < 100 ? EIGHTH : 1)}`;
}

/** A change of length with its sign: "−2.9 cm", "+1 1/8 in"; from 1 m or 3 ft on as a length. */
export function formatLengthChange(metres: number | null, unit: LengthUnit = "metres"): string {
  if (metres === null || Number.isNaN(metres)) return "unknown";
  const size = Math.abs(metres);
  const sign = metres < 0 ? "−" : "+";
  if (unit === "metres") {
    if (size >= 1) return `${sign}${trimmed(size, 2)}${THIN}m`;
    return `${sign}${size >= 0.1 ? trimmed(size * 100, 0) : trimmed(size * 100, 1)}${THIN}cm`;
  }
  return `${sign}${feetAndInches(size, size < 3 * FOOT_M ? SIXTEENTH : EIGHTH)}`;
}

type Part = { metres: number; unit: string | null; digits: string; at: number };

function summed(parts: Part[], preferred: LengthUnit): ParsedLength {
  let metres = 0;
  for (const [i, part] of parts.entries()) {
    if (part.unit === null && parts.length > 1 && !(i > 0 && parts[i - 1].unit === "ft"))
      return { ok: false, message: "Each number needs its unit.", at: part.at };
    const unit = part.unit ?? (i > 0 ? "in" : preferred === "feet" ? "ft" : "m");
    metres += part.metres * METRES[unit];
  }
  const [first] = parts;
  if (!(metres > 0))
    return {
      ok: false,
      message: "A length must be more than zero. Leave it empty where it is not known.",
      at: first.at,
    };
  if (!Number.isFinite(metres)) return { ok: false, message: "The number is too large.", at: first.at };
  return { ok: true, metres, ask: question(metres, parts, preferred) };
}

function question(metres: number, parts: Part[], preferred: LengthUnit): string | null {
  const read = formatLength(metres, preferred);
  if (parts.some(({ digits }) => /^[1-9]\d{0,2},\d{3}$/.test(digits)))
    return `The comma was read as a decimal sign: ${read}. Is that right?`;
  if (metres > MOST_M) return `${read} is longer than most antennas and feedlines. Is the unit right?`;
  if (metres < LEAST_M) return `${read} is shorter than an antenna's parts usually are. Is the unit right?`;
  return null;
}

function wrongOrder(before: string | null, unit: string, count: number): string | null {
  if (count === 0) return null;
  if (before === "ft" && unit === "in") return null;
  if (before === "m" && (unit === "cm" || unit === "mm")) return null;
  if (before === "cm" && unit === "mm") return null;
  return "Only feet with inches, or metres with centimetres, go together, the larger first.";
}

function faultAt(rest: string): string {
  return /^\s*[-+−]?\s*[a-z'"]/i.test(rest)
    ? "A number was expected before the unit."
    : `"${rest.trim().slice(0, 12)}" is no length: write it like 3.1 m, 312 cm or 10 ft 3 in.`;
}

function fractionOf(fraction: string): number {
  const known = VULGAR[fraction.trim()];
  if (known !== undefined) return known;
  const [above, below] = fraction.split(/[/⁄]/).map(Number);
  return below === 0 ? Number.NaN : above / below;
}

function feetAndInches(metres: number, step: number): string {
  const steps = Math.round(metres / INCH_M / step);
  const feet = Math.floor((steps * step) / 12);
  const left = steps - (feet * 12) / step;
  const inches = Math.floor(left * step);
  const over = Math.round((left * step - inches) / step);
  const fraction = over === 0 ? "" : reduced(over, Math.round(1 / step));
  const inchText = [inches > 0 || !fraction ? String(inches) : "", fraction].filter(Boolean).join(" ");
  if (feet === 0) return `${inchText}${THIN}in`;
  return left === 0 ? `${feet}${THIN}ft` : `${feet}${THIN}ft ${inchText}${THIN}in`;
}

function reduced(above: number, below: number): string {
  return above % 2 === 0 ? reduced(above / 2, below / 2) : `${above}/${below}`;
}

function trimmed(value: number, decimals: number): string {
  const text = value.toFixed(decimals);
  return text.includes(".") ? text.replace(/\.?0+$/, "") : text;
}

/** Sign, number, fraction and unit of one part; the fraction alone is a number too. */
const PART =
  /^\s*([-+−]?)\s*(?:(\d+(?:[.,]\d+)?|[.,]\d+)(?!\d*\s*[/⁄]))?\s*(\d+\s*[/⁄]\s*\d+|[¼½¾⅛⅜⅝⅞])?(?<=[\d¼½¾⅛⅜⅝⅞])\s*([a-zµ]+\.?|'|")?\s*(?:,(?=\s))?\s*/i;
const VULGAR: Record<string, number> = {
  "¼": 0.25,
  "½": 0.5,
  "¾": 0.75,
  "⅛": 0.125,
  "⅜": 0.375,
  "⅝": 0.625,
  "⅞": 0.875,
};
const FOOT_M = 0.3048;
const INCH_M = FOOT_M / 12;
const METRES: Record<string, number> = { m: 1, cm: 0.01, mm: 0.001, km: 1000, ft: FOOT_M, in: INCH_M };
const UNIT_OF: Record<string, string> = {
  m: "m",
  "m.": "m",
  metre: "m",
  metres: "m",
  meter: "m",
  meters: "m",
  cm: "cm",
  mm: "mm",
  km: "km",
  ft: "ft",
  "ft.": "ft",
  foot: "ft",
  feet: "ft",
  "'": "ft",
  in: "in",
  "in.": "in",
  inch: "in",
  inches: "in",
  '"': "in",
};
const EIGHTH = 1 / 8;
const SIXTEENTH = 1 / 16;
/** Longest seen in use: long-wave wires and cable runs of some 300 m (common practice, no source). */
const MOST_M = 500;
/** Shortest in use: a quarter wave at 1.3 GHz is 5.8 cm; under 1 cm a unit is more likely wrong. */
const LEAST_M = 0.01;
/** U+2009, thin space. */
const THIN = "\u2009";
