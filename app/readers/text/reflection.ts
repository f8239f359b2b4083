import { fail } from "../problem.ts";
import type { TextSpec } from "../reading.ts";
import type { Rows } from "./rows.ts";

/** abs Γ, and Γ where the columns hold a phase; the order of the rows. */
export interface Reflection {
  magnitude: Float64Array;
  gammaRe?: Float64Array;
  gammaIm?: Float64Array;
  assumed: string[];
  /** Values that no such quantity can have (SWR below 1), now gaps. */
  impossible: number;
}

type Convert = Pick<TextSpec, "quantity" | "angleUnit" | "referenceOhm" | "zeroDb"> & {
  /** Factors of the headings' units. */
  valueScale: number;
  secondScale: number;
  unsigned: boolean;
};

/** An SWR of 0.999 is a rounding of 1; anything lower is no SWR. */
const SWR_ROUNDING = 0.995;

/**
 * Turns the rows' columns into the reflection coefficient. NaN stays NaN; an infinite SWR or impedance is a full
 * reflection. Formulas: T. S. Bird, IEEE Antennas Propag. Mag. 51(2), 2009; Γ = (Z - Z0)/(Z + Z0).
 */
export function toReflection(rows: Rows, convert: Convert): Reflection {
  const { quantity, valueScale } = convert;
  const value = rows.value.subarray(0, rows.count);
  if (valueScale !== 1 && quantity !== "swr") for (let i = 0; i < value.length; i++) value[i] *= valueScale;
  const second = rows.second.subarray(0, rows.count);
  if (convert.secondScale !== 1) for (let i = 0; i < second.length; i++) second[i] *= convert.secondScale;
  switch (quantity) {
    case "s11-db":
      return scalar(value, (v) => 10 ** (v / 20));
    case "return-loss":
      return scalar(value, (v) => 10 ** (-v / 20));
    case "level": {
      if (convert.zeroDb === null) return fail("zero-db-needed", "The level of the 0 dB line is not known.");
      const zeroDb = convert.zeroDb;
      return scalar(value, (v) => 10 ** ((v - zeroDb) / 20));
    }
    case "swr":
      return fromSwr(value);
    case "magnitude":
      return scalar(value, Math.abs);
    case "real-imaginary":
      return complex(value.slice(), second.slice());
    case "magnitude-angle":
      return signed(fromPolar(value, second, convert.angleUnit), second, convert.angleUnit);
    case "db-angle":
      return signed(fromDbAngle(value, second, convert.angleUnit), second, convert.angleUnit);
    case "resistance-reactance":
      return fromImpedance(value, second, convert.referenceOhm, convert.unsigned || turnsAtZero(second));
    case "impedance-angle": {
      const { re, im } = cartesian(value, second, convert.angleUnit);
      return fromImpedance(re, im, convert.referenceOhm, turnsAtZero(im));
    }
  }
}

/** Γ as it is, or its magnitude alone where the angles bounce off 0° and 180° because their sign was not written. */
function signed(found: Reflection, angle: Float64Array, unit: "deg" | "rad"): Reflection {
  const half = unit === "deg" ? 180 : Math.PI;
  const beyond = (a: number) => a < 0 || a > half * 1.001;
  if (angle.some(beyond) || !(turnsAtZero(angle) || turnsAtZero(angle.map((a) => half * 1.001 - a))))
    return found;
  return {
    magnitude: found.magnitude,
    impossible: 0,
    assumed: [...found.assumed, "The angle is written without its sign: only the magnitude of Γ is used."],
  };
}

function scalar(value: Float64Array, rule: (v: number) => number): Reflection {
  const magnitude = new Float64Array(value.length);
  for (let i = 0; i < value.length; i++) magnitude[i] = rule(value[i]);
  return { magnitude, assumed: [], impossible: 0 };
}

function fromSwr(value: Float64Array): Reflection {
  let impossible = 0;
  const found = scalar(value, (s) => {
    if (s === Infinity) return 1;
    if (s >= 1) return (s - 1) / (s + 1);
    if (s >= SWR_ROUNDING) return 0;
    if (!Number.isNaN(s)) impossible++;
    return Number.NaN;
  });
  return { ...found, impossible };
}

function complex(gammaRe: Float64Array, gammaIm: Float64Array): Reflection {
  const magnitude = new Float64Array(gammaRe.length);
  for (let i = 0; i < magnitude.length; i++) {
    magnitude[i] = Math.hypot(gammaRe[i], gammaIm[i]);
    if (!Number.isFinite(magnitude[i])) magnitude[i] = gammaRe[i] = gammaIm[i] = Number.NaN;
  }
  return { magnitude, gammaRe, gammaIm, assumed: [], impossible: 0 };
}

function cartesian(size: Float64Array, angle: Float64Array, unit: "deg" | "rad") {
  const toRadian = unit === "deg" ? Math.PI / 180 : 1;
  const re = new Float64Array(size.length);
  const im = new Float64Array(size.length);
  for (let i = 0; i < size.length; i++) {
    re[i] = size[i] * Math.cos(angle[i] * toRadian);
    im[i] = size[i] * Math.sin(angle[i] * toRadian);
  }
  return { re, im };
}

function fromPolar(size: Float64Array, angle: Float64Array, unit: "deg" | "rad"): Reflection {
  const { re, im } = cartesian(size, angle, unit);
  return complex(re, im);
}

function fromDbAngle(value: Float64Array, angle: Float64Array, unit: "deg" | "rad"): Reflection {
  let sum = 0;
  for (const v of value) if (Number.isFinite(v)) sum += v;
  const sign = sum > 0 ? -1 : 1;
  const size = Float64Array.from(value, (v) => 10 ** ((sign * v) / 20));
  const found = fromPolar(size, angle, unit);
  if (sign < 0)
    found.assumed.push("The dB values are positive: taken as return loss, so S11 is their negative.");
  return found;
}

function fromImpedance(r: Float64Array, x: Float64Array, z0: number, unsigned: boolean): Reflection {
  const re = new Float64Array(r.length);
  const im = new Float64Array(r.length);
  for (let i = 0; i < r.length; i++) {
    const open = Math.abs(r[i]) === Infinity || Math.abs(x[i]) === Infinity;
    const below = (r[i] + z0) ** 2 + x[i] ** 2;
    re[i] = open ? 1 : (r[i] ** 2 - z0 ** 2 + x[i] ** 2) / below;
    im[i] = open ? 0 : (2 * z0 * x[i]) / below;
  }
  const found = complex(re, im);
  if (!unsigned) return found;
  return {
    magnitude: found.magnitude,
    impossible: 0,
    assumed: [
      "The reactance is written without its sign: only the magnitude of Γ is used, which does not depend on it.",
    ],
  };
}

/** A reactance that never goes below zero but comes down to it with a kink has lost its sign. */
function turnsAtZero(x: Float64Array): boolean {
  let turns = 0;
  let largest = 0;
  for (const v of x) {
    if (v < 0) return false;
    if (v > largest) largest = v;
  }
  for (let i = 2; i < x.length - 2; i++) {
    const step = Math.max(Math.abs(x[i - 1] - x[i - 2]), Math.abs(x[i + 2] - x[i + 1]));
    const lowest = x[i] <= x[i - 1] && x[i] <= x[i + 1];
    if (lowest && x[i] <= step && x[i - 2] > x[i - 1] && x[i + 2] > x[i + 1] && step < 0.5 * largest) turns++;
  }
  return turns > 0;
}
