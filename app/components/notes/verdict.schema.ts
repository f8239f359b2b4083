import { z } from "zod";
import { MAX_VERDICT_CHARACTERS } from "~/services/note-limits";

/** What is left of a note beside the verdict's own words and its evidence. */
const MAX_NOTE_WORDS = 4000;

export const verdictSchema = z.object({
  intent: z.enum(["propose", "settle", "reopen"]),
  was: z.enum(["open", "proposed", "settled"]),
  text: z
    .string({ error: "Say why, in a few words." })
    .trim()
    .min(1, "Say why, in a few words.")
    .max(MAX_VERDICT_CHARACTERS, `At most ${MAX_VERDICT_CHARACTERS} characters.`),
  /** What it rests on, each as "kind:id". */
  evidence: z.array(z.string().max(80)).max(100, "At most 100 pieces of evidence.").optional(),
  /** Markdown, for the note in the thread. */
  note: z.string().max(MAX_NOTE_WORDS, `At most ${MAX_NOTE_WORDS} characters.`).optional(),
  returnTo: z.string().optional(),
});
