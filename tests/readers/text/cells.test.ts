import { describe, expect, it } from "vitest";
import { cellColumn, parseCell, splitCells, type Writing } from "../../../app/readers/text/cells.ts";

const POINT: Writing = { decimal: ".", thousands: "" };
const COMMA: Writing = { decimal: ",", thousands: "" };

const shown = (text: string, writing = POINT) => {
  const cell = parseCell(text, writing);
  return cell.kind === "number" ? cell.value : cell.kind;
};

describe("parseCell", () => {
  it.each([
    ["7.1", 7.1],
    ["-12.50", -12.5],
    ["+3", 3],
    [".5", 0.5],
    ["5.", 5],
    ["1.5E+06", 1.5e6],
    ["1.5d-3", 1.5e-3],
    ["\u22123.5", -3.5],
    ["\u2013 3.5", -3.5],
    ["inf", Infinity],
    ["-Infinity", -Infinity],
    ["∞", Infinity],
    ["1.05:1", 1.05],
    ["1.05 : 1", 1.05],
    [">99.9", 99.9],
    ["33.3 %", 0.333],
    ["7.1 MHz", 7.1],
    ["-12.3dB", -12.3],
    ["50 Ω", 50],
    ["0.5 kΩ", 0.5],
  ])("reads %s", (text, value) => {
    expect(shown(text)).toBeCloseTo(value as number, 12);
  });

  it.each([
    "",
    " ",
    "NaN",
    "nan",
    "-",
    "--",
    "---",
    "–",
    "n/a",
    "N/A",
    "#N/A",
    "#NV",
    "null",
    "OL",
    "O.L",
    "*",
    "?",
    "-.--",
    "1.#IND",
    "1.#QNAN",
    "over",
  ])("takes %j as a gap", (text) => {
    expect(shown(text)).toBe("gap");
  });

  it.each(["abc", "7.1.2", "1,5", "7.1 furlong", "0x10", "1e", "--1", "12:30:05", "2031-05-04", "7,1"])(
    "takes %s for no number",
    (text) => {
      expect(shown(text)).toBe("text");
    },
  );

  it.each([
    ["7,1", COMMA, 7.1],
    ["1.234,5", { decimal: ",", thousands: "." }, 1234.5],
    ["7.100.000", { decimal: ",", thousands: "." }, 7.1e6],
    ["1,234,567.5", { decimal: ".", thousands: "," }, 1234567.5],
    ["1'234'567", { decimal: ".", thousands: "'" }, 1234567],
    ["1’234", { decimal: ".", thousands: "'" }, 1234],
    ["7\u00a0100,5", { decimal: ",", thousands: " " }, 7100.5],
    ["7\u202f100", { decimal: ",", thousands: " " }, 7100],
    ["1,05:1", COMMA, 1.05],
    ["-12,3 dB", COMMA, -12.3],
  ] as [string, Writing, number][])("reads %s with its marks", (text, writing, value) => {
    expect(shown(text, writing)).toBeCloseTo(value, 12);
  });

  it("does not take groups of the wrong size for thousands", () => {
    expect(shown("1,23,456", { decimal: ".", thousands: "," })).toBe("text");
    expect(shown("1000,", COMMA)).toBe("text");
  });
});

describe("splitCells", () => {
  it("keeps delimiters, quotes and blanks inside quotes (RFC 4180)", () => {
    expect(splitCells('a,"b,c","d ""e"""', ",")).toEqual(["a", "b,c", 'd "e"']);
    expect(splitCells('"x";;" y "', ";")).toEqual(["x", "", " y "]);
  });

  it("leaves a quote alone that closes nothing", () => {
    expect(splitCells('5" pipe,3', ",")).toEqual(['5" pipe', "3"]);
    expect(splitCells('"open,3', ",")).toEqual(['"open', "3"]);
  });

  it("parts at runs of blanks and keeps a unit with its number", () => {
    expect(splitCells("  7.1 MHz \t -12.3 dB ", " ")).toEqual(["7.1 MHz", "-12.3 dB"]);
  });

  it("says at which column a cell begins", () => {
    expect(cellColumn("7.1;abc", ";", 1)).toBe(5);
    expect(cellColumn("  7.1   abc", " ", 1)).toBe(9);
    expect(cellColumn('"7,1","x"', ",", 1)).toBe(8);
  });
});
