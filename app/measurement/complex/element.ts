import type { Complex } from "../reflection.ts";

/** An ideal inductor or capacitor in a matching network. */
export interface Element {
  place: "series" | "shunt";
  kind: "inductor" | "capacitor";
  /** Henry or farad. */
  value: number;
  /** Ω at the frequency it was made for; positive for an inductor. */
  reactanceOhm: number;
}

/** L = X/(2πf) for X > 0, C = −1/(2πfX) for X < 0; null for a reactance that is rounding beside `scaleOhm`. */
export function seriesElement(reactanceOhm: number, hz: number, scaleOhm: number): Element | null {
  if (Math.abs(reactanceOhm) <= NOTHING * scaleOhm) return null;
  return { place: "series", ...partOf(reactanceOhm, hz), reactanceOhm };
}

/** C = B/(2πf) for B > 0, L = −1/(2πfB) for B < 0; null for a susceptance that is rounding beside `scaleSiemens`. */
export function shuntElement(susceptance: number, hz: number, scaleSiemens: number): Element | null {
  if (Math.abs(susceptance) <= NOTHING * scaleSiemens) return null;
  const reactanceOhm = -1 / susceptance;
  return { place: "shunt", ...partOf(reactanceOhm, hz), reactanceOhm };
}

/** What `load` (Ω) looks like through an element, at any frequency in Hz. */
export function through({ place, kind, value }: Element, load: Complex, hz: number): Complex {
  const omega = 2 * Math.PI * hz;
  const reactance = kind === "inductor" ? omega * value : -1 / (omega * value);
  if (place === "series") return { re: load.re, im: load.im + reactance };
  // jX·Z/(jX + Z)
  const below = load.re ** 2 + (load.im + reactance) ** 2;
  return {
    re: (reactance ** 2 * load.re) / below,
    im: (reactance * (load.re ** 2 + load.im ** 2 + load.im * reactance)) / below,
  };
}

function partOf(reactanceOhm: number, hz: number): Pick<Element, "kind" | "value"> {
  const omega = 2 * Math.PI * hz;
  return reactanceOhm > 0
    ? { kind: "inductor", value: reactanceOhm / omega }
    : { kind: "capacitor", value: -1 / (omega * reactanceOhm) };
}

/** Of the reference: no such element changes what is seen. */
const NOTHING = 1e-9;
