import { z } from "zod";
import { MAX_FILE_BYTES } from "~/readers/reading";
import { BATCH_PATHS } from "./openapi-batches.ts";
import { BUNDLE_PATHS } from "./openapi-bundles.ts";
import { COMPARE_PATHS } from "./openapi-compare.ts";
import { DIPS_PATHS } from "./openapi-dips.ts";
import { FORM_PATHS } from "./openapi-forms.ts";
import { MENTION_PATHS } from "./openapi-mentions.ts";
import {
  CURSOR,
  componentSchemas,
  inPath,
  inQuery,
  jsonBody,
  operation,
  type PathItem,
  problemResponse,
  reference,
} from "./openapi-parts.ts";
import { PLATE_PATHS } from "./openapi-plates.ts";
import { STORY_PATHS } from "./openapi-story.ts";
import { WRITE_UP_PATHS } from "./openapi-write-ups.ts";
import * as shapes from "./schemas.ts";
import { uploadFieldsSchema } from "./upload.schema.ts";

/** The OpenAPI 3.1 document, made from the schemas that the endpoints check with. */

export function openApiDocument(origin: string) {
  return {
    openapi: "3.1.0",
    info: {
      title: "Swale",
      version: "1",
      summary: "Antenna sweeps, their dips, and what is said about them",
      description:
        "Paths under /api/v1 take a token and speak JSON; those outside of it are for everybody, without one. Ids are short and public. Times are UTC. Unknown numbers are null, never zero. Lists with a `nextCursor` hold at most 100 rows; give it back as `cursor` for the next page. Errors are RFC 9457 problem documents.",
    },
    servers: [{ url: origin }],
    security: [{ token: [] }],
    paths: { ...underApi(PATHS), ...FORM_PATHS },
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

function underApi(paths: Record<string, PathItem>): Record<string, PathItem> {
  return Object.fromEntries(Object.entries(paths).map(([path, item]) => [`/api/v1${path}`, item]));
}

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

const PATHS: Record<string, PathItem> = {
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
    post: operation({
      operationId: "changeProject",
      summary: "Choose the licence that new plates and write-ups of it are under",
      parameters: [inPath("project")],
      requestBody: jsonBody("ProjectChange"),
      answer: "ProjectWithBands",
      refusals: ["400", "411", "413", "415", "422"],
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
      requestBody: jsonBody("NewNote"),
      status: "201",
      answer: "Note",
      refusals: ["400", "409", "411", "413", "415", "422"],
    }),
  },
  ...STORY_PATHS,
  ...COMPARE_PATHS,
  ...DIPS_PATHS,
  ...PLATE_PATHS,
  ...WRITE_UP_PATHS,
  ...MENTION_PATHS,
  ...BATCH_PATHS,
  ...BUNDLE_PATHS,
};
