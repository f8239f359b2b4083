import { z } from "zod";

/** The shapes of the API for bundles: projects as one file, taken in again, and all data of a person. */

const id = z.string().describe("Short public id");
const time = z.iso.datetime().describe("UTC");

export const bundleShape = z.object({
  id,
  kind: z
    .enum(["export", "import", "mine"])
    .describe("A project as one file, such a file being taken in, or all data of a person"),
  state: z
    .enum(["waiting", "running", "done", "failed", "gone"])
    .describe("`gone`: it was made, and its file is not kept any more"),
  share: z.number().nullable().describe("Of the work, 0 to 1; null while that is not known"),
  again: z.boolean().describe("Something failed, and it is tried again by itself"),
  faults: z.array(z.string()).describe("Why it failed, or why it was refused, each in a sentence"),
  createdAt: time,
  file: z
    .object({
      name: z.string(),
      sizeBytes: z.number().int(),
      files: z.number().int().describe("How many are in it"),
      until: time.describe("Kept so long"),
    })
    .nullable()
    .describe("What `links.file` answers; null while there is nothing"),
  records: z
    .number()
    .int()
    .nullable()
    .describe("How many were written when it was taken in; null where nothing was"),
  project: z
    .string()
    .nullable()
    .describe(
      "The one that it is of, or that came of it; null until there is one, and where you can't read it",
    ),
  links: z.object({ self: z.string(), file: z.string().nullable(), page: z.string() }),
});

export const bundleListShape = z.object({ items: z.array(bundleShape).describe("The last 20") });
