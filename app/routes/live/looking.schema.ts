import { z } from "zod";

/** What a window says of itself: where it looks, or that it looks away. */
export const lookingSchema = z.object({
  window: z.string().regex(/^[0-9a-f]{16,64}$/),
  away: z.literal("yes").optional(),
  kind: z.enum(["project", "sweep", "dip", "trail", "step", "bench"]).default("project"),
  subject: z
    .string()
    .regex(/^[0-9a-z-]{1,16}$/)
    .default("story"),
});
