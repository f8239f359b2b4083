import { execFileSync } from "node:child_process";
import { describe, expect, it } from "vitest";
import { csvLine, textCell } from "~/services/csv-cells";
import { toCsv } from "~/services/exports.server";
import { EVASIONS, FORMULAS } from "../fixtures/hostile/evasions.ts";

describe("a cell of CSV", () => {
  it("is no formula, whatever the text, and stays one cell", () => {
    const texts = [...FORMULAS, ...EVASIONS.map(([, text]) => text.replaceAll("\u0000", ""))];
    const rows = parse(texts.map((text) => csvLine([textCell(text), "1"])).join(""));
    expect(rows.map((row) => row.length)).toEqual(texts.map(() => 2));
    for (const [i, [cell]] of rows.entries()) {
      expect([texts[i], `'${texts[i]}`]).toContain(cell);
      expect(cell).not.toMatch(/^[=+\-@\t\r\n＝＋－＠]/);
      if (i < FORMULAS.length) expect(cell).toBe(`'${texts[i]}`);
    }
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

function parse(csv: string): string[][] {
  const code =
    "import csv,io,json,sys;print(json.dumps(list(csv.reader(io.StringIO(sys.stdin.buffer.read().decode(),newline='')))))";
  return JSON.parse(execFileSync("/usr/bin/python3", ["-c", code], { input: csv }).toString());
}
