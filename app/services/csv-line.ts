/**
 * Cells as a line of CSV without its end (RFC 4180). A text that a spreadsheet would run as a formula gets a single quote
 * before it, which such programs show as text; numbers stay as they are, negative ones too.
 * Source: OWASP, "CSV Injection", https://owasp.org/www-community/attacks/CSV_Injection: = + - @, tab, carriage return,
 * line feed, and the wide forms of the four signs.
 */
export function csvLine(cells: readonly (string | number)[]): string {
  return cells.map((cell) => (typeof cell === "number" ? cell : textCell(cell))).join(",");
}

function textCell(text: string): string {
  const harmless = FORMULA.test(text) ? `'${text}` : text;
  return /[",\r\n]/.test(harmless) ? `"${harmless.replaceAll('"', '""')}"` : harmless;
}

/** After quotes and spaces too: programs pass over them. */
const FORMULA = /^["'\s]*[=+\-@\t\r\n＝＋－＠]/;
