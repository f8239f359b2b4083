import { z } from "zod";
import { MAX_NOTE_CHARACTERS } from "~/services/note-limits";

const publicId = z.string().regex(/^[0-9a-z]{1,16}$/, "This is no address of ours.");

/** A form sends line ends of two characters, a text field counts one. */
const body = z
  .string({ error: "Write something first." })
  .transform((text) => text.replace(/\r\n?/g, "\n"))
  .refine((text) => text.trim() !== "", "Write something first.")
  .refine((text) => text.length <= MAX_NOTE_CHARACTERS, {
    error: `A note has at most ${MAX_NOTE_CHARACTERS.toLocaleString("en")} characters.`,
  });

/** As a person writes it, with a point or a comma; nothing where the field is empty. */
function figure(most: number, wrong: string) {
  return z
    .string()
    .optional()
    .transform((text) => text?.trim().replace(",", ".") || undefined)
    .refine((text) => text === undefined || (/^\d*\.?\d+$/.test(text) && Number(text) <= most), wrong)
    .transform((text) => (text === undefined ? undefined : Number(text)));
}
const mhz = figure(1e6, "Give the stretch in MHz, as 7.05.");
const percent = figure(100, "Give the region in per cent of the picture, 0 to 100.");

/** A note on one of these, or with none of them on the project. */
export const writeNoteSchema = z.object({
  dip: publicId.optional(),
  sweep: publicId.optional(),
  trail: publicId.optional(),
  step: publicId.optional(),
  bench: publicId.optional(),
  parent: publicId.optional(),
  body,
  fromMhz: mhz,
  toMhz: mhz,
  regionLeft: percent,
  regionTop: percent,
  regionWidth: percent,
  regionHeight: percent,
  clientKey: z.string().max(40).optional(),
  returnTo: z.string().optional(),
});

export const editNoteSchema = z.object({
  intent: z.literal("edit"),
  body,
  /** Of the text that the change was begun with. */
  revision: z.string().max(40).optional(),
  returnTo: z.string().optional(),
});

export const changeNoteSchema = z.discriminatedUnion("intent", [
  editNoteSchema,
  z.object({ intent: z.literal("remove"), returnTo: z.string().optional() }),
  z.object({ intent: z.literal("restore"), returnTo: z.string().optional() }),
]);

export const previewSchema = z.object({ body: z.string().default(""), project: publicId.optional() });
