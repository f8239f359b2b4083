import { z } from "zod";

const id = z.string().max(16).optional();
const caption = z
  .string()
  .max(300, "A caption has at most 300 characters.")
  .optional()
  .transform((text) => text ?? "");

/** The forms of `<Photographs>`; `bench` or `step` says whose they are, neither: the antenna's. */
export const photographsSchema = z.discriminatedUnion("intent", [
  z.object({ intent: z.literal("add"), bench: id, step: id, caption }),
  z.object({ intent: z.literal("caption"), photograph: z.string(), caption }),
  z.object({ intent: z.literal("delete"), photograph: z.string() }),
]);
