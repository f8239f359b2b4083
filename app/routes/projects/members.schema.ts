import { z } from "zod";
import { PROJECT_ROLES } from "~/auth/permissions";

export const INVITATION_DAYS = [
  { value: "1", label: "One day" },
  { value: "7", label: "One week" },
  { value: "30", label: "30 days" },
  { value: "90", label: "90 days" },
] as const;

/** What an owner who hands the project over is afterwards. */
export const AFTERWARDS = [
  { value: "experimenter", label: "Stay as experimenter" },
  { value: "owner", label: "Stay as a second owner" },
  { value: "leave", label: "Leave the project" },
] as const;

const userNameField = z
  .string({ error: "Say the user name." })
  .trim()
  .toLowerCase()
  .min(1, "Say the user name.")
  .max(40, "A user name has at most 40 characters.")
  .transform((text) => text.replace(/^@/, ""));

const roleField = z.enum(PROJECT_ROLES as ["owner", "experimenter", "commenter", "reader"], {
  error: "Choose a role.",
});

export const addMemberSchema = z.object({
  intent: z.literal("add"),
  userName: userNameField,
  role: roleField,
});

export const inviteSchema = z.object({
  intent: z.literal("invite"),
  /** Left empty: a link. */
  email: z
    .string()
    .trim()
    .toLowerCase()
    .max(254, "An address has at most 254 characters.")
    .pipe(z.email("That is not an e-mail address, such as name@example.org."))
    .optional(),
  role: z.enum(["experimenter", "commenter", "reader"], { error: "Choose a role." }),
  days: z.enum(["1", "7", "30", "90"], { error: "Choose how long it works." }).transform(Number),
});

export const handOverSchema = z.object({
  intent: z.literal("hand-over"),
  userName: userNameField,
  afterwards: z.enum(["experimenter", "owner", "leave"], { error: "Choose what you are afterwards." }),
  title: z.string({ error: "Type the title to hand the project over." }).trim(),
});

export const membersSchema = z.discriminatedUnion("intent", [
  addMemberSchema,
  inviteSchema,
  handOverSchema,
  z.object({ intent: z.literal("revoke"), invitation: z.string().min(1).max(16) }),
  z.object({ intent: z.literal("change"), userName: userNameField, role: roleField }),
  z.object({ intent: z.literal("remove"), userName: userNameField }),
  z.object({ intent: z.literal("leave") }),
]);
