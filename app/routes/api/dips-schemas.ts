import { z } from "zod";
import { DIP_ORDERS } from "~/db/dip-table.server";
import { dipShape } from "./schemas.ts";

/** The shapes of the API for the table of all dips. */

const number = z.string().regex(/^\d*\.?\d+$/, "A number such as 7.1.");
const id = z.string().describe("Short public id");

/** By the names of the table's page. What a page passes over is refused here. */
export const dipsQuerySchema = z.object({
  from: number.optional().describe("MHz; dips from this frequency on"),
  to: number.optional().describe("MHz; dips up to this frequency"),
  under: number.optional().describe("Dips whose lowest SWR is under this"),
  band: z
    .string()
    .max(60)
    .optional()
    .describe("`design`, `not-design`, `outside` (of every band), or `in:` and the name of a band"),
  verdict: z.enum(["open", "proposed", "settled"]).optional().describe("The one that stands"),
  sweep: z.string().max(16).optional().describe("Id of the sweep they are of"),
  q: z.string().max(200).optional().describe("Words in the sweep's title, the verdict or the trail's name"),
  sort: z
    .string()
    .regex(new RegExp(`^-?(?:${DIP_ORDERS.join("|")})$`), `One of ${DIP_ORDERS.join(", ")}.`)
    .optional()
    .describe(
      `${DIP_ORDERS.map((key) => `\`${key}\``).join(", ")}; with \`-\` before it the other way round`,
    ),
  cursor: z.string().max(60).optional(),
});

export const tableDipShape = dipShape.extend({
  sweep: z.object({
    id,
    title: z.string(),
    takenAt: z.iso.datetime().nullable().describe("UTC; null where unknown"),
    createdAt: z.iso.datetime().describe("When it came in, UTC"),
  }),
  band: z.string().nullable().describe("The band that it lies in; null outside of every band"),
  inDesignBand: z.boolean(),
  trail: z
    .object({ id, name: z.string().describe("Empty where it has none") })
    .nullable()
    .describe("Null where it is on none"),
});

export const dipTableShape = z.object({
  total: z.number().int().describe("Dips on all pages"),
  items: z.array(tableDipShape),
  nextCursor: z.string().nullable(),
});
