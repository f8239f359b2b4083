import { type Ending, formOf, MEDIA_TYPES, PNG_WIDTHS } from "~/services/plates/form-names";
import { type Name, type Operation, reference } from "./openapi-parts.ts";

/** What the OpenAPI document's paths outside of /api/v1 are made of: no token, and answers that are no JSON. */

export interface OpenAbout {
  operationId: string;
  summary: string;
  parameters?: unknown[];
  /** Of the JSON that it answers. */
  schema?: Name;
}

/** An operation that anybody may ask: the media types of its good answer, and those of each other status (null: no body). */
export function openOperation(
  { schema, ...about }: OpenAbout,
  types: string[],
  others: Record<string, string[] | null>,
  status = "200",
): Operation {
  const cached = "304" in others;
  return {
    ...about,
    security: [],
    responses: {
      [status]: {
        description: status === "202" ? "Queued" : "Found",
        ...(cached && { headers: { ETag: { schema: { type: "string" } } } }),
        content: Object.fromEntries(types.map((type) => [type, schema ? { schema: reference(schema) } : {}])),
      },
      ...Object.fromEntries(
        Object.entries(others).map(([code, given]) => [
          code,
          {
            description: DESCRIPTIONS[code],
            ...(given && { content: Object.fromEntries(given.map((type) => [type, {}])) }),
          },
        ]),
      ),
    },
  };
}

export function inQuestion(name: string, schema: object, required = false) {
  return { name, in: "query", required, schema };
}

/** Without its parameters: `text/csv`. */
export function mediaTypeOf(ending: Ending): string {
  const form = formOf(ending, new URLSearchParams()) ?? "";
  return (MEDIA_TYPES[form.split("-")[0] ?? ""] ?? "").split(";")[0] ?? "";
}

export const HTML = "text/html";
export const TEXT = "text/plain";
export const JSON_TYPE = "application/json";

export const THEME = {
  name: "theme",
  in: "query",
  schema: { type: "string", enum: ["light", "dark"], default: "light", description: "`light` or `dark`" },
};

export const SVG_WIDTH = {
  name: "width",
  in: "query",
  schema: {
    type: "string",
    enum: ["wide", "narrow"],
    default: "wide",
    description: "`narrow` is laid out for a phone",
  },
};

export const PNG_WIDTH = {
  name: "width",
  in: "query",
  schema: {
    type: "integer",
    enum: PNG_WIDTHS,
    default: 1280,
    description: `Pixels: ${PNG_WIDTHS.join(", ")}`,
  },
};

export const VERSION = {
  name: "version",
  in: "query",
  schema: { type: "integer", minimum: 1, description: "A version that was published; without it the newest" },
};

const DESCRIPTIONS: Record<string, string> = {
  "304": "What the ETag in If-None-Match names is still what there is",
  "400": "What is wrong with it; nothing was stored",
  "404": "There is no such thing",
  "410": "It was withdrawn or taken back, and says so",
  "411": "The length of the body was not said",
  "413": "Too large; nothing was stored",
  "415": "No form; nothing was stored",
  "429": "Too many in a while; Retry-After says how long to wait",
  "501": "Another format than JSON",
  "503": "It can't be made just now; ask again in a while",
};
