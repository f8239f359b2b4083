/** What is said of a trail beside its line. */
import { formatFrequency, formatSwr, formatWidth } from "../measurement/units.ts";

export interface TrailNumbers {
  frequencyHz: number;
  frequencyUncertaintyHz: number | null;
  minimumSwr: number | null;
  minimumSwrLow: number | null;
  minimumSwrHigh: number | null;
  /** When its sweep was taken; null where that is not known. */
  at: Date | null;
}

/** `7.118 MHz, SWR 1.21 (1.12–1.31)` */
export function stopWords(dip: TrailNumbers): string {
  const swr = formatSwr(dip.minimumSwr ?? Number.POSITIVE_INFINITY, dip.minimumSwrLow, dip.minimumSwrHigh);
  return `${formatFrequency(dip.frequencyHz, dip.frequencyUncertaintyHz)}, SWR ${swr}`;
}

/** `400 kHz up in 6 weeks`; empty where it did not move by more than both limits, or these are not known. */
export function movementWords(first: TrailNumbers, last: TrailNumbers): string {
  const byHz = last.frequencyHz - first.frequencyHz;
  const [a, b] = [first.frequencyUncertaintyHz, last.frequencyUncertaintyHz];
  if (a === null || b === null) return "";
  const uncertaintyHz = Math.hypot(a, b);
  if (!(Math.abs(byHz) > uncertaintyHz)) return "";
  const way = `${formatWidth(Math.abs(byHz), uncertaintyHz)} ${byHz > 0 ? "up" : "down"}`;
  const time = first.at && last.at ? timeWords(last.at.getTime() - first.at.getTime()) : "";
  return time ? `${way} in ${time}` : way;
}

/** `6 weeks`, `9 days`, `4 hours`; empty for less than an hour. */
export function timeWords(ms: number): string {
  const unit = UNITS.find(({ least }) => ms >= least);
  if (!unit) return "";
  const n = Math.round(ms / unit.ms);
  return `${n} ${unit.name}${n === 1 ? "" : "s"}`;
}

const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;
const UNITS = [
  { name: "year", ms: 365.25 * DAY_MS, least: 700 * DAY_MS },
  { name: "month", ms: 30.44 * DAY_MS, least: 90 * DAY_MS },
  { name: "week", ms: 7 * DAY_MS, least: 14 * DAY_MS },
  { name: "day", ms: DAY_MS, least: DAY_MS },
  { name: "hour", ms: HOUR_MS, least: HOUR_MS },
];
