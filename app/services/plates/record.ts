import { z } from "zod";
import { plateChoices } from "./choices.ts";
import { LICENCE_IDS } from "./licences.ts";
import { PLATE_KINDS } from "./subject.ts";

/**
 * All that a plate says: its page and every form are made from this and nothing else, and it is the JSON form as it
 * stands. Frequencies are in Hz, times ISO 8601 in UTC, ids the public ones. null is "not known", never zero.
 */

const known = z.number().nullable();

/** A dip with its numbers, as the analysis named with its sweep found it. */
const plateDip = z.object({
  id: z.string(),
  /** Id of the trace that it is a dip of. */
  trace: z.string(),
  label: z.string(),
  frequencyHz: z.number(),
  /** Half-width of the 95 % interval. */
  frequencyUncertaintyHz: known,
  /** null: beyond every number (abs Γ reaches 1). */
  minimumSwr: known,
  /** Worst-case limits of the bench and the 95 % interval together. */
  minimumSwrLow: known,
  minimumSwrHigh: known,
  returnLossDb: z.number(),
  returnLossLowDb: known,
  returnLossHighDb: known,
  prominenceDb: z.number(),
  /** null where the SWR does not get as low as the limit. */
  bandwidth: z
    .object({
      limitSwr: z.number(),
      /** null where the sweep ends inside. */
      lowHz: known,
      highHz: known,
      /** "At least" where `open`. */
      widthHz: z.number(),
      widthLowHz: known,
      widthHighHz: known,
      open: z.boolean(),
      /** Another dip lies in the same stretch. */
      shared: z.boolean(),
    })
    .nullable(),
  q: known,
  qLow: known,
  qHigh: known,
  method: z.string(),
  /** The lowest point is the first or the last of the sweep. */
  edge: z.boolean(),
  /** null while the antenna has no design bands. */
  inDesignBand: z.boolean().nullable(),
  /** Its verdict at that time, in words; empty while it is open. */
  verdict: z.string(),
});
export type PlateDip = z.infer<typeof plateDip>;

/** A line as it is drawn: only the points that a line of that width can show, lowest and highest kept. */
const plateTrace = z.object({
  /** Public id of its sweep; for a bench the name of the measure. */
  id: z.string(),
  label: z.string(),
  /** What else tells it apart: a date, a hint. */
  caption: z.string(),
  frequencyHz: z.array(z.number()),
  /** abs Γ, or dB for a bench's measures; null is a gap. */
  value: z.array(known),
  /** Limits of the values; null where none is known. */
  limits: z.object({ low: z.array(known), high: z.array(known) }).nullable(),
  /** As measured where the correction does not hold, drawn in grey; null where it holds everywhere. */
  measured: z.array(known).nullable(),
});
export type PlateTrace = z.infer<typeof plateTrace>;

export const plateFigure = z.object({
  /** Lines over one another, strips over one another on one frequency axis, or a bench's measures in strips of their own. */
  form: z.enum(["curves", "strips", "measures"]),
  frequency: z.object({ fromHz: z.number(), toHz: z.number(), scale: z.enum(["linear", "log"]) }),
  /** What the value axis shows. */
  quantity: z.enum(["return-loss", "swr", "decibels"]),
  /** Of the bandwidths; null where the figure has none. */
  swrLimit: known,
  /** Ω; null where the traces differ in it. */
  referenceOhm: known,
  bands: z.array(z.object({ name: z.string(), lowHz: z.number(), highHz: z.number(), design: z.boolean() })),
  /** Strips: oldest first. */
  traces: z.array(plateTrace),
  dips: z.array(plateDip),
  /** Id of the dip that the plate is of; null for other plates. */
  focus: z.string().nullable(),
  /** One dip from sweep to sweep. */
  trails: z.array(
    z.object({
      id: z.string(),
      label: z.string(),
      tone: z.enum(["heather", "clay", "moss"]),
      stops: z.array(z.object({ trace: z.string(), dip: z.string() })),
    }),
  ),
  /** What was changed between strips; `before` is the trace that came after it. */
  steps: z.array(z.object({ id: z.string(), label: z.string(), caption: z.string(), before: z.string() })),
  show: z.object({ bands: z.boolean(), dips: z.boolean(), limits: z.boolean(), title: z.boolean() }),
});
export type PlateFigure = z.infer<typeof plateFigure>;

