import { z } from "zod";
import { formatLength, type LengthUnit, parseLength } from "~/measurement/lengths";

/** A size that was read, with a question to put before it is taken. Null is "not said". */
export interface Sized {
  value: number | null;
  ask: string | null;
}

/** The person's setting; a visitor reads metres. */
export function lengthUnitOf(person: { lengthUnit: "m" | "ft" } | null): LengthUnit {
  return person?.lengthUnit === "ft" ? "feet" : "metres";
}

/** A length in metres or feet; empty is not said, zero and less are refused. */
export function lengthField(unit: LengthUnit) {
  return sizeField(unit, false);
}

/** A height above ground: zero is on the ground. */
export function heightField(unit: LengthUnit) {
  return sizeField(unit, true);
}

function sizeField(unit: LengthUnit, zero: boolean) {
  return z
    .string()
    .trim()
    .max(40, "At most 40 characters.")
    .optional()
    .transform((text, context): Sized => {
      if (!text) return { value: null, ask: null };
      if (zero && ZERO.test(text)) return { value: 0, ask: null };
      const parsed = parseLength(text, unit);
      if (parsed.ok) return { value: parsed.metres, ask: parsed.ask };
      context.addIssue({ code: "custom", message: parsed.message });
      return z.NEVER;
    });
}

/** Millimetres, or a length with its unit. */
export function diameterField() {
  return z
    .string()
    .trim()
    .max(40, "At most 40 characters.")
    .optional()
    .transform((text, context): number | null => {
      if (!text) return null;
      const read = readDiameter(text);
      if (typeof read === "number") return read;
      context.addIssue({ code: "custom", message: read });
      return z.NEVER;
    });
}

/** Millimetres, or what is wrong. A thin wire is no short antenna: nothing is asked about it. */
export function readDiameter(text: string): number | string {
  const parsed = parseLength(/[a-z'"]/i.test(text) ? text : `${text} mm`);
  if (!parsed.ok) return parsed.message;
  return parsed.metres < MOST_DIAMETER_M ? parsed.metres * 1000 : "A diameter under a metre.";
}

export function wholeField(most: number) {
  return z
    .string()
    .trim()
    .optional()
    .transform((text) => (text ? Number(text) : null))
    .refine(
      (value) => value === null || (Number.isInteger(value) && value >= 1 && value <= most),
      `A whole number from 1 to ${most}.`,
    );
}

/** As a field shows it; the same text back means the same length. */
export function lengthInField(metres: number | null, unit: LengthUnit): string {
  return metres === null ? "" : metres === 0 ? "0" : formatLength(metres, unit).replaceAll("\u2009", " ");
}

const ZERO = /^0+([.,]0*)?\s*(m|ft)?$/;
const MOST_DIAMETER_M = 1;
