import { z } from "zod";
import { batchIdSchema } from "~/routes/batch/batch.schema";
import { PROBLEM_CODES } from "~/services/batch/problems";
import { BATCH_PHASES } from "~/services/batch/report";

/** The shapes of the API for batches: many sweeps that are checked together before one of them is taken in. */

const id = z.string().describe("Short public id");
const time = z.iso.datetime().describe("UTC");
const words = z.string().describe("In words");

/** What comes beside the files of a batch. */
export const batchFieldsSchema = z.strictObject({
  batch: batchIdSchema
    .optional()
    .describe("Id of a batch that more files are for, or another table: what it says of a file counts"),
});

export const takeBatchSchema = z.strictObject({
  problems: z
    .enum(["refuse", "leave-out"])
    .default("refuse")
    .describe("What to do where something stands in the way of a row: take nothing in, or leave the row out"),
});

const check = z
  .discriminatedUnion("kind", [
    z.object({
      kind: z.literal("read"),
      points: z.number().int(),
      startHz: z.number().describe("Hz"),
      stopHz: z.number().describe("Hz"),
      dips: z.number().int(),
    }),
    z.object({ kind: z.literal("to-read"), words }),
    z.object({
      kind: z.literal("unreadable"),
      words,
      line: z.number().int().nullable().describe("Of the file; null where it has none"),
      column: z.number().int().nullable(),
    }),
    z.object({ kind: z.literal("here"), sweep: id, title: z.string() }),
  ])
  .nullable()
  .describe(
    "What was found in its file. `to-read`: a picture that is not certain, kept until somebody looks at it; `here`: this file is in the project. Null until it was read, and where there is no file",
  );

const row = z.object({
  file: z.string().describe("Its name, as the table writes it; the path where no table does"),
  line: z
    .number()
    .int()
    .nullable()
    .describe("Of the table, from 1; null where no table says anything of the file"),
  title: z.string().describe("As it was written; empty where nothing was said, as the next three"),
  takenAt: z.string(),
  bench: z.string(),
  step: z.string(),
  check,
  problems: z
    .array(
      z.object({
        code: z.enum(PROBLEM_CODES),
        words,
        sweep: id.optional().describe("The one that is in the way"),
      }),
    )
    .describe("What stands in the way of taking it in"),
  leftOut: z.boolean(),
  result: z
    .object({
      kind: z.enum(["read", "unread", "twice", "refused", "failed"]),
      title: z.string(),
      sweep: id.nullable().describe("Null where nothing was stored"),
      words,
    })
    .nullable()
    .describe("What became of it; null until it was taken in"),
});

export const batchSummaryShape = z.object({
  id,
  project: id,
  phase: z
    .enum(BATCH_PHASES)
    .describe("Still being sent; being read; read, and nothing is written yet; being taken in; taken in"),
  done: z.number().int().describe("Files looked at, or from `taking` on rows taken in"),
  all: z.number().int().describe("Of so many"),
  createdAt: time,
  until: time.nullable().describe("Its files are kept so long"),
  links: z.object({ self: z.string(), page: z.string() }),
});

export const batchShape = batchSummaryShape.extend({
  table: z
    .object({
      name: z.string(),
      problem: z.string().nullable().describe("Why nothing of it was used, with the line; null where it was"),
      remarks: z.array(z.string()),
    })
    .nullable()
    .describe("Null while none came"),
  passedOver: z.number().int().describe("Files that a system leaves in folders, passed over"),
  ready: z.boolean().describe("It was checked and nothing stands in its way"),
  rows: z.array(row).describe("What would be written, or was: a row for each file"),
});

export const batchListShape = z.object({
  items: z.array(batchSummaryShape).describe("The last 20, newest first"),
});
