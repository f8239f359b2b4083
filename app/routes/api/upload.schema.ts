import { z } from "zod";
import { FREQUENCY_UNITS } from "~/measurement/sweep";
import { type Given, TEXT_ENCODINGS, TEXT_QUANTITIES } from "~/readers/reading";

/** What comes with a file. */

const text = z
  .strictObject({
    encoding: z.enum(TEXT_ENCODINGS),
    delimiter: z.enum([",", ";", "\t", " "]),
    decimal: z.enum([".", ","]),
    thousands: z.enum(["", ".", ",", " ", "'"]),
    headerLine: z.number().int().min(0),
    firstDataLine: z.number().int().min(1),
    frequencyColumn: z.number().int().min(0),
    frequencyUnit: z.enum(FREQUENCY_UNITS),
    valueColumn: z.number().int().min(0),
    secondColumn: z.number().int().min(0).nullable(),
    quantity: z.enum(TEXT_QUANTITIES),
    angleUnit: z.enum(["deg", "rad"]),
    referenceOhm: z.number().positive(),
    zeroDb: z.number().nullable(),
  })
  .partial();

const screenshot = z
  .strictObject({
    frame: z.strictObject({ left: z.number(), top: z.number(), right: z.number(), bottom: z.number() }),
    corners: z.array(z.strictObject({ x: z.number(), y: z.number() })).length(4),
    masked: z
      .array(
        z.strictObject({
          fromX: z.number(),
          toX: z.number(),
          top: z.number().optional(),
          bottom: z.number().optional(),
        }),
      )
      .max(100),
    zeroTrace: z.string().regex(/^#[0-9a-f]{6}$/i),
    startHz: z.number(),
    stopHz: z.number(),
    scale: z.enum(["linear", "log"]),
    top: z.number(),
    bottom: z.number(),
    quantity: z.enum(["s11-db", "return-loss", "swr", "level"]),
    zeroDb: z.number(),
    traceColor: z.string().regex(/^#[0-9a-f]{6}$/i),
    referenceOhm: z.number().positive(),
  })
  .partial();

export const givenSchema = z
  .strictObject({
    text,
    touchstone: z.strictObject({ port: z.union([z.literal(1), z.literal(2)]) }).partial(),
    screenshot,
  })
  .partial() satisfies z.ZodType<Given>;

export const uploadFieldsSchema = z.strictObject({
  title: z.string().trim().max(160, "At most 160 characters.").optional(),
  takenAt: z
    .union([z.iso.datetime({ offset: true }), z.iso.date()], {
      error: "A time as in 2026-09-14T17:20:00Z, or a date.",
    })
    .optional()
    .describe("When it was swept"),
  bench: z
    .string()
    .max(16, "The public id of a bench.")
    .optional()
    .describe("Public id of the bench it was taken with: its dips are then found at that bench's port"),
  step: z
    .string()
    .max(16, "The public id of a step.")
    .optional()
    .describe("Public id of a step that was done: this sweep then stands after it, whatever the dates say"),
  reading: z
    .string()
    .transform((json, context) => {
      try {
        return JSON.parse(json) as unknown;
      } catch {
        context.addIssue({ code: "custom", message: "This is not JSON." });
        return z.NEVER;
      }
    })
    .pipe(givenSchema)
    .optional(),
});
