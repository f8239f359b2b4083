import { z } from "zod";

/** W3C Webmention 3.1.3: both, once each. What they may be is judged where they are received. */
export const webmentionSchema = z.object({ source: z.string().min(1), target: z.string().min(1) });

export const decisionSchema = z.object({
  intent: z.enum(["show", "hide", "check"]),
  mention: z.string().regex(/^[0-9a-z]{1,16}$/),
});
