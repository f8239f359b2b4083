import { z } from "zod";
import { FREQUENCY_UNITS } from "~/measurement/sweep";
import { type Given, type Reading, TEXT_ENCODINGS, TEXT_QUANTITIES, type TextSpec } from "~/readers/reading";

/** The choices of a reading as a form sends them; columns count from 1 there, as people count. */

const DELIMITERS = { comma: ",", semicolon: ";", tab: "\t", blank: " " } as const;
const THOUSANDS = { none: "", point: ".", comma: ",", blank: " ", apostrophe: "'" } as const;
const column = z.coerce.number().int().min(1, "Columns count from 1.").max(1000);
const line = z.coerce.number().int().min(0).max(10_000_000);

export const textReadingSchema = z.object({
  encoding: z.enum(TEXT_ENCODINGS),
  delimiter: z.enum(["comma", "semicolon", "tab", "blank"]).transform((name) => DELIMITERS[name]),
  decimal: z.enum([".", ","]),
  thousands: z.enum(["none", "point", "comma", "blank", "apostrophe"]).transform((name) => THOUSANDS[name]),
  headerLine: line,
  firstDataLine: line.min(1, "Lines count from 1."),
  frequencyColumn: column.transform((n) => n - 1),
  frequencyUnit: z.enum(FREQUENCY_UNITS),
  valueColumn: column.transform((n) => n - 1),
  secondColumn: z
    .union([z.literal("none"), column.transform((n) => n - 1)])
    .transform((value) => (value === "none" ? null : value)),
  quantity: z.enum(TEXT_QUANTITIES),
  angleUnit: z.enum(["deg", "rad"]),
  referenceOhm: z.coerce.number({ error: "Give the reference impedance in ohms." }).gt(0, "Over 0 Ω."),
  /** An empty field is "not known". */
  zeroDb: z.preprocess(
    (value) => (value === "" || value === undefined ? null : value),
    z.coerce.number({ error: "Give the level as a number of dB." }).nullable(),
  ),
});

export const touchstoneReadingSchema = z.object({
  port: z.coerce
    .number()
    .int()
    .refine((port) => port === 1 || port === 2),
});

export type ReadingFormErrors = Partial<Record<string, string>>;

/**
 * What the form fixes: what was fixed before and what now differs from the resolved reading. The rest stays free,
 * so that the same choices serve the next file of the same shape.
 */
export function givenFromForm(
  form: FormData,
  before: Given,
  reading: Reading,
): { given: Given } | { errors: ReadingFormErrors } {
  const values = Object.fromEntries(form);
  if (reading.format === "touchstone") {
    const parsed = touchstoneReadingSchema.safeParse(values);
    if (!parsed.success) return { errors: errorsOf(parsed.error) };
    return { given: { touchstone: { port: parsed.data.port as 1 | 2 } } };
  }
  const parsed = textReadingSchema.safeParse(values);
  if (!parsed.success) return { errors: errorsOf(parsed.error) };
  const resolved: Partial<TextSpec> = reading.spec.text ?? {};
  const changed = Object.entries(parsed.data).filter(
    ([name, value]) => name in (before.text ?? {}) || value !== resolved[name as keyof TextSpec],
  );
  return { given: { text: { ...before.text, ...Object.fromEntries(changed) } } };
}

/** The names that the form uses for a resolved value. */
export function nameOf(kind: "delimiter" | "thousands", value: string): string {
  const names = kind === "delimiter" ? DELIMITERS : THOUSANDS;
  return Object.entries(names).find(([, sign]) => sign === value)?.[0] ?? Object.keys(names)[0];
}

function errorsOf(error: z.ZodError): ReadingFormErrors {
  return Object.fromEntries(error.issues.map((issue) => [String(issue.path[0]), issue.message]));
}
