import type { Lines } from "../lines.ts";
import { parseCell, splitCells } from "./cells.ts";
import type { Dialect } from "./dialect.ts";
import { plain } from "./headings.ts";
import { withoutCommentMark } from "./segments.ts";

/** Labels of the preamble that take part in a shape. */
const PREAMBLE_LABELS = 20;

/**
 * Fingerprint of a text file's shape: delimiter, marks, headings and the labels of its preamble, but none of
 * its values, so that the next file of the same export has the same.
 */
export function textShape(lines: Lines, firstRow: number, dialect: Dialect, headings: string[]): string {
  const labels: string[] = [];
  for (let n = 1; n < firstRow && labels.length < PREAMBLE_LABELS; n++) {
    const cells = splitCells(
      withoutCommentMark(lines.text(n)),
      dialect.delimiter === " " ? "," : dialect.delimiter,
    );
    const label = cells.length > 1 ? cells[0].trim() : "";
    if (label !== "" && parseCell(label, dialect).kind === "text")
      labels.push(plain(label).replace(/\d+/g, "0"));
  }
  const parts = [dialect.delimiter, dialect.decimal, dialect.columns, ...headings.map(plain), "/", ...labels];
  return `text-${hash(parts.join("|"))}`;
}

/** FNV-1a, 64 bits in two halves (G. Fowler, L. C. Noll, P. Vo; RFC 9923). */
export function hash(text: string): string {
  let value = 0xcbf29ce484222325n;
  for (const byte of new TextEncoder().encode(text)) {
    value = BigInt.asUintN(64, (value ^ BigInt(byte)) * 0x100000001b3n);
  }
  return value.toString(16).padStart(16, "0");
}
