import { bandsQuerySchema, comparisonQuerySchema } from "./compare-schemas.ts";
import { inPath, inQuery, type Operation, operation } from "./openapi-parts.ts";

/** Paths of the OpenAPI document for bands and comparisons. */
export const COMPARE_PATHS: Record<string, { get?: Operation; post?: Operation }> = {
  "/sweeps/{sweep}/bands": {
    get: operation({
      operationId: "getBands",
      summary:
        "What a sweep shows of every band that it touches, and how far its dips lie from the design bands",
      parameters: [inPath("sweep"), ...inQuery(bandsQuerySchema)],
      answer: "Bands",
      refusals: ["422"],
    }),
  },
  "/projects/{project}/compare": {
    get: operation({
      operationId: "compareSweeps",
      summary: "Dips and bands of several sweeps side by side, of any projects that you may read",
      parameters: [inPath("project"), ...inQuery(comparisonQuerySchema)],
      answer: "Comparison",
      refusals: ["422"],
    }),
  },
};
