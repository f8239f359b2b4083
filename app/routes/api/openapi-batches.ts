import { z } from "zod";
import { batchFieldsSchema } from "./batch-schemas.ts";
import { inPath, operation, type PathItem, reference } from "./openapi-parts.ts";

/** Paths of the OpenAPI document for batches of sweeps. */
export const BATCH_PATHS: Record<string, PathItem> = {
  "/projects/{project}/batches": {
    get: operation({
      operationId: "listBatches",
      summary: "The batches of a project that are kept, newest first",
      parameters: [inPath("project")],
      answer: "BatchList",
    }),
    post: operation({
      operationId: "checkBatch",
      summary:
        "Send many sweeps with a table of what is said of them. All of it is checked, and none of it becomes a sweep: a second call takes it in",
      parameters: [inPath("project")],
      requestBody: batchBody(),
      status: "201",
      answer: "Batch",
      refusals: ["400", "409", "411", "413", "415", "422"],
    }),
  },
  "/batches/{batch}": {
    get: operation({
      operationId: "getBatch",
      summary: "How far a batch is, row by row, with the sweeps that came of it",
      parameters: [inPath("batch")],
      answer: "Batch",
    }),
    post: operation({
      operationId: "takeBatchIn",
      summary:
        "Take a checked batch in. Sent again it takes nothing twice; rows that failed are tried once more",
      parameters: [inPath("batch")],
      requestBody: { content: { "application/json": { schema: reference("TakeBatch") } } },
      status: "202",
      answer: "Batch",
      refusals: ["400", "409", "411", "413", "415", "422"],
    }),
    delete: operation({
      operationId: "giveBatchUp",
      summary: "Remove a batch and the files that wait in it; sweeps that came of it stay",
      parameters: [inPath("batch")],
      status: "204",
      answer: null,
      refusals: ["409"],
    }),
  },
};

function batchBody() {
  const { properties } = z.toJSONSchema(batchFieldsSchema, { io: "input" });
  const bytes = { type: "string", contentMediaType: "application/octet-stream" };
  const files = {
    type: "array",
    items: bytes,
    description:
      "Sweeps, or ZIPs of them, at most 140 MB in one call; more go by sending again with `batch`. A batch takes 300 files of 64 MB, 512 MB unpacked",
  };
  const table = {
    type: "string",
    contentMediaType: "text/csv",
    description:
      "A line of headings with `file`, and any of `title`, `taken at` (UTC), `bench` and `step` (by name or id); then a line for each file",
  };
  return {
    required: true,
    content: {
      "multipart/form-data": { schema: { type: "object", properties: { files, table, ...properties } } },
    },
  };
}
