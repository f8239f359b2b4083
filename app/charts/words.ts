/** Words about dips that every drawing uses. */
import { formatFrequency } from "../measurement/units.ts";

const SPOKEN_UNITS: Record<string, string> = {
  GHz: "gigahertz",
  MHz: "megahertz",
  kHz: "kilohertz",
  Hz: "hertz",
};

/** A frequency for labels that are read out: `7.118 megahertz`. */
export function speakFrequency(hz: number, uncertaintyHz: number | null = null): string {
  const [number, unit] = formatFrequency(hz, uncertaintyHz).split(/\s/);
  return `${number} ${SPOKEN_UNITS[unit] ?? unit ?? ""}`.trim();
}

/** `1 note`, `4 notes`, `no notes yet` */
export function formatNoteCount(count: number): string {
  if (count === 0) return "no notes yet";
  return count === 1 ? "1 note" : `${count} notes`;
}
