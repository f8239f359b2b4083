import { inPath, type Operation, operation, type PathItem, refusalsOf } from "./openapi-parts.ts";

/** Paths of the OpenAPI document for bundles and for all data of a person. */
export const BUNDLE_PATHS: Record<string, PathItem> = {
  "/projects/{project}/bundles": {
    get: operation({
      operationId: "listBundles",
      summary: "The bundles that were asked of a project, newest first",
      parameters: [inPath("project")],
      answer: "BundleList",
    }),
    post: operation({
      operationId: "makeBundle",
      summary:
        "Ask for the whole project as one ZIP (BagIt, RFC 8493). While one is being made, that is the answer",
      parameters: [inPath("project")],
      status: "202",
      answer: "Bundle",
    }),
  },
  "/bundles/take-in": {
    get: operation({
      operationId: "listTakenIn",
      summary: "The bundles that you gave, newest first",
      answer: "BundleList",
    }),
    post: operation({
      operationId: "takeBundleIn",
      summary:
        "Give a bundle, which becomes a private project of yours. All of it is checked first; one that is refused leaves nothing behind",
      requestBody: bundleBody(),
      status: "202",
      answer: "Bundle",
      refusals: ["400", "409", "411", "413", "415", "422", "503"],
    }),
  },
  "/bundles/{bundle}": {
    get: operation({
      operationId: "getBundle",
      summary: "How far it is: of a bundle that is made, of one that is taken in, or of your own data",
      parameters: [inPath("bundle")],
      answer: "Bundle",
    }),
    delete: operation({
      operationId: "removeBundle",
      summary: "Remove it and its file before their time; projects stay as they are",
      parameters: [inPath("bundle")],
      status: "204",
      answer: null,
      refusals: ["409"],
    }),
  },
  "/bundles/{bundle}/file": { get: fileOperation() },
  "/my-data": {
    get: operation({
      operationId: "listMyData",
      summary: "When you asked for all your data, newest first",
      answer: "BundleList",
    }),
    post: operation({
      operationId: "gatherMyData",
      summary: "Ask for everything that is kept of you as one ZIP",
      status: "202",
      answer: "Bundle",
    }),
  },
};

function bundleBody() {
  const bundle = {
    type: "string",
    contentMediaType: "application/zip",
    description: "The ZIP as it was downloaded, at most 2 GB; it is stored while it comes in",
  };
  const schema = { type: "object", required: ["bundle"], properties: { bundle } };
  return { required: true, content: { "multipart/form-data": { schema } } };
}

/** Bytes, in one go or in pieces. */
function fileOperation(): Operation {
  const text = (name: string, description: string) => ({
    [name]: { description, schema: { type: "string" } },
  });
  const etag = text("ETag", "Of these bytes; give it back as `If-Range` or `If-None-Match`");
  const content = { "application/zip": {} };
  const range = text("Content-Range", "Which bytes, and of how many");
  const name = text("Content-Disposition", "With the name of the file");
  return {
    operationId: "getBundleFile",
    summary: "The ZIP; a download that was broken off goes on with `Range`",
    parameters: [
      inPath("bundle"),
      ...["Range", "If-Range", "If-None-Match"].map((header) => ({
        name: header,
        in: "header",
        schema: { type: "string" },
      })),
    ],
    responses: {
      "200": { description: "All of it", headers: { ...etag, ...name }, content },
      "206": { description: "The bytes asked for", headers: { ...etag, ...name, ...range }, content },
      "304": { description: "You have it already", headers: etag },
      "416": { description: "It has no such bytes", headers: { ...etag, ...range } },
      ...refusalsOf(["409", "410", "503"]),
    },
  };
}
