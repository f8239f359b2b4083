import { describe, expect, it } from "vitest";
import { read } from "../../../app/readers/read.ts";
import type { Given } from "../../../app/readers/reading.ts";

const rows = (n: number, row: (i: number) => string) =>
  Array.from({ length: n }, (_, i) => row(i)).join("\n");
const readText = (text: string, given?: Given) =>
  read({ name: "a.csv", bytes: new TextEncoder().encode(text) }, given);

function sweepOf(text: string, given?: Given) {
  const result = readText(text, given);
  if (!result.ok) throw new Error(result.problem.message);
  return result;
}

describe("what can't be read", () => {
  it.each([
    ["nothing", "", "empty", 1, 1],
    ["blanks", " \n\n ", "empty", 1, 1],
    ["prose", "\nDear all,\nthe antenna is up.\n", "not-a-sweep", 2, 1],
    ["one column", rows(20, (i) => `-${i}.5`), "not-a-sweep", 1, 1],
    ["one row", "Frequency (MHz),SWR\n7.1,1.5\n", "not-a-sweep", 1, 1],
    [
      "a word among the values",
      `MHz,SWR\n${rows(20, (i) => `${7 + i},${i === 9 ? "1.x5" : "1.5"}`)}`,
      "bad-number",
      11,
      4,
    ],
    [
      "a word among the frequencies",
      `MHz;SWR\n${rows(20, (i) => `${i === 9 ? "7.x" : 7 + i};1.5`)}`,
      "bad-number",
      11,
      1,
    ],
    [
      "no column that can be a frequency",
      rows(20, (i) => `-${i % 3},-${(i * 7) % 5}`),
      "no-frequency-column",
      1,
      1,
    ],
  ])("%s", (_, text, code, line, column) => {
    const result = readText(text);
    expect(result).toMatchObject({ ok: false, problem: { code, line, column } });
    expect(!result.ok && result.problem.message).toMatch(/expected|Expected/);
  });

  it("says what was found instead of a number", () => {
    const result = readText(`MHz;SWR\n${rows(20, (i) => `${7 + i};${i === 9 ? "eins" : "1,5"}`)}`);
    expect(!result.ok && result.problem.message).toBe(
      'Line 11: expected a number (with a decimal comma) in column 2 of the table, found "eins".',
    );
  });

  it("asks for the 0 dB line of a level, and keeps the reading beside the question", () => {
    const text = `MHz,Level (dBm)\n${rows(30, (i) => `${7 + i / 10},${-10.4 - (i === 15 ? 20 : 0)}`)}`;
    const result = readText(text);
    expect(result).toMatchObject({
      ok: false,
      problem: { code: "zero-db-needed" },
      reading: {
        quantity: "level",
        questions: [{ id: "zero-db", proposed: null, choices: [{ value: "-10.4" }] }],
      },
    });
    const { sweep } = sweepOf(text, { text: { zeroDb: -10.4 } });
    expect(sweep.magnitude[0]).toBeCloseTo(1, 12);
    expect(sweep.magnitude[15]).toBeCloseTo(0.1, 12);
  });

  it.each([
    [{ valueColumn: 9 }, "no-such-column"],
    [{ frequencyColumn: 9 }, "no-such-column"],
    [{ quantity: "real-imaginary" as const }, "no-such-column"],
    [{ referenceOhm: -3 }, "bad-given"],
    [{ firstDataLine: 999 }, "not-a-sweep"],
  ])("refuses %j for a table of two columns", (text, code) => {
    expect(readText(`MHz,SWR\n${rows(9, (i) => `${7 + i},1.5`)}`, { text })).toMatchObject({
      ok: false,
      problem: { code },
    });
  });
});

