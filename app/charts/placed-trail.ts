export type TrailTone = "heather" | "clay" | "moss";

/** A trail where it stands on the map: fractions across, px down. */
export interface PlacedTrail {
  id: string;
  label: string;
  detail: string;
  tone: TrailTone;
  /** From stop to stop where the strips follow one another, and where strips between do not show it. */
  way: string;
  gaps: string;
  /** From the newest stop to its planned ghost. */
  ahead: string;
  /** Newest first. */
  stops: TrailStop[];
  ghosts: PlacedGhost[];
  /** Beside the newest stop; null where it fits at no width. */
  name: TrailName | null;
}

export interface TrailStop {
  dipId: string;
  stripId: string;
  fraction: number;
  y: number;
  words: string;
}

export interface PlacedGhost {
  key: string;
  fraction: number;
  /** The interval's ends in view; null where it is not known. */
  low: number | null;
  high: number | null;
  y: number;
  planned: boolean;
  words: string;
}

export interface TrailName {
  side: "left" | "right";
  /** px under the stop, negative over it. */
  shiftY: number;
  /** Narrowest tier at which the label is shown, and at which the detail is shown with it; null at none. */
  tier: number;
  detailTier: number | null;
}
