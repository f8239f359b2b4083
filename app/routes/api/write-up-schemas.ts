import { z } from "zod";
import { titleField } from "~/routes/write-ups/write-ups.schema";
import { plainText } from "~/services/file-names";
import { MAX_WRITE_UP_CHARACTERS } from "~/services/note-limits";
import { shownMentionShape } from "./mention-schemas.ts";

/** The shapes of the API for write-ups. */

const id = z.string().describe("Short public id");
const body = z.string().max(MAX_WRITE_UP_CHARACTERS);
const time = z.iso.datetime().describe("UTC");

export const writeUpSummaryShape = z.object({
  id,
  project: id,
  title: z.string(),
  state: z
    .enum(["draft", "published", "taken-back"])
    .describe("Drafts are listed for those who may write them"),
  version: z
    .number()
    .int()
    .nullable()
    .describe("The published one, or the one that was asked for; null where none is"),
  publishedAt: time.nullable(),
  updatedAt: time.describe("Last written in"),
  address: z.string().describe("Where it is read once it is published; answers 410 while it is taken back"),
});

export const writeUpListShape = z.object({ items: z.array(writeUpSummaryShape) });

export const writeUpShape = writeUpSummaryShape.extend({
  versions: z
    .array(
      z.object({
        version: z.number().int(),
        title: z.string(),
        remark: z.string(),
        publishedAt: time,
        publishedBy: z.string().nullable(),
      }),
    )
    .describe("Every version that was published, newest first"),
  mentions: z.array(shownMentionShape).describe("Pages elsewhere that cite it, as its page shows them"),
  body: z.string().describe("Markdown: the published text, or with `draft=yes` as it is being written"),
  revision: z.string().describe("Of title and text; send it back with a change"),
});

export const newWriteUpSchema = z.object({ title: titleField, body: body.default("") });

export const writeUpChangeSchema = z.object({
  title: titleField.optional(),
  body: body
    .optional()
    .describe("Markdown; a figure is a line of its own: ![caption](#dip:…), #sweep:… or #plate:…"),
  revision: z
    .string()
    .max(40)
    .describe("Of the draft that this is a change of; 409 where it is another by now"),
});

export const writeUpQuerySchema = z.object({
  draft: z.literal("yes").optional().describe("As it is being written, for those who may write it"),
  version: z
    .string()
    .regex(/^[1-9]\d{0,5}$/, "A number from 1.")
    .optional()
    .describe("The text of a version that was published; without it the one that counts"),
});

export const publicationSchema = z.strictObject({
  revision: z.string().max(40).describe("Of the draft that was looked at; 409 where it is another by now"),
  remark: z.string().overwrite(plainText).max(300).default("").describe("What changed, in a line"),
});