describe("other kinds of file", () => {
  it.each([
    ["%PDF-1.7\n", "not-a-format", /PDF/],
    ["PK\x03\x04....", "not-a-format", /ZIP|spreadsheet/],
    ["<?xml version='1.0'?><svg xmlns='x'>", "not-a-format", /SVG/],
    ["<!doctype html><html>", "not-a-format", /markup/],
    ["\x1f\x8b\x08\x00abc", "not-a-format", /gzip/],
    ["\x7fELF\x02", "not-a-format", /program/],
    ["\x89PNG\r\n\x1a\n", "picture", /PNG/],
    ["\xff\xd8\xff\xe0", "picture", /JPEG/],
    ["RIFF\x00\x00\x00\x00WEBPVP8 ", "picture", /WebP/],
    ["\x00\x01\x02\x03\x04\x05\x06\x07\x08\x0e\x0f", "not-a-format", /not a text file/],
  ])("%j", (head, code, words) => {
    const result = read({ name: "a.csv", bytes: Uint8Array.from(head, (c) => c.charCodeAt(0)) });
    expect(result).toMatchObject({ ok: false, problem: { code } });
    expect(!result.ok && result.problem.message).toMatch(words);
  });
});

describe("what is assumed comes back", () => {
  it("the unit, the quantity and the reference of a bare table", () => {
    const { reading } = sweepOf(rows(60, (i) => `${7 + i / 100} ${(1.2 + Math.abs(i - 30) / 3).toFixed(3)}`));
    expect(reading.quantity).toBe("swr");
    expect(reading.assumed.join(" ")).toMatch(/taken as SWR.*MHz.*50 Ω/s);
    expect(reading.questions.map((q) => q.id)).toContain("quantity");
    expect(reading.confidence).toBeLessThan(0.75);
  });

  it("nothing but the reference of a table that says everything", () => {
    const { reading } = sweepOf(`Frequency (MHz),SWR\n${rows(30, (i) => `${7 + i / 10},${2 + i / 10}`)}`);
    expect(reading.assumed).toEqual(["The file names no reference impedance: 50 Ω."]);
    expect(reading.questions).toEqual([]);
    expect(reading.confidence).toBe(1);
  });

  it("the order of the points, repeats, rows left out", () => {
    const { reading, sweep } = sweepOf("MHz,SWR\n9,2\n8,3\n8,5\n,4\n7,2\n");
    expect([...sweep.frequencyHz]).toEqual([7e6, 8e6, 9e6]);
    expect(sweep.magnitude[1]).toBeCloseTo((0.5 + 2 / 3) / 2, 12);
    expect(reading.assumed.join(" ")).toMatch(
      /turned round.*repeats a frequency.*without a frequency left out \(line 5\)/s,
    );
  });
});

describe("values on the edge", () => {
  it("takes an SWR below 1 for a gap, infinite SWR for full reflection", () => {
    const { sweep, warnings } = sweepOf(
      `MHz,SWR\n7,inf\n8,1.5\n9,0.2\n10,0.999\n${rows(20, (i) => `${11 + i},3`)}`,
    );
    expect([sweep.magnitude[0], sweep.magnitude[1], sweep.magnitude[3]]).toEqual([1, 0.2, 0]);
    expect(sweep.magnitude[2]).toBeNaN();
    expect(warnings).toMatchObject([{ code: "swr-below-one" }]);
  });

  it("takes an infinite impedance for an open end", () => {
    const { sweep } = sweepOf(`MHz,R (ohm),X (ohm)\n7,inf,0\n${rows(20, (i) => `${8 + i},25,0`)}`);
    expect([sweep.gammaRe?.[0], sweep.gammaIm?.[0]]).toEqual([1, 0]);
    expect(sweep.gammaRe?.[1]).toBeCloseTo(-1 / 3, 12);
  });

  it("uses the magnitude alone where an angle has lost its sign", () => {
    const angle = (i: number) => Math.abs(Math.abs(170 - 12 * i) % 360);
    const text = `MHz,S11 (dB),Phase (deg)\n${rows(25, (i) => `${7 + i},-6,${angle(i)}`)}`;
    const { sweep, reading } = sweepOf(text);
    expect(sweep.gammaRe).toBeUndefined();
    expect(reading.assumed.join(" ")).toMatch(/without its sign/);
  });
});
