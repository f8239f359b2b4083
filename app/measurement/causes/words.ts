import { formatFrequency, formatPercent, formatWidth } from "../units.ts";
import type { Standing } from "./rank.ts";

/** "; the dip is 120 kHz (1.2 %) above, within ±2.1 %". */
export function offsetWords({ offsetHz, toleranceHz }: Standing, predictedHz: number): string {
  const share = Math.abs(offsetHz) / predictedHz;
  const tolerance = `±${formatPercent(toleranceHz / predictedHz)}`;
  const within =
    Math.abs(offsetHz) <= toleranceHz ? `within the usual ${tolerance}` : `more than the usual ${tolerance}`;
  if (share < 5e-4) return "; the dip is there";
  const size = formatWidth(Number(Math.abs(offsetHz).toPrecision(2)));
  return `; the dip is ${size} (${formatPercent(share)}) ${offsetHz > 0 ? "above" : "below"}, ${within}`;
}

/** A shift with its sign, to the kilohertz that matters: "−0.9 MHz", "nothing". */
export function shiftWords(shiftHz: number): string {
  if (shiftHz === 0) return "nothing";
  const text = formatFrequency(Number(Math.abs(shiftHz).toPrecision(2)));
  return `${shiftHz > 0 ? "+" : "−"}${text}`;
}
