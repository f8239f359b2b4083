/** The forms that a plate is frozen in. Pure. */

export const PNG_WIDTHS = [640, 1280, 2560] as const;
type Theme = "light" | "dark";
export type FormName =
  | `svg-${Theme}`
  | `svg-${Theme}-narrow`
  | `png-${(typeof PNG_WIDTHS)[number]}-${Theme}`
  | "pdf"
  | "csv"
  | "s1p"
  | "json"
  | "bib"
  | "csl"
  | "embed";

/** By the first part of a form's name. */
export const MEDIA_TYPES: Record<string, string> = {
  svg: "image/svg+xml; charset=utf-8",
  png: "image/png",
  pdf: "application/pdf",
  csv: "text/csv; charset=utf-8; header=present",
  s1p: "text/plain; charset=us-ascii",
  json: "application/json; charset=utf-8",
  bib: "application/x-bibtex; charset=utf-8",
  csl: "application/vnd.citationstyles.csl+json; charset=utf-8",
  embed: "text/html; charset=utf-8",
};

/** What an address asks for: `/plates/ID` with this behind it. */
export const ENDINGS = ["svg", "png", "pdf", "csv", "s1p", "json", "bib", "csl.json", "/embed"] as const;
export type Ending = (typeof ENDINGS)[number];

/** What the plain address gives to whoever does not want a page: media type → form. */
export const NEGOTIATED: ReadonlyMap<string, Ending> = new Map<string, Ending>([
  ["image/svg+xml", "svg"],
  ["image/png", "png"],
  ["application/pdf", "pdf"],
  ["text/csv", "csv"],
  ["application/json", "json"],
  ["application/x-bibtex", "bib"],
  ["application/vnd.citationstyles.csl+json", "csl.json"],
]);

/** The form that an ending with its question names; null for a size or a theme that there is not. */
export function formOf(ending: Ending, search: URLSearchParams): FormName | null {
  const theme = search.get("theme") ?? "light";
  if (theme !== "light" && theme !== "dark") return null;
  switch (ending) {
    case "svg": {
      const width = search.get("width") ?? "wide";
      if (width !== "wide" && width !== "narrow") return null;
      return width === "narrow" ? `svg-${theme}-narrow` : `svg-${theme}`;
    }
    case "png": {
      const asked = Number(search.get("width") ?? 1280);
      const width = PNG_WIDTHS.find((known) => known === asked);
      return width ? `png-${width}-${theme}` : null;
    }
    case "csl.json":
      return "csl";
    case "/embed":
      return "embed";
    default:
      return ending;
  }
}
