import { z } from "zod";
import { MAX_VERDICT_CHARACTERS } from "~/services/note-limits";

export const verdictSchema = z.object({
  intent: z.enum(["propose", "settle", "reopen"]),
  was: z.enum(["open", "proposed", "settled"]),
  text: z
    .string({ error: "Say why, in a few words." })
    .trim()
    .min(1, "Say why, in a few words.")
    .max(MAX_VERDICT_CHARACTERS, `At most ${MAX_VERDICT_CHARACTERS} characters.`),
  returnTo: z.string().optional(),
});
