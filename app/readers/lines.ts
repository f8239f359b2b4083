import type { Plain } from "./decode.ts";
import { fail } from "./problem.ts";

/** More lines than this are not taken: room for 1,000,000 points with as many blank and comment lines. */
export const MAX_LINES = 4_000_000;
/** Characters of one line that are ever turned into text; the longest heading line seen has about 2,000. */
export const MAX_LINE_TEXT = 20_000;

/** A text file by lines; line numbers count from 1 as people do. */
export interface Lines {
  count: number;
  bytes: Uint8Array;
  /** Byte offset of line `n`. */
  start: (n: number) => number;
  /** Byte offset after the last character of line `n`, without its line end. */
  end: (n: number) => number;
  /** Text of line `n`, at most MAX_LINE_TEXT bytes of it. */
  text: (n: number) => string;
}

/**
 * Indexes the lines of a text: LF, CRLF, CR, or all of them mixed. A last line end adds no empty line.
 * Fails with "too-many-lines".
 */
export function indexLines(plain: Plain): Lines {
  const { bytes } = plain;
  let starts = new Uint32Array(1024);
  let count = 0;
  const push = (at: number) => {
    if (count === starts.length) {
      if (count >= MAX_LINES) tooManyLines();
      const wider = new Uint32Array(Math.min(count * 2, MAX_LINES + 1));
      wider.set(starts);
      starts = wider;
    }
    starts[count++] = at;
  };
  push(0);
  const n = bytes.length;
  for (let i = 0; i < n; i++) {
    const c = bytes[i];
    if (c > 13) continue;
    if (c === 10 || (c === 13 && bytes[i + 1] !== 10)) push(i + 1);
  }
  if (starts[count - 1] === n && count > 1) count--;
  const start = (line: number) => starts[line - 1];
  const end = (line: number) => {
    let e = line < count ? starts[line] : n;
    const s = starts[line - 1];
    if (e > s && bytes[e - 1] === 10) e--;
    if (e > s && bytes[e - 1] === 13) e--;
    return e;
  };
  const text = (line: number) => plain.text(start(line), Math.min(end(line), start(line) + MAX_LINE_TEXT));
  return { count, bytes, start, end, text };
}

function tooManyLines(): never {
  return fail(
    "too-many-lines",
    `The file has more than ${MAX_LINES} lines. Nothing was changed; export the sweep with fewer points.`,
    MAX_LINES,
  );
}
