import { describe, expect, it } from "vitest";
import { read } from "../../../app/readers/read.ts";
import { angleDeg, at, magnitude, type Point, s11Db, swr, VHF } from "../make-fixtures/model.ts";

/** An invented dip that fills the sweep, so that neither crest shows: the hardest case for guesses. */
const NARROW = Array.from({ length: 61 }, (_, i) => at(VHF, 140 + i * 0.2));
const c = (value: number, digits = 3) => value.toFixed(digits).replace(".", ",");
const db = (p: Point) => s11Db(p).toFixed(3);

const DIALECTS: [string, string, (p: Point, i: number) => string][] = [
  [
    "a title with as many cells as the table",
    "My antenna,third try\nFrequency,S11\nMHz,dB",
    (p) => `${p.mhz.toFixed(2)},${db(p)}`,
  ],
  [
    "commas inside the headings",
    "Frequency, MHz;Return loss, dB",
    (p) => `${p.mhz.toFixed(2)};${(-s11Db(p)).toFixed(3)}`,
  ],
  [
    "headings parted by a tab, rows by blanks",
    "Frequency (MHz)\tS11 (dB)",
    (p) => `${p.mhz.toFixed(2)}   ${db(p)}`,
  ],
  ["German dates", "Datum;Uhrzeit;Frequenz (MHz);SWR", (p) => `04.05.2031;10:00:07;${c(p.mhz)};${c(swr(p))}`],
  ["bare whole kilohertz and SWR", "", (p) => `${(p.mhz * 1e3).toFixed(0)} ${swr(p).toFixed(2)}`],
  [
    "a preamble of keys that look like headings",
    "Start Frequency: 140\nStop Frequency: 152\nUnit: MHz\nSWR data",
    (p) => `${p.mhz.toFixed(1)}, ${swr(p).toFixed(2)}`,
  ],
  [
    "names with underscores",
    "freq_hz,return_loss_db",
    (p) => `${(p.mhz * 1e6).toFixed(0)},${(-s11Db(p)).toFixed(3)}`,
  ],
  ["names run together", "frequencyMHz,returnLossDb", (p) => `${p.mhz.toFixed(2)},${(-s11Db(p)).toFixed(3)}`],
  ["a linear S11", "Frequency (MHz),S11 (lin)", (p) => `${p.mhz.toFixed(2)},${magnitude(p).toFixed(4)}`],
  [
    "a magnitude that is in decibels, with phase",
    "Frequency,Magnitude,Phase",
    (p) => `${(p.mhz * 1e6).toFixed(0)},${s11Db(p).toFixed(4)},${angleDeg(p).toFixed(2)}`,
  ],
  [
    "real and imaginary impedance",
    "Frequency (MHz),Z Re,Z Im",
    (p) => `${p.mhz.toFixed(2)},${p.r.toFixed(2)},${p.x.toFixed(2)}`,
  ],
  [
    "units in words",
    "Frequenz in MHz;Rückflussdämpfung in dB;Phase in Grad",
    (p) => `${c(p.mhz)};${c(-s11Db(p))};${c(angleDeg(p))}`,
  ],
  [
    "a reflection coefficient in decibels, French",
    "Fréquence (MHz);Coefficient de réflexion (dB)",
    (p) => `${c(p.mhz)};${c(s11Db(p))}`,
  ],
  [
    "a linear reflection coefficient, Spanish",
    "Frecuencia (MHz);Coeficiente de reflexión",
    (p) => `${c(p.mhz)};${c(magnitude(p), 4)}`,
  ],
  [
    "index, glued unit and ratio at once",
    "Point\tFrequency\tSWR",
    (p, i) => `${i}\t${p.mhz.toFixed(2)} MHz\t${swr(p).toFixed(3)}:1`,
  ],
  ["an empty column between", "Frequency (MHz);;S11 (dB)", (p) => `${c(p.mhz)};;${c(s11Db(p))}`],
  ["two tabs between", "MHz\t\tSWR", (p) => `${p.mhz.toFixed(2)}\t\t${swr(p).toFixed(3)}`],
];

describe("dialects", () => {
  it.each(DIALECTS)("reads %s", (_, head, row) => {
    const text = `${head === "" ? "" : `${head}\n`}${NARROW.map(row).join("\n")}\n`;
    const result = read({ name: "a.csv", bytes: new TextEncoder().encode(text) });
    if (!result.ok) throw new Error(result.problem.message);
    expect(result.sweep.frequencyHz).toHaveLength(NARROW.length);
    expect(result.sweep.frequencyHz[0]).toBeCloseTo(140e6, 0);
    for (const [i, p] of NARROW.entries())
      expect(Math.abs(result.sweep.magnitude[i] - magnitude(p))).toBeLessThan(5e-3);
  });

  it("does not guess where the comma is delimiter and decimal mark at once", () => {
    const text = `Frequenz,S11\n${NARROW.map((p) => `${c(p.mhz, 2)},${c(s11Db(p))}`).join("\n")}\n`;
    const result = read({ name: "a.csv", bytes: new TextEncoder().encode(text) });
    expect(result).toMatchObject({ ok: false, problem: { code: "ambiguous-comma", line: 2 } });
  });

  it("says that a table without a reflection has none", () => {
    const text = `Frequency (MHz),Reflected power (%)\n${NARROW.map((p) => `${p.mhz.toFixed(2)},${(100 * magnitude(p) ** 2).toFixed(2)}`).join("\n")}\n`;
    const result = read({ name: "a.csv", bytes: new TextEncoder().encode(text) });
    expect(result).toMatchObject({ ok: false, problem: { code: "no-value-column", line: 2 } });
  });

  it.each([
    ["a table", "Z0;75;Ohm\nMHz;SWR\n", 75],
    ["a comment", "# system impedance: 75 ohm\nMHz;SWR\n", 75],
    ["a heading", "MHz;SWR (Z0=60)\n", 60],
    ["nothing", "MHz;SWR\n", 50],
  ])("takes the reference impedance that %s names", (_, head, ohm) => {
    const text = head + NARROW.map((p) => `${c(p.mhz)};${c(swr(p))}`).join("\n");
    const result = read({ name: "a.csv", bytes: new TextEncoder().encode(text) });
    expect(result.ok && result.sweep.referenceOhm).toBe(ohm);
  });
});
