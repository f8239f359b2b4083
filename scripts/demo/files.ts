import type { Complex } from "./antenna.ts";

/** The same sweep as different instruments would write it: each with habits of its own. */

export interface Span {
  startHz: number;
  stopHz: number;
  points: number;
}

type Gamma = (hz: number) => Complex;

/** A one-port analyser: comma, MHz, return loss with a sign. */
export function returnLossFile(span: Span, gamma: Gamma, remark: string): Uint8Array {
  const head = [`# ${remark}`, "# one port, 50 ohm", "Frequency (MHz),Return loss (dB)"];
  return text([
    ...head,
    ...rows(span, (hz) => [(hz / 1e6).toFixed(4), lossDb(gamma(hz)).toFixed(2)].join(",")),
  ]);
}

/** A spectrum analyser with a tracking generator behind a bridge: semicolons, decimal commas, levels. */
export function levelFile(span: Span, gamma: Gamma, zeroDbm: number, remark: string): Uint8Array {
  const head = [`Messung;${remark}`, "Pegel in dBm, Messbruecke 50 Ohm", "", "Frequenz [MHz];Pegel [dBm]"];
  const line = (hz: number) => {
    const level = zeroDbm - lossDb(gamma(hz));
    return `${comma((hz / 1e6).toFixed(5))};${comma(level.toFixed(2))}`;
  };
  return text([...head, ...rows(span, line)], "\r\n");
}

/** A pocket instrument that only knows SWR: tabs, Hz. */
export function swrFile(span: Span, gamma: Gamma, remark: string): Uint8Array {
  const line = (hz: number) => {
    const size = Math.min(0.9999, abs(gamma(hz)));
    return `${Math.round(hz)}\t${((1 + size) / (1 - size)).toFixed(3)}`;
  };
  return text([`! ${remark}`, "freq_Hz\tSWR", ...rows(span, line)]);
}

/** Resistance and reactance: blanks, kHz. */
export function impedanceFile(span: Span, gamma: Gamma, remark: string): Uint8Array {
  const line = (hz: number) => {
    const { re, im } = gamma(hz);
    const size = (1 - re) ** 2 + im ** 2;
    const r = (50 * (1 - re * re - im * im)) / size;
    const x = (100 * im) / size;
    return `${(hz / 1e3).toFixed(1)} ${r.toFixed(2)} ${x.toFixed(2)}`;
  };
  return text([`% ${remark}`, "f/kHz R/ohm X/ohm", ...rows(span, line)]);
}

/** Touchstone 1.1, one port. Source: IBIS Open Forum, Touchstone File Format Specification, Rev 1.1. */
export function touchstoneFile(span: Span, gamma: Gamma, form: "RI" | "MA", remark: string): Uint8Array {
  const line = (hz: number) => {
    const { re, im } = gamma(hz);
    const pair = form === "RI" ? [re, im] : [Math.hypot(re, im), (Math.atan2(im, re) * 180) / Math.PI];
    const unit = form === "RI" ? (hz / 1e6).toFixed(6) : hz.toFixed(0);
    return `${unit} ${pair[0].toFixed(6)} ${pair[1].toFixed(form === "RI" ? 6 : 3)}`;
  };
  return text([`! ${remark}`, `# ${form === "RI" ? "MHz" : "Hz"} S ${form} R 50`, ...rows(span, line)]);
}

function rows({ startHz, stopHz, points }: Span, line: (hz: number) => string): string[] {
  const step = (stopHz - startHz) / (points - 1);
  return Array.from({ length: points }, (_, i) => line(startHz + i * step));
}

function lossDb(gamma: Complex): number {
  return -20 * Math.log10(abs(gamma));
}

function abs({ re, im }: Complex): number {
  return Math.hypot(re, im);
}

function comma(number: string): string {
  return number.replace(".", ",");
}

function text(lines: string[], end = "\n"): Uint8Array {
  return new TextEncoder().encode(lines.join(end) + end);
}
