import { readdirSync, readFileSync } from "node:fs";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { read } from "../../app/readers/read.ts";
import type { Given, ReadResult } from "../../app/readers/reading.ts";
import { FOLDER } from "./make-fixtures/write.ts";

/** Far more than a file of this size takes; a reader that hangs exceeds it a thousandfold. */
const MOST_MS = 10_000;
const NAMES = ["x.csv", "x.txt", "x.s1p", "x.s2p", "x.s4p", "x.ts", "x"];

function readWithin(name: string, bytes: Uint8Array, given?: Given): ReadResult {
  const start = performance.now();
  const result = read({ name, bytes }, given);
  expect(performance.now() - start).toBeLessThan(MOST_MS);
  return result;
}

/** A sweep as promised, or a problem that says what and where. */
function expectOutcome(result: ReadResult): void {
  if (!result.ok) {
    expect(result.problem.code).toMatch(/^[a-z-]+$/);
    expect(result.problem.message.length).toBeGreaterThan(15);
    if (result.problem.line !== undefined) expect(result.problem.line).toBeGreaterThanOrEqual(1);
    if (result.problem.column !== undefined) expect(result.problem.column).toBeGreaterThanOrEqual(1);
    return;
  }
  const { frequencyHz, magnitude, gammaRe, gammaIm, referenceOhm } = result.sweep;
  expect(frequencyHz.length).toBeGreaterThanOrEqual(1);
  expect(magnitude).toHaveLength(frequencyHz.length);
  if (gammaRe) expect(gammaRe).toHaveLength(frequencyHz.length);
  expect(gammaRe === undefined).toBe(gammaIm === undefined);
  expect(referenceOhm).toBeGreaterThan(0);
  let sound = true;
  for (let i = 0; i < frequencyHz.length; i++) {
    sound &&= Number.isFinite(frequencyHz[i]) && frequencyHz[i] >= 0;
    sound &&= i === 0 || frequencyHz[i] > frequencyHz[i - 1];
    sound &&= magnitude[i] >= 0 || Number.isNaN(magnitude[i]);
  }
  expect(sound).toBe(true);
  expect(result.reading.confidence).toBeGreaterThanOrEqual(0);
  expect(result.reading.confidence).toBeLessThanOrEqual(1);
}

const files = readdirSync(FOLDER)
  .filter((name) => name.endsWith(".json"))
  .map((name) => name.slice(0, -5));
const contents = new Map(files.map((name) => [name, new Uint8Array(readFileSync(FOLDER + name))]));

