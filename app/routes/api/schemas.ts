import { z } from "zod";
import { LIMIT_SOURCES } from "~/measurement/sweep";
import { LICENCE_IDS } from "~/services/plates/licences";

/** The shapes of the API: what answers hold, and where the OpenAPI document comes from. */

const id = z.string().describe("Short public id");
const time = z.iso.datetime().describe("UTC");
const hz = z.number().describe("Hz");

export const problemShape = z.looseObject({
  type: z.string(),
  title: z.string(),
  status: z.number().int(),
  detail: z.string().describe("What happened, what is safe, what to do"),
  code: z.string().optional().describe("A word that a program can act on"),
  line: z.number().int().optional(),
  column: z.number().int().optional(),
  errors: z.array(z.object({ field: z.string(), message: z.string() })).optional(),
  sweep: z.string().optional().describe("The sweep that is in the way: where to get it"),
});

export const projectShape = z.object({
  id,
  title: z.string(),
  summary: z.string().describe("Markdown"),
  visibility: z.enum(["private", "linked", "public"]),
  ituRegion: z.number().int().nullable().describe("1, 2 or 3; null where it was not said"),
  demo: z.boolean().describe("True where the data are invented"),
  role: z.enum(["owner", "experimenter", "commenter", "reader"]),
  sweepCount: z.number().int(),
  updatedAt: time,
  links: z.object({ self: z.string(), sweeps: z.string(), page: z.string() }),
});

export const projectWithBandsShape = projectShape.extend({
  licence: z
    .enum(LICENCE_IDS)
    .describe("Proposed for new plates, and the one of write-ups when they are published"),
  designBands: z.array(z.object({ name: z.string(), lowHz: hz, highHz: hz, swrLimit: z.number() })),
});

export const projectChangeSchema = z.strictObject({
  licence: z.enum(LICENCE_IDS).describe("What is made later is under it; what is there keeps its own"),
});

export const projectListShape = z.object({
  items: z.array(projectShape),
  nextCursor: z.string().nullable().describe("Give it back as `cursor` for the next page"),
});

const verdict = z.enum(["open", "proposed", "settled"]);

const edge = z.object({ low: z.number().nullable(), high: z.number().nullable() });

export const bandwidthShape = z.object({
  limitSwr: z.number(),
  lowHz: hz.nullable().describe("Hz; null where the sweep ends inside"),
  highHz: hz.nullable(),
  widthHz: z.number().describe("Hz; at least this where `open`"),
  widthUncertaintyHz: z.number().nullish(),
  open: z.boolean(),
  shared: z.boolean().describe("Another dip lies in the same stretch"),
  fractional: z.number().nullish(),
  widthLowHz: z.number().nullish().describe("Worst case with the bench's errors; null where unknown"),
  widthHighHz: z.number().nullish(),
  lowEdge: edge.nullish().describe("Where the lower end may lie, Hz; null where unknown"),
  highEdge: edge.nullish(),
});

export const dipShape = z.object({
  id,
  frequencyHz: hz,
  frequencyUncertaintyHz: z.number().nullable().describe("Half-width of the 95 % interval, Hz"),
  minimumSwr: z.number().nullable().describe("Null where the reflection is total: the SWR has no number"),
  minimumSwrLow: z.number().nullable().describe("Limits with the bench's directivity; null where unknown"),
  minimumSwrHigh: z.number().nullable(),
  minimumSwrNoiseLow: z.number().nullish().describe("95 % interval from noise and fit alone"),
  minimumSwrNoiseHigh: z.number().nullish(),
  returnLossDb: z.number(),
  returnLossLowDb: z.number().nullable().describe("The same limits as of the SWR, dB; null where unknown"),
  returnLossHighDb: z.number().nullable(),
  benchFrequencyHalfHz: z
    .number()
    .nullable()
    .describe("Hz; how far the bench's errors may have moved the lowest point; null where unknown"),
  prominenceDb: z.number(),
  bandwidth: bandwidthShape.nullable().describe("Null where the lowest SWR is above the limit"),
  q: z.number().nullable(),
  qLow: z.number().nullish(),
  qHigh: z.number().nullish(),
  qLimits: z
    .object({ low: z.number().nullable(), high: z.number().nullable() })
    .nullable()
    .describe("`qLow` to `qHigh` widened by the bench's errors; null where unknown"),
  limits: z
    .array(z.object({ source: z.enum(LIMIT_SOURCES), share: z.number() }))
    .describe("What the limits of the lowest SWR come from, the largest first, sum 1"),
  unknown: z
    .array(z.object({ source: z.enum(LIMIT_SOURCES), remedy: z.string() }))
    .describe("What is not known about the limits, and what would make it known"),
  method: z.enum(["fit", "parabola", "sample"]),
  edge: z.boolean(),
  verdict,
  verdictText: z.string(),
  noteCount: z.number().int(),
  links: z.object({ notes: z.string(), causes: z.string(), page: z.string() }),
});

