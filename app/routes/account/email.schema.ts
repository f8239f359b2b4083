import { z } from "zod";
import { plainText } from "~/services/file-names";

/** Compared letter by letter, so kept in one way of writing. */
export const emailField = z
  .string({ error: "Type your e-mail address." })
  .trim()
  .toLowerCase()
  .max(254, "An address has at most 254 characters.")
  .pipe(z.email("That is not an e-mail address, such as name@example.org."));

export const askSchema = z.object({
  intent: z.literal("ask"),
  email: emailField,
  next: z.string().optional(),
  /** Adds the address to the account that is signed in. */
  add: z.literal("yes").optional(),
});

export const codeSchema = z.object({
  intent: z.literal("code"),
  code: z
    .string({ error: "Type the code from the mail." })
    .trim()
    .regex(/^[\d\s-]{8,20}$/, "The code has eight digits."),
});

export const newcomerSchema = z.object({
  intent: z.literal("name"),
  name: z
    .string({ error: "Say the name that others see." })
    .overwrite(plainText)
    .min(1, "Say the name that others see.")
    .max(120, "At most 120 characters."),
});

export const emailSchema = z.discriminatedUnion("intent", [
  askSchema,
  codeSchema,
  newcomerSchema,
  z.object({ intent: z.literal("again") }),
]);
