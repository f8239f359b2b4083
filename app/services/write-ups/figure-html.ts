import { formatDate, formatDateTime } from "../dates.ts";
import { escapeHtml } from "../html-text.ts";
import type { DrawFigure, DrawnFigure } from "../markdown-article.ts";
import { FIGURE_ID, type FrozenFigure, type PlateState } from "./frozen.ts";

/** How figures are put into a page of HTML. Pure; everything that a person wrote is escaped here. */

export interface FigurePlace {
  figures: readonly FrozenFigure[];
  /** What became of the plates since; one that is missing was deleted. */
  plates: ReadonlyMap<string, PlateState>;
  /** Address of a plate's drawing; null where there is none. */
  plateSource: (publicId: string, theme: "light" | "dark", width: "wide" | "narrow") => string | null;
  /** Where the page of a figure is; null for a reader who could not open it. */
  linkTo: (figure: FrozenFigure) => string | null;
}

export function figureDrawer(place: FigurePlace): DrawFigure {
  const known = new Map(place.figures.map((figure) => [figure.subject, figure]));
  return (subject, n) => {
    const figure = known.get(subject);
    if (!figure) return null;
    return subject.startsWith("plate:") ? plate(figure, n, place) : live(figure, n, place);
  };
}

function plate(figure: FrozenFigure, n: number, place: FigurePlace): DrawnFigure {
  const publicId = figure.subject.slice("plate:".length);
  const state = place.plates.get(publicId);
  const label = `Figure ${n}, ${figure.label ?? "a plate"}`;
  const link = linked(
    place.linkTo(figure),
    `${figure.label ?? "Plate"}: its numbers and how they came about`,
  );
  if (!state || state.withdrawnAt) {
    const words = escapeHtml(withdrawnWords(state));
    return { label, drawing: `<p class="article-missing">${words}</p>`, under: smallLine(link) };
  }
  const picture = (["light", "dark"] as const).map((theme) => {
    const [wide, narrow] = (["wide", "narrow"] as const).map((width) =>
      place.plateSource(publicId, theme, width),
    );
    if (wide === null) return "";
    const small = narrow && `<source media="(width < 34rem)" srcset="${escapeHtml(narrow)}">`;
    const image = `<img src="${escapeHtml(wide)}" alt="${escapeHtml(figure.title)}" loading="lazy">`;
    return `<picture class="on-${theme}">${small ?? ""}${image}</picture>`;
  });
  const drawing = picture.some((one) => one !== "")
    ? `<div class="figure-plate">${picture.join("")}</div>`
    : `<p class="article-missing">The drawing of this plate can't be had just now.</p>`;
  return { label, drawing, under: smallLine(link) };
}

/** What stands where a plate's drawing was; `state` is missing where there is no such plate here. */
export function withdrawnWords(state: PlateState | undefined): string {
  if (!state?.withdrawnAt) return "This plate is not here any more";
  const reason = state.withdrawnReason ? `: ${state.withdrawnReason}` : "";
  return `This plate was withdrawn on ${formatDate(state.withdrawnAt)}${reason}`;
}

function live(figure: FrozenFigure, n: number, place: FigurePlace): DrawnFigure {
  const drawing =
    figure.wide && figure.narrow
      ? `<div class="figure-drawing figure-wide">${own(figure.wide, `f${n}w`)}</div><div class="figure-drawing figure-narrow">${own(figure.narrow, `f${n}n`)}</div>`
      : `<p class="article-missing">The curve can't be drawn: the sweep's file was not read.</p>`;
  const asOf = figure.asOf ? `numbers as of ${formatDateTime(figure.asOf)}` : "";
  const link = linked(place.linkTo(figure), "see it in the project");
  const line = [escapeHtml(figure.title), asOf, link].filter((words) => words !== "").join("; ");
  return { label: `Figure ${n}`, drawing, under: `${smallLine(line)}${table(figure)}` };
}

function table({ numbers }: FrozenFigure): string {
  if (!numbers) return "";
  const cells = (row: readonly string[], tag: "th" | "td") =>
    row.map((cell) => `<${tag}>${escapeHtml(cell)}</${tag}>`).join("");
  const rows = numbers.rows.map((row) => `<tr>${cells(row, "td")}</tr>`).join("");
  return `<table class="figure-numbers"><thead><tr>${cells(numbers.columns, "th")}</tr></thead><tbody>${rows}</tbody></table>`;
}

/** Its own ids for each place on the page. */
function own(svg: string, id: string): string {
  return svg.replaceAll(FIGURE_ID, id);
}

function linked(path: string | null, words: string): string {
  return path === null ? "" : `<a href="${escapeHtml(path)}">${escapeHtml(words)}</a>`;
}

function smallLine(html: string): string {
  return html === "" ? "" : `<span class="figure-line">${html}.</span>`;
}

/** Where the frozen drawings of plates are on this server. */
export const PLATE_ADDRESS: FigurePlace["plateSource"] = (publicId, theme, width) => {
  const asked = [theme === "dark" ? "theme=dark" : "", width === "narrow" ? "width=narrow" : ""];
  const search = asked.filter((one) => one !== "").join("&");
  return `/plates/${publicId}.svg${search === "" ? "" : `?${search}`}`;
};
