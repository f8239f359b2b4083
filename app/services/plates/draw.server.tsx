import { renderToStaticMarkup } from "react-dom/server";
import { PAPER_PALETTE, PEAT_PALETTE } from "~/charts/palette";
import { formatFrequency } from "~/measurement/units";
import { formatDate } from "../dates.ts";
import { Curves } from "./draw/Curves.tsx";
import { keyOf } from "./draw/key.ts";
import { Measures, measuresHeightPx } from "./draw/Measures.tsx";
import { FOOT_PX } from "./draw/marks.tsx";
import { NARROW_PX, plotWidthOf, Sheet } from "./draw/Sheet.tsx";
import { Strips, stripsHeightPx } from "./draw/Strips.tsx";
import { numberWords } from "./number-words.ts";
import type { PlateFigure, PlateRecord, UnnumberedRecord } from "./record.ts";

interface DrawOptions {
  theme: "light" | "dark";
  /** px; the drawing is laid out anew for it, never only shrunk. */
  width?: number;
}

/** A plate's figure as a complete SVG document of SVG alone: text is text, nothing is fetched, nothing runs. */
export function drawFigure(record: PlateRecord | UnnumberedRecord, { theme, width = WIDE_PX }: DrawOptions) {
  const { figure } = record;
  const palette = theme === "dark" ? PEAT_PALETTE : PAPER_PALETTE;
  const plot = { widthPx: plotWidthOf(width), palette };
  const { node, heightPx } = partOf(figure, plot, width);
  return renderToStaticMarkup(
    <Sheet
      widthPx={width}
      palette={palette}
      number={"number" in record ? numberWords(record) : ""}
      title={figure.show.title ? record.title : ""}
      description={descriptionOf(record)}
      key_={keyOf(figure)}
      provenance={provenanceOf(record)}
      figureHeightPx={heightPx + FOOT_PX + 6}
      figure={node}
    />,
  );
}

function partOf(
  figure: PlateFigure,
  plot: { widthPx: number; palette: typeof PAPER_PALETTE },
  width: number,
) {
  switch (figure.form) {
    case "curves": {
      const heightPx = width < NARROW_PX ? 220 : 320;
      return { heightPx, node: <Curves figure={figure} plot={{ ...plot, heightPx }} /> };
    }
    case "strips":
      return { heightPx: stripsHeightPx(figure), node: <Strips figure={figure} plot={plot} /> };
    case "measures":
      return { heightPx: measuresHeightPx(figure), node: <Measures figure={figure} plot={plot} /> };
    default:
      return figure.form satisfies never;
  }
}

/** Where it is from, in small type; a preview has no address yet. */
function provenanceOf(record: PlateRecord | UnnumberedRecord): string {
  const { project, licence, sources, code } = record;
  const sweeps = sources.filter(({ role }) => role === "sweep").length;
  const from = sweeps === 0 ? "" : sweeps === 1 ? ", from one original" : `, from ${sweeps} originals`;
  const method = `method ${code.analysisVersion}`;
  if (!("number" in record)) return `${project.title}${from}, ${method}. Not frozen yet.`;
  const made = `${record.madeBy}, ${formatDate(record.madeAt)}`;
  return `${numberWords(record)} of ${project.title}. ${made}. ${record.address} · ${licence.name}. ${method[0].toUpperCase()}${method.slice(1)}${from}.`;
}

function descriptionOf({ figure }: PlateRecord | UnnumberedRecord): string {
  const { fromHz, toHz } = figure.frequency;
  const what = { "return-loss": "Return loss", swr: "SWR", decibels: "Decibels" }[figure.quantity];
  const span = `${what} from ${formatFrequency(fromHz)} to ${formatFrequency(toHz)}`;
  const names = figure.traces.map(({ label }) => label).join("; ");
  const key = keyOf(figure).map(({ letter, text }) => `${letter}: ${text}`);
  return [span, names, ...key].join(". ");
}

const WIDE_PX = 960;
