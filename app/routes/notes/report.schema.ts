import { z } from "zod";

export const reportSchema = z.object({
  reason: z
    .string({ error: "Say what is wrong with the note." })
    .trim()
    .min(1, "Say what is wrong with the note.")
    .max(500, "At most 500 characters."),
});
