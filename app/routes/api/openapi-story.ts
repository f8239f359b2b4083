import { inPath, inQuery, jsonBody, type Operation, operation } from "./openapi-parts.ts";
import { antennaQuerySchema } from "./story-schemas.ts";

/** Paths of the OpenAPI document that tell the experiment's story. */
export const STORY_PATHS: Record<string, { get?: Operation; post?: Operation }> = {
  "/projects/{project}/antenna": {
    get: operation({
      operationId: "getAntenna",
      summary: "The antenna as it was on a day, and every change of it",
      parameters: [inPath("project"), ...inQuery(antennaQuerySchema)],
      answer: "Antenna",
      refusals: ["422"],
    }),
  },
  "/projects/{project}/steps": {
    get: operation({
      operationId: "listSteps",
      summary: "What was changed, in order of time; planned steps last",
      parameters: [inPath("project")],
      answer: "StepList",
    }),
    post: operation({
      operationId: "makeStep",
      summary: "Write a step down; what it changes of the antenna is changed with it",
      parameters: [inPath("project")],
      requestBody: jsonBody("NewStep"),
      status: "201",
      answer: "Step",
      refusals: ["400", "411", "413", "415", "422"],
    }),
  },
  "/steps/{step}": {
    get: operation({
      operationId: "getStep",
      summary: "One step with the sweeps beside it and what was expected of it",
      parameters: [inPath("step")],
      answer: "Step",
    }),
  },
  "/projects/{project}/trails": {
    get: operation({
      operationId: "listTrails",
      summary: "Every dip followed from sweep to sweep, by frequency",
      parameters: [inPath("project")],
      answer: "TrailList",
    }),
  },
  "/trails/{trail}": {
    get: operation({
      operationId: "getTrail",
      summary: "One trail with its dips",
      parameters: [inPath("trail")],
      answer: "Trail",
    }),
  },
  "/projects/{project}/benches": {
    get: operation({
      operationId: "listBenches",
      summary: "The benches kept in it, with every version and its references",
      parameters: [inPath("project")],
      answer: "BenchList",
    }),
  },
  "/dips/{dip}/causes": {
    get: operation({
      operationId: "getCauses",
      summary: "What may be behind a dip, what to cut, and every verdict that was given",
      parameters: [inPath("dip")],
      answer: "Causes",
    }),
  },
};