const sweepFacts = z.object({
  points: z.number().int(),
  startHz: hz,
  stopHz: hz,
  referenceOhm: z.number(),
  complex: z.boolean(),
});

const sweepError = z.object({
  code: z.string(),
  message: z.string(),
  line: z.number().int().optional(),
  column: z.number().int().optional(),
});

const sweepHead = z.object({
  id,
  title: z.string(),
  file: z.string().describe("The name that the original came with"),
  sha256: z.string().describe("Of the original's bytes"),
  format: z.enum(["text", "touchstone", "screenshot"]).nullable(),
  takenAt: time.nullable().describe("When it was swept; null where unknown"),
  createdAt: time,
  sweep: sweepFacts.nullable().describe("Null while the file could not be read"),
  error: sweepError.nullable().describe("Why it could not be read"),
});

export const sweepSummaryShape = sweepHead.extend({
  dips: z.array(
    z.object({
      id,
      frequencyHz: hz,
      minimumSwr: z.number().nullable(),
      returnLossDb: z.number(),
      verdict,
    }),
  ),
  links: z.object({ self: z.string(), page: z.string() }),
});

export const sweepListShape = z.object({
  items: z.array(sweepSummaryShape),
  nextCursor: z.string().nullable(),
});

export const correctionShape = z.object({
  kind: z.enum(["none", "scalar", "three-term"]),
  plane: z.enum(["instrument", "port", "antenna"]).describe("Where the numbers are referred to"),
  fromHz: hz.nullable().describe("Hz; the correction holds from here; null where nothing was corrected"),
  toHz: hz.nullable(),
  bench: z
    .object({ id, name: z.string(), version: z.number().int() })
    .nullable()
    .describe("The bench as it was that day"),
  feedline: z
    .object({
      name: z.string(),
      k1: z.number().describe("Matched loss in dB a metre is k1·√f + k2·f, f in MHz"),
      k2: z.number(),
      lengthM: z.number(),
      velocityFactor: z.number(),
    })
    .nullable()
    .describe("The line that was taken away"),
});

export const sweepShape = sweepHead.extend({
  reading: z
    .object({
      quantity: z.enum(["s11-db", "return-loss", "swr", "level", "gamma", "impedance"]),
      frequencyUnit: z.enum(["Hz", "kHz", "MHz", "GHz"]),
      assumed: z.array(z.string()).describe("What the file did not say"),
      confidence: z.number().min(0).max(1),
    })
    .nullable(),
  correction: correctionShape.describe("What was done before the dips were found"),
  dips: z.array(dipShape),
  warnings: z.array(z.object({ code: z.string(), message: z.string() })),
  analysis: z
    .object({
      version: z.string().describe("Of the method: two analyses of one version and settings agree"),
      settings: z.object({ swrLimit: z.number(), minimumProminenceDb: z.number() }),
      number: z.number().int(),
      createdAt: time,
    })
    .nullable(),
  links: z.object({
    self: z.string(),
    points: z.string(),
    project: z.string(),
    page: z.string(),
    original: z.string(),
  }),
});

const column = z.array(z.number().nullable());

export const pointsShape = z.object({
  total: z.number().int().describe("Points of the whole sweep"),
  correction: correctionShape,
  points: z.object({
    frequencyHz: z.array(z.number()),
    magnitude: column.describe("Magnitude of the reflection coefficient; null is a gap"),
    returnLossDb: column.describe("dB; null for a gap and where the reflection is nothing at all"),
    gammaRe: column.optional().describe("Complex sweeps only"),
    gammaIm: column.optional(),
  }),
});

export const noteShape = z.object({
  id,
  parent: z.string().nullable().describe("The note that this one answers"),
  author: z
    .object({ userName: z.string(), name: z.string() })
    .nullable()
    .describe("Null where it was closed"),
  body: z.string().describe("Markdown; empty where it was removed"),
  createdAt: time,
  editedAt: time.nullable(),
  removed: z.boolean(),
});

export const noteListShape = z.object({ items: z.array(noteShape), nextCursor: z.string().nullable() });

export const newNoteSchema = z.strictObject({
  body: z.string().trim().min(1, "Say something.").max(20_000, "At most 20,000 characters."),
  parent: z.string().max(16).nullish().describe("The note to answer"),
  clientKey: z
    .string()
    .regex(/^[\w-]{8,40}$/)
    .nullish()
    .describe("Sent again with the same key, the first note is found instead of a second made"),
});

export const pointsQuerySchema = z.object({
  plane: z
    .enum(["instrument", "port", "antenna"])
    .optional()
    .describe("Where the points are referred to; without it, where the dips were found"),
  fromHz: z.coerce.number().min(0).optional(),
  toHz: z.coerce.number().min(0).optional(),
  max: z.coerce
    .number()
    .int()
    .min(2)
    .max(100_000)
    .default(5000)
    .describe("At most so many points; dips are kept"),
});
