import { dipsQuerySchema } from "./dips-schemas.ts";
import { inPath, inQuery, type Operation, operation, type PathItem } from "./openapi-parts.ts";

/** Paths of the OpenAPI document about the table of all dips. */
export const DIPS_PATHS: Record<string, PathItem> = {
  "/projects/{project}/dips": { get: withCsv() },
};

/** The same answer in two forms. */
function withCsv(): Operation {
  const listed = operation({
    operationId: "listDips",
    summary:
      "All its dips with the filters of their page, 100 at a time; with `Accept: text/csv` all of them at once as CSV",
    parameters: [inPath("project"), ...inQuery(dipsQuerySchema)],
    answer: "DipTable",
    refusals: ["422"],
  });
  const found = listed.responses["200"] as { content: Record<string, unknown> };
  found.content["text/csv"] = { schema: { type: "string" } };
  return listed;
}
