import { z } from "zod";

export const bundleSchema = z.discriminatedUnion("intent", [
  z.object({ intent: z.literal("make") }),
  z.object({ intent: z.literal("remove"), run: z.string().max(16) }),
]);
