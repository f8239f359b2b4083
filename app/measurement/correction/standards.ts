import type { BenchStandards } from "../bench.ts";
import type { Complex } from "../reflection.ts";

export interface StandardGammas {
  open: Complex;
  short: Complex;
  load: Complex;
}

/**
 * Γ of open, short and load at `hz` (Hz) as the bench describes them, against `referenceOhm` (Ω). The open is a
 * capacitance, the short an inductance, each behind a lossless line of the offset delay τ (one way, so e^(−2jωτ)); the
 * load is a resistance without a line. What is null is ideal: +1, −1, 0. Lumped model of coaxial standards with its
 * first coefficients only (common practice in one-port calibration; D. M. Pozar, Microwave Engineering, ch. 2 for the
 * lines, from memory, not seen).
 */
export function standardGammas(standards: BenchStandards, hz: number, referenceOhm: number): StandardGammas {
  const w = 2 * Math.PI * hz;
  const turn = -2 * w * (standards.offsetDelayS ?? 0);
  const open = -2 * Math.atan(w * (standards.openCapacitanceF ?? 0) * referenceOhm);
  const short = Math.PI - 2 * Math.atan((w * (standards.shortInductanceH ?? 0)) / referenceOhm);
  const ohm = standards.loadOhm ?? referenceOhm;
  return {
    open: open + turn === 0 ? { re: 1, im: 0 } : unit(open + turn),
    short: short + turn === Math.PI ? { re: -1, im: 0 } : unit(short + turn),
    load: { re: (ohm - referenceOhm) / (ohm + referenceOhm), im: 0 },
  };
}

function unit(angle: number): Complex {
  return { re: Math.cos(angle), im: Math.sin(angle) };
}
