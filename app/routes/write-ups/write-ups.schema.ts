import { z } from "zod";
import { plainText } from "~/services/file-names";
import { MAX_WRITE_UP_CHARACTERS } from "~/services/note-limits";

export const titleField = z
  .string({ error: "Give it a title." })
  .overwrite(plainText)
  .min(1, "Give it a title.")
  .max(160, "At most 160 characters.");

/** A form sends line ends of two characters, a text field counts one. */
export const bodyField = z
  .string()
  .default("")
  .transform((text) => text.replace(/\r\n?/g, "\n"))
  .refine((text) => text.length <= MAX_WRITE_UP_CHARACTERS, {
    error: `A write-up has at most ${MAX_WRITE_UP_CHARACTERS.toLocaleString("en")} characters.`,
  });

export const newSchema = z.object({ title: titleField });

export const keepSchema = z.object({
  intent: z.literal("keep"),
  title: titleField,
  body: bodyField,
  /** As the form was filled in when it was opened. */
  was: z.string().optional(),
  /** Stays on the page, which goes on by itself. */
  here: z.string().optional(),
});

export const editSchema = z.discriminatedUnion("intent", [
  keepSchema,
  z.object({ intent: z.literal("look"), title: z.string().default(""), body: bodyField }),
  z.object({ intent: z.literal("delete") }),
]);

export const publishSchema = z.discriminatedUnion("intent", [
  z.object({
    intent: z.literal("publish"),
    /** Of the text that was looked at. */
    revision: z.string().max(40),
    remark: z
      .string()
      .optional()
      .transform((text) => plainText(text ?? ""))
      .refine((text) => text.length <= 300, "At most 300 characters."),
  }),
  z.object({ intent: z.literal("take-back") }),
]);

export const lookSchema = z.object({ body: bodyField });
