import type { Antenna, QuantityTarget, StepQuantity } from "~/measurement/antenna";
import type { LengthUnit } from "~/measurement/lengths";
import { lengthInField } from "~/routes/antenna/sizes";
import { entriesOf, pathOf } from "~/services/antenna-changes";
import { entryLabel, entryText } from "~/services/antenna-words";
import { FIELD_UNITS } from "~/services/step-quantities";
import type { ReadQuantity } from "./steps.schema";

export type QuantityTexts = Partial<Record<"target" | "label" | "unit" | "from" | "to", string>>;

export interface StepTexts {
  title: string;
  body: string;
  state: string;
  at: string;
  quantities: QuantityTexts[];
}

export interface TargetOption {
  value: string;
  label: string;
}

/** Everything of the antenna that a step can point at, with what it is now. */
export function targetOptions(antenna: Antenna, unit: LengthUnit): TargetOption[] {
  const fields = (part: string, names: QuantityTarget["field"][]) => names.map((field) => ({ part, field }));
  const targets: QuantityTarget[] = [
    ...antenna.elements.flatMap(({ key }) => fields(key, ["lengthM", "heightM", "count", "diameterMm"])),
    ...fields("feedline", ["lengthM"]),
    ...fields("choke", ["turns"]),
  ];
  const entries = entriesOf(antenna);
  return targets.map((target) => {
    const path = pathOf(target);
    return {
      value: path,
      label: `${entryLabel(path, antenna)} (${entryText(path, entries[path] ?? null, unit)})`,
    };
  });
}

/** A stored step as its form's fields show it. */
export function textsOf(
  step: { title: string; body: string; state: string; at: Date | null; quantities: StepQuantity[] },
  unit: LengthUnit,
): StepTexts {
  return {
    title: step.title,
    body: step.body,
    state: step.state,
    at: step.at?.toISOString().slice(0, 16) ?? "",
    quantities: step.quantities.map(({ label, unit: own, from, to, target }) => ({
      target: target ? pathOf(target) : "",
      label: target ? "" : label,
      unit: target ? "" : own,
      from: target ? "" : numberText(from, null, unit),
      to: numberText(to, target, unit),
    })),
  };
}

/**
 * Quantities with the words of what they point at. One that shows as it was stored stays what it was: showing rounds,
 * and where it began is the antenna's to say.
 */
export function quantitiesFrom(
  read: readonly ReadQuantity[],
  antenna: Antenna | null,
  unit: LengthUnit,
  stored: readonly StepQuantity[] = [],
): StepQuantity[] {
  return read.map((quantity) => {
    const { target } = quantity;
    if (!target) return quantity;
    const before = stored.find((one) => one.target && pathOf(one.target) === pathOf(target));
    if (before && quantity.from === null && toText(before, unit) === toText(quantity, unit)) return before;
    const label = antenna ? entryLabel(pathOf(target), antenna) : (before?.label ?? pathOf(target));
    return { ...quantity, label, unit: FIELD_UNITS[target.field] };
  });
}

/** The fields as they were sent, so that nothing that was typed is lost. */
export function sentStep(payload: Record<string, unknown>): StepTexts & { was: string } {
  const sent = payload as Partial<StepTexts & { was: string }>;
  return {
    title: String(sent.title ?? ""),
    body: String(sent.body ?? ""),
    state: String(sent.state ?? "done"),
    at: String(sent.at ?? ""),
    was: String(sent.was ?? ""),
    quantities: rowsOf(sent.quantities),
  };
}

/** Rows as a form sends them, or as one field does; none where it makes no sense. */
export function rowsOf(sent: unknown): QuantityTexts[] {
  try {
    const rows: unknown = typeof sent === "string" ? JSON.parse(sent) : sent;
    return Array.isArray(rows) ? rows.map((row) => row ?? {}) : [];
  } catch {
    return [];
  }
}

function toText({ to, target }: StepQuantity, unit: LengthUnit): string {
  return numberText(to, target, unit);
}

function numberText(value: number | null, target: QuantityTarget | null, unit: LengthUnit): string {
  if (value === null) return "";
  if (target?.field === "lengthM" || target?.field === "heightM") return lengthInField(value, unit);
  return String(Number(value.toPrecision(8)));
}
