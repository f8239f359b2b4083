import { z } from "zod";

export const activitySchema = z.discriminatedUnion("intent", [
  z.object({ intent: z.literal("seen"), mark: z.string().min(1).max(40) }),
  z.object({ intent: z.literal("make-feed") }),
  z.object({ intent: z.literal("revoke-feed"), feed: z.string().min(1).max(16) }),
]);
