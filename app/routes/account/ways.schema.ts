import { z } from "zod";

const way = {
  provider: z.enum(["github", "email"]),
  subject: z.string().min(1).max(190),
};

export const waysSchema = z.discriminatedUnion("intent", [
  z.object({ intent: z.literal("add-github") }),
  z.object({ intent: z.literal("remove"), ...way }),
  z.object({ intent: z.literal("mails-to"), subject: way.subject }),
]);
