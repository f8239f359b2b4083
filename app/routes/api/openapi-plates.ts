import { inPath, type Operation, operation, reference } from "./openapi-parts.ts";

/** Paths of the OpenAPI document about plates. */
export const PLATE_PATHS: Record<string, { get?: Operation; post?: Operation }> = {
  "/projects/{project}/plates": {
    get: operation({
      operationId: "listPlates",
      summary: "Its plates by number, the newest version of each first",
      parameters: [inPath("project")],
      answer: "PlateList",
    }),
    post: operation({
      operationId: "makePlate",
      summary: "Freeze a figure with its numbers; anyone who has its address can read it from then on",
      parameters: [inPath("project")],
      requestBody: { required: true, content: { "application/json": { schema: reference("NewPlate") } } },
      status: "201",
      answer: "Plate",
      refusals: ["400", "411", "413", "415", "422"],
    }),
  },
  "/plates/{plate}": {
    get: operation({
      operationId: "getPlate",
      summary: "A plate as it was frozen; 410 with the reason where it was withdrawn",
      parameters: [inPath("plate")],
      answer: "Plate",
      refusals: ["410"],
    }),
  },
};
