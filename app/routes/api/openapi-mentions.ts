import { mentionQuerySchema } from "./mention-schemas.ts";
import { inPath, inQuery, jsonBody, operation, type PathItem } from "./openapi-parts.ts";

/** Paths of the OpenAPI document about pages elsewhere that cite something here. */
export const MENTION_PATHS: Record<string, PathItem> = {
  "/projects/{project}/mentions": {
    get: operation({
      operationId: "listMentions",
      summary:
        "Pages elsewhere that cite its plates and write-ups, the last to come first: those shown to readers, and all of them for who decides",
      parameters: [inPath("project"), ...inQuery(mentionQuerySchema)],
      answer: "MentionList",
      refusals: ["422"],
    }),
  },
  "/projects/{project}/mentions/sent": {
    get: operation({
      operationId: "listSentMentions",
      summary: "Which pages elsewhere its write-ups told that they cite them, the last 100",
      parameters: [inPath("project")],
      answer: "SentMentionList",
    }),
  },
  "/mentions/{mention}": {
    get: operation({
      operationId: "getMention",
      summary: "One of them",
      parameters: [inPath("mention")],
      answer: "Mention",
    }),
    post: operation({
      operationId: "decideOnMention",
      summary: "Show it to readers, hide it, or have its page looked up again",
      parameters: [inPath("mention")],
      requestBody: jsonBody("MentionDecision"),
      answer: "Mention",
      refusals: ["400", "409", "411", "413", "415", "422"],
    }),
  },
};
