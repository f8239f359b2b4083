/**
 * Numbers as they are shown: with the digits that their uncertainty supports, a thin space before the unit,
 * "∞" for Infinity and "unknown" for what is not known (null or NaN). Text only; nothing computes with it.
 */

/**
 * Hz → "18.104 MHz". The unit follows the frequency; the last digit is the first one of the uncertainty
 * (half-width of the 95 % interval, Hz). Without an uncertainty up to six significant digits, trailing
 * zeros dropped.
 */
export function formatFrequency(hz: number | null, uncertaintyHz: number | null = null): string {
  if (hz === null || Number.isNaN(hz)) return UNKNOWN;
  return withUnit(hz, uncertaintyHz, unitOf(hz));
}

/** Hz → "260 kHz", "1.22 MHz": as a frequency, with three digits where the uncertainty is not known. */
export function formatWidth(hz: number | null, uncertaintyHz: number | null = null): string {
  if (hz === null || Number.isNaN(hz)) return UNKNOWN;
  return withUnit(hz, uncertaintyHz, unitOf(hz), 3, "width");
}

/**
 * SWR with its limits: "1.21 (1.12–1.31)"; two decimals to 10, one to 100, then none. An unknown limit
 * stays away.
 */
export function formatSwr(swr: number | null, low: number | null = null, high: number | null = null): string {
  if (swr === null || Number.isNaN(swr)) return UNKNOWN;
  const decimals = swrDecimals(swr, low, high);
  const shown = plain(swr, decimals);
  if (low === null || high === null || Number.isNaN(low) || Number.isNaN(high)) return shown;
  const [from, to] = [plain(low, decimals), plain(high, decimals)];
  return from === to ? shown : `${shown} (${from}–${to})`;
}

/** dB → "20.4 dB"; one decimal unless the uncertainty supports more or fewer. */
export function formatDb(db: number | null, uncertaintyDb: number | null = null): string {
  if (db === null || Number.isNaN(db)) return UNKNOWN;
  const decimals = uncertaintyDb === null ? 1 : Math.min(3, decimalsFor(uncertaintyDb));
  return `${plain(db, decimals)}${THIN}dB`;
}

/** dB with its limits: "20.4 dB (18.9–22.3)"; an unknown limit stays away. */
export function formatDbLimits(db: number | null, low: number | null, high: number | null): string {
  if (db === null || Number.isNaN(db) || low === null || high === null) return formatDb(db);
  const decimals = Number.isFinite(high - low) ? Math.min(1, decimalsFor((high - low) / 2)) : 1;
  const [shown, from, to] = [plain(db, decimals), endDb(low, decimals), endDb(high, decimals)];
  return from === to ? `${shown}${THIN}dB` : `${shown}${THIN}dB (${from}–${to})`;
}

/** A width with its limits: "260 kHz (241–283)", all in the unit of the width; an unknown limit stays away. */
export function formatWidthLimits(hz: number, low: number | null, high: number | null): string {
  if (low === null || high === null) return formatWidth(hz);
  const half = (high - low) / 2;
  const { factor } = unitOf(hz);
  if (!(half > 0) || !Number.isFinite(half)) return formatWidth(hz, half);
  const decimals = decimalsFor(Math.max(half, hz * FINEST.width) / factor);
  const ends = [low, high].map((end) => plain(end / factor, decimals));
  return `${formatWidth(hz, half)} (${ends.join("–")})`;
}

/** A sweep's noise: one digit, and what no instrument resolves only as less than that. */
export function formatNoise(db: number | null): string {
  if (db === null || Number.isNaN(db)) return UNKNOWN;
  return db < LEAST_NOISE_DB ? `under ${LEAST_NOISE_DB}${THIN}dB` : formatDb(db, db);
}

/** A range of positive numbers with three digits: "11.2–15.7"; one number where both print alike. */
export function formatRange(low: number | null, high: number | null): string {
  if (low === null || high === null || Number.isNaN(low) || Number.isNaN(high)) return UNKNOWN;
  const digits = (value: number) => (Number.isFinite(value) ? significant(value, 3) : plain(value, 0));
  const [from, to] = [digits(low), digits(high)];
  return from === to ? from : `${from}–${to}`;
}

/** Share 0..1 → "3.2 %". */
export function formatPercent(share: number | null): string {
  return share === null || Number.isNaN(share) ? UNKNOWN : `${significant(share * 100, 2)}${THIN}%`;
}

