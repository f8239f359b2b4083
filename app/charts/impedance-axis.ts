/** Value axes for ohms, close around zero and drawn together far out, and for degrees. */
import type { ValueTick } from "./value-axis.ts";

export interface LineAxis {
  /** px from the plot's top, not clamped. */
  yOf: (value: number) => number;
  ticks: ValueTick[];
}

/**
 * Ohms of both signs: nearly even up to half the reference, by ratios beyond it (asinh), so that a resonance and the kilohms beside it
 * both have room. `values` are what is drawn; NaN is left out, what lies beyond the last tick is off the scale.
 */
export function ohmAxis(
  values: readonly ArrayLike<number>[],
  referenceOhm: number,
  heightPx: number,
): LineAxis {
  const [lowest, highest] = extremes(values);
  const top = OHMS.find((tick) => tick >= highest) ?? OHMS[OHMS.length - 1];
  const bottom = lowest >= 0 ? 0 : -(OHMS.find((tick) => tick >= -lowest) ?? OHMS[OHMS.length - 1]);
  const bend = (ohm: number) => Math.asinh(ohm / (referenceOhm / 2));
  const perUnit = heightPx / (bend(top) - bend(bottom));
  const yOf = (ohm: number) => (bend(top) - bend(ohm)) * perUnit;
  const all = [...OHMS.map((tick) => -tick).reverse(), 0, ...OHMS].filter(
    (tick) => tick <= top && tick >= bottom,
  );
  return { yOf, ticks: spaced(all, yOf, (ohm) => `${minus(ohm)}${ohm === top ? " Ω" : ""}`) };
}

/** Degrees: even steps of a part of a turn. */
export function degreeAxis(values: readonly ArrayLike<number>[], heightPx: number): LineAxis {
  const [lowest, highest] = extremes(values);
  const step =
    DEGREE_STEPS.find((each) => (highest - lowest) / each <= 6) ?? DEGREE_STEPS[DEGREE_STEPS.length - 1];
  const top = Math.ceil(highest / step) * step;
  const bottom = Math.min(top - step, Math.floor(lowest / step) * step);
  const yOf = (degrees: number) => ((top - degrees) / (top - bottom)) * heightPx;
  const all = Array.from({ length: Math.round((top - bottom) / step) + 1 }, (_, i) => bottom + i * step);
  return { yOf, ticks: spaced(all, yOf, (degrees) => `${minus(degrees)}°`) };
}

function extremes(values: readonly ArrayLike<number>[]): [number, number] {
  let [lowest, highest] = [0, 0];
  let any = false;
  for (const column of values) {
    for (let i = 0; i < column.length; i++) {
      if (!Number.isFinite(column[i])) continue;
      lowest = any ? Math.min(lowest, column[i]) : column[i];
      highest = any ? Math.max(highest, column[i]) : column[i];
      any = true;
    }
  }
  return [lowest, highest];
}

/** Ticks with room for their labels: zero and the ends first, then outwards. */
function spaced(
  values: number[],
  yOf: (value: number) => number,
  label: (value: number) => string,
): ValueTick[] {
  const order = [0, values[values.length - 1], values[0], ...values].filter((value) =>
    values.includes(value),
  );
  const kept: number[] = [];
  for (const value of order) {
    if (kept.every((other) => Math.abs(yOf(other) - yOf(value)) >= LEAST_PX)) kept.push(value);
  }
  return kept.sort((a, b) => a - b).map((value) => ({ y: yOf(value), label: label(value) }));
}

function minus(value: number): string {
  return value < 0 ? `−${-value}` : String(value);
}

const OHMS = [25, 50, 100, 200, 500, 1000, 2000, 5000];
const DEGREE_STEPS = [30, 45, 90, 180, 360, 720, 1440, 3600];
const LEAST_PX = 15;
