import type { Antenna, AntennaField, StepQuantity } from "../measurement/antenna.ts";
import { entryAt } from "./antenna-changes.ts";

export interface QuantityProblem {
  /** Which quantity, from 0. */
  index: number;
  message: string;
}

/** The unit that a field of the antenna is kept in. */
export const FIELD_UNITS: Record<AntennaField, string> = {
  lengthM: "m",
  heightM: "m",
  count: "",
  diameterMm: "mm",
  turns: "turns",
};

/**
 * Quantities that point at the antenna, with what it said that day as where they began. What the antenna does not say
 * is taken from the person; what it says otherwise is a problem, and so is a part that was not there.
 */
export function resolveQuantities(
  quantities: readonly StepQuantity[],
  antenna: Antenna | null,
): { quantities: StepQuantity[]; problem: QuantityProblem | null } {
  const resolved: StepQuantity[] = [];
  for (const [index, quantity] of quantities.entries()) {
    const { target } = quantity;
    if (!target) {
      resolved.push(quantity);
      continue;
    }
    const entry = antenna ? entryAt(antenna, target) : undefined;
    if (!antenna || entry === undefined) return failed(index, antenna ? NO_PART : NOT_DESCRIBED);
    const known = typeof entry === "number" ? entry : null;
    const { from, to } = quantity;
    if (known !== null && from !== null && Math.abs(from - known) > SAME * Math.abs(known)) {
      return failed(
        index,
        `The antenna says ${plainly(known)} ${FIELD_UNITS[target.field]} there, not ${plainly(from)}. Leave “from” empty, or set the antenna right first.`,
      );
    }
    if (to === null) return failed(index, "Say what it became.");
    resolved.push({ ...quantity, unit: FIELD_UNITS[target.field], from: known ?? from });
  }
  return { quantities: resolved, problem: null };
}

function failed(index: number, message: string) {
  return { quantities: [], problem: { index, message } };
}

function plainly(value: number): string {
  return String(Number(value.toPrecision(5)));
}

/** Feet and inches are shown to an eighth of an inch, a fifth of a per cent of a metre and a half. */
const SAME = 0.002;
const NO_PART = "The antenna had no such part on that day.";
const NOT_DESCRIBED =
  "The antenna is not described for that day: describe it from an earlier day on first, or write the quantity in words.";
