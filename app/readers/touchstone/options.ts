import type { FrequencyUnit } from "../../measurement/sweep.ts";
import { fail } from "../problem.ts";

export type Parameter = "S" | "Y" | "Z" | "H" | "G";
export type Format = "DB" | "MA" | "RI";

export interface Options {
  unit: FrequencyUnit;
  parameter: Parameter;
  format: Format;
  /** Ω; one value, or one a port (version 1.1 with several values behind R). */
  references: number[];
  /** What the line left to the defaults. */
  defaults: string[];
}

const UNITS: Record<string, FrequencyUnit> = { hz: "Hz", khz: "kHz", mhz: "MHz", ghz: "GHz" };
const EXPECTED = "expected Hz, kHz, MHz or GHz, S, Y, Z, H or G, DB, MA or RI, and R with a number of ohms";

/**
 * Reads an option line: every item optional, in any order and case; defaults GHz, S, MA, R 50.
 * Source: Touchstone File Format Specification 1.1, IBIS Open Forum, "Option Line"; several values behind R:
 * TSIRD 5.1. Fails with "option-line", "complex-reference" and "bad-reference", located.
 */
export function readOptions(text: string, line: number): Options {
  const found: Partial<Options> = {};
  const references: number[] = [];
  let sawR = false;
  for (const match of text.matchAll(/[^\s,]+/g)) {
    const column = (match.index ?? 0) + 1;
    for (const token of parted(match[0], column === 1)) {
      const word = token.toLowerCase();
      if (word === "#" || /^ohms?$|^Ω$/.test(word)) continue;
      if (word in UNITS) found.unit = UNITS[word];
      else if (/^[syzhg]$/.test(word)) found.parameter = token.toUpperCase() as Parameter;
      else if (/^(?:db|ma|ri)$/.test(word)) found.format = token.toUpperCase() as Format;
      else if (word === "r") sawR = true;
      else if (sawR && /^\(?[-+.\d]/.test(word)) references.push(reference(token, line, column));
      else
        fail("option-line", `Line ${line}, option line: "${token}" is not known; ${EXPECTED}.`, line, column);
    }
  }
  const defaults: string[] = [];
  if (!found.unit) defaults.push("GHz");
  if (!found.parameter) defaults.push("S-parameters");
  if (!found.format) defaults.push("magnitude and angle");
  if (references.length === 0) defaults.push("50 Ω");
  return {
    unit: found.unit ?? "GHz",
    parameter: found.parameter ?? "S",
    format: found.format ?? "MA",
    references: references.length > 0 ? references : [50],
    defaults,
  };
}

/** "#" and "R" may touch what follows them. */
function parted(token: string, first: boolean): string[] {
  const rest = first && token.startsWith("#") ? token.slice(1) : token;
  const words = rest === token ? [] : ["#"];
  const glued = rest.match(/^([rR])(\d.*)$/);
  if (glued) words.push(glued[1], glued[2]);
  else if (rest !== "") words.push(rest);
  return words;
}

function reference(token: string, line: number, column: number): number {
  if (/[ij)]/i.test(token))
    fail(
      "complex-reference",
      `Line ${line}: the reference impedance ${token} is complex; expected a real number of ohms. Export the file renormalised to a real impedance.`,
      line,
      column,
    );
  const ohm = Number(token);
  if (!(ohm > 0 && ohm < Infinity))
    fail(
      "bad-reference",
      `Line ${line}: expected a positive number of ohms behind R, found "${token}".`,
      line,
      column,
    );
  return ohm;
}
