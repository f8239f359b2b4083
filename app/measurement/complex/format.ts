import type { Complex } from "../reflection.ts";
import type { Element } from "./element.ts";

/** Impedances and elements as they are shown: three digits, a thin space before the unit, "unknown" for NaN. Text only. */

/** Ω → "72.1 Ω", "1.24 kΩ", "∞ Ω". */
export function formatOhm(ohm: number | null): string {
  if (ohm === null || Number.isNaN(ohm)) return UNKNOWN;
  if (!Number.isFinite(ohm)) return `${ohm < 0 ? "−" : ""}∞${THIN}Ω`;
  return Math.abs(ohm) < 1000 ? `${digits(ohm)}${THIN}Ω` : `${digits(ohm / 1000)}${THIN}kΩ`;
}

/** Z → "36.5 + j21.3 Ω"; the digits go down to the same place in both parts, at most a hundredth of an ohm. */
export function formatImpedance(z: Complex | null): string {
  if (z === null || Number.isNaN(z.re) || Number.isNaN(z.im)) return UNKNOWN;
  if (!Number.isFinite(z.re) || !Number.isFinite(z.im)) return formatOhm(Number.POSITIVE_INFINITY);
  const size = Math.max(Math.abs(z.re), Math.abs(z.im));
  const decimals = size < 10 ? 2 : size < 100 ? 1 : 0;
  const im = Math.abs(z.im).toFixed(decimals);
  const sign = z.im < 0 && Number(im) !== 0 ? "−" : "+";
  return `${minus(z.re.toFixed(decimals))} ${sign} j${im}${THIN}Ω`;
}

/** "0.451 µH", "282 pF". */
export function formatElement({ kind, value }: Pick<Element, "kind" | "value">): string {
  const { unit, from } = LOOKS[kind];
  if (!Number.isFinite(value) || !(value > 0)) return UNKNOWN;
  const { name, factor } =
    PREFIXES.find((prefix) => value >= prefix.factor * from) ?? PREFIXES[PREFIXES.length - 1];
  return `${digits(value / factor)}${THIN}${name}${unit}`;
}

/** Degrees → "−113.6°". */
export function formatDegrees(degrees: number | null): string {
  return degrees === null || Number.isNaN(degrees) ? UNKNOWN : `${minus(degrees.toFixed(1))}°`;
}

function digits(value: number): string {
  if (value === 0) return "0";
  const decimals = Math.min(3, Math.max(0, 2 - Math.floor(Math.log10(Math.abs(value)))));
  return minus(value.toFixed(decimals));
}

function minus(text: string): string {
  return text.startsWith("-") ? (Number(text) === 0 ? text.slice(1) : `−${text.slice(1)}`) : text;
}

const UNKNOWN = "unknown";
/** U+2009, thin space. */
const THIN = "\u2009";
/** A part's bag says 470 pF and 0.47 µH: where the next unit begins, in parts of it. */
const LOOKS = { inductor: { unit: "H", from: 0.1 }, capacitor: { unit: "F", from: 1 } } as const;
const PREFIXES = [
  { name: "", factor: 1 },
  { name: "m", factor: 1e-3 },
  { name: "µ", factor: 1e-6 },
  { name: "n", factor: 1e-9 },
  { name: "p", factor: 1e-12 },
];
