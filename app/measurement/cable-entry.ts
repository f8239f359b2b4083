/** A published attenuation figure. */
export interface CablePoint {
  mhz: number;
  dbPer100m: number;
}

export interface CableEntry {
  name: string;
  /** dB per metre: k1·√f + k2·f with f in MHz. */
  k1: number;
  k2: number;
  velocityFactor: number;
  impedanceOhm: number;
  /** Of the sheet, ascending; the entry holds up to the last. */
  points: readonly CablePoint[];
  /** From here on the entry holds: below the first point by the law of the skin effect alone. */
  lowestMhz: number;
  source: string;
  /** How far a reel may be from the sheet, as a part of the loss in dB. */
  lossUncertainty: number;
}

/** What a sheet says, before the fit. */
export type CableSheet = Omit<CableEntry, "k1" | "k2" | "lowestMhz"> & {
  /** A thin copper skin on steel, which leaves the law of the skin effect at low frequencies. */
  steelCore?: true;
};
