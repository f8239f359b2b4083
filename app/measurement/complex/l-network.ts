import { type Complex, gammaToSwr, impedanceToGamma } from "../reflection.ts";
import { type Element, seriesElement, shuntElement, through } from "./element.ts";

/** Two elements that turn a load into the reference at one frequency. */
export interface LNetwork {
  /** The element at the port's end comes first: series-first has its shunt element across the load. */
  order: "series-first" | "shunt-first";
  /** From the port to the load; one is absent where the load needs only the other. */
  elements: Element[];
  /** Recomputed from the values of the elements: what the port sees, Ω. */
  input: Complex;
}

/**
 * All L-networks that match `load` (Ω, R > 0) to the real `referenceOhm` at `hz`, at most four; empty where the load has no positive
 * finite resistance or the frequency or reference is not positive.
 *
 * Shunt element across the load, then series to the port: with Y = G + jB of the load the total susceptance b = ±√(G/Z0 − G²) makes
 * the real part of 1/(G + jb) the reference, the series reactance b·Z0/G takes the rest away; real where G ≤ 1/Z0. Series at the load,
 * then shunt at the port: X + Xs = ±√(R(Z0 − R)), and the susceptance ±√((Z0 − R)/R)/Z0; real where R ≤ Z0. D. M. Pozar, Microwave
 * Engineering, section 5.1 (from memory, not seen); each result carries the input impedance recomputed from the values, which the
 * tests compare for thousands of loads. Elements are ideal: real coils and capacitors have loss, and hold at `hz` only.
 */
export function lNetworks(load: Complex, referenceOhm: number, hz: number): LNetwork[] {
  if (!usable(load, referenceOhm, hz)) return [];
  const power = load.re ** 2 + load.im ** 2;
  const [g, b] = [load.re / power, -load.im / power];
  const found: LNetwork[] = [];
  const add = (order: LNetwork["order"], parts: (Element | null)[]) => {
    const elements = parts.filter((part) => part !== null);
    const key = describe(order, elements);
    if (elements.length === 0 || found.some((other) => describe(other.order, other.elements) === key)) return;
    found.push({ order, elements, input: inputImpedance(elements, load, hz) });
  };
  const gap = g / referenceOhm - g * g;
  if (gap >= -TOUCHING * g * g) {
    const root = Math.sqrt(Math.max(0, gap));
    for (const total of [root, -root]) {
      const shunt = shuntElement(total - b, hz, 1 / referenceOhm);
      add("series-first", [seriesElement((total * referenceOhm) / g, hz, referenceOhm), shunt]);
    }
  }
  const room = load.re * (referenceOhm - load.re);
  if (room >= -TOUCHING * load.re ** 2) {
    const root = Math.sqrt(Math.max(0, room));
    for (const total of [root, -root]) {
      const shunt = shuntElement(total / load.re / referenceOhm, hz, 1 / referenceOhm);
      add("shunt-first", [shunt, seriesElement(total - load.im, hz, referenceOhm)]);
    }
  }
  return found;
}

/** One element that lowers the SWR as far as one can. */
export interface SingleElement {
  element: Element;
  input: Complex;
  swr: number;
}

/**
 * The best single element in series and the best one across the load, at `hz`; the better first. Each takes the whole reactance (or
 * susceptance) away, as abs Γ² = ((R−Z0)² + X²)/((R+Z0)² + X²) rises with X² (and likewise with B²). Empty as `lNetworks`, and for a
 * load without reactance.
 */
export function singleElements(load: Complex, referenceOhm: number, hz: number): SingleElement[] {
  if (!usable(load, referenceOhm, hz)) return [];
  const power = load.re ** 2 + load.im ** 2;
  return [seriesElement(-load.im, hz, referenceOhm), shuntElement(load.im / power, hz, 1 / referenceOhm)]
    .filter((element) => element !== null)
    .map((element) => {
      const input = inputImpedance([element], load, hz);
      return { element, input, swr: swrOf(input, referenceOhm) };
    })
    .sort((a, b) => a.swr - b.swr);
}

/** What the port sees of `load` through the elements, given from the port to the load, Ω. */
export function inputImpedance(elements: readonly Element[], load: Complex, hz: number): Complex {
  return elements.reduceRight((z, element) => through(element, z, hz), load);
}

function swrOf(z: Complex, referenceOhm: number): number {
  const gamma = impedanceToGamma(z, referenceOhm);
  return gammaToSwr(Math.hypot(gamma.re, gamma.im));
}

function usable(load: Complex, referenceOhm: number, hz: number): boolean {
  return load.re > 0 && Number.isFinite(load.re) && Number.isFinite(load.im) && referenceOhm > 0 && hz > 0;
}

function describe(order: string, elements: readonly Element[]): string {
  const parts = elements.map(({ place, kind, value }) => `${place} ${kind} ${value.toPrecision(9)}`);
  // With one element alone there is no order.
  return elements.length === 1 ? parts[0] : `${order} ${parts.join(" ")}`;
}

/** Of the load's own size: a load on the circle's edge misses it by rounding. */
const TOUCHING = 1e-12;
