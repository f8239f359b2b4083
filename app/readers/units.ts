import type { FrequencyUnit } from "../measurement/sweep.ts";

export const UNIT_HZ: Record<FrequencyUnit, number> = { Hz: 1, kHz: 1e3, MHz: 1e6, GHz: 1e9 };

/**
 * A frequency as a file gives it, in hertz. Decimal fractions are not exact in binary (8.2 times a million falls
 * short of 8,200,000): where the product is a rounding error away from a whole millihertz, that is what was meant.
 * NaN stays NaN.
 */
export function toHertz(value: number, factor: number): number {
  const hz = value * factor;
  const whole = Math.round(hz * 1000) / 1000;
  return Math.abs(whole - hz) <= Math.abs(hz) * ROUNDING ? whole : hz;
}

/** Two roundings: of the decimal number itself and of the product. */
const ROUNDING = 2 ** -52;
