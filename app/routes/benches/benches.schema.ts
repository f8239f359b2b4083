import { z } from "zod";
import type { BenchGiven, BenchStandards } from "~/measurement/bench";
import { plainText } from "~/services/file-names";

/** The forms about benches. */

export interface FigureField<Key extends string> {
  key: Key;
  label: string;
  unit: string;
  /** What one of this unit is in SI; 1 for dB and ohm. */
  scale: number;
  low: number;
  high: number;
}

/** What the standards are, where they are not ideal. Ranges wide enough for home-made ones (common practice, no source). */
export const STANDARD_FIELDS: readonly FigureField<keyof BenchStandards>[] = [
  { key: "openCapacitanceF", label: "Open’s capacitance", unit: "fF", scale: 1e-15, low: -1e3, high: 1e5 },
  { key: "shortInductanceH", label: "Short’s inductance", unit: "pH", scale: 1e-12, low: -1e3, high: 1e5 },
  { key: "offsetDelayS", label: "Delay before both, one way", unit: "ps", scale: 1e-12, low: 0, high: 1e5 },
  { key: "loadOhm", label: "Load’s resistance", unit: "Ω", scale: 1, low: 0.1, high: 1e5 },
  { key: "loadReturnLossDb", label: "Load’s own return loss", unit: "dB", scale: 1, low: 0, high: 100 },
];

/** What is known of the bench without a sweep of it. */
export const GIVEN_FIELDS: readonly FigureField<keyof BenchGiven>[] = [
  { key: "zeroDb", label: "Level of the 0 dB line", unit: "dB", scale: 1, low: -200, high: 200 },
  { key: "directivityDb", label: "Directivity", unit: "dB", scale: 1, low: 0, high: 100 },
  { key: "testPortMatchDb", label: "Test port’s return loss", unit: "dB", scale: 1, low: 0, high: 100 },
  { key: "trackingDb", label: "Error of the 0 dB line", unit: "dB", scale: 1, low: 0, high: 20 },
];

export const PART_KINDS = [
  { value: "connector", label: "Connector" },
  { value: "cable", label: "Cable" },
  { value: "adapter", label: "Adapter" },
  { value: "other", label: "Other" },
] as const;

const benchFields = {
  name: z
    .string({ error: "Give the bench a name." })
    .overwrite(plainText)
    .min(1, "Give the bench a name.")
    .max(120, "A name has at most 120 characters."),
  description: z
    .string()
    .trim()
    .max(20_000, "At most 20,000 characters.")
    .optional()
    .transform((text) => text ?? ""),
  own: z
    .enum(["yes", "no"])
    .optional()
    .transform((own) => own ?? "no"),
};

/** A day in UTC; one that is yet to come would leave every sweep until then without a bench. */
const day = z
  .string({ error: "Say from which day on." })
  .regex(/^\d{4}-\d{2}-\d{2}$/, "Give the day as 2026-09-14.")
  .transform((text) => new Date(`${text}T00:00Z`))
  .refine((at) => !Number.isNaN(at.getTime()), "There is no such day.")
  .refine((at) => at.getTime() < Date.now() + HALF_DAY_MS, "This day is yet to come.");

/** Rows that were left empty are no parts. */
const parts = z
  .array(z.object({ kind: z.enum(["connector", "cable", "adapter", "other"]), text: z.string().optional() }))
  .max(60, "At most 60 parts.")
  .optional()
  .transform((rows) =>
    (rows ?? [])
      .map(({ kind, text }) => ({ kind, text: plainText(text ?? "").slice(0, 200) }))
      .filter(({ text }) => text !== ""),
  );

const versionFields = {
  validFrom: day,
  remark: z
    .string()
    .overwrite(plainText)
    .max(300, "At most 300 characters.")
    .optional()
    .transform((text) => text ?? ""),
  parts,
  standards: figures(STANDARD_FIELDS),
  given: figures(GIVEN_FIELDS),
};

export const newBenchSchema = z.object({ ...benchFields, ...versionFields });

export const rebuildSchema = z.object({
  ...versionFields,
  remark: z
    .string({ error: "Say in a line what was rebuilt." })
    .overwrite(plainText)
    .min(1, "Say in a line what was rebuilt.")
    .max(300, "At most 300 characters."),
});

const was = z.string().optional();
const kind = z.enum(["open", "short", "load", "through"]);

export const editBenchSchema = z.discriminatedUnion("intent", [
  z.object({ intent: z.literal("bench"), was, ...benchFields }),
  z.object({
    intent: z.literal("version"),
    version: z.string(),
    ...versionFields,
    /** Which reference is which, by the sweep's public id. */
    kinds: z.record(z.string(), kind).optional(),
  }),
]);

export const benchActionSchema = z.discriminatedUnion("intent", [
  z.object({ intent: z.literal("references"), version: z.string() }),
  z.object({ intent: z.literal("retire") }),
  z.object({ intent: z.literal("resume") }),
  z.object({ intent: z.literal("delete") }),
]);

export interface Wish {
  swr: number;
  tolerance: number;
}

/** The wish as it stands in an address; what makes no sense is left at its default. */
export function parseWish(search: URLSearchParams): Wish {
  const number = (name: string, low: number, high: number, otherwise: number) => {
    const value = Number((search.get(name) || "x").replace(",", "."));
    return value > low && value <= high ? value : otherwise;
  };
  return {
    swr: number("swr", 1, 20, DEFAULT_WISH.swr),
    tolerance: number("tolerance", 0, 10, DEFAULT_WISH.tolerance),
  };
}

/** An object of numbers in SI from as many text fields; what is left empty is null. A decimal comma is taken too. */
function figures<Key extends string>(fields: readonly FigureField<Key>[]) {
  return z
    .record(z.string(), z.string().optional())
    .optional()
    .transform((texts, context) => {
      const values = {} as Record<Key, number | null>;
      for (const { key, label, unit, scale, low, high } of fields) {
        const text = texts?.[key]?.trim().replace(",", ".") ?? "";
        const value = Number(text);
        if (text !== "" && !(value >= low && value <= high)) {
          const message = `${label}: a number of ${unit} from ${low} to ${high}, or nothing.`;
          context.addIssue({ code: "custom", message, path: [key] });
        }
        values[key] = text === "" ? null : Number((value * scale).toPrecision(12));
      }
      return values;
    });
}

const HALF_DAY_MS = 12 * 60 * 60 * 1000;
/** MEASUREMENT section 4. */
export const DEFAULT_WISH: Wish = { swr: 1.5, tolerance: 0.1 };
