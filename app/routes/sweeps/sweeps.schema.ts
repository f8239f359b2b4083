import { z } from "zod";
import type { Plane } from "~/measurement/sweep";
import { plainText } from "~/services/file-names";

/** The forms about sweeps, and the view of a sweep as it stands in an address. */

export const editSweepSchema = z.object({
  title: z
    .string({ error: "Give the sweep a title." })
    .overwrite(plainText)
    .min(1, "Give the sweep a title.")
    .max(160, "A title has at most 160 characters."),
  /** As a local-less `datetime-local` control gives it; read as UTC. Empty: not known. */
  takenAt: z
    .string()
    .regex(/^\d{4}-\d{2}-\d{2}(T\d{2}:\d{2}(:\d{2})?)?$/, "Give date and time as 2026-09-14T17:20.")
    .transform((text) => new Date(text.includes("T") ? `${text}Z` : `${text}T12:00Z`))
    .refine((at) => !Number.isNaN(at.getTime()), "There is no such day.")
    .refine((at) => at.getTime() < Date.now() + DAY_MS, "This day is yet to come.")
    .optional(),
});

export const settingsSchema = z.object({
  swrLimit: z.coerce
    .number({ error: "Give the SWR limit as a number." })
    .gt(1, "An SWR limit is over 1.")
    .max(20, "An SWR limit over 20 says nothing."),
  minimumProminenceDb: z.coerce
    .number({ error: "Give the prominence in dB." })
    .min(0.1, "At least 0.1 dB.")
    .max(40, "At most 40 dB."),
});

export const QUANTITIES = ["rl", "swr"] as const;
export const SCALES = ["linear", "log"] as const;
export const PLANES = ["instrument", "port", "antenna"] as const satisfies readonly Plane[];

export function parsePlane(text: unknown): Plane | null {
  return PLANES.find((plane) => plane === text) ?? null;
}

export interface SweepView {
  quantity: (typeof QUANTITIES)[number];
  scale: (typeof SCALES)[number];
  /** Hz; null for the sweep's own end. */
  fromHz: number | null;
  toHz: number | null;
  /** Public id of the chosen dip. */
  dip: string | null;
  /** Settings tried out in the address; null for those of the stored analysis. */
  swrLimit: number | null;
  minimumProminenceDb: number | null;
  /** Plane tried out in the address; null for that of the stored analysis. */
  plane: Plane | null;
  /** Frequency of the matching networks, as it was typed. */
  match: string | null;
  sort: string | null;
}

/** Reads the view from an address; what makes no sense is left at its default. */
export function parseView(search: URLSearchParams): SweepView {
  const number = (name: string, test: (n: number) => boolean) => {
    const text = search.get(name);
    const n = text ? Number(text) : Number.NaN;
    return Number.isFinite(n) && test(n) ? n : null;
  };
  const settings = settingsSchema.shape;
  const fromMHz = number("from", (n) => n >= 0);
  const toMHz = number("to", (n) => n > (fromMHz ?? 0));
  return {
    quantity: search.get("view") === "swr" ? "swr" : "rl",
    scale: search.get("axis") === "log" ? "log" : "linear",
    fromHz: fromMHz === null ? null : fromMHz * 1e6,
    toHz: toMHz === null ? null : toMHz * 1e6,
    dip: search.get("dip"),
    match: search.get("match"),
    swrLimit: number("limit", (n) => settings.swrLimit.safeParse(n).success),
    minimumProminenceDb: number("prominence", (n) => settings.minimumProminenceDb.safeParse(n).success),
    plane: parsePlane(search.get("plane")),
    sort: search.get("sort"),
  };
}

const NAMES: Record<keyof SweepView, string> = {
  quantity: "view",
  scale: "axis",
  fromHz: "from",
  toHz: "to",
  dip: "dip",
  match: "match",
  swrLimit: "limit",
  minimumProminenceDb: "prominence",
  plane: "plane",
  sort: "sort",
};

/** The address's search with some of the view changed: `?view=swr&dip=…`; defaults are left out. */
export function searchWith(view: SweepView, change: Partial<SweepView>): string {
  const search = new URLSearchParams();
  for (const [key, value] of Object.entries({ ...view, ...change }) as [keyof SweepView, unknown][]) {
    if (value === null || value === "rl" || value === "linear") continue;
    const shown = key === "fromHz" || key === "toHz" ? megahertz(value as number) : String(value);
    search.set(NAMES[key], shown);
  }
  const text = search.toString();
  return text ? `?${text}` : "";
}

/** MHz with at most a hertz of rounding and no trailing zeros. */
function megahertz(hz: number): string {
  return String(Number((hz / 1e6).toFixed(6)));
}

const DAY_MS = 24 * 60 * 60 * 1000;
