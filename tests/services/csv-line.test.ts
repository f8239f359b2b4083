import { describe, expect, it } from "vitest";
import { csvLine } from "~/services/csv-line";
import { toCsv } from "~/services/exports.server";
import { EVASIONS, FORMULAS } from "../fixtures/hostile/evasions.ts";

describe("csvLine", () => {
  it("writes numbers and plain texts as they are, and quotes what RFC 4180 asks", () => {
    expect(csvLine([-1.5, "", "7.1 MHz", 'a "b"', "a,b", "a\nb"])).toBe(
      '-1.5,,7.1 MHz,"a ""b""","a,b","a\nb"',
    );
  });

  it.each(FORMULAS)("lets %j be no formula", (text) => {
    const [cell] = parse(csvLine([text]));
    expect(cell).toBe(`'${text}`);
  });

  it.each(EVASIONS)("keeps a text of one cell in one cell: %s", (_, text) => {
    const cells = parse(csvLine([text, 1]));
    expect(cells).toHaveLength(2);
    expect([text, `'${text}`]).toContain(cells[0]);
  });
});

describe("a sweep's CSV", () => {
  it("holds numbers and nothing that a person wrote", () => {
    const sweep = {
      frequencyHz: Float64Array.of(7e6, 7.1e6),
      magnitude: Float64Array.of(0.1, Number.NaN),
      gammaRe: Float64Array.of(-0.1, Number.NaN),
      gammaIm: Float64Array.of(0, Number.NaN),
      referenceOhm: 50,
    };
    const [head, ...lines] = toCsv(sweep as never)
      .trimEnd()
      .split("\r\n");
    expect(head).toMatch(/^[a-z_,]+$/);
    for (const line of lines) expect(line).toMatch(/^[-+.,\de]+$/);
    expect(lines[0].split(",")[4]).toBe("-0.1");
  });
});

/** RFC 4180, one line. */
function parse(line: string): string[] {
  const cells = line.match(/("(?:[^"]|"")*"|[^",]*)(?:,|$)/gs) ?? [];
  return cells
    .slice(0, line.endsWith(",") ? undefined : -1)
    .map((cell) => cell.replace(/,$/, ""))
    .map((cell) => (cell.startsWith('"') ? cell.slice(1, -1).replaceAll('""', '"') : cell));
}
