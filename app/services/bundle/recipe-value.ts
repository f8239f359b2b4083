import { z } from "zod";
import { feedline, given, settings, sha256 } from "./record-values.ts";

/** JSON, kept as it was written: by it a plate is computed again, by anybody who asks. */
export const recipe = z
  .string()
  .max(8_000_000)
  .refine((text) => shape.safeParse(parsed(text)).success, "no recipe by which numbers are computed");

function parsed(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
}

const shape = z.looseObject({
  given,
  analysis: z
    .looseObject({ settings, plane: z.enum(["instrument", "port", "antenna"]), feedline })
    .nullable(),
  bench: z
    .looseObject({
      standards: z.looseObject({}),
      given: z.looseObject({}),
      references: z.partialRecord(z.enum(["open", "short", "load", "through"]), sha256),
    })
    .nullable(),
});
