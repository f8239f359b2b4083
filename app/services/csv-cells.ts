/** Cells of a CSV file that programs of tables open (RFC 4180). Pure. */

/**
 * A text as a cell. One that a program of tables would take for a formula gets an apostrophe in front, which such programs
 * show as text. Source: OWASP, "CSV Injection", https://owasp.org/www-community/attacks/CSV_Injection: = + - @, tab,
 * return, line feed, and the wide forms of the four signs.
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

/** After quotes and spaces too: programs pass over them. */
const FORMULA = /^["'\s]*[=+\-@\t\r\n＝＋－＠]/;
