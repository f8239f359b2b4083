import { z } from "zod";
import * as batches from "./batch-schemas.ts";
import * as bundles from "./bundle-schemas.ts";
import * as compare from "./compare-schemas.ts";
import * as dips from "./dips-schemas.ts";
import { oembedShape } from "./form-schemas.ts";
import * as mentions from "./mention-schemas.ts";
import * as plates from "./plate-schemas.ts";
import * as shapes from "./schemas.ts";
import * as story from "./story-schemas.ts";
import { givenSchema } from "./upload.schema.ts";
import * as writeUps from "./write-up-schemas.ts";

/** The named schemas of the OpenAPI document, and what its paths are made of. */

export type Name = keyof typeof COMPONENTS;

const COMPONENTS = {
  Problem: shapes.problemShape,
  Project: shapes.projectShape,
  ProjectWithBands: shapes.projectWithBandsShape,
  ProjectList: shapes.projectListShape,
  SweepSummary: shapes.sweepSummaryShape,
  SweepList: shapes.sweepListShape,
  Sweep: shapes.sweepShape,
  Dip: shapes.dipShape,
  Correction: shapes.correctionShape,
  Bandwidth: shapes.bandwidthShape,
  Points: shapes.pointsShape,
  Note: shapes.noteShape,
  NoteList: shapes.noteListShape,
  Reading: givenSchema,
  NewNote: shapes.newNoteSchema,
  Antenna: story.antennaShape,
  Step: story.stepShape,
  StepList: story.stepListShape,
  NewStep: story.newStepSchema,
  Trail: story.trailShape,
  TrailList: story.trailListShape,
  Bench: story.benchShape,
  BenchList: story.benchListShape,
  Causes: story.causesShape,
  Bands: compare.bandsShape,
  Comparison: compare.comparisonShape,
  Plate: plates.plateShape,
  PlateList: plates.plateListShape,
  NewPlate: plates.newPlateSchema,
  PlateRecord: plates.plateRecordShape,
  PlateCheck: plates.plateCheckShape,
  PlateWithdrawal: plates.plateWithdrawalSchema,
  WithdrawnPlate: plates.withdrawnPlateShape,
  ProjectChange: shapes.projectChangeSchema,
  DipTable: dips.dipTableShape,
  Mention: mentions.mentionShape,
  MentionList: mentions.mentionListShape,
  MentionDecision: mentions.mentionDecisionSchema,
  SentMentionList: mentions.sentMentionListShape,
  Oembed: oembedShape,
  WriteUp: writeUps.writeUpShape,
  WriteUpList: writeUps.writeUpListShape,
  NewWriteUp: writeUps.newWriteUpSchema,
  WriteUpChange: writeUps.writeUpChangeSchema,
  Publication: writeUps.publicationSchema,
  Batch: batches.batchShape,
  BatchList: batches.batchListShape,
  TakeBatch: batches.takeBatchSchema,
  Bundle: bundles.bundleShape,
  BundleList: bundles.bundleListShape,
} satisfies Record<string, z.ZodType>;

/** What an answer of that name is checked with. */
export function componentOf(name: Name): z.ZodType {
  return COMPONENTS[name];
}

export function componentSchemas() {
  const registry = z.registry<{ id: string }>();
  for (const [id, schema] of Object.entries(COMPONENTS)) registry.add(schema, { id });
  const { schemas } = z.toJSONSchema(registry, { uri: (id) => `#/components/schemas/${id}` });
  return Object.fromEntries(
    Object.entries(schemas).map(([id, { $schema: _, $id: __, ...schema }]) => [id, schema]),
  );
}

export const reference = (name: Name) => ({ $ref: `#/components/schemas/${name}` });

/** A body in JSON that has to be there. */
export const jsonBody = (name: Name) => ({
  required: true,
  content: { "application/json": { schema: reference(name) } },
});

export function problemResponse() {
  return {
    description: "What happened, what is safe, what to do",
    content: { "application/problem+json": { schema: reference("Problem") } },
  };
}

export interface Operation {
  operationId: string;
  summary: string;
  parameters?: unknown[];
  requestBody?: unknown;
  responses: Record<string, unknown>;
  security?: unknown[];
}

/** An operation with its good answer (null: an empty one) and every refusal it may give. */
export function operation(
  about: Omit<Operation, "responses"> & { status?: string; answer: Name | null; refusals?: string[] },
): Operation {
  const { status = "200", answer, refusals, ...rest } = about;
  const content = answer && { content: { "application/json": { schema: reference(answer) } } };
  return {
    ...rest,
    responses: { [status]: { description: DONE[status], ...content }, ...refusalsOf(refusals) },
  };
}

/** Every refusal that any operation may give, and those of its own. */
export function refusalsOf(own: string[] = []): Record<string, unknown> {
  const problem = { $ref: "#/components/responses/Problem" };
  return Object.fromEntries([...EVERY_REFUSAL, ...own].map((code) => [code, problem]));
}

export const inPath = (name: string) => ({ name, in: "path", required: true, schema: { type: "string" } });

/** One entry for each member of a query's schema. */
export function inQuery(schema: z.ZodObject) {
  const { properties = {} } = z.toJSONSchema(schema, { io: "input" });
  return Object.entries(properties).map(([name, member]) => ({ name, in: "query", schema: member }));
}

const EVERY_REFUSAL = ["401", "403", "404", "405", "429", "500"];
const DONE: Record<string, string> = { "200": "Found", "201": "Made", "202": "Under way", "204": "Removed" };

/** A path's operations by method. */
export type PathItem = Partial<Record<"get" | "post" | "delete", Operation>>;

export const CURSOR = { name: "cursor", in: "query", schema: { type: "string" } };
