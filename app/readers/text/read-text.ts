import type { Quantity, Warning } from "../../measurement/sweep.ts";
import { assemble } from "../assemble.ts";
import { plainText } from "../decode.ts";
import { indexLines, type Lines } from "../lines.ts";
import { fail, ReadFailure } from "../problem.ts";
import type { Reading, ReadResult, TextSpec } from "../reading.ts";
import { toHertz, UNIT_HZ } from "../units.ts";
import { counted } from "../wording.ts";
import { splitCells } from "./cells.ts";
import { COARSE, choose } from "./choose.ts";
import { frequencyUnit } from "./frequency.ts";
import { textQuestions } from "./questions.ts";
import { referenceOhmIn } from "./reference.ts";
import { toReflection } from "./reflection.ts";
import type { Rows } from "./rows.ts";
import { textShape } from "./shape.ts";
import { joinAndCut } from "./stretch.ts";
import { findTable, type Table } from "./table.ts";

const PREVIEW_ROWS = 12;
const DEFAULT_OHM = 50;

/**
 * Reads delimited text of any dialect into a sweep: Hz ascending, abs Γ or Γ, gaps NaN. What is `given` overrules what
 * is found, field by field; what had to be assumed comes back as sentences. Throws `ReadFailure` (located).
 */
export function readText(bytes: Uint8Array, given: Partial<TextSpec> = {}, wanted?: Quantity): ReadResult {
  const plain = plainText(bytes, given.encoding);
  const lines = indexLines(plain);
  const table = findTable(lines, given);
  const chosen = located(table.block.firstLine, () =>
    choose(table.candidates, table.columns, table.frequencies[0].index, given, wanted),
  );
  const column = table.columns[chosen.frequencyColumn];
  const unit = given.frequencyUnit
    ? { unit: given.frequencyUnit, assumed: null, confidence: 1 }
    : frequencyUnit(column, table.preamble);
  const named = referenceOhmIn([...table.preamble, ...table.headings]);
  const spec: TextSpec = {
    encoding: plain.encoding,
    delimiter: table.dialect.delimiter,
    decimal: table.dialect.decimal,
    thousands: table.dialect.thousands,
    headerLine: table.headerLine,
    firstDataLine: table.block.firstLine,
    frequencyColumn: chosen.frequencyColumn,
    frequencyUnit: unit.unit,
    valueColumn: chosen.valueColumn,
    secondColumn: chosen.secondColumn,
    quantity: chosen.quantity,
    angleUnit: chosen.angleUnit,
    referenceOhm: given.referenceOhm ?? named ?? DEFAULT_OHM,
    zeroDb: given.zeroDb ?? null,
  };
  if (!(spec.referenceOhm > 0 && spec.referenceOhm < Infinity))
    fail(
      "bad-given",
      `A reference impedance of ${spec.referenceOhm} Ω was given: expected a positive number.`,
    );
  const stretch = joinAndCut(lines, table, spec);
  const assumed = [...chosen.assumed, ...stretch.assumed];
  if (unit.assumed) assumed.push(unit.assumed);
  if (given.referenceOhm === undefined && named === null)
    assumed.push(`The file names no reference impedance: ${DEFAULT_OHM} Ω.`);
  const reading: Reading = {
    format: "text",
    quantity: COARSE[spec.quantity],
    frequencyUnit: spec.frequencyUnit,
    assumed,
    confidence: round(chosen.confidence * unit.confidence),
    questions: textQuestions({
      candidates: table.candidates,
      chosen,
      unitConfidence: unit.confidence,
      blocks: stretch.blocks,
      spec,
      crestDb: spec.quantity === "level" ? crest(stretch.rows) : null,
    }),
    spec: { text: spec },
    shape: textShape(lines, table.block.firstLine, table.dialect, table.headings),
    preview: preview(lines, table),
  };
  return finish(reading, spec, table, stretch.rows);
}

/** Gives a problem that concerns the whole table the line at which the table begins. */
function located<T>(line: number, work: () => T): T {
  try {
    return work();
  } catch (error) {
    if (error instanceof ReadFailure) throw new ReadFailure({ line, ...error.problem });
    throw error;
  }
}

function finish(reading: Reading, spec: TextSpec, table: Table, rows: Rows): ReadResult {
  if (spec.quantity === "level" && spec.zeroDb === null)
    return {
      ok: false,
      reading,
      problem: {
        code: "zero-db-needed",
        message:
          "The values are levels: the level of full reflection (port open or shorted) is needed to read them, and the file does not say it.",
        line: table.block.firstLine,
      },
    };
  const value = table.columns[spec.valueColumn];
  const second = spec.secondColumn === null ? null : table.columns[spec.secondColumn];
  const reflection = toReflection(rows, {
    ...spec,
    valueScale: value.unit === "%" ? 1 : value.heading.scale,
    secondScale: second?.heading.scale ?? 1,
    unsigned: second?.heading.unsigned ?? false,
  });
  const frequencyHz = new Float64Array(rows.count);
  const factor = UNIT_HZ[spec.frequencyUnit];
  for (let i = 0; i < rows.count; i++) {
    frequencyHz[i] = toHertz(rows.frequency[i], factor);
    if (!(frequencyHz[i] >= 0 && frequencyHz[i] < Infinity))
      fail(
        "bad-frequency",
        `Line ${rows.line[i]}: expected a frequency of zero or more, found ${rows.frequency[i]}.`,
        rows.line[i],
      );
  }
  const { sweep, assumed } = assemble({ ...reflection, frequencyHz }, spec.referenceOhm);
  reading.assumed.push(...reflection.assumed, ...assumed, ...rowSentences(rows));
  return {
    ok: true,
    reading,
    sweep,
    warnings: impossibleWarning(reflection.impossible),
  };
}

function rowSentences(rows: Rows): string[] {
  const said: string[] = [];
  const list = (numbers: number[]) => `${numbers.slice(0, 5).join(", ")}${numbers.length > 5 ? ", …" : ""}`;
  if (rows.withoutFrequency.length > 0)
    said.push(
      `${counted(rows.withoutFrequency.length, "row")} without a frequency left out (line ${list(rows.withoutFrequency)}).`,
    );
  if (rows.skipped.length > 0)
    said.push(
      `${counted(rows.skipped.length, "line")} inside the table hold no row of numbers and were passed over (line ${list(rows.skipped)}).`,
    );
  if (rows.limits > 0)
    said.push(`${counted(rows.limits, "value")} written as a limit (such as ">99") taken as that number.`);
  return said;
}

function impossibleWarning(impossible: number): Warning[] {
  if (impossible === 0) return [];
  return [
    {
      code: "swr-below-one",
      message: `${counted(impossible, "value")} below an SWR of 1, which can't be: left as gaps.`,
    },
  ];
}

function preview(lines: Lines, table: Table): Reading["preview"] {
  const rows: string[][] = [];
  for (let n = table.block.firstLine; n <= table.block.lastLine && rows.length < PREVIEW_ROWS; n++) {
    const line = lines.text(n);
    if (line.trim() !== "")
      rows.push(
        splitCells(line, table.dialect.delimiter)
          .slice(0, table.dialect.columns)
          .map((c) => c.trim()),
      );
  }
  return { headings: table.headings, rows, firstLine: table.block.firstLine };
}

function crest(rows: Rows): number | null {
  let most = Number.NaN;
  for (let i = 0; i < rows.count; i++)
    if (!(rows.value[i] <= most) && Number.isFinite(rows.value[i])) most = rows.value[i];
  return Number.isFinite(most) ? most : null;
}

function round(x: number): number {
  return Math.round(x * 100) / 100;
}
