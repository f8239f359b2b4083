import type { Content, TDocumentDefinitions } from "pdfmake/interfaces";
import { PAPER_PALETTE } from "~/charts/palette";
import { formatDate, formatDateTime } from "../dates.ts";
import { articleTokens } from "../markdown.server.ts";
import { printPdf } from "../pdf.server.ts";
import { licenceOf } from "../plates/licences.ts";
import { addressOf, CAUTION, INVENTED, peopleOf } from "./cite.ts";
import { withdrawnWords } from "./figure-html.ts";
import { FIGURE_ID, type FrozenFigure, type PlateState } from "./frozen.ts";
import { lined, pdfContent, rule } from "./pdf-content.ts";
import {
  DISPLAY,
  FEN,
  INK,
  MARGINS,
  MONO,
  SANS,
  SMALL_SIZE,
  SOFT,
  TEXT_SIZE,
  TEXT_WIDTH,
} from "./pdf-looks.ts";
import type { Publication } from "./published.server.ts";

export interface DocumentTask {
  publication: Publication;
  origin: string;
  plates: Map<string, PlateState>;
  /** Of its plates, by their public ids: the light one, wide; those that can't be had are missing. */
  drawings: Map<string, string>;
}

/** A published write-up on paper. Up to seconds of work: `printing.server.ts` has it done beside the pages. */
export function printDocument(task: DocumentTask): Promise<Buffer> {
  return printPdf(printable(task));
}

/** The same text, figures and numbers, with where it came from on each page. */
export function printable({ publication, origin, plates, drawings }: DocumentTask): TDocumentDefinitions {
  const { version, project, frozen } = publication;
  const people = peopleOf(publication).join(" and ");
  const address = addressOf(publication, origin);
  const day = formatDate(version.publishedAt);
  const licence = licenceOf(frozen.licence);
  const known = new Map(frozen.figures.map((figure) => [figure.subject, figure]));
  const tokens = articleTokens(version.body);
  const text = tokens
    ? pdfContent(tokens, {
        origin,
        figure: (subject, n, caption) => {
          const figure = known.get(subject);
          return figure ? figureContent(figure, n, caption, { origin, plates, drawings }) : null;
        },
      })
    : [{ text: version.body, font: MONO, fontSize: SMALL_SIZE }];
  const licenceWords: Content = licence
    ? { text: licence.name, ...(licence.address && { link: licence.address, color: FEN }) }
    : "No licence is given";
  return {
    pageSize: "A4",
    pageMargins: MARGINS,
    defaultStyle: { font: SANS, fontSize: TEXT_SIZE, lineHeight: 1.3, color: INK },
    info: {
      title: version.title,
      author: people,
      creationDate: version.publishedAt,
      creator: "Swale",
      producer: "Swale",
    },
    content: [
      { text: `A write-up of ${frozen.project}`, color: SOFT, fontSize: SMALL_SIZE },
      { text: version.title, font: DISPLAY, bold: true, fontSize: 24, lineHeight: 1.1, margin: [0, 4, 0, 6] },
      { text: `${people}, ${day}, version ${version.number}`, color: SOFT, margin: [0, 0, 0, 14] },
      ...text,
      rule(),
      {
        stack: [
          {
            text: [
              `${people}: ${version.title}. Version ${version.number}, ${day}. `,
              { text: address, link: address, color: FEN },
            ],
          },
          { text: [licenceWords, project.demo === 1 ? `. ${INVENTED}` : "."] },
          { text: CAUTION, color: SOFT },
        ],
        fontSize: SMALL_SIZE,
      },
    ],
    footer: (page, pages) => ({
      columns: [
        { text: version.title, width: "*" },
        { text: `${page} of ${pages}`, alignment: "right", width: 60 },
      ],
      margin: [MARGINS[0], 20, MARGINS[2], 0],
      fontSize: SMALL_SIZE - 0.5,
      color: SOFT,
    }),
    // No heading alone at the foot of a page.
    pageBreakBefore: (node, rest) =>
      node.headlineLevel !== undefined && rest.getFollowingNodesOnPage().length === 0,
  };
}

type FigurePlace = Omit<DocumentTask, "publication">;

function figureContent(figure: FrozenFigure, n: number, caption: Content[], place: FigurePlace): Content {
  const isPlate = figure.subject.startsWith("plate:");
  const label = `Figure ${n}${figure.label ? `, ${figure.label}` : ""}. `;
  const words: Content[] = [{ text: label, bold: true }, ...(caption.length > 0 ? caption : [figure.title])];
  const line: Content = isPlate
    ? { text: `${place.origin}${figure.path}`, link: `${place.origin}${figure.path}`, color: FEN }
    : {
        text: `${figure.title}${figure.asOf ? `; numbers as of ${formatDateTime(figure.asOf)}` : ""}.`,
        color: SOFT,
      };
  const drawing = isPlate ? plateDrawing(figure, place) : ownDrawing(figure);
  return {
    stack: [
      drawing,
      { text: words, margin: [0, 6, 0, 2] },
      { stack: [line], fontSize: SMALL_SIZE },
      ...(figure.numbers ? [numbersOf(figure.numbers)] : []),
    ],
    unbreakable: true,
    margin: [0, 6, 0, 12],
  };
}

function plateDrawing({ subject }: FrozenFigure, { plates, drawings }: FigurePlace): Content {
  const id = subject.slice("plate:".length);
  const state = plates.get(id);
  if (!state || state.withdrawnAt) return { text: withdrawnWords(state), color: SOFT };
  const svg = drawings.get(id);
  return svg
    ? { svg: forPrint(svg), width: TEXT_WIDTH }
    : { text: "The drawing of this plate can't be had just now.", color: SOFT };
}

function ownDrawing({ wide }: FrozenFigure): Content {
  if (!wide) return { text: "The curve can't be drawn: the sweep's file was not read.", color: SOFT };
  return { svg: forPrint(wide.replaceAll(FIGURE_ID, "f")), width: TEXT_WIDTH };
}

function numbersOf({ columns, rows }: NonNullable<FrozenFigure["numbers"]>): Content {
  const cell = (text: string, color?: string) => ({ text, color, fontSize: SMALL_SIZE });
  return {
    stack: [
      lined({
        headerRows: 1,
        widths: columns.map(() => "auto"),
        body: [columns.map((text) => cell(text, SOFT)), ...rows.map((row) => row.map((text) => cell(text)))],
      }),
    ],
    margin: [0, 4, 0, 0],
  };
}

/** The paper's colours and fonts by name; what a printer does not know goes. */
export function forPrint(svg: string): string {
  return svg
    .replace(/var\(--color-([a-z-]+)\)/g, (all, name: string) => {
      return PAPER_PALETTE[name as keyof typeof PAPER_PALETTE] ?? all;
    })
    .replace(/var\(--font-(sans|display|mono)\)/g, (_, name: "sans" | "display" | "mono") => {
      return PAPER_PALETTE[`${name}Font`];
    })
    .replace(/<rect[^>]*fill="transparent"[^>]*\/?>(?:<\/rect>)?/g, "")
    .replace(/ class="[^"]*"/g, "");
}
