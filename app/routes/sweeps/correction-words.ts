import type { StoredCorrection } from "~/db/schema";
import type { Plane } from "~/measurement/sweep";
import { formatFrequency } from "~/measurement/units";
import { formatDate } from "~/services/dates";

/** The names of the planes, as switches and lists have them. */
export const PLANE_WORDS: Record<Plane, string> = {
  instrument: "As measured",
  port: "Corrected",
  antenna: "At the antenna",
};

/** What was done to a sweep, in one line. */
export function correctionWords(correction: StoredCorrection | null): string {
  if (!correction)
    return "As measured: nothing is corrected, and what the bench adds to the limits is unknown.";
  const bench = benchWords(correction);
  const line = lineWords(correction);
  if (!bench)
    return line ? `As measured without a bench; ${line}.` : "As measured: nothing could be corrected.";
  return `${bench}${line ? `; ${line}` : ""}.`;
}

/** The same in a few words, for lines of provenance. */
export function planeWords(correction: StoredCorrection | null): string {
  if (!correction || (correction.kind === "none" && correction.plane !== "antenna")) return "as measured";
  const where = correction.plane === "antenna" ? "at the antenna" : "at the port";
  return correction.kind === "none" ? `${where}, no bench` : `${where}, ${KINDS[correction.kind]}`;
}

function benchWords({ bench, kind, references, fromHz, toHz, validFrom }: StoredCorrection): string | null {
  if (!bench) return null;
  const asOf = validFrom ? ` as of ${formatDate(new Date(validFrom))}` : "";
  const name = `the bench “${bench.name}”${asOf}`;
  if (kind === "none") return `Nothing corrected: ${name} has no open or short that fits this sweep`;
  const over = fromHz !== null && toHz !== null ? `, ${span(fromHz, toHz)}` : "";
  return `Corrected with ${name}: ${how(kind, references)}${over}`;
}

function how(kind: "scalar" | "three-term", references: StoredCorrection["references"]): string {
  if (kind === "three-term") return "three error terms from open, short and load";
  if (references.open && references.short) return "0 dB line from open and short";
  if (references.open) return "0 dB line from the open alone";
  if (references.short) return "0 dB line from the short alone";
  return "0 dB line at the level that was given";
}

function lineWords({ feedline, plane }: StoredCorrection): string | null {
  if (!feedline || plane !== "antenna") return null;
  return `${metres(feedline.lengthM)} of ${feedline.name} taken away`;
}

/** `12.0 m` */
export function metres(lengthM: number): string {
  return `${lengthM < 10 ? Number(lengthM.toFixed(2)) : lengthM.toFixed(1)}\u2009m`;
}

/** `1.0–99.8 MHz`, one unit where both have the same. */
function span(fromHz: number, toHz: number): string {
  const [from, to] = [formatFrequency(fromHz), formatFrequency(toHz)];
  const unit = to.match(/\u2009\S+$/)?.[0] ?? "";
  return unit && from.endsWith(unit) ? `${from.slice(0, -unit.length)}–${to}` : `${from} – ${to}`;
}

const KINDS = { scalar: "corrected in size", "three-term": "corrected in three terms" } as const;
