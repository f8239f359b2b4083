import { renormalise } from "../../measurement/renormalise.ts";
import type { Warning } from "../../measurement/sweep.ts";
import { assemble } from "../assemble.ts";
import { plainText } from "../decode.ts";
import { portsFromName } from "../detect.ts";
import { indexLines, type Lines } from "../lines.ts";
import { fail } from "../problem.ts";
import type { Reading, ReadResult, TouchstoneSpec } from "../reading.ts";
import { toHertz, UNIT_HZ } from "../units.ts";
import { counted } from "../wording.ts";
import { type DataEnd, fillMatrix, firstSetPairs, readData } from "./data.ts";
import { contentOf, type Header, readHeader } from "./header.ts";
import { reflectionAt } from "./network.ts";
import type { Format, Options } from "./options.ts";

const PREVIEW_ROWS = 12;

/**
 * Reads a Touchstone file, version 1.0, 1.1, 2.0 or 2.1, of any count of ports, into the sweep of one reflection: Hz
 * ascending, complex Γ at that port's reference, NaN for gaps. Sources: the specifications of the IBIS Open Forum.
 * Throws `ReadFailure` (located).
 */
export function readTouchstone(
  file: { name: string; bytes: Uint8Array },
  given: Partial<TouchstoneSpec> = {},
): ReadResult {
  const lines = indexLines(plainText(file.bytes));
  const header = readHeader(lines);
  const options = header.options as Options;
  const layout = layoutOf(lines, header, portsFromName(file.name));
  const { ports } = layout;
  const port = given.port ?? 1;
  if (!(Number.isInteger(port) && port >= 1 && port <= ports))
    fail(
      "no-such-port",
      `The file has ${counted(ports, "port")}; the reflection at port ${port} was asked for.`,
    );
  const { referenceOhm } = given;
  if (typeof referenceOhm === "number" && !(referenceOhm > 0 && referenceOhm < Infinity))
    fail("bad-given", `A reference impedance of ${referenceOhm} Ω was given: expected a positive number.`);
  const references = referencesOf(header, ports);
  const points = readPoints(lines, header, ports, port - 1, references);
  if (points.end.sets === 0)
    fail(
      "no-data",
      "Expected rows of numbers behind the option line; the file has none.",
      Math.min(header.firstLine, lines.count),
    );
  const { sweep, assumed } = assemble(points, references[port - 1]);
  const own = sweep.referenceOhm;
  const impedance = options.parameter !== "S";
  const reading: Reading = {
    format: "touchstone",
    quantity: impedance ? "impedance" : "gamma",
    frequencyUnit: options.unit,
    assumed: [
      ...header.assumed,
      ...layout.assumed,
      ...defaults(options, header),
      ...notes(points.end, header),
      ...assumed,
    ],
    confidence: 1,
    questions: ports > 1 ? [portQuestion(ports, port)] : [],
    spec: { touchstone: { port, referenceOhm: referenceOhm ?? null } },
    shape: `touchstone-${ports}-${options.parameter}-${options.format}-${options.unit}`.toLowerCase(),
    preview: preview(lines, header, options),
  };
  if (ports > 1 && given.port === undefined)
    reading.assumed.push(`The file has ${ports} ports: S11 was taken.`);
  const warnings: Warning[] = [];
  if (points.end.unfinished > 0)
    warnings.push({
      code: "cut-off",
      message: "The file ends inside its last frequency, which was left out.",
    });
  if (header.frequencies !== null && header.frequencies !== points.end.sets)
    warnings.push({
      code: "frequency-count",
      message: `The file says ${header.frequencies} frequencies and holds ${points.end.sets}: those it holds were read.`,
    });
  if (referenceOhm && referenceOhm !== own)
    reading.assumed.push(
      `The file is referred to ${own} Ω; Γ was converted to ${referenceOhm} Ω through the impedance.`,
    );
  return { ok: true, reading, sweep: referenceOhm ? renormalise(sweep, referenceOhm) : sweep, warnings };
}

/** The count of ports, from [Number of Ports], else from the first frequency's numbers, else from the name. */
function layoutOf(lines: Lines, header: Header, named: number | null): { ports: number; assumed: string[] } {
  const first = firstSetPairs(lines, header.firstLine);
  if (header.ports !== null) return { ports: header.ports, assumed: [] };
  if (first === null) return { ports: named ?? 1, assumed: [] };
  const root = Math.round(Math.sqrt(first.pairs));
  if (named !== null && (named * named === first.pairs || first.onFirstLine === 1 + 2 * named * named))
    return { ports: named, assumed: [] };
  if (first.pairs < 1 || root * root !== first.pairs) {
    const need =
      named === null
        ? "3 numbers (one port) or 9 (two ports)"
        : `${1 + 2 * named * named} numbers (${counted(named, "port")})`;
    return fail(
      "row-length",
      `Line ${first.line}: expected ${need} for the first frequency, found ${1 + 2 * first.pairs}.`,
      first.line,
      1,
    );
  }
  const said =
    named === null
      ? "The name does not say how many ports the file has"
      : `The name says ${counted(named, "port")}`;
  return { ports: root, assumed: [`${said}; its rows hold ${counted(root, "port")}, which was taken.`] };
}

