import type { Lines } from "../lines.ts";
import { scan, scanNumber } from "../number-bytes.ts";
import { fail } from "../problem.ts";
import { MAX_POINTS } from "../reading.ts";
import type { Matrix } from "./header.ts";

/** Called for every frequency with its numbers: the frequency, then pairs as the file has them. */
export type OnSet = (numbers: Float64Array, line: number) => void;

export interface DataEnd {
  sets: number;
  /** Line at which noise data begin; null where there are none. */
  noiseLine: number | null;
  /** Numbers of a last, unfinished frequency. */
  unfinished: number;
}

const DECIMAL_POINT = 46;
const GAP = /^[+-]?(?:nan|inf|infinity|1\.#\w+|-+)(?=[\s,!]|$)/i;
let buffer = new Float64Array(64);

/**
 * Pairs of numbers that the first frequency has, over as many lines as it takes: a line with an even count of numbers
 * goes on where the last one ended. Null where there are no data.
 */
export function firstSetPairs(
  lines: Lines,
  firstLine: number,
): { pairs: number; line: number; onFirstLine: number } | null {
  let total = 0;
  let line = 0;
  let onFirstLine = 0;
  for (let n = firstLine; n <= lines.count; n++) {
    const found = numbersOf(lines, n);
    if (found === END) break;
    if (found === 0) continue;
    if (total === 0) {
      line = n;
      onFirstLine = found;
    } else if (found % 2 === 1) break;
    total += found;
  }
  return total === 0 ? null : { pairs: (total - 1) / 2, line, onFirstLine };
}

/** Reads all network data: sets of 1 + 2·pairs numbers, wrapped at will; noise data behind two ports are passed over. */
export function readData(
  lines: Lines,
  firstLine: number,
  pairs: number,
  twoPorts: boolean,
  onSet: OnSet,
): DataEnd {
  const need = 1 + 2 * pairs;
  const set = new Float64Array(need);
  let filled = 0;
  let startLine = 0;
  let sets = 0;
  let last = -Infinity;
  for (let n = firstLine; n <= lines.count; n++) {
    const found = numbersOf(lines, n);
    if (found === END) break;
    if (found === 0) continue;
    if (filled === 0) {
      startLine = n;
      if (twoPorts && found === 5 && sets > 0 && buffer[0] <= last)
        return { sets, noiseLine: n, unfinished: 0 };
    }
    if (filled + found > need) tooMany(startLine, need, filled + found);
    for (let i = 0; i < found; i++) set[filled++] = buffer[i];
    if (filled < need) continue;
    if (sets === MAX_POINTS) tooManyPoints(startLine);
    onSet(set, startLine);
    last = set[0];
    sets++;
    filled = 0;
  }
  return { sets, noiseLine: null, unfinished: filled };
}

/** Spreads the numbers of a triangular set over the full matrix; `set` starts with the frequency. */
export function fillMatrix(set: Float64Array, ports: number, matrix: Matrix, full: Float64Array): void {
  if (matrix === "full") {
    full.set(set.subarray(1));
    return;
  }
  let at = 1;
  for (let i = 0; i < ports; i++) {
    const from = matrix === "upper" ? i : 0;
    const to = matrix === "upper" ? ports : i + 1;
    for (let j = from; j < to; j++) {
      for (const k of [2 * (i * ports + j), 2 * (j * ports + i)]) {
        full[k] = set[at];
        full[k + 1] = set[at + 1];
      }
      at += 2;
    }
  }
}

const END = -1;

/** Numbers of a line into `buffer`; END at a keyword that closes the network data. Fails with "bad-number". */
function numbersOf(lines: Lines, n: number): number {
  const { bytes } = lines;
  const to = lines.end(n);
  let i = lines.start(n);
  let count = 0;
  while (i < to) {
    const c = bytes[i];
    if (c === 32 || c === 9 || c === 44) {
      i++;
      continue;
    }
    if (c === 33) break;
    if (count === 0 && (c === 35 || c === 91 || c > 64)) return wordLine(lines, n);
    scanNumber(bytes, i, to, DECIMAL_POINT);
    let value = scan.value;
    let next = scan.at;
    const stop = bytes[next];
    if (!scan.ok || (next < to && stop !== 32 && stop !== 9 && stop !== 44 && stop !== 33)) {
      const rest = String.fromCharCode(...bytes.subarray(i, Math.min(to, i + 40)));
      const gap = rest.match(GAP);
      if (!gap) badNumber(n, i - lines.start(n) + 1, rest);
      value = Number.NaN;
      next = i + gap[0].length;
    }
    if (count === buffer.length) {
      const wider = new Float64Array(count * 2);
      wider.set(buffer);
      buffer = wider;
    }
    buffer[count++] = value;
    i = next;
  }
  return count;
}

/** A line that begins with a word: keywords end the data, a later option line is passed over. */
function wordLine(lines: Lines, n: number): number {
  const text = lines.text(n).trim();
  if (/^#/.test(text)) return 0;
  if (/^\[\s*(?:end|noise data)\s*\]/i.test(text) || /^end$/i.test(text)) return END;
  if (/^\[/.test(text)) return 0;
  if (GAP.test(text))
    return fail("bad-number", `Line ${n}: expected a frequency, found "${text.slice(0, 40)}".`, n, 1);
  return badNumber(n, lines.text(n).search(/\S/) + 1, text);
}

function badNumber(line: number, column: number, found: string): never {
  return fail(
    "bad-number",
    `Line ${line}, column ${column}: expected a number, found "${found.match(/^[^\s,]*/)?.[0].slice(0, 40)}".`,
    line,
    column,
  );
}

function tooMany(line: number, need: number, found: number): never {
  return fail(
    "row-length",
    `Line ${line}: expected ${need} numbers for this frequency (the frequency and ${(need - 1) / 2} ${need === 3 ? "pair" : "pairs"}), found ${found}.`,
    line,
    1,
  );
}

function tooManyPoints(line: number): never {
  return fail(
    "too-many-points",
    `The file has more than ${MAX_POINTS} points: the limit is reached at line ${line}. Export the sweep with fewer points.`,
    line,
  );
}
