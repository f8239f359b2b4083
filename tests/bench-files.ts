/**
 * A resistive bridge under test, invented, as files of levels: what a detector shows with an open, a short, a load and
 * straight from the source, and with an antenna. Closed form of a one-port with errors: level = source − loss + 20 log10 abs(e00 +
 * Γ/(1 − e11·Γ)), so the truth is known: directivity e00 falls with the square of the frequency, match e11 is fixed.
 */
export interface BenchTruth {
  /** dB, at low frequencies. */
  directivityDb: number;
  /** Hz, where the directivity has fallen by 6 dB. */
  cornerHz: number;
  /** dB. */
  matchDb: number;
  /** dB through the bridge at full reflection. */
  lossDb: number;
}

/** One arm off by 1 %: 48 dB at best (REFERENCE section 5); 12.04 dB of loss are those of an ideal 50 Ω bridge. */
export const GOOD_BRIDGE: BenchTruth = { directivityDb: 46, cornerHz: 60e6, matchDb: 28, lossDb: 12.04 };
/** The same with a worse arm. */
export const POOR_BRIDGE: BenchTruth = { directivityDb: 27, cornerHz: 30e6, matchDb: 24, lossDb: 12.4 };

export type Standard = "open" | "short" | "load" | "through" | "antenna";

/** The level at a frequency, dB over an arbitrary but common zero; a source that falls by 2 dB to 100 MHz. */
export function levelDb(truth: BenchTruth, standard: Standard, hz: number): number {
  const source = -10 - (2 * hz) / 100e6;
  if (standard === "through") return source;
  const [e00, e11] = [10 ** (-directivityDbOf(truth, hz) / 20), 10 ** (-truth.matchDb / 20)];
  // Both errors turn with frequency, as if behind half a metre of line.
  const turn = (4 * Math.PI * 0.5 * hz) / 2e8;
  const [re, im] = gamma(standard, hz);
  const [nRe, nIm] = [
    1 - e11 * (Math.cos(turn) * re - Math.sin(turn) * im),
    -e11 * (Math.cos(turn) * im + Math.sin(turn) * re),
  ];
  const n = nRe * nRe + nIm * nIm;
  const seenRe = e00 * Math.cos(turn) + (re * nRe + im * nIm) / n;
  const seenIm = e00 * Math.sin(turn) + (im * nRe - re * nIm) / n;
  return source - truth.lossDb + 20 * Math.log10(Math.hypot(seenRe, seenIm));
}

export function directivityDbOf({ directivityDb, cornerHz }: BenchTruth, hz: number): number {
  return directivityDb - 20 * Math.log10(1 + (hz / cornerHz) ** 2);
}

/** A file as an instrument would write it: 1 to 100 MHz, `points` of them. `remark` makes two alike differ. */
export function benchFile(truth: BenchTruth, standard: Standard, remark = "", points = 397): string {
  const lines = [`# ${standard}${remark}, invented`, "Frequency (MHz),S11 (dB)"];
  for (let i = 0; i < points; i++) {
    const hz = 1e6 + (99e6 * i) / (points - 1);
    lines.push(`${(hz / 1e6).toFixed(4)},${levelDb(truth, standard, hz).toFixed(3)}`);
  }
  return `${lines.join("\n")}\n`;
}

/** The antenna: a series resonator of 60 Ω at 21.2 MHz with a Q of 12. */
function gamma(standard: Standard, hz: number): [number, number] {
  if (standard === "open") return [1, 0];
  if (standard === "short") return [-1, 0];
  if (standard === "load") return [0, 0];
  const x = 60 * 12 * (hz / 21.2e6 - 21.2e6 / hz);
  const d = 110 * 110 + x * x;
  return [(10 * 110 + x * x) / d, (x * 110 - 10 * x) / d];
}