const cell = z.union([z.number(), z.string(), z.boolean(), z.null()]);

const plateTable = z.object({
  title: z.string(),
  columns: z.array(z.object({ key: z.string(), label: z.string(), unit: z.string() })),
  /** By the keys of the columns. */
  rows: z.array(z.record(z.string(), cell)),
});
export type PlateTable = z.infer<typeof plateTable>;

/** An original that the numbers rest on, and how it became numbers. */
export const plateSource = z.object({
  /** "sweep", or of a bench "open", "short", "load", "through". */
  role: z.enum(["sweep", "open", "short", "load", "through"]),
  /** Public id of its sweep. */
  sweep: z.string(),
  title: z.string(),
  takenAt: z.string().nullable(),
  /** Name, size and SHA-256 of the original as it was given. */
  name: z.string(),
  sha256: z.string(),
  sizeBytes: z.number(),
  /** How the file became numbers: in words, what was assumed, and the complete choices. */
  reading: z.object({
    format: z.string(),
    quantity: z.string(),
    assumed: z.array(z.string()),
    spec: z.unknown(),
  }),
  /** Of the analysis that found the dips; null for references. */
  settings: z.object({ swrLimit: z.number(), minimumProminenceDb: z.number() }).nullable(),
  /** Version of the method that found them; null for references. */
  analysisVersion: z.string().nullable(),
  /** What was done before dips were found; null: nothing, as it was measured. */
  correction: z
    .object({
      kind: z.enum(["none", "scalar", "three-term"]),
      plane: z.enum(["instrument", "port", "antenna"]),
      fromHz: known,
      toHz: known,
      /** The line that was taken away; null where none was. */
      feedline: z.unknown(),
      /** SHA-256 of the references' originals by kind. */
      references: z.record(z.string(), z.string()),
    })
    .nullable(),
  /** The bench of that correction, or the one that a reference is of; null without one. */
  bench: z
    .object({ name: z.string(), version: z.number(), standards: z.unknown(), given: z.unknown() })
    .nullable(),
});
export type PlateSource = z.infer<typeof plateSource>;

/** Everything but what is only known once it is numbered. */
const unnumberedRecord = z.object({
  kind: z.enum(PLATE_KINDS),
  /** What it is of: `subjectText`. */
  subject: z.string(),
  title: z.string(),
  /** Markdown. */
  caption: z.string(),
  licence: z.object({ id: z.enum(LICENCE_IDS), name: z.string(), address: z.string().nullable() }),
  /** Whoever took part, with the part each had: "took the sweep …", "made the plate". */
  people: z.array(z.object({ name: z.string(), part: z.string() })),
  project: z.object({ title: z.string(), address: z.string() }),
  figure: plateFigure,
  /** The figure's numbers with their limits. */
  tables: z.array(plateTable),
  sources: z.array(plateSource),
  /** As it was chosen when it was made. */
  choices: plateChoices,
  code: z.object({
    /** Of this program. */
    version: z.string(),
    /** Of the method of analysis, at the time of making. */
    analysisVersion: z.string(),
  }),
});
export type UnnumberedRecord = z.infer<typeof unnumberedRecord>;

export const plateRecord = unnumberedRecord.extend({
  format: z.literal("swale-plate/1"),
  /** Public id. */
  id: z.string(),
  /** Within its project, from 1; the same for every version. */
  number: z.number(),
  version: z.number(),
  /** Its permanent address. */
  address: z.string(),
  /** Address of the version before; null for the first. `reason` is what was wrong with that. */
  previous: z.object({ address: z.string(), version: z.number(), reason: z.string() }).nullable(),
  madeAt: z.string(),
  madeBy: z.string(),
});
export type PlateRecord = z.infer<typeof plateRecord>;

/** A stored record; throws where it is none. */
export function parseRecord(text: string): PlateRecord {
  return plateRecord.parse(JSON.parse(text));
}
