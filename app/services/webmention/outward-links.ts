import { Parser } from "htmlparser2";

/** The pages elsewhere that a text of ours links to, each once, in its order. Pure. `origin`: our own, which is not told. */
export function outwardLinks(html: string, origin: string): string[] {
  const found = new Set<string>();
  const parser = new Parser({
    onopentag(name, { href }) {
      if (name !== "a" || href === undefined || !URL.canParse(href)) return;
      const url = new URL(href);
      if ((url.protocol === "https:" || url.protocol === "http:") && url.origin !== origin) found.add(href);
    },
  });
  parser.end(html);
  return [...found].slice(0, MOST_TOLD);
}

/** What one version tells of (an article with more is a list of links; common practice, no source). */
export const MOST_TOLD = 50;
