import type { Content, TDocumentDefinitions } from "pdfmake/interfaces";
import { PAPER_PALETTE } from "~/charts/palette";
import { plainText } from "../markdown.server.ts";
import { printPdf } from "../pdf.server.ts";
import { sentence } from "./citation.ts";
import { drawFigure } from "./draw.server.tsx";
import { numberWords } from "./number-words.ts";
import type { PlateRecord, PlateTable } from "./record.ts";

/** A plate as one page of A4: the figure in lines, its numbers, the caption, how to cite it and where it is from. */
export function printPlate(record: PlateRecord): Promise<Buffer> {
  // One page: what does not fit is at the plate's address. (Its types do not know the option.)
  return printPdf({ ...definitionOf(record), maxPagesNumber: 1 } as TDocumentDefinitions);
}

function definitionOf(record: PlateRecord): TDocumentDefinitions {
  const caption = plainText(record.caption, MOST_CAPTION);
  return {
    pageSize: "A4",
    pageMargins: [MARGIN, MARGIN, MARGIN, MARGIN],
    info: {
      title: record.title,
      author: record.madeBy,
      subject: `${numberWords(record)} of ${record.project.title}`,
      creationDate: new Date(record.madeAt),
      creator: "Swale",
      producer: "Swale",
    },
    defaultStyle: {
      font: "Atkinson Hyperlegible Next",
      fontSize: 9.5,
      color: PAPER_PALETTE.ink,
      lineHeight: 1.25,
    },
    content: [
      {
        svg: drawFigure(record, { theme: "light", width: 960 }),
        fit: [WIDTH, FIGURE_HEIGHT],
        alignment: "center",
      },
      ...(caption ? [{ text: caption, margin: [0, 8, 0, 0] } satisfies Content] : []),
      ...record.tables.slice(0, 1).flatMap(tableOf),
      { text: "How to cite", bold: true, margin: [0, 10, 0, 2] },
      { text: `${sentence(record)}`, link: record.address },
      { text: "Where it is from", bold: true, margin: [0, 8, 0, 2] },
      ...record.sources.slice(0, MOST_SOURCES).map(sourceLine),
      ...(record.sources.length > MOST_SOURCES
        ? [{ text: `and ${record.sources.length - MOST_SOURCES} more originals: ${record.address}.json` }]
        : []),
      {
        text: `Licence: ${record.licence.name}. Swale ${record.code.version}, method ${record.code.analysisVersion}.`,
        margin: [0, 8, 0, 0],
        color: PAPER_PALETTE.soft,
        fontSize: 8,
      },
    ],
  };
}

/** The columns that fit on paper; the whole table is in the CSV. */
function tableOf({ title, columns, rows }: PlateTable): Content[] {
  const shown = columns.filter(({ key }) => PAPER_COLUMNS.has(key)).slice(0, MOST_COLUMNS);
  const kept = shown.length > 0 ? shown : columns.slice(0, MOST_COLUMNS);
  const small = { fontSize: 8 };
  const head = kept.map(({ label, unit }) => ({
    text: unit ? `${label}, ${unit}` : label,
    bold: true,
    ...small,
  }));
  const body = rows.slice(0, MOST_ROWS).map((row) =>
    kept.map(({ key }) => ({
      text: row[key] === null || row[key] === "" ? "unknown" : String(row[key]),
      ...small,
    })),
  );
  const more = rows.length - MOST_ROWS;
  return [
    { text: title, bold: true, margin: [0, 10, 0, 3] },
    {
      table: { headerRows: 1, widths: kept.map(() => "auto"), body: [head, ...body] },
      layout: {
        hLineWidth: () => 0.5,
        vLineWidth: () => 0,
        hLineColor: () => PAPER_PALETTE.rule,
        paddingTop: () => 2,
        paddingBottom: () => 2,
      },
    },
    ...(more > 0
      ? [{ text: `and ${more} more rows in the CSV at the plate’s address`, ...small } as Content]
      : []),
  ];
}

function sourceLine({
  role,
  title,
  name,
  sha256,
  analysisVersion,
  correction,
}: PlateRecord["sources"][number]): Content {
  const how = correction
    ? `, corrected (${correction.kind}) to the ${correction.plane}`
    : role === "sweep"
      ? ", as measured"
      : "";
  const method = analysisVersion === null ? "" : `, method ${analysisVersion}`;
  return {
    text: [
      `${role === "sweep" ? "Sweep" : `Bench’s ${role}`} “${title}”, ${name}${how}${method}. SHA-256 `,
      { text: sha256, font: "Sometype Mono", fontSize: 7 },
    ],
    fontSize: 8,
  };
}

const MARGIN = 42;
const WIDTH = 595.28 - 2 * MARGIN;
const FIGURE_HEIGHT = 430;
const MOST_CAPTION = 900;
const MOST_ROWS = 10;
const MOST_COLUMNS = 8;
const MOST_SOURCES = 4;
const PAPER_COLUMNS = new Set([
  "group",
  "trace",
  "frequency",
  "frequencyHalf",
  "swr",
  "swrLow",
  "swrHigh",
  "returnLoss",
  "width",
]);