/**
 * "18.104 MHz", "18,104 MHz", "7.1e6", "450 kHz" → Hz; null where it is no frequency. Without a unit:
 * hertz.
 */
export function parseFrequency(text: string): number | null {
  const match = /^\s*([+]?\d+(?:[.,]\d+)?(?:e[+-]?\d+)?)\s*([kmg]?)(?:hz)?\s*$/i.exec(text);
  if (!match) return null;
  const hz = Number(match[1].replace(",", ".")) * FACTORS[match[2].toLowerCase()];
  return Number.isFinite(hz) ? hz : null;
}

interface Unit {
  name: string;
  factor: number;
}

function unitOf(hz: number): Unit {
  const size = Math.abs(hz);
  return UNITS.find(({ factor }) => size >= factor) ?? UNITS[UNITS.length - 1];
}

function withUnit(
  hz: number,
  uncertaintyHz: number | null,
  unit: Unit,
  digits = 6,
  of: keyof typeof FINEST = "frequency",
): string {
  if (!Number.isFinite(hz)) return `${plain(hz, 0)}${THIN}${unit.name}`;
  const value = hz / unit.factor;
  if (uncertaintyHz === null || !Number.isFinite(uncertaintyHz) || uncertaintyHz <= 0) {
    return `${significant(value, digits)}${THIN}${unit.name}`;
  }
  const supportedHz = Math.max(uncertaintyHz, Math.abs(hz) * FINEST[of]);
  const decimals = Math.min(MOST_DECIMALS, decimalsFor(supportedHz / unit.factor));
  return `${plain(value, decimals)}${THIN}${unit.name}`;
}

/** Decimals down to the first digit of the uncertainty. */
function decimalsFor(uncertainty: number): number {
  if (!(uncertainty > 0) || !Number.isFinite(uncertainty)) return MOST_DECIMALS;
  return Math.max(0, -Math.floor(Math.log10(uncertainty * (1 + 1e-12))));
}

function swrDecimals(swr: number, low: number | null, high: number | null): number {
  const usual = swr < 10 ? 2 : swr < 100 ? 1 : 0;
  if (low === null || high === null || !Number.isFinite(high - low)) return usual;
  return Math.min(usual, Math.max(0, decimalsFor((high - low) / 2)));
}

/** Up to `digits` significant digits, no exponent, trailing zeros dropped, digits before the point kept. */
function significant(value: number, digits: number): string {
  if (value === 0) return "0";
  const decimals = Math.max(0, digits - 1 - Math.floor(Math.log10(Math.abs(value))));
  const text = plain(value, Math.min(decimals, 20));
  return text.includes(".") ? text.replace(/\.?0+$/, "") : text;
}

function endDb(db: number, decimals: number): string {
  if (Math.abs(db) < ENDLESS_DB) return plain(db, decimals);
  return db < 0 ? "−∞" : "∞";
}

function plain(value: number, decimals: number): string {
  if (value === Number.POSITIVE_INFINITY) return "∞";
  if (value === Number.NEGATIVE_INFINITY) return "−∞";
  const text = value.toFixed(decimals);
  return text.startsWith("-") ? (Number(text) === 0 ? text.slice(1) : `−${text.slice(1)}`) : text;
}

const UNKNOWN = "unknown";
/** The last digit that files usually carry. */
const LEAST_NOISE_DB = 0.001;
/** Where return losses end in stored analyses, for no file holds an infinity. */
const ENDLESS_DB = 200;
/** U+2009, thin space. */
const THIN = "\u2009";
/** A hertz in a gigahertz. */
const MOST_DECIMALS = 9;
/**
 * Parts of the value below which digits say nothing: a sweep generator's clock is known to about a part in
 * a million at best (common practice, no source), and a width is a difference of two such edges on a curve
 * that weather moves.
 */
const FINEST = { frequency: 1e-6, width: 1e-3 };
const FACTORS: Record<string, number> = { "": 1, k: 1e3, m: 1e6, g: 1e9 };
/** Large first; the switch to megahertz lies at 1 MHz as on most instruments. */
const UNITS: Unit[] = [
  { name: "GHz", factor: 1e9 },
  { name: "MHz", factor: 1e6 },
  { name: "kHz", factor: 1e3 },
  { name: "Hz", factor: 1 },
];
