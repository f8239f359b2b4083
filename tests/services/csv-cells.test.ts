import { execFileSync } from "node:child_process";
import { expect, test } from "vitest";
import { csvLine, numberCell, textCell } from "~/services/csv-cells";

test("texts that would be taken for formulas get an apostrophe, numbers stay numbers", () => {
  for (const first of ["=", "+", "-", "@", "\t", "\r"]) {
    expect(textCell(`${first}cmd`).replace(/^"/, "")).toMatch(/^'/);
  }
  expect(textCell("7.1 MHz = dip")).toBe("7.1 MHz = dip");
  expect(numberCell(-12.5)).toBe("-12.5");
  expect(numberCell(0)).toBe("0");
  expect([
    numberCell(null),
    numberCell(Number.POSITIVE_INFINITY),
    numberCell(Number.NaN),
    textCell(null),
  ]).toEqual(["", "", "", ""]);
});

test("another reader of CSV gets the same cells back", () => {
  const texts = ['say "reed", then', "two\r\nlines", "plain", "ünï – 北", " kept "];
  const answer = execFileSync(
    "/usr/bin/python3",
    [
      "-c",
      "import csv,io,json,sys;print(json.dumps(list(csv.reader(io.StringIO(sys.stdin.buffer.read().decode(),newline='')))))",
    ],
    { input: csvLine(texts.map(textCell)) },
  );
  expect(JSON.parse(answer.toString())).toEqual([texts]);
});
