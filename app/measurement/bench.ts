/** A bench's description as numbers: what its standards are, and what is known of it without sweeps. */

/** Null or absent is "ideal" for standards. */
export interface BenchStandards {
  /** Farad, of the open's fringing field. */
  openCapacitanceF: number | null;
  /** Henry, of the short. */
  shortInductanceH: number | null;
  /** Seconds, one way, of the offset line before open and short. */
  offsetDelayS: number | null;
  /** Ω, the load's measured resistance. */
  loadOhm: number | null;
  /** dB, the return loss that the load itself is known to have; null where it is not known. */
  loadReturnLossDb: number | null;
}

export const IDEAL_STANDARDS: BenchStandards = {
  openCapacitanceF: null,
  shortInductanceH: null,
  offsetDelayS: null,
  loadOhm: null,
  loadReturnLossDb: null,
};

/** What a person says of a bench that no sweep of it shows; null where nothing is said. */
export interface BenchGiven {
  /** Level of the 0 dB line, in the unit of the sweep. */
  zeroDb: number | null;
  /** dB, positive. */
  directivityDb: number | null;
  /** dB, return loss of the test port. */
  testPortMatchDb: number | null;
  /** dB, error of the 0 dB line. */
  trackingDb: number | null;
}

export const NOTHING_GIVEN: BenchGiven = {
  zeroDb: null,
  directivityDb: null,
  testPortMatchDb: null,
  trackingDb: null,
};
