import { toCsv, toTouchstone } from "../exports.server.ts";
import { bibtex, cslJson } from "./citation.ts";
import type { Composed } from "./compose.server.ts";
import { drawFigure } from "./draw.server.tsx";
import { embedPage } from "./embed.ts";
import { type FormName, MEDIA_TYPES, PNG_WIDTHS } from "./form-names.ts";
import { printPlate } from "./paper.server.ts";
import type { PlateRecord } from "./record.ts";
import { renderPng } from "./render-png.server.ts";
import { tablesCsv } from "./table-csv.ts";

/** A form of a plate, ready to be stored. */
export interface MadeForm {
  form: FormName;
  mediaType: string;
  bytes: Buffer;
}

export interface FormsTask {
  record: PlateRecord;
  /** The points of a single sweep come along for CSV and Touchstone. */
  sweeps: Composed["sweeps"];
}

/** Every form of a plate, from its record. Seconds of work: `printing.server.ts` has it done beside the pages. */
export async function makeForms({ record, sweeps }: FormsTask): Promise<MadeForm[]> {
  const texts: Partial<Record<FormName, string>> = {
    "svg-light": drawFigure(record, { theme: "light" }),
    "svg-dark": drawFigure(record, { theme: "dark" }),
    "svg-light-narrow": drawFigure(record, { theme: "light", width: NARROW_PX }),
    "svg-dark-narrow": drawFigure(record, { theme: "dark", width: NARROW_PX }),
    json: `${JSON.stringify(record)}\n`,
    bib: bibtex(record),
    csl: cslJson(record),
    csv: csvOf(record, sweeps),
    s1p: touchstoneOf(record, sweeps) ?? undefined,
  };
  texts.embed = embedPage(record, {
    wide: sizeOf(texts["svg-light"] ?? ""),
    narrow: sizeOf(texts["svg-light-narrow"] ?? ""),
  });
  const forms = Object.entries(texts).flatMap(([form, text]) =>
    text === undefined ? [] : [made(form as FormName, Buffer.from(text))],
  );
  const pictures = (["light", "dark"] as const).flatMap((theme) =>
    PNG_WIDTHS.map((width) => ({ theme, width })),
  );
  const rendered = await Promise.all(
    pictures.map(async ({ theme, width }) => {
      // A small picture is laid out for its size, so that its words can be read.
      const svg = drawFigure(record, { theme, width: Math.min(width, WIDE_PX) });
      return made(`png-${width}-${theme}`, await renderPng(svg, width));
    }),
  );
  forms.push(...rendered);
  forms.push(made("pdf", await printPlate(record)));
  return forms;
}

/** Width and height that an SVG of ours gives itself, px. */
export function sizeOf(svg: string): { width: number; height: number } {
  const [, width, height] = /^<svg[^>]* width="([\d.]+)" height="([\d.]+)"/.exec(svg) ?? [];
  return { width: Number(width), height: Number(height) };
}

function made(form: FormName, bytes: Buffer): MadeForm {
  return { form, bytes, mediaType: MEDIA_TYPES[form.split("-")[0]] };
}

/** One sweep: its points with their limits; else the tables. */
function csvOf(record: PlateRecord, sweeps: Composed["sweeps"]): string {
  const [only] = sweeps;
  return isOfOneSweep(record) && only ? toCsv(only.sweep, only.limits) : tablesCsv(record);
}

/** Null where there is no phase, or more than one sweep. */
function touchstoneOf(record: PlateRecord, [only]: Composed["sweeps"]): string | null {
  if (!isOfOneSweep(record) || !only?.sweep.gammaRe || !only.sweep.gammaIm) return null;
  const source = record.sources.find(({ role }) => role === "sweep");
  const plane = source?.correction ? `corrected to the ${source.correction.plane}` : "as measured";
  return toTouchstone(only.sweep, [
    `${record.title}: the sweep "${only.title}", ${plane}`,
    `${record.madeBy}, ${record.madeAt.slice(0, 10)}, ${record.address}`,
    record.licence.name,
  ]);
}

function isOfOneSweep({ kind }: PlateRecord): boolean {
  return kind === "sweep" || kind === "dip";
}

const NARROW_PX = 420;
const WIDE_PX = 960;
