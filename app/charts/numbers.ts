/**
 * Numbers as people read them on pages, charts and in mails: thin space before the unit, no more digits
 * than the uncertainty supports, "unknown" said and never zero.
 */

const THIN = "\u202f";
const UNITS = [
  { name: "GHz", spoken: "gigahertz", exponent: 9 },
  { name: "MHz", spoken: "megahertz", exponent: 6 },
  { name: "kHz", spoken: "kilohertz", exponent: 3 },
  { name: "Hz", spoken: "hertz", exponent: 0 },
] as const;
const DIGITS_WHEN_UNKNOWN = 5;
const MOST_DECIMALS = 6;
/** Above this an SWR is a near-total reflection and its digits say nothing. */
const SWR_TOO_HIGH_TO_TELL = 100;

export type FrequencyUnitName = (typeof UNITS)[number]["name"];

/** `18.104 MHz`: the last digit is of the size of the uncertainty; five digits where that is unknown. */
export function formatFrequency(hz: number, uncertaintyHz: number | null = null): string {
  const unit = unitFor(hz);
  return `${frequencyDigits(hz, uncertaintyHz, unit.exponent)}${THIN}${unit.name}`;
}

/** The same in spoken words, for labels that are read out. */
export function speakFrequency(hz: number, uncertaintyHz: number | null = null): string {
  const unit = unitFor(hz);
  return `${frequencyDigits(hz, uncertaintyHz, unit.exponent)} ${unit.spoken}`;
}

/** `260 kHz`: a width, three digits. */
export function formatWidth(widthHz: number): string {
  const unit = unitFor(widthHz);
  return `${threeDigits(widthHz / 10 ** unit.exponent)}${THIN}${unit.name}`;
}

/** `1.21`, or `1.21 (1.12–1.31)` where its limits are known. */
export function formatSwr(swr: number, low: number | null = null, high: number | null = null): string {
  const limits = low === null || high === null ? "" : ` (${swrDigits(low)}–${swrDigits(high)})`;
  return swrDigits(swr) + limits;
}

/** `20.4 dB` */
export function formatDecibel(db: number): string {
  if (Number.isNaN(db)) return "unknown";
  return Number.isFinite(db) ? `${db.toFixed(1)}${THIN}dB` : "beyond measure";
}

/** `1 note`, `4 notes`, `no notes yet` */
export function formatNoteCount(count: number): string {
  if (count === 0) return "no notes yet";
  return count === 1 ? "1 note" : `${count} notes`;
}

function unitFor(hz: number) {
  const size = Math.abs(hz);
  return UNITS.find((unit) => size >= 10 ** unit.exponent) ?? UNITS[UNITS.length - 1];
}

function frequencyDigits(hz: number, uncertaintyHz: number | null, exponent: number): string {
  const value = hz / 10 ** exponent;
  if (uncertaintyHz === null || !(uncertaintyHz > 0)) {
    const wholeDigits = Math.max(1, Math.floor(Math.log10(Math.abs(value) || 1)) + 1);
    return value.toFixed(Math.max(0, Math.min(MOST_DECIMALS, DIGITS_WHEN_UNKNOWN - wholeDigits)));
  }
  const decimals = exponent - Math.floor(Math.log10(uncertaintyHz));
  return value.toFixed(Math.max(0, Math.min(MOST_DECIMALS, decimals)));
}

function threeDigits(value: number): string {
  const size = Math.abs(value);
  return value.toFixed(size >= 100 ? 0 : size >= 10 ? 1 : 2);
}

function swrDigits(swr: number): string {
  if (Number.isNaN(swr)) return "unknown";
  if (swr > SWR_TOO_HIGH_TO_TELL) return `over ${SWR_TOO_HIGH_TO_TELL}`;
  return swr.toFixed(swr < 10 ? 2 : 1);
}
