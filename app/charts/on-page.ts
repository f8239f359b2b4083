import { PAGE_PALETTE, PAPER_PALETTE } from "./palette.ts";

/**
 * A drawing on paper, for a page of ours: the same lines and words, in the page's own colours and fonts, so that it
 * follows the theme. Only whole attribute values are put in; text is left as it is.
 */
export function onPage(svg: string): string {
  return svg.replace(ATTRIBUTE, (all, name: string, value: string) => {
    const own = OF_PAGE.get(value.toLowerCase()) ?? OF_PAGE.get(value);
    return own === undefined ? all : `${name}="${own}"`;
  });
}

/** Of two tokens with one value on paper, the first counts. */
const OF_PAGE = new Map(
  (Object.keys(PAPER_PALETTE) as (keyof typeof PAPER_PALETTE)[])
    .reverse()
    .map((name) => [PAPER_PALETTE[name], PAGE_PALETTE[name]] as const),
);
const ATTRIBUTE = /\b(fill|stroke|stop-color|color|font-family)="([^"]*)"/g;
