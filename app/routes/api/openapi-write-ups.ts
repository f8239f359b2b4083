import { inPath, inQuery, jsonBody, operation, type PathItem } from "./openapi-parts.ts";
import { writeUpQuerySchema } from "./write-up-schemas.ts";

/** Paths of the OpenAPI document for write-ups. */
export const WRITE_UP_PATHS: Record<string, PathItem> = {
  "/projects/{project}/write-ups": {
    get: operation({
      operationId: "listWriteUps",
      summary:
        "The write-ups of a project, what was written on last first; drafts only for who may write them",
      parameters: [inPath("project")],
      answer: "WriteUpList",
    }),
    post: operation({
      operationId: "makeWriteUp",
      summary: "Begin a write-up; it is a draft until somebody publishes it",
      parameters: [inPath("project")],
      requestBody: jsonBody("NewWriteUp"),
      status: "201",
      answer: "WriteUp",
      refusals: ["400", "411", "413", "415", "422"],
    }),
  },
  "/write-ups/{writeUp}": {
    get: operation({
      operationId: "getWriteUp",
      summary: "One write-up with its text: published ones for every token, drafts for who may write them",
      parameters: [inPath("writeUp"), ...inQuery(writeUpQuerySchema)],
      answer: "WriteUp",
      refusals: ["422"],
    }),
    post: operation({
      operationId: "changeWriteUp",
      summary: "Change the draft; what is published stays as it is",
      parameters: [inPath("writeUp")],
      requestBody: jsonBody("WriteUpChange"),
      answer: "WriteUp",
      refusals: ["400", "409", "411", "413", "415", "422"],
    }),
    delete: operation({
      operationId: "deleteWriteUp",
      summary: "Delete a draft; what was published once stays, and can be taken back",
      parameters: [inPath("writeUp")],
      status: "204",
      answer: null,
      refusals: ["409"],
    }),
  },
  "/write-ups/{writeUp}/publication": {
    post: operation({
      operationId: "publishWriteUp",
      summary:
        "Publish the draft as its next version, with its figures and numbers kept as they are now; anyone who has its address reads it from then on, also of a private project",
      parameters: [inPath("writeUp")],
      requestBody: jsonBody("Publication"),
      answer: "WriteUp",
      refusals: ["400", "409", "411", "413", "415", "422"],
    }),
    delete: operation({
      operationId: "takeWriteUpBack",
      summary: "Take back what is published; its address says so, the draft and the versions stay",
      parameters: [inPath("writeUp")],
      status: "204",
      answer: null,
      refusals: ["409"],
    }),
  },
};
