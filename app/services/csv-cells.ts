/** Cells of a CSV file that programs of tables open (RFC 4180). Pure. */

/**
 * A text as a cell. One that a program of tables would take for a formula (it begins with = + - @, a tab or a return) gets
 * an apostrophe in front: OWASP, "CSV Injection" (from memory, not seen).
 */
export function textCell(text: string | null): string {
  if (!text) return "";
  const safe = FORMULA.test(text) ? `'${text}` : text;
  return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}

/** A number as a number; empty where it is unknown or has no value. */
export function numberCell(value: number | null): string {
  return value === null || !Number.isFinite(value) ? "" : String(value);
}

export function csvLine(cells: readonly string[]): string {
  return `${cells.join(",")}\r\n`;
}

const FORMULA = /^[=+\-@\t\r]/;
