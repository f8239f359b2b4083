import { z } from "zod";
import { plainText } from "~/services/file-names";
import { LICENCE_IDS } from "~/services/plates/licences";

/** Words for a choice, and what follows from it. */
export const VISIBILITIES = [
  { value: "private", label: "Private", consequence: "Only its members can read it." },
  {
    value: "linked",
    label: "Linked",
    consequence: "Anyone who has the address can read it, without an account. It is listed nowhere.",
  },
  {
    value: "public",
    label: "Public",
    consequence: "Anyone can read it, and it is listed on the front page.",
  },
] as const;

export const ROLES = [
  { value: "owner", label: "Owner", may: "everything, members and deletion included" },
  {
    value: "experimenter",
    label: "Experimenter",
    may: "take sweeps in, change readings, settle dips, write",
  },
  { value: "commenter", label: "Commenter", may: "write notes and propose causes" },
  { value: "reader", label: "Reader", may: "read" },
] as const;

export const ITU_REGIONS = [
  { value: "", label: "Not said" },
  { value: "1", label: "Region 1: Europe, Africa, the Middle East, northern Asia" },
  { value: "2", label: "Region 2: the Americas, Greenland" },
  { value: "3", label: "Region 3: the rest of Asia, Oceania" },
] as const;

const titleField = z
  .string({ error: "Give the project a title." })
  .overwrite(plainText)
  .min(1, "Give the project a title.")
  .max(160, "At most 160 characters.");

const summaryField = z
  .string()
  .trim()
  .max(20_000, "At most 20,000 characters.")
  .optional()
  // Forms send lines ended in their own way: the same text must be the same.
  .transform((text) => (text ?? "").replace(/\r\n?/g, "\n"));

const regionField = z
  .enum(["1", "2", "3"], { error: "Choose one of the three regions, or none." })
  .optional()
  .transform((text) => (text ? Number(text) : null));

const visibilityField = z.enum(["private", "linked", "public"], { error: "Choose who can read it." });

export const newProjectSchema = z.object({
  title: titleField,
  summary: summaryField,
  visibility: visibilityField,
  ituRegion: regionField,
});

/** With what the form began with, so that two people who change a project do not undo one another's changes. */
export const aboutSchema = newProjectSchema.extend({
  intent: z.literal("about"),
  was: z.string().optional(),
});

/** Accepts a decimal comma: it is what many people's keyboards give. */
const megahertz = z
  .string({ error: "Give a frequency." })
  .trim()
  .transform((text) => Number(text.replace(",", ".")))
  .refine((value) => Number.isFinite(value) && value > 0, "A frequency in MHz, over 0.")
  .refine((value) => value <= 300_000, "At most 300,000 MHz.");

export const bandSchema = z
  .object({
    name: z
      .string({ error: "Name the band." })
      .trim()
      .min(1, "Name the band.")
      .max(40, "At most 40 characters."),
    lowMhz: megahertz,
    highMhz: megahertz,
    swrLimit: z
      .string({ error: "Give a limit." })
      .trim()
      .transform((text) => Number(text.replace(",", ".")))
      .refine((value) => Number.isFinite(value) && value > 1 && value <= 100, "A limit over 1, at most 100."),
  })
  .refine((band) => band.highMhz > band.lowMhz, {
    path: ["highMhz"],
    error: "The upper edge lies below the lower one.",
  });

/** Rows that were left empty are no bands: that is how one is added, and removed, without scripts. */
export const bandsSchema = z.object({
  intent: z.literal("bands"),
  bands: z
    .array(z.record(z.string(), z.string().optional()).optional())
    .max(60, "At most 60 bands.")
    .optional()
    .transform((rows) => rows ?? [])
    .transform((rows, context) => {
      const bands: z.output<typeof bandSchema>[] = [];
      for (const [i, row] of rows.entries()) {
        if (!row || !["name", "lowMhz", "highMhz"].some((key) => row[key]?.trim())) continue;
        const result = bandSchema.safeParse(row);
        if (result.success) bands.push(result.data);
        else {
          for (const issue of result.error.issues) {
            context.addIssue({ code: "custom", message: issue.message, path: [i, ...issue.path] });
          }
        }
      }
      return bands;
    }),
});

export const deleteSchema = z.object({
  intent: z.literal("delete"),
  title: z.string({ error: "Type the title to delete the project." }).trim(),
});

export const licenceSchema = z.object({
  intent: z.literal("licence"),
  licence: z.enum(LICENCE_IDS, { error: "Choose one of the licences." }),
});

export const projectSettingsSchema = z.discriminatedUnion("intent", [
  aboutSchema,
  bandsSchema,
  licenceSchema,
  deleteSchema,
]);
