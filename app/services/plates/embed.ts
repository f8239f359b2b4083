import { PAPER_PALETTE, PEAT_PALETTE } from "../../charts/palette.ts";
import type { PlateRecord } from "./record.ts";

interface Size {
  width: number;
  height: number;
}

/**
 * A plate for another site's page: complete HTML of its figure alone, without scripts. It follows the reader's theme and the
 * width of its frame, and leads to the plate.
 */
export function embedPage(record: PlateRecord, size: { wide: Size; narrow: Size }): string {
  const { address, title, number } = record;
  const base = `/plates/${record.id}.svg`;
  const source = (media: string, query: string, { width, height }: Size) =>
    `<source media="${media}" srcset="${base}${query}" width="${width}" height="${height}">`;
  const dark = "(prefers-color-scheme: dark)";
  const alt = text(`Plate ${number}: ${title}`);
  return `<!DOCTYPE html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta name="color-scheme" content="light dark">
<title>${alt}</title>
<link rel="canonical" href="${text(address)}">
<style>
html{background:${PAPER_PALETTE.paper}}
@media ${dark}{html{background:${PEAT_PALETTE.paper}}}
body{margin:0}
a{display:block}
a:focus-visible{outline:3px solid ${PAPER_PALETTE.fen};outline-offset:-3px}
img{display:block;width:100%;max-width:${size.wide.width}px;height:auto;margin:0 auto}
</style>
</head>
<body>
<a href="${text(address)}" target="_top"><picture>
${source(`(max-width: ${NARROW_FRAME_PX}px) and ${dark}`, "?theme=dark&amp;width=narrow", size.narrow)}
${source(`(max-width: ${NARROW_FRAME_PX}px)`, "?width=narrow", size.narrow)}
${source(dark, "?theme=dark", size.wide)}
<img src="${base}" alt="${alt}" width="${size.wide.width}" height="${size.wide.height}">
</picture></a>
</body>
</html>
`;
}

/** Text for HTML and its attributes. */
export function text(plain: string): string {
  return plain
    .replaceAll("&", "&amp;")
    .replaceAll("<", "&lt;")
    .replaceAll(">", "&gt;")
    .replaceAll('"', "&quot;");
}

/** Frames up to here get the figure that is laid out for phones. */
export const NARROW_FRAME_PX = 560;
