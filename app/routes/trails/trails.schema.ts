import { z } from "zod";
import { verdictSchema } from "~/components/notes/verdict.schema";
import { plainText } from "~/services/file-names";

/** The forms about a trail. Dips and trails are named by their public ids. */

const publicId = z.string().regex(/^[0-9a-z]{4,16}$/, "Choose one of the list.");

export const nameSchema = z.object({
  intent: z.literal("name"),
  name: z
    .string()
    .optional()
    .transform((text) => plainText(text ?? "").trim())
    .pipe(z.string().max(80, "A name has at most 80 characters.")),
});

/** Two dips: that they are apart, or that what was said of them is taken back. */
export const pairSchema = z.object({
  intent: z.enum(["part", "take-back"]),
  one: publicId,
  other: publicId,
});

export const joinSchema = z.object({ intent: z.literal("join"), other: publicId });

/** `trail`: where the dip belongs; left out, it is the trail of the page. */
export const joinDipSchema = z.object({
  intent: z.literal("join-dip"),
  dip: publicId,
  trail: publicId.optional(),
});

export const trailForm = z.discriminatedUnion("intent", [
  nameSchema,
  joinSchema,
  joinDipSchema,
  pairSchema.extend({ intent: z.literal("part") }),
  pairSchema.extend({ intent: z.literal("take-back") }),
  verdictSchema.extend({ intent: z.literal("propose") }),
  verdictSchema.extend({ intent: z.literal("settle") }),
  verdictSchema.extend({ intent: z.literal("reopen") }),
]);

export type TrailForm = z.infer<typeof trailForm>;
