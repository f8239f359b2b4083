import type { Antenna } from "../antenna.ts";
import type { Series } from "../elements.ts";
import type { LengthUnit } from "../lengths.ts";
import type { Dip } from "../sweep.ts";

/** What may be behind a dip. Never more than "may be". */
export interface Cause {
  kind: "part" | "multiple" | "ripple" | "reference";
  /** The antenna's part, by its key; null where the cause is none. */
  part: string | null;
  /** 3 in "3 × quarter wave"; null for a reference. */
  order: number | null;
  /** "the mast, 3 × quarter wave". */
  name: string;
  /** "may be the mast, 3 × quarter wave, if its foot is insulated". */
  title: string;
  /** How the predicted frequency was reckoned, and how far off it is. */
  arithmetic: string;
  predictedHz: number;
  /** Half-width of what the prediction allows, Hz. */
  toleranceHz: number;
  /** Dip minus prediction, Hz. */
  offsetHz: number;
  /** Share of frequencies chosen blindly that this cause would fit as well, 0 to 1. */
  byChance: number;
  /** Larger is likelier: the logarithm of how much more often the cause puts a dip here than chance does. */
  score: number;
  /** The wire that the wave runs along, for the try that tells it apart; null where the cause is none. */
  path: CausePath | null;
  /** The measurement that would tell it apart. */
  test: string;
}

export interface CausePath {
  name: string;
  series: Series;
  lengthM: number;
  /** Another part that the path goes on through, and the share of that part's length in it. */
  joined: { part: string; share: number } | null;
}

/** A dip as causes need it. */
export type JudgedDip = Pick<Dip, "frequencyHz"> & { frequencyUncertaintyHz?: number | null; edge?: boolean };

export interface CauseContext {
  antenna: Antenna;
  /** All dips of the sweep, the judged one among them or not. */
  dips: readonly JudgedDip[];
  /** VF·c/(2l) of the feedline, Hz; null where it is not known. */
  ripplePeriodHz: number | null;
  /** The dips of the bench's own sweeps. */
  references: readonly ReferenceDip[];
  /** How lengths are written. */
  unit?: LengthUnit;
}

/** A dip of one of the bench's own sweeps. */
export interface ReferenceDip {
  role: "open" | "short" | "load";
  frequencyHz: number;
  frequencyUncertaintyHz: number | null;
}
