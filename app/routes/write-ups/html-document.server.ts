import { PAPER_PALETTE, type Palette, PEAT_PALETTE } from "~/charts/palette";
import { formatDate } from "~/services/dates";
import { escapeHtml } from "~/services/html-text";
import type { Article } from "~/services/markdown.server";
import { licenceOf } from "~/services/plates/licences";
import { addressOf, CAUTION, INVENTED, peopleOf } from "~/services/write-ups/cite";
import type { Publication } from "~/services/write-ups/published.server";
import articleCss from "./article.css?raw";
import { listedOf } from "./components/ArticleText.tsx";

/**
 * A write-up as one HTML file: styles, fonts and figures are in it, it asks nobody for anything and runs nothing, so that
 * it opens from a disk as it does from a server.
 */
export function htmlDocument(
  publication: Publication,
  article: Article,
  { origin, fonts }: { origin: string; fonts: string },
): string {
  const { version, project, frozen } = publication;
  const people = peopleOf(publication).join(" and ");
  const address = addressOf(publication, origin);
  const day = formatDate(version.publishedAt);
  const licence = licenceOf(frozen.licence);
  const title = escapeHtml(version.title);
  const licenceWords = licence?.address
    ? `<a rel="license" href="${licence.address}">${escapeHtml(licence.name)}</a>`
    : escapeHtml(licence?.name ?? "No licence is given");
  return `<!DOCTYPE html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta http-equiv="Content-Security-Policy" content="default-src 'none'; style-src 'unsafe-inline'; img-src data:; font-src data:">
<title>${title}</title>
<meta name="author" content="${escapeHtml(people)}">
<link rel="canonical" href="${address}">
<link rel="icon" href="data:,">
<style>
${fonts}
${tokens()}
${articleCss}
${PAGE}
</style>
</head>
<body>
<header>
<p class="small">A write-up of ${escapeHtml(frozen.project)}</p>
<h1>${title}</h1>
<p class="small">${escapeHtml(people)}, ${day}, version ${version.number}</p>
</header>
${contents(article)}
<main class="article">
${article.html}
</main>
<footer class="small">
<p>${escapeHtml(people)}: ${title}. Version ${version.number}, ${day}. <a href="${address}">${address}</a></p>
<p>${licenceWords}.${project.demo === 1 ? ` ${INVENTED}` : ""}</p>
<p>${CAUTION}</p>
</footer>
</body>
</html>
`;
}

function contents({ headings }: Article): string {
  const items = listedOf(headings).map(
    ({ id, depth, words }) => `<li class="depth-${depth}"><a href="#${id}">${escapeHtml(words)}</a></li>`,
  );
  if (items.length === 0) return "";
  return `<nav class="article-contents" aria-label="Contents"><h2>Contents</h2><ol>${items.join("")}</ol></nav>`;
}

/** The page's colours, paper and peat, and its fonts, under the names that its style sheet knows. */
function tokens(): string {
  const { sansFont, displayFont, monoFont } = PAPER_PALETTE;
  const fonts = `--font-sans:"${sansFont.replace(",", '",')};--font-display:"${displayFont.replace(",", '",')};--font-mono:"${monoFont.replace(",", '",')};`;
  return `:root{color-scheme:light dark;${fonts}${colours(PAPER_PALETTE)}}
@media (prefers-color-scheme: dark){:root{${colours(PEAT_PALETTE)}}}
@media print{:root{color-scheme:light;${colours(PAPER_PALETTE)}}}`;
}

function colours(palette: Palette): string {
  return Object.entries(palette)
    .filter(([name]) => !name.endsWith("Font"))
    .map(([name, value]) => `--color-${name}:${value};`)
    .join("");
}

const PAGE = `
*{box-sizing:border-box}
body{max-width:46rem;margin:0 auto;padding:2rem 1rem;background:var(--color-paper);color:var(--color-ink);font-family:var(--font-sans);line-height:1.6}
h1,h2,h3,h4,h5,h6,p,ul,ol,figure,blockquote,pre,table{margin:0}
h1{margin:.3rem 0;font-family:var(--font-display);font-size:2.4rem;line-height:1.1;text-wrap:balance;overflow-wrap:anywhere}
a{color:var(--color-fen)}
.small{color:var(--color-soft);font-size:.875rem}
.article-contents{margin:1.5rem 0 2rem}
main{margin-top:2rem}
footer{display:grid;gap:.6rem;margin-top:2.5rem;padding-top:1rem;border-top:3px double var(--color-rule);overflow-wrap:anywhere}
.article .figure-numbers,.article .article-figure{margin-inline:0}
`;
