import type { Complex } from "./antenna.ts";

/** The invented return loss bridge: what it makes of a reflection at its port, before and after it was built anew. */

export type Built = "first" | "rebuilt";

/** Nominal level with the port open or shorted, dBm: 0 dBm less the 12.04 dB of an ideal bridge, rounded. */
export const ZERO_DBM = -12;
/** From the generator straight into the detector, dB over the 0 dB line. */
export const THROUGH_DB = 12.04;

interface Terms {
  directivity: Complex;
  match: Complex;
  tracking: number;
}

const TERMS: Record<Built, (hz: number) => Terms> = {
  first: (hz) => ({
    directivity: { re: 0.004 * Math.cos(hz / 3e7), im: 0.003 + hz * 1.6e-10 },
    match: turned(0.01 + hz * 3e-10, hz / 2.4e7),
    tracking: 1 - hz * 2.5e-10,
  }),
  rebuilt: (hz) => ({
    directivity: { re: 0.002 * Math.cos(hz / 3e7), im: 0.001 + hz * 0.4e-10 },
    match: turned(0.006 + hz * 1.2e-10, hz / 2.4e7),
    tracking: 1 - hz * 1.5e-10,
  }),
};

/** e00 + e10e01·Γ/(1 − e11·Γ), the usual three terms. */
export function atBridge(built: Built, gamma: (hz: number) => Complex): (hz: number) => Complex {
  return (hz) => {
    const { directivity, match, tracking } = TERMS[built](hz);
    const { re, im } = gamma(hz);
    const below = { re: 1 - (match.re * re - match.im * im), im: -(match.re * im + match.im * re) };
    const size = below.re ** 2 + below.im ** 2;
    return {
      re: directivity.re + (tracking * (re * below.re + im * below.im)) / size,
      im: directivity.im + (tracking * (im * below.re - re * below.im)) / size,
    };
  };
}

/** What can be screwed to the port; "worn" is the load from the drawer, 53.1 Ω. */
export const STANDARDS: Record<"open" | "short" | "load" | "worn", (hz: number) => Complex> = {
  open: () => ({ re: 1, im: 0 }),
  short: () => ({ re: -1, im: 0 }),
  load: () => ({ re: 0.001, im: 0 }),
  worn: (hz) => ({ re: 3.1 / 103.1, im: hz * 0.8e-10 }),
};

function turned(size: number, by: number): Complex {
  return { re: size * Math.cos(by), im: size * Math.sin(by) };
}
