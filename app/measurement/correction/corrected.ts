import type { Correction, Sweep, Warning } from "../sweep.ts";

/** A sweep after its correction, what that was, and what there is to doubt in it. */
export interface Corrected {
  sweep: Sweep;
  correction: Correction;
  warnings: Warning[];
}

/** The sweep as it was measured. */
export function none(sweep: Sweep, ...warnings: Warning[]): Corrected {
  return { sweep, correction: { kind: "none", plane: sweep.plane, fromHz: null, toHz: null }, warnings };
}
