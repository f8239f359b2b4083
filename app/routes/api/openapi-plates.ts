import { inPath, jsonBody, operation, type PathItem } from "./openapi-parts.ts";

/** Paths of the OpenAPI document about plates. */
export const PLATE_PATHS: Record<string, PathItem> = {
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
      requestBody: jsonBody("NewPlate"),
      status: "201",
      answer: "Plate",
      refusals: ["400", "411", "413", "415", "422"],
    }),
  },
  "/plates/{plate}": {
    get: operation({
      operationId: "getPlate",
      summary:
        "A plate as it was frozen, with its versions and with who cites it; 410 with the reason where it was withdrawn",
      parameters: [inPath("plate")],
      answer: "Plate",
      refusals: ["410"],
    }),
  },
  "/plates/{plate}/check": {
    get: operation({
      operationId: "checkPlate",
      summary:
        "Compute it again from its stored originals, and say what comes out otherwise; changes nothing",
      parameters: [inPath("plate")],
      answer: "PlateCheck",
      refusals: ["410"],
    }),
  },
  "/plates/{plate}/withdrawal": {
    post: operation({
      operationId: "withdrawPlate",
      summary: "Withdraw it for good: its address says why from then on",
      parameters: [inPath("plate")],
      requestBody: jsonBody("PlateWithdrawal"),
      answer: "WithdrawnPlate",
      refusals: ["400", "410", "411", "413", "415", "422"],
    }),
  },
};
