import { z } from "zod";
import type { KindName } from "~/db/bundle-kinds.server";
import * as v from "./record-values.ts";
import { TOLD } from "./records-told.ts";

/**
 * The shape of every record in a bundle, a file a kind under `data/records/`. The same shapes check what is taken in, and
 * go into the bundle as JSON Schema.
 */

const verdict = z.enum(["open", "proposed", "settled"]);
const judged = { verdict, verdictText: v.upTo(300), verdictBy: v.person, verdictAt: v.time.nullable() };

export const PEOPLE = z.strictObject({
  id: v.id,
  name: v.upTo(120).describe("As shown in the project when the bundle was made"),
  role: z
    .enum(["owner", "experimenter", "commenter", "reader"])
    .nullable()
    .describe("Null: not a member any more"),
});
export type PersonRecord = z.infer<typeof PEOPLE>;

export const RECORDS = {
  project: z.strictObject({
    id: v.id,
    title: v.upTo(160),
    summary: v.markdown,
    visibility: z.enum(["private", "linked", "public"]),
    ituRegion: z.number().int().min(1).max(3).nullable(),
    demo: z.number().int().min(0).max(1).describe("1: invented data"),
    licence: v.upTo(40).describe("Proposed for its plates; an SPDX name"),
    createdAt: v.time,
    updatedAt: v.time,
  }),
  bands: z.strictObject({ id: v.id, name: v.upTo(40), lowHz: v.hz, highHz: v.hz, swrLimit: z.number() }),
  benches: z.strictObject({
    id: v.id,
    owner: v.person.describe("Whose own it is; null where it is the project's"),
    name: v.upTo(120),
    description: v.markdown,
    ...v.made,
    updatedAt: v.time,
    retiredAt: v.time.nullable(),
  }),
  cables: z.strictObject({
    id: v.id,
    name: v.upTo(80),
    k1: z.number().describe("dB per metre: k1·√f + k2·f, f in MHz"),
    k2: z.number(),
    velocityFactor: z.number(),
    points: v.cablePoints,
    source: v.upTo(300),
    ...v.made,
  }),
  originals: z.strictObject({
    id: v.id,
    name: v.upTo(255),
    ...v.file,
    uploadedBy: v.person,
    createdAt: v.time,
    path: v.path,
  }),
  sweeps: z.strictObject({
    id: v.id,
    file: v.id,
    title: v.upTo(160),
    takenAt: v.time.nullable(),
    ...v.made,
    reading: v.ref.describe("The current reading"),
    analysis: v.ref.describe("The current analysis"),
    problem: v.readProblem,
    pointCount: v.count.nullable(),
    startHz: v.hz.nullable(),
    stopHz: v.hz.nullable(),
    referenceOhm: z.number().nullable(),
    complex: z.boolean().nullable(),
    purpose: z.enum(["antenna", "reference"]),
    bench: v.ref,
    feedline: v.feedline,
    repeatGroup: v.upTo(16).nullable(),
    previewPath: v.path.nullable().describe("The curve its dips were found in, thinned for drawing"),
  }),
  readings: z.strictObject({
    id: v.id,
    sweep: v.id,
    number: v.count,
    given: v.given,
    reading: v.reading,
    shape: v.upTo(190).nullable(),
    ...v.made,
    pointsPath: v.path.nullable().describe("CSV; null where the file could not be read"),
    touchstonePath: v.path.nullable().describe("The same as Touchstone, where there is phase"),
    referenceOhm: z.number().positive().nullable().describe("Ω, what the points are referred to"),
  }),
  analyses: z.strictObject({
    id: v.id,
    sweep: v.id,
    reading: v.id,
    number: v.count,
    version: v.upTo(20),
    settings: v.settings,
    correction: v.correction,
    noiseDb: z.number().nullable(),
    warnings: v.warnings,
    dips: z.array(v.foundDip),
    ...v.made,
  }),
  dips: z.strictObject({
    id: v.id,
    sweep: v.id,
    present: z.boolean().describe("False: the current analysis does not find it any more"),
    frequencyHz: v.hz,
    minimumSwr: z.number().nullable(),
    returnLossDb: z.number(),
    prominenceDb: z.number(),
    numbers: v.dip,
    ...judged,
    createdAt: v.time,
  }),
  steps: z.strictObject({
    id: v.id,
    title: v.upTo(160),
    body: v.markdown,
    state: z.enum(["planned", "done"]),
    at: v.time.nullable(),
    quantities: v.quantities,
    beforeSweep: v.ref,
    afterSweep: v.ref,
    expected: v.expected,
    ...v.made,
    updatedAt: v.time,
  }),
  "antenna-versions": z.strictObject({
    id: v.id,
    number: v.count,
    validFrom: v.time,
    content: v.antenna,
    remark: v.upTo(300),
    step: v.ref,
    ...v.made,
  }),
  "bench-versions": z.strictObject({
    id: v.id,
    bench: v.id,
    number: v.count,
    validFrom: v.time,
    remark: v.upTo(300),
    parts: v.benchParts,
    standards: v.standards,
    given: v.benchGiven,
    ...v.made,
  }),
  "bench-references": z.strictObject({
    version: v.id,
    kind: z.enum(["open", "short", "load", "through"]),
    sweep: v.id,
    createdAt: v.time,
  }),
  photographs: z.strictObject({
    id: v.id,
    bench: v.ref,
    step: v.ref,
    caption: v.upTo(300),
    name: v.upTo(255),
    ...v.file,
    width: v.pixels,
    height: v.pixels,
    ...v.made,
    path: v.path,
    shownPath: v.path,
    smallPath: v.path,
  }),
  trails: z.strictObject({ id: v.id, name: v.upTo(80), frequencyHz: v.hz, ...judged, createdAt: v.time }),
  "trail-dips": z.strictObject({ dip: v.id, trail: v.id }),
  "trail-decisions": z.strictObject({
    one: v.id,
    other: v.id,
    decision: z.enum(["same", "apart"]),
    by: v.person,
    at: v.time,
  }),
  verdicts: z.strictObject({
    id: v.id,
    dip: v.ref,
    trail: v.ref,
    verdict,
    text: v.upTo(300),
    evidence: v.evidence,
    by: v.person,
    at: v.time,
  }),
  ...TOLD,
} satisfies Record<KindName, z.ZodObject>;

/** Fields that stand for bytes elsewhere in the bundle; not columns. */
export const PATH_FIELDS = [
  "path",
  "shownPath",
  "smallPath",
  "previewPath",
  "pointsPath",
  "touchstonePath",
  "recordPath",
] as const;

export type Rec = Record<string, unknown>;
