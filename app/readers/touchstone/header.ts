import type { Lines } from "../lines.ts";
import { fail } from "../problem.ts";
import { type Options, readOptions } from "./options.ts";

export type Matrix = "full" | "lower" | "upper";

/** Everything in a Touchstone file that stands before its network data. */
export interface Header {
  /** "1" for files without [Version]. */
  version: string;
  options: Options | null;
  ports: number | null;
  matrix: Matrix;
  frequencies: number | null;
  references: number[] | null;
  /** First line of network data; past the end where there is none. */
  firstLine: number;
  assumed: string[];
}

const IGNORED = /^(?:number of noise frequencies|begin information|end information|noise data|end)$/;
const MOST_PORTS = 64;

/** Bytes of a line without comment and blanks, as text. */
export function contentOf(lines: Lines, n: number): string {
  const text = lines.text(n);
  const at = text.indexOf("!");
  return withoutBlockHead(at < 0 ? text : text.slice(0, at)).trimEnd();
}

/** IEEE 488.2 block heads ("#48066", "#0") may be glued to the first line that an instrument sends. */
export function withoutBlockHead(text: string): string {
  const head = text.match(/^\s*#([0-9])/);
  if (!head) return text;
  const digits = Number(head[1]);
  const rest = text.slice(head[0].length);
  return /^\d*$/.test(rest.slice(0, digits)) ? rest.slice(digits) : text;
}

/**
 * Reads option line and keywords. Sources: Touchstone File Format Specification 1.1 and 2.0/2.1, IBIS Open Forum.
 * Fails, located, with "option-line", "option-line-missing", "mixed-mode", "bad-keyword", "bad-reference".
 */
export function readHeader(lines: Lines): Header {
  const header: Header = {
    version: "1",
    options: null,
    ports: null,
    matrix: "full",
    frequencies: null,
    references: null,
    firstLine: lines.count + 1,
    assumed: [],
  };
  let inside = false;
  let wanted = 0;
  for (let n = 1; n <= lines.count; n++) {
    const text = contentOf(lines, n).trim();
    if (text === "" || (n === 1 && /^begin$/i.test(text))) continue;
    if (inside) {
      inside = !/^\[\s*end information\s*\]/i.test(text);
      continue;
    }
    if (text.startsWith("#")) {
      if (header.options === null) header.options = readOptions(contentOf(lines, n), n);
      else header.assumed.push(`Line ${n}: a second option line, which the specification says to pass over.`);
    } else if (text.startsWith("[")) {
      wanted = 0;
      const { name, value } = keyword(text, n);
      if (name === "network data") {
        header.firstLine = n + 1;
        break;
      }
      if (name === "begin information") inside = true;
      else if (name === "reference") wanted = readReferences(header, value, n);
      else applyKeyword(header, name, value, n);
    } else if (wanted > 0) wanted = readReferences(header, text, n);
    else {
      header.firstLine = n;
      break;
    }
  }
  if (header.options === null) missingOptions(header);
  return header;
}

function keyword(text: string, line: number): { name: string; value: string } {
  const match = text.match(/^\[\s*([^\]]*?)\s*\]\s*(.*)$/);
  if (!match)
    return fail(
      "bad-keyword",
      `Line ${line}: expected a keyword in square brackets, found "${text.slice(0, 40)}".`,
      line,
      1,
    );
  return { name: match[1].toLowerCase().replace(/\s+/g, " "), value: match[2].trim() };
}

function applyKeyword(header: Header, name: string, value: string, line: number): void {
  if (name === "version") header.version = value || "2.0";
  else if (name === "number of ports") header.ports = whole(name, value, line, MOST_PORTS);
  else if (name === "number of frequencies")
    header.frequencies = whole(name, value, line, Number.MAX_SAFE_INTEGER);
  else if (name === "matrix format") {
    const matrix = value.toLowerCase();
    if (matrix !== "full" && matrix !== "lower" && matrix !== "upper")
      fail(
        "bad-keyword",
        `Line ${line}: expected [Matrix Format] Full, Lower or Upper, found "${value}".`,
        line,
        1,
      );
    header.matrix = matrix as Matrix;
  } else if (name === "two-port data order") {
    if (!/^(?:12_21|21_12)$/.test(value))
      fail(
        "bad-keyword",
        `Line ${line}: expected [Two-Port Data Order] 12_21 or 21_12, found "${value}".`,
        line,
        1,
      );
  } else if (name === "mixed-mode order")
    fail(
      "mixed-mode",
      `Line ${line}: the file holds mixed-mode parameters, whose reflections belong to no single port. Export single-ended S-parameters.`,
      line,
      1,
    );
  else if (!IGNORED.test(name))
    header.assumed.push(`Line ${line}: the keyword [${name}] is not known and was passed over.`);
}

/** Collects the values of [Reference], which may go on over several lines; returns how many are still to come. */
function readReferences(header: Header, text: string, line: number): number {
  header.references ??= [];
  for (const token of text.split(/\s+/).filter((t) => t !== "")) {
    const ohm = Number(token);
    if (!(ohm > 0 && ohm < Infinity))
      fail(
        /[ij)]/i.test(token) ? "complex-reference" : "bad-reference",
        `Line ${line}: expected positive real numbers of ohms behind [Reference], found "${token}".`,
        line,
      );
    header.references.push(ohm);
  }
  return Math.max((header.ports ?? 1) - header.references.length, 0);
}

function whole(name: string, value: string, line: number, most: number): number {
  const n = Number(value);
  if (!/^\d+$/.test(value) || n < 1 || n > most)
    fail(
      "bad-keyword",
      `Line ${line}: expected a whole number from 1${most < 1e6 ? ` to ${most}` : ""} behind [${name}], found "${value}".`,
      line,
      1,
    );
  return n;
}

function missingOptions(header: Header): never {
  return fail(
    "option-line-missing",
    `Line ${header.firstLine}: expected an option line such as "# MHz S MA R 50" before the first data. Add the line, or rename the file to .txt to have it read as a table.`,
    header.firstLine,
    1,
  );
}
