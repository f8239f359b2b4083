import { z } from "zod";
import { MAX_FILE_BYTES } from "~/readers/reading";
import * as shapes from "./schemas.ts";
import { givenSchema, uploadFieldsSchema } from "./upload.schema.ts";

/** The OpenAPI 3.1 document, made from the schemas that the endpoints check with. */

export function openApiDocument(origin: string) {
  return {
    openapi: "3.1.0",
    info: {
      title: "Swale",
      version: "1",
      summary: "Antenna sweeps, their dips, and what is said about them",
      description:
        "Ids are short and public. Times are UTC. Unknown numbers are null, never zero. Lists hold at most 100 rows; give `nextCursor` back as `cursor` for the next page. Errors are RFC 9457 problem documents.",
    },
    servers: [{ url: `${origin}/api/v1` }],
    security: [{ token: [] }],
    paths: PATHS,
    components: {
      securitySchemes: {
        token: {
          type: "http",
          scheme: "bearer",
          description:
            "Made at /settings/tokens. Scope `read` reads; scope `write` also takes in and writes.",
        },
      },
      schemas: componentSchemas(),
      responses: { Problem: problemResponse() },
    },
  };
}

type Name = keyof typeof COMPONENTS;

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
} satisfies Record<string, z.ZodType>;

function componentSchemas() {
  const registry = z.registry<{ id: string }>();
  for (const [id, schema] of Object.entries(COMPONENTS)) registry.add(schema, { id });
  const { schemas } = z.toJSONSchema(registry, { uri: (id) => `#/components/schemas/${id}` });
  return Object.fromEntries(
    Object.entries(schemas).map(([id, { $schema: _, $id: __, ...schema }]) => [id, schema]),
  );
}

const reference = (name: Name) => ({ $ref: `#/components/schemas/${name}` });

function problemResponse() {
  return {
    description: "What happened, what is safe, what to do",
    content: { "application/problem+json": { schema: reference("Problem") } },
  };
}

interface Operation {
  operationId: string;
  summary: string;
  parameters?: unknown[];
  requestBody?: unknown;
  responses: Record<string, unknown>;
  security?: unknown[];
}

/** An operation with its good answer and every refusal it may give. */
function operation(
  about: Omit<Operation, "responses"> & { status?: string; answer: Name; refusals?: string[] },
): Operation {
  const { status = "200", answer, refusals = [], ...rest } = about;
  const problem = { $ref: "#/components/responses/Problem" };
  const refused = ["401", "403", "404", "405", "429", "500", ...refusals].map((code) => [code, problem]);
  return {
    ...rest,
    responses: {
      [status]: {
        description: status === "201" ? "Made" : "Found",
        content: { "application/json": { schema: reference(answer) } },
      },
      ...Object.fromEntries(refused),
    },
  };
}

const inPath = (name: string) => ({ name, in: "path", required: true, schema: { type: "string" } });

/** One entry for each member of a query's schema. */
function inQuery(schema: z.ZodObject) {
  const { properties = {} } = z.toJSONSchema(schema, { io: "input" });
  return Object.entries(properties).map(([name, member]) => ({ name, in: "query", schema: member }));
}

const CURSOR = { name: "cursor", in: "query", schema: { type: "string" } };

function uploadBody() {
  const { properties } = z.toJSONSchema(uploadFieldsSchema, { io: "input" });
  const file = {
    type: "string",
    contentMediaType: "application/octet-stream",
    description: `Delimited text, Touchstone or a picture; at most ${MAX_FILE_BYTES / 1024 / 1024} MB and 1,000,000 points`,
  };
  return {
    required: true,
    content: {
      "multipart/form-data": {
        schema: {
          type: "object",
          required: ["file"],
          properties: { file, ...properties, reading: reference("Reading") },
        },
        encoding: { reading: { contentType: "application/json" } },
      },
    },
  };
}

const PATHS: Record<string, { get?: Operation; post?: Operation }> = {
  "/openapi.json": {
    get: {
      operationId: "getOpenApi",
      summary: "This document",
      security: [],
      responses: { "200": { description: "This document", content: { "application/json": {} } } },
    },
  },
  "/projects": {
    get: operation({
      operationId: "listProjects",
      summary: "The projects you are a member of, last changed first",
      parameters: [CURSOR],
      answer: "ProjectList",
    }),
  },
  "/projects/{project}": {
    get: operation({
      operationId: "getProject",
      summary: "One project",
      parameters: [inPath("project")],
      answer: "ProjectWithBands",
    }),
  },
  "/projects/{project}/sweeps": {
    get: operation({
      operationId: "listSweeps",
      summary: "Its sweeps, newest first",
      parameters: [inPath("project"), CURSOR],
      answer: "SweepList",
    }),
    post: operation({
      operationId: "takeSweepIn",
      summary: "Take a file in as a sweep; it is read and analysed at once",
      parameters: [inPath("project")],
      requestBody: uploadBody(),
      status: "201",
      answer: "Sweep",
      refusals: ["400", "409", "411", "413", "415", "422"],
    }),
  },
  "/sweeps/{sweep}": {
    get: operation({
      operationId: "getSweep",
      summary: "One sweep with how it was read and its current analysis",
      parameters: [inPath("sweep")],
      answer: "Sweep",
    }),
  },
  "/sweeps/{sweep}/points": {
    get: operation({
      operationId: "getPoints",
      summary: "Its points, or those of a stretch",
      parameters: [inPath("sweep"), ...inQuery(shapes.pointsQuerySchema)],
      answer: "Points",
      refusals: ["422"],
    }),
  },
  "/dips/{dip}/notes": {
    get: operation({
      operationId: "listNotes",
      summary: "The notes on a dip, oldest first",
      parameters: [inPath("dip"), CURSOR],
      answer: "NoteList",
    }),
    post: operation({
      operationId: "writeNote",
      summary: "Write a note on a dip",
      parameters: [inPath("dip")],
      requestBody: { required: true, content: { "application/json": { schema: reference("NewNote") } } },
      status: "201",
      answer: "Note",
      refusals: ["400", "409", "411", "413", "415", "422"],
    }),
  },
};