function referencesOf({ references, options }: Header, ports: number): number[] {
  const found = references ?? options?.references ?? [50];
  if (found.length === 1) return Array(ports).fill(found[0]);
  if (found.length < ports)
    return fail(
      "bad-reference",
      `Expected one reference impedance or ${ports}, one a port; found ${found.length}.`,
    );
  return found;
}

function readPoints(lines: Lines, header: Header, ports: number, port: number, references: number[]) {
  const { parameter, format, unit } = header.options as Options;
  const pairs = header.matrix === "full" ? ports * ports : (ports * (ports + 1)) / 2;
  const size = Math.min(lines.count, 1_000_001);
  const frequencyHz = new Float64Array(size);
  const gammaRe = new Float64Array(size);
  const gammaIm = new Float64Array(size);
  const matrix = new Float64Array(2 * ports * ports);
  const scale = header.version === "1" ? null : normalisation(parameter, ports, references);
  const out = new Float64Array(2);
  const from = parameter === "S" ? 2 * (port * ports + port) : 0;
  const to = parameter === "S" ? from + 2 : matrix.length;
  let count = 0;
  const end = readData(lines, header.firstLine, pairs, ports === 2, (set, line) => {
    const frequency = toHertz(set[0], UNIT_HZ[unit]);
    if (!(frequency >= 0 && frequency < Infinity))
      fail("bad-frequency", `Line ${line}: expected a frequency of zero or more, found ${set[0]}.`, line, 1);
    fillMatrix(set, ports, header.matrix, matrix);
    for (let k = from; k < to; k += 2) {
      cartesian(matrix, k, format);
      if (scale) {
        matrix[k] *= scale[k >> 1];
        matrix[k + 1] *= scale[k >> 1];
      }
    }
    reflectionAt(parameter, matrix, ports, port, out);
    frequencyHz[count] = frequency;
    const finite = Number.isFinite(out[0]) && Number.isFinite(out[1]);
    gammaRe[count] = finite ? out[0] : Number.NaN;
    gammaIm[count++] = finite ? out[1] : Number.NaN;
  });
  const magnitude = new Float64Array(count);
  for (let i = 0; i < count; i++) magnitude[i] = Math.hypot(gammaRe[i], gammaIm[i]);
  const cut = (a: Float64Array) => (a.length === count ? a : a.slice(0, count));
  return { end, frequencyHz: cut(frequencyHz), gammaRe: cut(gammaRe), gammaIm: cut(gammaIm), magnitude };
}

/** Factors that normalise version 2 data, which are in ohm and siemens; version 1 data come normalised. */
function normalisation(parameter: string, n: number, r: number[]): Float64Array | null {
  if (parameter === "S") return null;
  const scale = new Float64Array(n * n);
  for (let i = 0; i < n; i++)
    for (let j = 0; j < n; j++) {
      const mean = Math.sqrt(r[i] * r[j]);
      if (parameter === "Z") scale[i * n + j] = 1 / mean;
      else if (parameter === "Y") scale[i * n + j] = mean;
      else {
        const diagonal = i === 0 ? 1 / r[0] : r[1];
        const factor = i === j ? diagonal : Math.sqrt(r[1] / r[0]);
        scale[i * n + j] = parameter === "H" ? factor : 1 / factor;
      }
    }
  return scale;
}

function cartesian(m: Float64Array, at: number, format: Format): void {
  if (format === "RI") return;
  const size = format === "DB" ? 10 ** (m[at] / 20) : m[at];
  const angle = (m[at + 1] * Math.PI) / 180;
  m[at] = size * Math.cos(angle);
  m[at + 1] = size * Math.sin(angle);
}

function defaults(options: Options, header: Header): string[] {
  const left = options.defaults.filter((word) => !(word === "50 Ω" && header.references !== null));
  return left.length > 0 ? [`The option line leaves out ${left.join(", ")}: the format's defaults.`] : [];
}

function notes(end: DataEnd, header: Header): string[] {
  const said: string[] = [];
  if (end.noiseLine !== null)
    said.push(`The noise parameters from line ${end.noiseLine} on were passed over.`);
  if (header.options?.parameter !== "S")
    said.push(`The file's ${header.options?.parameter}-parameters were turned into reflection coefficients.`);
  return said;
}

function portQuestion(ports: number, port: number) {
  const choices = Array.from({ length: ports }, (_, i) => ({
    value: String(i + 1),
    label: `S${i + 1}${ports > 9 ? "," : ""}${i + 1}`,
  }));
  return {
    id: "port",
    text: "The file has several ports. Which reflection is the antenna's?",
    choices,
    proposed: String(port),
  };
}

const PAIR_HEADINGS: Record<Format, [string, string]> = {
  DB: ["dB", "angle °"],
  MA: ["magnitude", "angle °"],
  RI: ["real", "imaginary"],
};

function preview(lines: Lines, header: Header, { parameter, format, unit }: Options): Reading["preview"] {
  const rows: string[][] = [];
  for (let n = header.firstLine; n <= lines.count && rows.length < PREVIEW_ROWS; n++) {
    const cells = contentOf(lines, n)
      .trim()
      .split(/[\s,]+/);
    if (cells[0] !== "" && /^[+-.\d]/.test(cells[0])) rows.push(cells.slice(0, 9));
  }
  const [a, b] = PAIR_HEADINGS[format];
  return {
    headings: [`frequency ${unit}`, `${parameter}11 ${a}`, `${parameter}11 ${b}`],
    rows,
    firstLine: header.firstLine,
  };
}
