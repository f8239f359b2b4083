import type { FrequencyUnit } from "../../measurement/sweep.ts";
import { UNIT_HZ } from "../units.ts";
import type { Column } from "./columns.ts";
import { plain } from "./headings.ts";

export interface UnitFound {
  unit: FrequencyUnit;
  /** A sentence where it had to be inferred, null where the file says it. */
  assumed: string | null;
  confidence: number;
}

/** Columns that hold frequencies, best first; empty where none can. */
export function frequencyColumns(columns: Column[]): Column[] {
  const named = columns.filter((c) => c.heading.role === "frequency" && c.filled > 0 && c.minimum >= 0);
  if (named.length > 0) return named;
  const glued = columns.filter((c) => c.unit !== null && /hz$/.test(c.unit));
  if (glued.length > 0) return glued;
  const able = columns.filter((c) => c.filled > 0.5 && c.minimum >= 0 && c.heading.role === "unknown");
  const ordered = able.filter((c) => c.direction !== 0 && c.maximum > c.minimum);
  const real = ordered.filter((c) => !isCounter(c));
  if (real.length > 0) return real.slice(0, 1);
  if (ordered.length > 0) return ordered.slice(0, 1);
  return able.filter((c) => c.index === 0 && new Set(c.values).size > c.values.length / 2);
}

/** Says the unit of a frequency column: heading, glued unit, preamble, else from the size of the numbers. */
export function frequencyUnit(column: Column, preamble: string[]): UnitFound {
  if (column.heading.frequencyUnit)
    return { unit: column.heading.frequencyUnit, assumed: null, confidence: 1 };
  const glued = unitNamed(column.unit ?? "");
  if (glued) return { unit: glued, assumed: null, confidence: 1 };
  return fromPreamble(column, preamble) ?? fromSize(column);
}

/** The counting column of a table: whole numbers in steps of one from 0 or 1. */
export function isCounter(column: Column): boolean {
  return (
    column.integers &&
    column.direction === 1 &&
    column.minimum <= 1 &&
    column.values.slice(0, 5).every((v, i, all) => i === 0 || v - all[i - 1] === 1)
  );
}

function unitNamed(text: string): FrequencyUnit | null {
  const match = text.match(/^\s*([kmg]?)hz/i);
  if (!match) return null;
  return ({ "": "Hz", k: "kHz", m: "MHz", g: "GHz" } as const)[
    match[1].toLowerCase() as "" | "k" | "m" | "g"
  ];
}

/** A line "Start … Stop" or "Frequency unit" says the unit directly, or by a value equal to the column's ends. */
function fromPreamble(column: Column, preamble: string[]): UnitFound | null {
  for (const raw of preamble) {
    const line = plain(raw);
    const named = line.match(
      /\b(?:freq\w*|frec\w*|x) ?(?:unit|axis|einheit|unite|unidad|unita|eenheid)\w* ([kmg]?)hz\b/,
    );
    if (named) return { unit: unitNamed(`${named[1]}hz`) ?? "Hz", assumed: null, confidence: 0.97 };
  }
  for (const raw of preamble) {
    const line = plain(raw.replace(/(\d),(\d)/g, "$1.$2")).replace(/(\d)\.(?=\s|$)/g, "$1");
    if (
      !/\b(?:start|stop|span|center|centre|von|bis|debut|fin|inicio|inizio|fine|begin|eind|from|to|mitte)/.test(
        line,
      )
    )
      continue;
    for (const m of raw
      .replace(/(\d),(\d)/g, "$1.$2")
      .matchAll(/([\d.]+(?:e[+-]?\d+)?)[\s,;"\t]*([kmg]?)hz/gi)) {
      const hz = Number(m[1]) * UNIT_HZ[unitNamed(`${m[2]}hz`) ?? "Hz"];
      for (const unit of ["Hz", "kHz", "MHz", "GHz"] as const)
        for (const end of [column.values[0], column.values[column.values.length - 1]])
          if (end > 0 && Math.abs(end * UNIT_HZ[unit] - hz) < 0.002 * hz)
            return {
              unit,
              assumed: `The frequency column names no unit: ${unit}, because the file's line "${raw.trim().slice(0, 60)}" fits it.`,
              confidence: 0.95,
            };
    }
  }
  return null;
}

/** Ranges in use on the air: whole numbers of hertz are huge, gigahertz are small. */
function fromSize({ minimum, maximum, integers }: Column): UnitFound {
  const because = (unit: FrequencyUnit, confidence: number): UnitFound => ({
    unit,
    assumed: `The file names no frequency unit: ${unit}, from the size of the numbers (${minimum} to ${maximum}).`,
    confidence,
  });
  if (maximum >= 1e6) return because("Hz", 0.9);
  if (maximum > 6500) return because("kHz", 0.8);
  if (maximum >= 1000)
    return integers && minimum < 5000 && maximum < 4500 && minimum >= 1000
      ? because("kHz", 0.4)
      : because("MHz", 0.5);
  if (maximum > 6) return because("MHz", 0.85);
  if (maximum < 1) return because("GHz", 0.6);
  const gigahertz = [
    [1.2, 1.35],
    [2.2, 2.6],
    [5, 6],
  ].some(([low, high]) => minimum >= low && maximum <= high);
  return gigahertz ? because("GHz", 0.4) : because("MHz", 0.6);
}
