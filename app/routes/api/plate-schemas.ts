import { z } from "zod";
import { withdrawSchema } from "~/routes/plates/plates.schema";
import { LICENCE_IDS } from "~/services/plates/licences";
import { plateRecord } from "~/services/plates/record";
import { PLATE_KINDS } from "~/services/plates/subject";
import { shownMentionShape } from "./mention-schemas.ts";

/** The shapes of the API for plates. */

export const newPlateSchema = z.object({
  from: z
    .string({ error: "Say what the plate is of." })
    .max(200)
    .describe(
      "`sweep:ID`, `dip:ID`, `compare:ID,ID` (two to eight sweeps), `trail:ID`, `strip` or `bench:ID`",
    ),
  title: z
    .string()
    .trim()
    .min(1)
    .max(160)
    .optional()
    .describe("Proposed from what it is of where it is left out"),
  caption: z.string().trim().max(2000).optional().describe("Markdown"),
  licence: z.enum(LICENCE_IDS).optional().describe("The one that the project proposes where it is left out"),
  fromHz: z.number().nonnegative().nullable().optional().describe("Hz; null for the end of what there is"),
  toHz: z.number().positive().nullable().optional().describe("Hz; null for the end of what there is"),
  scale: z.enum(["linear", "log"]).optional(),
  quantity: z.enum(["return-loss", "swr"]).optional(),
  showBands: z.boolean().optional(),
  showDips: z.boolean().optional(),
  showLimits: z.boolean().optional(),
  showTitle: z.boolean().optional(),
  labels: z
    .record(z.string(), z.string().trim().max(80))
    .optional()
    .describe("Other names for sweeps, dips and trails, by id"),
  mends: z.string().max(16).optional().describe("Id of the plate that this is a new version of"),
  wrong: z.string().trim().min(1).max(500).optional().describe("With `mends`: what was wrong with that"),
  clientKey: z
    .string()
    .regex(/^[\w-]{1,64}$/, "Letters, digits, _ and -, at most 64.")
    .optional()
    .describe("Made by whoever sends: sent twice, one plate is made"),
});

export const plateSummaryShape = z.object({
  id: z.string(),
  number: z.number().int().describe("Within the project, from 1; the same for every version"),
  version: z.number().int(),
  kind: z.enum(PLATE_KINDS),
  title: z.string(),
  licence: z.string(),
  madeAt: z.iso.datetime(),
  madeBy: z.string().nullable(),
  withdrawnAt: z.iso.datetime().nullable(),
  links: z.object({ self: z.string(), page: z.string() }),
});

export const plateListShape = z.object({ items: z.array(plateSummaryShape) });

/** The plate as it was frozen, which is its JSON form, and beside it what has come since. */
export const plateShape = plateRecord.extend({
  versions: z
    .array(
      z.object({
        id: z.string(),
        version: z.number().int(),
        madeAt: z.iso.datetime(),
        withdrawnAt: z.iso.datetime().nullable(),
      }),
    )
    .describe("Every version of this plate, oldest first, itself among them"),
  mentions: z
    .array(shownMentionShape)
    .describe("Pages elsewhere that cite this version, as its page shows them"),
});

/** The JSON form, which never changes. */
export const plateRecordShape = plateRecord;

export const plateWithdrawalSchema = z.strictObject({ reason: withdrawSchema.shape.reason });

/** What stays of a plate that was withdrawn. */
export const withdrawnPlateShape = z.object({
  id: z.string(),
  number: z.number().int(),
  version: z.number().int(),
  title: z.string(),
  withdrawnAt: z.iso.datetime(),
  reason: z.string(),
  newer: z.string().nullable().describe("Id of the newest later version that stands; null for none"),
});

const held = z.union([z.string(), z.number()]).nullable();

export const plateCheckShape = z.object({
  same: z.boolean().describe("True: every number came out as it was frozen, to the last digit"),
  differences: z.array(
    z.object({
      what: z.string(),
      frozen: held,
      now: held,
      why: z.string().describe("Why, and by how much where that can be said"),
    }),
  ),
});
