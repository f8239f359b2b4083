import { type Ending, NEGOTIATED } from "~/services/plates/form-names";
import {
  HTML,
  inQuestion,
  JSON_TYPE,
  mediaTypeOf,
  type OpenAbout,
  openOperation,
  PNG_WIDTH,
  SVG_WIDTH,
  TEXT,
  THEME,
  VERSION,
} from "./openapi-open-parts.ts";
import { inPath, type Operation, type PathItem } from "./openapi-parts.ts";

/** Paths outside of /api/v1 that anybody asks without a token: the forms of plates and write-ups, and how to embed and cite. */

/** One for each ending that there is. */
const PLATE_FORMS: Record<Ending, OpenAbout> = {
  svg: {
    operationId: "getPlateSvg",
    summary: "A plate's figure as SVG: text is text, and it asks for nothing else",
    parameters: [THEME, SVG_WIDTH],
  },
  png: {
    operationId: "getPlatePng",
    summary: "A plate's figure as PNG",
    parameters: [PNG_WIDTH, THEME],
  },
  pdf: { operationId: "getPlatePdf", summary: "A plate as a page to print, its figure in vectors" },
  csv: {
    operationId: "getPlateCsv",
    summary:
      "A plate's numbers: of one sweep or dip its points with their limits, of everything else its tables",
  },
  s1p: {
    operationId: "getPlateTouchstone",
    summary: "A plate's points as Touchstone; 404 where its sweep has no phase, or there are several",
  },
  json: {
    operationId: "getPlateRecord",
    summary: "All that a plate says, as it was frozen",
    schema: "PlateRecord",
  },
  bib: { operationId: "getPlateBibtex", summary: "A plate as a BibTeX entry" },
  "csl.json": { operationId: "getPlateCslJson", summary: "A plate as CSL-JSON" },
  "/embed": {
    operationId: "getPlateEmbed",
    summary:
      "A plate as a page for a frame on another site: no cookies, no scripts, as wide as the frame, in the reader's theme",
  },
};

export const FORM_PATHS: Record<string, PathItem> = {
  "/plates/{plate}": {
    get: openOperation(
      {
        operationId: "readPlate",
        summary:
          "A plate's page, or by `Accept` one of its forms (said in `Content-Location`); the page where it names none of them",
        parameters: [inPath("plate")],
      },
      [HTML, ...[...NEGOTIATED.values()].map(mediaTypeOf)],
      { 304: null, 404: [HTML, TEXT], 410: [HTML, TEXT] },
    ),
  },
  ...Object.fromEntries(
    Object.entries(PLATE_FORMS).map(([ending, about]) => [
      `/plates/{plate}${ending.startsWith("/") ? "" : "."}${ending}`,
      { get: plateForm(ending as Ending, about) },
    ]),
  ),
  "/oembed": {
    get: openOperation(
      {
        operationId: "getOembed",
        summary: "How to embed the plate at an address (oEmbed 1.0, type `rich`)",
        parameters: [
          inQuestion("url", { type: "string", format: "uri", description: "Of a plate's page" }, true),
          inQuestion("format", { type: "string", enum: ["json"], default: "json" }),
          inQuestion("maxwidth", { type: "integer", minimum: 1, description: "Pixels" }),
          inQuestion("maxheight", { type: "integer", minimum: 1, description: "Pixels" }),
        ],
        schema: "Oembed",
      },
      [JSON_TYPE],
      { 404: [JSON_TYPE], 501: [JSON_TYPE] },
    ),
  },
  "/webmention": {
    post: {
      ...openOperation(
        {
          operationId: "sendMention",
          summary:
            "Say that a page elsewhere links to a plate or a published write-up (W3C Webmention 3.2); it is looked up later, and shown once an owner says so",
        },
        [HTML],
        { 400: [HTML], 411: [TEXT], 413: [TEXT], 415: [TEXT], 429: [HTML] },
        "202",
      ),
      requestBody: {
        required: true,
        content: {
          "application/x-www-form-urlencoded": {
            schema: {
              type: "object",
              required: ["source", "target"],
              properties: {
                source: { type: "string", format: "uri", description: "The page elsewhere" },
                target: { type: "string", format: "uri", description: "What it links to here" },
              },
            },
          },
        },
      },
    },
  },
  "/write-ups/{writeUp}": {
    get: openOperation(
      {
        operationId: "readWriteUp",
        summary: "A published write-up's page; 410 while it is taken back",
        parameters: [inPath("writeUp"), VERSION],
      },
      [HTML],
      { 404: [HTML], 410: [HTML] },
    ),
  },
  "/write-ups/{writeUp}.html": {
    get: writeUpForm("getWriteUpHtml", "A write-up as one HTML file that holds all it shows", HTML),
  },
  "/write-ups/{writeUp}.pdf": {
    get: writeUpForm("getWriteUpPdf", "A write-up as PDF", "application/pdf"),
  },
  "/projects/{project}/write-ups.atom": {
    get: openOperation(
      {
        operationId: "getWriteUpFeed",
        summary: "What a project published, as an Atom feed; of a private project for who has a key to it",
        parameters: [
          inPath("project"),
          inQuestion("token", {
            type: "string",
            description: "A member's own key, from the page of what they follow",
          }),
        ],
      },
      ["application/atom+xml"],
      { 304: null, 404: [JSON_TYPE] },
    ),
  },
};

function plateForm(ending: Ending, about: OpenAbout): Operation {
  const parameters = [inPath("plate"), ...(about.parameters ?? [])];
  return openOperation({ ...about, parameters }, [mediaTypeOf(ending)], {
    304: null,
    404: [TEXT],
    410: [TEXT],
    503: [TEXT],
  });
}

function writeUpForm(operationId: string, summary: string, type: string): Operation {
  const parameters = [inPath("writeUp"), VERSION];
  return openOperation({ operationId, summary, parameters }, [type], {
    304: null,
    404: [JSON_TYPE],
    410: [JSON_TYPE],
    503: [JSON_TYPE],
  });
}
