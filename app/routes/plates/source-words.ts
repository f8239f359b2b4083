import { formatFrequency } from "~/measurement/units";
import { kindOf } from "~/routes/sweeps/words";
import type { PlateSource } from "~/services/plates/record";

type Read = Pick<PlateSource, "correction"> & {
  reading: Pick<PlateSource["reading"], "format" | "quantity">;
} & {
  bench: Pick<NonNullable<PlateSource["bench"]>, "name" | "version"> | null;
};

/** How an original became numbers, in words. Pure. */

export const ROLES: Record<PlateSource["role"], string> = {
  sweep: "Sweep",
  open: "Open",
  short: "Short",
  load: "Load",
  through: "Through",
};

export function readingWords({ reading }: Pick<Read, "reading">): string {
  const formats = ["text", "touchstone", "screenshot"] as const;
  const format = formats.find((known) => known === reading.format);
  const what = format ? kindOf(format) : reading.format;
  return `${what}, read as ${QUANTITIES[reading.quantity] ?? reading.quantity}`;
}

export function correctionWords({ correction, bench }: Pick<Read, "correction" | "bench">): string {
  if (!correction)
    return "As measured: nothing is corrected, and what the bench adds to the limits is unknown.";
  const { kind, plane, fromHz, toHz, feedline } = correction;
  const line = lineOf(feedline);
  const away = plane === "antenna" && line ? `${metres(line.lengthM)} of ${line.name} taken away` : null;
  const span =
    fromHz === null || toHz === null
      ? ""
      : `, ${formatFrequency(fromHz, null)} to ${formatFrequency(toHz, null)}`;
  const with_ = bench ? `the bench “${bench.name}”, version ${bench.version}` : "a bench";
  const first =
    kind === "none" ? "Nothing corrected by a bench" : `Corrected with ${with_}: ${HOW[kind]}${span}`;
  return `${first}${away ? `; ${away}` : ""}.`;
}

/** `4.2 kB` */
export function bytesWords(bytes: number): string {
  if (bytes < 1000) return `${bytes} bytes`;
  return bytes < 1_000_000 ? `${(bytes / 1000).toFixed(1)} kB` : `${(bytes / 1_000_000).toFixed(1)} MB`;
}

function lineOf(feedline: unknown): { name: string; lengthM: number } | null {
  if (typeof feedline !== "object" || feedline === null) return null;
  const { name, lengthM } = feedline as { name?: unknown; lengthM?: unknown };
  return typeof name === "string" && typeof lengthM === "number" ? { name, lengthM } : null;
}

function metres(lengthM: number): string {
  return `${lengthM < 10 ? Number(lengthM.toFixed(2)) : lengthM.toFixed(1)}\u2009m`;
}

const HOW = {
  scalar: "0 dB line from its open and short",
  "three-term": "three error terms from open, short and load",
} as const;

const QUANTITIES: Record<string, string> = {
  "s11-db": "S11 in dB",
  "return-loss": "return loss",
  swr: "SWR",
  level: "level",
  magnitude: "abs Γ",
  gamma: "Γ",
  impedance: "impedance",
};
