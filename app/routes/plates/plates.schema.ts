import { z } from "zod";
import type { PlateChoices } from "~/services/plates/choices";
import { LICENCE_IDS } from "~/services/plates/licences";

/** The form of a new plate, as it stands in the page and as it is sent. */

export interface PlateTexts {
  title: string;
  caption: string;
  licence: string;
  /** MHz; empty for the end of what there is. */
  low: string;
  high: string;
  scale: string;
  quantity: string;
  showBands: boolean;
  showDips: boolean;
  showLimits: boolean;
  showTitle: boolean;
  /** By public id of what is called so. */
  labels: Record<string, string>;
}

export type PlateErrors = Partial<Record<keyof PlateTexts | "wrong" | "form", string[]>>;

/** A box that is not ticked is not sent. */
export function textsOfForm(form: FormData): PlateTexts {
  const text = (name: string) => String(form.get(name) ?? "");
  const labels = [...form].flatMap(([name, value]) => {
    const id = LABEL.exec(name)?.[1];
    return id ? [[id, String(value)] as const] : [];
  });
  return {
    title: text("title"),
    caption: text("caption"),
    licence: text("licence"),
    low: text("low"),
    high: text("high"),
    scale: text("scale"),
    quantity: text("quantity"),
    showBands: form.has("showBands"),
    showDips: form.has("showDips"),
    showLimits: form.has("showLimits"),
    showTitle: form.has("showTitle"),
    labels: Object.fromEntries(labels.slice(0, MOST_LABELS)),
  };
}

export function textsOfChoices({ fromHz, toHz, ...choices }: PlateChoices): PlateTexts {
  return { ...choices, low: megahertz(fromHz), high: megahertz(toHz) };
}

const frequency = z
  .string()
  .trim()
  .transform((text) => (text === "" ? null : Number(text.replace(",", ".")) * 1e6))
  .refine((hz) => hz === null || (Number.isFinite(hz) && hz >= 0), "A frequency in MHz, as 7.1, or nothing.");

export const plateSchema = z
  .object({
    title: z.string().trim().min(1, "Give the plate a title.").max(160, "At most 160 characters."),
    caption: z
      .string()
      .trim()
      .max(2000, "At most 2,000 characters.")
      .transform((text) => text.replace(/\r\n?/g, "\n")),
    licence: z.enum(LICENCE_IDS, {
      error: "Choose a licence.",
    }),
    low: frequency,
    high: frequency,
    scale: z.enum(["linear", "log"], { error: "Choose an axis." }),
    quantity: z.enum(["return-loss", "swr"], { error: "Choose a curve." }),
    showBands: z.boolean(),
    showDips: z.boolean(),
    showLimits: z.boolean(),
    showTitle: z.boolean(),
    labels: z.record(z.string(), z.string().trim().max(80, "A label has at most 80 characters.")),
  })
  .refine(({ low, high }) => high === null || high > (low ?? 0), {
    path: ["high"],
    error: "The upper end lies below the lower one.",
  })
  .transform(({ low, high, ...rest }): PlateChoices => ({ ...rest, fromHz: low, toHz: high }));

/** What was wrong with the version before: asked where a plate is mended. */
export const wrongSchema = z
  .string()
  .trim()
  .min(1, "Say in a line what was wrong: readers of the old version see it.")
  .max(500, "At most 500 characters.");

export const withdrawSchema = z.object({
  intent: z.literal("withdraw"),
  reason: z
    .string({ error: "Say why: it stands in the plate’s place for ever." })
    .trim()
    .min(1, "Say why: it stands in the plate’s place for ever.")
    .max(500, "At most 500 characters."),
});

/** The errors of one try, by field. */
export function errorsOf(error: z.ZodError): PlateErrors {
  const errors: PlateErrors = {};
  for (const { path, message } of error.issues) {
    const field = (path[0] ?? "form") as keyof PlateErrors;
    errors[field] = [...(errors[field] ?? []), message];
  }
  return errors;
}

function megahertz(hz: number | null): string {
  return hz === null ? "" : String(Number((hz / 1e6).toFixed(6)));
}

const LABEL = /^label\.([0-9a-z-]{1,40})$/;
const MOST_LABELS = 200;
