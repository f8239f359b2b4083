import { z } from "zod";

export const accountSchema = z.object({
  intent: z.enum(["suspend", "restore", "promote", "demote"]),
  user: z.string().min(1).max(16),
});

export const mailSchema = z.object({ intent: z.literal("retry"), mail: z.string().min(1).max(16) });

export const reportsSchema = z.object({
  intent: z.enum(["leave", "remove", "suspend"]),
  report: z.string().min(1).max(16),
});
