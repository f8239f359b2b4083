import { z } from "zod";

const userName = z
  .string({ error: "Say the user name." })
  .trim()
  .toLowerCase()
  .min(1, "Say the user name.")
  .max(40, "A user name has at most 40 characters.")
  .transform((text) => text.replace(/^@/, ""));

export const blockSchema = z.object({
  intent: z.literal("block"),
  userName,
  returnTo: z.string().optional(),
});

export const blockedSchema = z.discriminatedUnion("intent", [
  blockSchema,
  z.object({ intent: z.literal("unblock"), userName }),
]);
