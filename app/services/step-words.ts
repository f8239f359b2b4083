import type { StepQuantity } from "../measurement/antenna.ts";
import { formatLength, formatLengthChange, type LengthUnit } from "../measurement/lengths.ts";

/** "reed pole, length: 10.21 m → 10.04 m (−17 cm)"; what is not known is said. */
export function quantityText({ label, unit: own, from, to, target }: StepQuantity, unit: LengthUnit): string {
  if (target?.field === "lengthM" || target?.field === "heightM") {
    const change = from !== null && to !== null ? ` (${formatLengthChange(to - from, unit)})` : "";
    return `${label}: ${formatLength(from, unit)} → ${formatLength(to, unit)}${change}`;
  }
  const shown = (value: number | null) => (value === null ? "unknown" : String(Number(value.toPrecision(8))));
  const ending = own && own !== label ? `\u2009${own}` : "";
  return `${label}: ${shown(from)} → ${shown(to)}${ending}`;
}
