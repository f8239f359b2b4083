import type { AntennaField, StepQuantity } from "~/measurement/antenna";

/** A number of the antenna that a step changed; what it was the antenna knows. */
export function makes(part: string, field: AntennaField, label: string, to: number): StepQuantity {
  return { label, unit: UNITS[field], from: null, to, target: { part, field } };
}

/** Anything else that was counted or measured. */
export function counts(label: string, unit: string, from: number, to: number): StepQuantity {
  return { label, unit, from, to, target: null };
}

const UNITS: Record<AntennaField, string> = {
  lengthM: "m",
  heightM: "m",
  count: "",
  diameterMm: "mm",
  turns: "turns",
};
