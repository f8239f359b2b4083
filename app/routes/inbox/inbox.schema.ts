import { z } from "zod";

const publicId = z.string().min(1).max(16);

export const MAIL_MODES = [
  { value: "once", label: "Each at once" },
  { value: "hourly", label: "One mail an hour, when there is something" },
  { value: "daily", label: "One mail a day, at seven in the morning" },
  { value: "none", label: "No mails" },
] as const;

const mode = z.enum(["once", "hourly", "daily", "none"], { error: "Choose how often mails come." });

export const inboxSchema = z.discriminatedUnion("intent", [
  z.object({ intent: z.literal("open"), notice: publicId }),
  z.object({ intent: z.literal("read"), notice: publicId }),
  z.object({ intent: z.literal("read-all"), project: publicId.optional() }),
]);

/** Scope "all" or a project's public id; mode "usual" takes a project's own choice away. */
export const mailSchema = z.object({ scope: publicId, mode: z.union([mode, z.literal("usual")]) });

export const FOLLOW_KINDS = ["project", "trail", "dip", "sweep", "step", "bench"] as const;

const subject = { kind: z.enum(FOLLOW_KINDS), subject: publicId.optional() };

export const followSchema = z.discriminatedUnion("intent", [
  z.object({ intent: z.literal("follow"), ...subject }),
  z.object({ intent: z.literal("mute"), ...subject }),
  z.object({ intent: z.literal("neither"), ...subject }),
  z.object({ intent: z.literal("mail"), mode: z.union([mode, z.literal("usual")]) }),
]);
