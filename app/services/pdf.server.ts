import { createRequire } from "node:module";
import type * as pdfmake from "pdfmake";
import type { Content, TDocumentDefinitions } from "pdfmake/interfaces";
import { type Covered, completeSvg, loadCoverage, REST, runsOf } from "./font-runs.server.ts";
import { type FontName, loadFonts } from "./fonts.server.ts";

/**
 * Papers for printing, by definitions of pdfmake. Families are those of our pages ("Atkinson Hyperlegible Next", "Bricolage
 * Grotesque", "Sometype Mono"); signs that these lack are set in another by themselves, in text and in drawings alike. Nothing
 * is fetched. The same definition with the same `info.creationDate` gives the same bytes.
 */
export async function printPdf(definition: TDocumentDefinitions): Promise<Buffer> {
  const [printer, covered] = await Promise.all([loadPrinter(), loadCoverage()]);
  const { content, header, footer, ...rest } = definition;
  const whole = (part: unknown) =>
    typeof part === "function"
      ? (...args: unknown[]) => completed(part(...args), covered)
      : completed(part, covered);
  return printer
    .createPdf({
      pageSize: "A4",
      defaultStyle: { font: SANS },
      ...rest,
      content: whole(content) as Content,
      ...(header !== undefined && { header: whole(header) as Content }),
      ...(footer !== undefined && { footer: whole(footer) as Content }),
    })
    .getBuffer();
}

/** A part of a definition with every sign that our fonts lack in the one that has it. */
function completed(part: unknown, covered: Covered): unknown {
  if (typeof part === "string") {
    const set = setText(part, covered);
    return set === part ? part : { text: set };
  }
  if (Array.isArray(part)) return part.map((one) => completed(one, covered));
  if (typeof part !== "object" || part === null) return part;
  const node = part as Record<string, unknown>;
  const own: Record<string, unknown> = { ...node };
  for (const key of ["text", "stack", "columns", "ul", "ol"]) {
    const value = node[key];
    if (value === undefined) continue;
    own[key] =
      key === "text" && typeof value === "string" ? setText(value, covered) : completed(value, covered);
  }
  if (typeof node.svg === "string") own.svg = completeSvg(withoutRims(node.svg), covered);
  if (node.table) {
    const table = node.table as { body: unknown[][] };
    own.table = { ...table, body: table.body.map((row) => row.map((cell) => completed(cell, covered))) };
  }
  return own;
}

function setText(text: string, covered: Covered): unknown {
  const runs = runsOf(text, covered);
  if (runs.every(({ rest }) => !rest)) return text;
  return runs.map((run) => (run.rest ? { text: run.text, font: REST } : { text: run.text }));
}

/** Rims around letters: the library draws them over the letters. */
function withoutRims(svg: string): string {
  return svg.replace(/<text\b[^>]*paint-order="stroke"[^>]*>/g, (tag) => tag.replace(RIM, ""));
}

const RIM = / (?:paint-order|stroke|stroke-width|stroke-linejoin)="[^"]*"/g;

async function loadPrinter(): Promise<typeof pdfmake> {
  const fonts = await loadFonts();
  const at = (name: FontName) => fonts.find((font) => font.name === name)?.path;
  const faces = (normal: FontName, bold: FontName, italics = normal, bolditalics = bold) => ({
    normal: at(normal),
    bold: at(bold),
    italics: at(italics),
    bolditalics: at(bolditalics),
  });
  const printer: typeof pdfmake = createRequire(import.meta.url)("pdfmake");
  const ours = new Set(fonts.map(({ path }) => path));
  printer.setUrlAccessPolicy(() => false);
  printer.setLocalAccessPolicy((path) => ours.has(path));
  printer.setFonts({
    [SANS]: faces("sans", "sans-bold", "sans-italic", "sans-bold-italic"),
    "Bricolage Grotesque": faces("display", "display"),
    "Sometype Mono": faces("mono", "mono"),
    [REST]: faces("rest", "rest-bold"),
  });
  return printer;
}

const SANS = "Atkinson Hyperlegible Next";