describe("any bytes", () => {
  it("of any kind end in a sweep or a located problem", () => {
    fc.assert(
      fc.property(fc.uint8Array({ maxLength: 3000 }), fc.constantFrom(...NAMES), (bytes, name) =>
        expectOutcome(readWithin(name, bytes)),
      ),
      { numRuns: 500 },
    );
  });

  it("made of the characters of tables end in a sweep or a located problem", () => {
    const piece = fc.constantFrom(
      ..."0123456789.,;:-+eE\t\n\r #!%\"'[]()RSMAIDBZ/*".split(""),
      "\n",
      "\n",
      "NaN",
      "MHz",
      "dB",
      "7.1",
      "-12.5",
      "1e308",
      "-1e-308",
      "9".repeat(400),
      "# MHz S RI R 50\n",
      "[Version] 2.0\n",
      "[Number of Ports] 2\n",
      "[Network Data]\n",
      "[Reference]",
      "Frequency (MHz),SWR\n",
      "∞",
      "\u2212",
      "\u00a0",
      "\ufeff",
      "Γ",
    );
    fc.assert(
      fc.property(fc.array(piece, { maxLength: 400 }), fc.constantFrom(...NAMES), (pieces, name) =>
        expectOutcome(readWithin(name, new TextEncoder().encode(pieces.join("")))),
      ),
      { numRuns: 1500 },
    );
  });

  it("made of rows of odd numbers end in a sweep or a located problem", () => {
    const number = fc.oneof(
      fc.double().map(String),
      fc.integer().map(String),
      fc.double({ min: -200, max: 200 }).map((v) => v.toFixed(3).replace(".", ",")),
      fc.constantFrom(
        "",
        "-",
        "NaN",
        "inf",
        "1:1",
        ">99",
        "1'000",
        "1.000.000",
        "0x10",
        "1e",
        "--1",
        "5 MHz",
      ),
    );
    const row = fc.array(number, { minLength: 1, maxLength: 5 });
    fc.assert(
      fc.property(
        fc.array(row, { maxLength: 60 }),
        fc.constantFrom(",", ";", "\t", " "),
        fc.constantFrom(...NAMES),
        (rows, delimiter, name) =>
          expectOutcome(
            readWithin(name, new TextEncoder().encode(rows.map((r) => r.join(delimiter)).join("\n"))),
          ),
      ),
      { numRuns: 1500 },
    );
  });

  it("of a good file with some of them changed end in a sweep or a located problem", () => {
    const change = fc.record({
      at: fc.nat(),
      kind: fc.constantFrom("set", "cut", "drop", "double"),
      byte: fc.oneof(fc.nat(255), fc.constantFrom(...[...'\n\r",;.-e# !\0'].map((c) => c.charCodeAt(0)))),
    });
    fc.assert(
      fc.property(
        fc.constantFrom(...files),
        fc.array(change, { minLength: 1, maxLength: 8 }),
        (name, changes) => {
          let bytes = (contents.get(name) as Uint8Array).slice();
          for (const { at, kind, byte } of changes) {
            const i = at % Math.max(bytes.length, 1);
            if (kind === "set") bytes[i] = byte;
            else if (kind === "cut") bytes = bytes.slice(0, i);
            else if (kind === "drop")
              bytes = Uint8Array.from([...bytes.slice(0, i), ...bytes.slice(i + 1 + (byte % 40))]);
            else bytes = Uint8Array.from([...bytes.slice(0, i), ...bytes.slice(Math.max(0, i - byte))]);
          }
          expectOutcome(readWithin(name, bytes));
        },
      ),
      { numRuns: 400 },
    );
  });

  it("with any choices given end in a sweep or a located problem", () => {
    const text = fc.record(
      {
        encoding: fc.constantFrom(
          "utf-8" as const,
          "utf-16le" as const,
          "utf-16be" as const,
          "latin1" as const,
        ),
        delimiter: fc.constantFrom("," as const, ";" as const, "\t" as const, " " as const),
        decimal: fc.constantFrom("." as const, "," as const),
        thousands: fc.constantFrom("" as const, "." as const, "," as const, " " as const, "'" as const),
        headerLine: fc.integer({ min: -2, max: 300 }),
        firstDataLine: fc.integer({ min: -2, max: 400 }),
        frequencyColumn: fc.integer({ min: -1, max: 5 }),
        valueColumn: fc.integer({ min: -1, max: 5 }),
        secondColumn: fc.option(fc.integer({ min: -1, max: 5 })),
        frequencyUnit: fc.constantFrom("Hz" as const, "kHz" as const, "MHz" as const, "GHz" as const),
        quantity: fc.constantFrom(
          "s11-db" as const,
          "return-loss" as const,
          "swr" as const,
          "level" as const,
          "magnitude" as const,
          "magnitude-angle" as const,
          "db-angle" as const,
          "real-imaginary" as const,
          "resistance-reactance" as const,
          "impedance-angle" as const,
        ),
        angleUnit: fc.constantFrom("deg" as const, "rad" as const),
        referenceOhm: fc.double(),
        zeroDb: fc.option(fc.double({ min: -300, max: 300 })),
      },
      { requiredKeys: [] },
    );
    fc.assert(
      fc.property(fc.constantFrom(...files), text, (name, given) =>
        expectOutcome(readWithin(name, contents.get(name) as Uint8Array, { text: given })),
      ),
      { numRuns: 400 },
    );
  });
});
