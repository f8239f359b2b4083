import type { Complex } from "../reflection.ts";
import type { StandardGammas } from "./standards.ts";

/** The three errors of a one-port instrument at one frequency. */
export interface ErrorTerms {
  /** e00. */
  directivity: Complex;
  /** e11. */
  match: Complex;
  /** e10·e01. */
  tracking: Complex;
}

/**
 * The error terms from what was measured on three standards and what they are: Γm = e00 + e10e01·Γ/(1 − e11·Γ), made
 * linear as Γ·a + b − Γ·Γm·c = Γm with a = e10e01 − e00·e11, b = e00, c = −e11; the load's equation is taken from the
 * other two, which are solved for a and c. Null where a value is NaN or two of the standards can't be told apart, in
 * what they are or in what was measured (nearer than EQUAL of the widest distance): the equations are then singular.
 * Source: HP/Agilent, "Solving the one-port calibration equations" (na.tm.agilent.com/vnahelp/tip20.html).
 */
export function solveTerms(measured: StandardGammas, actual: StandardGammas): ErrorTerms | null {
  if (!(distinctness(measured) > EQUAL) || !(distinctness(actual) > EQUAL)) return null;
  const products = { o: times(actual.open, measured.open), s: times(actual.short, measured.short) };
  const load = times(actual.load, measured.load);
  const [o, s] = [minus(actual.open, actual.load), minus(actual.short, actual.load)];
  const [op, sp] = [minus(products.o, load), minus(products.s, load)];
  const [om, sm] = [minus(measured.open, measured.load), minus(measured.short, measured.load)];
  const whole = minus(times(op, s), times(o, sp));
  const a = over(minus(times(op, sm), times(om, sp)), whole);
  const c = over(minus(times(o, sm), times(om, s)), whole);
  const directivity = plus(minus(measured.load, times(actual.load, a)), times(load, c));
  const match = { re: -c.re, im: -c.im };
  return { directivity, match, tracking: plus(a, times(directivity, match)) };
}

/** Γ = (Γm − e00)/(e10e01 + e11(Γm − e00)). NaN in gives NaN out. */
export function applyTerms({ directivity, match, tracking }: ErrorTerms, measured: Complex): Complex {
  const left = minus(measured, directivity);
  return over(left, plus(tracking, times(match, left)));
}

/**
 * The smallest distance between two of three values over the largest: 0.5 for ideal standards on a perfect
 * instrument, 0 where two are the same; NaN where one is NaN.
 */
export function distinctness({ open, short, load }: StandardGammas): number {
  const apart = [distance(open, short), distance(open, load), distance(short, load)];
  return Math.min(...apart) / Math.max(...apart);
}

function distance(a: Complex, b: Complex): number {
  return Math.hypot(a.re - b.re, a.im - b.im);
}

function plus(a: Complex, b: Complex): Complex {
  return { re: a.re + b.re, im: a.im + b.im };
}

function minus(a: Complex, b: Complex): Complex {
  return { re: a.re - b.re, im: a.im - b.im };
}

function times(a: Complex, b: Complex): Complex {
  return { re: a.re * b.re - a.im * b.im, im: a.re * b.im + a.im * b.re };
}

function over(a: Complex, b: Complex): Complex {
  const power = b.re * b.re + b.im * b.im;
  return { re: (a.re * b.re + a.im * b.im) / power, im: (a.im * b.re - a.re * b.im) / power };
}

/**
 * Real bridges and standards give 0.2 to 0.6; the same standard swept twice differs by its noise and the
 * connector's repeatability, under 0.02 (common practice, no source).
 */
const EQUAL = 0.05;
