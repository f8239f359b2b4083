import { z } from "zod";
import { plainText } from "~/services/file-names";

export const USER_NAME = /^[a-z0-9](?:[a-z0-9-]{0,38}[a-z0-9])?$/;

export const profileSchema = z.object({
  intent: z.literal("profile"),
  name: z
    .string({ error: "Say the name that others see." })
    .overwrite(plainText)
    .min(1, "Say the name that others see.")
    .max(120, "At most 120 characters."),
  userName: z
    .string({ error: "Choose a user name." })
    .trim()
    .toLowerCase()
    .max(40, "At most 40 characters.")
    .regex(USER_NAME, "Lower-case letters, digits and hyphens; no hyphen first or last."),
  /** As the person writes it; checked against nothing. */
  callSign: z
    .string()
    .overwrite(plainText)
    .max(20, "At most 20 characters.")
    .optional()
    .transform((text) => text ?? ""),
  ituRegion: z
    .enum(["1", "2", "3"], { error: "Choose one of the three regions, or none." })
    .optional()
    .transform((text) => (text ? Number(text) : null)),
  timeZone: z
    .string({ error: "Choose a time zone." })
    .max(60, "Choose a time zone of the list.")
    .refine(isTimeZone, "Choose a time zone of the list."),
});

/** Known to the server by its name; `UTC` always is. */
function isTimeZone(name: string): boolean {
  try {
    new Intl.DateTimeFormat("en", { timeZone: name });
    return /^(UTC|[A-Za-z]+\/[\w+/-]+)$/.test(name);
  } catch {
    return false;
  }
}

export const LENGTH_UNITS = [
  { value: "m", label: "Metres" },
  { value: "ft", label: "Feet and inches" },
] as const;

export const lengthsSchema = z.object({
  intent: z.literal("lengths"),
  lengthUnit: z.enum(["m", "ft"], { error: "Choose metres or feet." }),
});

export const sessionsSchema = z.discriminatedUnion("intent", [
  z.object({ intent: z.literal("revoke-session"), session: z.string().regex(/^[0-9a-f]{64}$/) }),
  z.object({ intent: z.literal("revoke-others") }),
]);

export const settingsSchema = z.discriminatedUnion("intent", [
  profileSchema,
  lengthsSchema,
  ...sessionsSchema.options,
]);

export const makeTokenSchema = z.object({
  intent: z.literal("make"),
  label: z
    .string({ error: "Say what the token is for." })
    .trim()
    .min(1, "Say what the token is for.")
    .max(80, "At most 80 characters."),
  scope: z.enum(["read", "write"], { error: "Choose what the token may do." }),
});

export const tokensSchema = z.discriminatedUnion("intent", [
  makeTokenSchema,
  z.object({ intent: z.literal("revoke"), token: z.string().min(1).max(16) }),
]);

export const cautionSchema = z.object({
  caution: z.string().regex(/^[a-z0-9-]{1,40}$/),
  returnTo: z.string().optional(),
});
