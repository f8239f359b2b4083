import type { Antenna, AntennaField, StepQuantity } from "../measurement/antenna.ts";
import { entryAt, pathOf } from "./antenna-changes.ts";

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
 * is taken from the person; what it says otherwise is a problem, and so is a part that was not there. Where a `stored`
 * quantity began was the antenna's word at that time, and gives way to what it says now.
 */
export function resolveQuantities(
  quantities: readonly StepQuantity[],
  antenna: Antenna | null,
  stored: readonly StepQuantity[] = [],
): { quantities: StepQuantity[]; problem: QuantityProblem | null } {
  const resolved: StepQuantity[] = [];
  for (const [index, quantity] of quantities.entries()) {
    const one = resolve(quantity, antenna, stored);
    if (typeof one === "string") return { quantities: [], problem: { index, message: one } };
    resolved.push(one);
  }
  return { quantities: resolved, problem: null };
}

/** The quantity, or what stands in its way. */
function resolve(
  quantity: StepQuantity,
  antenna: Antenna | null,
  stored: readonly StepQuantity[],
): StepQuantity | string {
  const { target, from, to } = quantity;
  if (!target) return quantity;
  if (!antenna) return NOT_DESCRIBED;
  const entry = entryAt(antenna, target);
  if (entry === undefined) return NO_PART;
  if (to === null) return "Say what it became.";
  const known = typeof entry === "number" ? entry : null;
  const isStored = stored.some(
    (one) => one.from === from && one.target && pathOf(one.target) === pathOf(target),
  );
  if (known !== null && from !== null && !isStored && Math.abs(from - known) > SAME * Math.abs(known)) {
    return `The antenna says ${plainly(known, target.field)} there, not ${plainly(from, target.field)}. Leave “from” empty, or set the antenna right first.`;
  }
  return { ...quantity, unit: FIELD_UNITS[target.field], from: known ?? from };
}

function plainly(value: number, field: AntennaField): string {
  return `${Number(value.toPrecision(5))} ${FIELD_UNITS[field]}`.trim();
}

/** Feet and inches are shown to an eighth of an inch, a fifth of a per cent of a metre and a half. */
const SAME = 0.002;
const NO_PART = "The antenna had no such part on that day.";
const NOT_DESCRIBED =
  "The antenna is not described for that day: describe it from an earlier day on first, or write the quantity in words.";
