import { z } from "zod";
import { correctionShape } from "./schemas.ts";

/** The shapes of the API for bands and comparisons. SI units; null is "the sweep does not say". */

const id = z.string().describe("Short public id");
const hz = z.number().describe("Hz");
const swr = z.number().nullable().describe("Null outside the sweep, in a gap, and where all comes back");

const figures = {
  swrLow: swr,
  swrMiddle: swr,
  swrHigh: swr,
  covered: z.number().describe("Share of the band that the sweep covers, 0 to 1"),
  shareUnder: z
    .number()
    .nullable()
    .describe("Share of what is covered with an SWR at or under the limit; null where nothing is"),
  bestHz: hz.nullable().describe("Where the SWR is lowest in what is covered"),
  bestSwr: swr,
};

const band = {
  name: z.string(),
  lowHz: hz,
  highHz: hz,
  limitSwr: z.number(),
  design: z
    .boolean()
    .describe("What the antenna is designed for; else an allocation. National limits differ"),
};

export const bandsShape = z.object({
  region: z.number().int().nullable().describe("ITU region of the allocations; null: the union of the three"),
  bands: z.array(z.object({ ...band, ...figures })),
  targets: z
    .array(
      z.object({
        dip: id,
        band: z.string().describe("The nearest design band"),
        targetHz: hz.describe("Its middle, Hz"),
        offsetHz: hz.describe("Dip less target, Hz"),
        share: z.number().describe("Offset over target"),
        inside: z.boolean(),
        part: z.string().nullable().describe("The antenna's part of that day that may be behind the dip"),
        trim: z
          .object({
            method: z.enum(["proportion", "line"]),
            toM: z.number().describe("Metres"),
            lowM: z.number().nullable(),
            highM: z.number().nullable(),
            changeM: z.number(),
            how: z.string().describe("The arithmetic in one line"),
          })
          .nullable()
          .describe("What to make of that part's length"),
        without: z.enum(["far", "not-described", "no-part"]).nullable().describe("Why there is no trim"),
      }),
    )
    .describe("How far each dip lies from the design bands"),
});

export const bandsQuerySchema = z.object({
  limit: z.coerce
    .number()
    .gt(1)
    .max(20)
    .optional()
    .describe("SWR limit of bands without their own; without it, as the sweep was analysed"),
});

export const comparisonShape = z.object({
  reference: id.nullable().describe("The sweep that the others are held against"),
  sweeps: z.array(
    z.object({
      id,
      title: z.string(),
      project: id,
      takenAt: z.iso.datetime().nullable(),
      startHz: hz,
      stopHz: hz,
      points: z.number().int(),
      referenceOhm: z.number(),
      correction: correctionShape,
      links: z.object({ self: z.string(), points: z.string(), page: z.string() }),
    }),
  ),
  missing: z.array(z.string()).describe("Absent or hidden: the two are not told apart"),
  remarks: z.array(z.string()).describe("What the sweeps do not have in common"),
  dips: z
    .array(
      z.array(
        z.object({
          sweep: id,
          dip: z
            .object({
              id,
              frequencyHz: hz,
              frequencyUncertaintyHz: z.number().nullable(),
              minimumSwr: z.number().nullable(),
              minimumSwrLow: z.number().nullable(),
              minimumSwrHigh: z.number().nullable(),
              returnLossDb: z.number(),
              trail: z.string().nullable(),
            })
            .nullable(),
          movement: z
            .object({
              kind: z.enum(["moved", "still", "unsure", "appeared", "vanished", "unseen"]),
              byHz: z.number().nullable(),
              uncertaintyHz: z.number().nullable(),
            })
            .nullable()
            .describe("Against the reference; null for the reference itself"),
        }),
      ),
    )
    .describe("A row a dip, with a cell for each sweep in their order"),
  bands: z.array(
    z.object({ ...band, figures: z.array(z.object(figures)).describe("In the order of the sweeps") }),
  ),
});

export const comparisonQuerySchema = z.object({
  sweep: z
    .array(z.string().max(32))
    .max(12, "At most twelve sweeps are compared.")
    .describe("Repeated: `sweep=…&sweep=…`, of any projects that you may read"),
  reference: z.string().max(32).optional().describe("One of them; without it the first"),
  limit: bandsQuerySchema.shape.limit,
});
