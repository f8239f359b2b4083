/**
 * Invented antennas, in closed form: a few series resonators side by side at one feedpoint, seen through a feedline.
 * Nothing here is a model of a real site; it only has to behave as such antennas do.
 */

export interface Complex {
  re: number;
  im: number;
}

/** A series resonator: resistance at its resonance, and how sharp it is. */
export interface Resonator {
  hz: number;
  ohm: number;
  q: number;
}

export interface Feedline {
  lengthM: number;
  velocityFactor: number;
  /** Matched loss in dB per metre at f MHz: k1·√f + k2·f. */
  k1: number;
  k2: number;
}

export interface Instrument {
  /** Deviation of the noise in each part of Γ. */
  noise: number;
  /** Leakage of the bridge, as abs Γ. */
  directivity: number;
}

export const LIGHT_SPEED = 299_792_458;
export const NO_FEEDLINE: Feedline = { lengthM: 0, velocityFactor: 1, k1: 0, k2: 0 };
const REFERENCE_OHM = 50;

/** What a quarter-wave element of `lengthM` does: its fundamental and its odd multiples, weaker and weaker. */
export function quarterWave(lengthM: number, shortening: number, ohm: number, slopeOhm: number): Resonator[] {
  const fundamental = (shortening * LIGHT_SPEED) / (4 * lengthM);
  const open = LIGHT_SPEED / (4 * lengthM);
  return [
    { hz: fundamental, ohm, q: slopeOhm / ohm },
    { hz: 3 * 0.985 * open, ohm: ohm + 85, q: (2.2 * slopeOhm) / (ohm + 85) },
    { hz: 5 * 0.99 * open, ohm: ohm + 150, q: (3.2 * slopeOhm) / (ohm + 150) },
  ];
}

/** The outer surface of a cable's braid between two points that hold it: a half wave. */
export function halfWaveOfBraid(lengthM: number, ohm = 55, q = 20): Resonator {
  return { hz: (0.96 * LIGHT_SPEED) / (2 * lengthM), ohm, q };
}

/** Γ of the resonators in parallel at the end of the feedline, as the instrument shows it. */
export function reflection(
  resonators: Resonator[],
  feedline: Feedline,
  instrument: Instrument,
  gauss: () => number,
) {
  return (hz: number): Complex => {
    const there = atFeedpoint(resonators, hz);
    const megahertz = hz / 1e6;
    const lossDb = feedline.lengthM * (feedline.k1 * Math.sqrt(megahertz) + feedline.k2 * megahertz);
    const size = 10 ** (-lossDb / 10);
    const turn = (-4 * Math.PI * hz * feedline.lengthM) / (feedline.velocityFactor * LIGHT_SPEED);
    const leak = 0.7 + hz / 9e6;
    return {
      re:
        size * (there.re * Math.cos(turn) - there.im * Math.sin(turn)) +
        instrument.directivity * Math.cos(leak) +
        instrument.noise * gauss(),
      im:
        size * (there.re * Math.sin(turn) + there.im * Math.cos(turn)) +
        instrument.directivity * Math.sin(leak) +
        instrument.noise * gauss(),
    };
  };
}

function atFeedpoint(resonators: Resonator[], hz: number): Complex {
  let g = 0;
  let b = 0;
  for (const { hz: resonance, ohm, q } of resonators) {
    const detune = q * (hz / resonance - resonance / hz);
    const share = 1 / (ohm * (1 + detune * detune));
    g += share;
    b -= share * detune;
  }
  // Γ = (Y0 − Y)/(Y0 + Y)
  const y0 = 1 / REFERENCE_OHM;
  const size = (y0 + g) ** 2 + b ** 2;
  return { re: (y0 * y0 - g * g - b * b) / size, im: (-2 * y0 * b) / size };
}
