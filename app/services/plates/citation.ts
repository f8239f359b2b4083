import { formatDate } from "../dates.ts";
import { numberWords } from "./number-words.ts";
import type { PlateRecord } from "./record.ts";

/** How a plate is cited. Pure. */

/** A BibTeX entry; its text is UTF-8, as today's programs read it, with the signs of TeX escaped. */
export function bibtex(record: PlateRecord): string {
  const at = new Date(record.madeAt);
  const fields: [string, string][] = [
    // Doubled braces: a name is taken as it stands, whether of a person or of a club, and a title keeps its MHz.
    ["author", `{${tex(record.madeBy)}}`],
    ["title", `{${tex(record.title)}}`],
    ["howpublished", tex(`${numberWords(record)} of “${record.project.title}”`)],
    ["year", String(at.getUTCFullYear())],
    ["month", MONTHS[at.getUTCMonth()]],
    ["url", record.address],
    ["note", tex(record.licence.name)],
  ];
  const lines = fields.map(([name, value]) => `  ${name} = ${name === "month" ? value : `{${value}}`},`);
  return `@misc{${keyOf(record)},\n${lines.join("\n")}\n}\n`;
}

/** One item of CSL-JSON, as its programs take a list of them. */
export function cslJson(record: PlateRecord): string {
  const at = new Date(record.madeAt);
  const item = {
    id: keyOf(record),
    type: "figure",
    title: record.title,
    author: [{ literal: record.madeBy }],
    "container-title": record.project.title,
    number: String(record.number),
    version: String(record.version),
    issued: { "date-parts": [[at.getUTCFullYear(), at.getUTCMonth() + 1, at.getUTCDate()]] },
    URL: record.address,
    note: `${numberWords(record)}. ${record.licence.name}`,
  };
  return `${JSON.stringify([item], null, 2)}\n`;
}

/** `Ada Marsh: “…”, plate 3 of “…”, 1 Dec 2026, https://…` */
export function sentence(record: PlateRecord): string {
  const { madeBy, title, project, address } = record;
  return `${madeBy}: “${title}”, ${lowerFirst(numberWords(record))} of “${project.title}”, ${formatDate(record.madeAt)}, ${address}`;
}

interface CopyTexts {
  markdown: string;
  html: string;
  latex: string;
  plain: string;
}

/** The figure with its source, ready to be put into an article. */
export function copyTexts(record: PlateRecord): CopyTexts {
  const { address, title, licence } = record;
  const cited = sentence(record);
  const licensed = licence.address ? `${cited} (${licence.name})` : cited;
  const alt = `${numberWords(record)}: ${title}`;
  const link = html(address);
  return {
    plain: `${licensed}\n`,
    markdown: `[![${markdown(alt)}](${address}.svg)](${address})\n\n${markdown(licensed)}\n`,
    html: [
      "<figure>",
      `  <a href="${link}"><picture>`,
      `    <source media="(prefers-color-scheme: dark)" srcset="${link}.svg?theme=dark">`,
      `    <img src="${link}.svg" alt="${html(alt)}" style="max-width:100%;height:auto">`,
      "  </picture></a>",
      `  <figcaption>${html(licensed)}</figcaption>`,
      "</figure>",
      "",
    ].join("\n"),
    latex: [
      `% The figure is ${address}.pdf: keep it beside this file as ${keyOf(record)}.pdf.`,
      "\\begin{figure}",
      "  \\centering",
      `  \\includegraphics[width=\\linewidth]{${keyOf(record)}.pdf}`,
      `  \\caption{${tex(title)}. ${tex(`${record.madeBy}, ${lowerFirst(numberWords(record))} of “${record.project.title}”, ${formatDate(record.madeAt)}`)}, \\url{${address}} (${tex(licence.name)}).}`,
      "\\end{figure}",
      "",
    ].join("\n"),
  };
}

function keyOf({ id }: PlateRecord): string {
  return `swale-plate-${id}`;
}

function lowerFirst(text: string): string {
  return text.charAt(0).toLowerCase() + text.slice(1);
}

/** Text for TeX: its ten special characters, one line. Source: D. E. Knuth, The TeXbook, chapter 7 (from memory, not seen). */
function tex(text: string): string {
  return text.replace(/\s+/g, " ").replace(/[\\{}$&#_%~^]/g, (sign) => TEX[sign] ?? sign);
}

const TEX: Record<string, string> = {
  "\\": "\\textbackslash{}",
  "~": "\\textasciitilde{}",
  "^": "\\textasciicircum{}",
  ...Object.fromEntries([..."{}$&#_%"].map((sign) => [sign, `\\${sign}`])),
};

function html(text: string): string {
  return text
    .replaceAll("&", "&amp;")
    .replaceAll("<", "&lt;")
    .replaceAll(">", "&gt;")
    .replaceAll('"', "&quot;");
}

/** Text that no Markdown reader takes for anything else; an address stays one. */
function markdown(text: string): string {
  return text.replace(/[\\`*_[\]<>#|!~&]/g, "\\$&");
}

/** As BibTeX knows them. */
const MONTHS = "jan feb mar apr may jun jul aug sep oct nov dec".split(" ");
