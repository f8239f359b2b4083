import { createRequire } from "node:module";
import type * as pdfmake from "pdfmake";
import type { Content, TDocumentDefinitions } from "pdfmake/interfaces";
import { signsOf } from "./font-signs.ts";
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

type Covered = (code: number) => boolean;

/** A part of a definition with every sign that our fonts lack in the one that has it. */
function completed(part: unknown, covered: Covered): unknown {
  if (typeof part === "string") return setText(part, covered);
  if (Array.isArray(part)) return part.map((one) => completed(one, covered));
  if (typeof part !== "object" || part === null) return part;
  const node = part as Record<string, unknown>;
  const own: Record<string, unknown> = { ...node };
  for (const key of ["text", "stack", "columns", "ul", "ol"]) {
    if (key in node) own[key] = completed(node[key], covered);
  }
  if (typeof node.svg === "string") own.svg = completeSvg(node.svg, covered);
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

/** Rims around letters go too: the library draws them over the letters. */
function completeSvg(svg: string, covered: Covered): string {
  return svg
    .replace(/<text\b[^>]*paint-order="stroke"[^>]*>/g, (tag) => tag.replace(RIM, ""))
    .replace(/>([^<]+)</g, (all, escaped: string) => {
      const runs = runsOf(escaped, covered);
      if (runs.every(({ rest }) => !rest)) return all;
      const spans = runs.map(({ text, rest }) =>
        rest ? `<tspan font-family="${REST}">${text}</tspan>` : `<tspan>${text}</tspan>`,
      );
      return `>${spans.join("")}<`;
    });
}

const RIM = / (?:paint-order|stroke|stroke-width|stroke-linejoin)="[^"]*"/g;

/** Stretches of a text by whether our own fonts have its signs. */
function runsOf(text: string, covered: Covered): { text: string; rest: boolean }[] {
  const runs: { text: string; rest: boolean }[] = [];
  for (const sign of text) {
    const rest = !covered(sign.codePointAt(0) ?? 0);
    const last = runs.at(-1);
    if (last?.rest === rest) last.text += sign;
    else runs.push({ text: sign, rest });
  }
  return runs;
}

/** Of the plainest face, which has what the others have. Line ends are nobody's signs. */
async function loadCoverage(): Promise<Covered> {
  const sans = (await loadFonts()).find(({ name }) => name === "sans");
  if (!sans) throw new Error("The font of texts is missing.");
  coverage ??= new Set([...signsOf(sans.bytes), 9, 10, 13]);
  const known = coverage;
  return (code) => known.has(code);
}

let coverage: Set<number> | undefined;

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
/** Has Greek, Cyrillic and the signs of mathematics. */
const REST = "Roboto";
