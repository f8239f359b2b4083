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

/** A note on one of these, or with none of them on the project. */
export const writeNoteSchema = z.object({
  dip: publicId.optional(),
  sweep: publicId.optional(),
  trail: publicId.optional(),
  step: publicId.optional(),
  bench: publicId.optional(),
  parent: publicId.optional(),
  body,
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
