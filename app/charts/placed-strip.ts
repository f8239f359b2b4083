import type { StripPath } from "./strip-path.ts";

/** A sweep's strip where it stands on the map: fractions across, px down. */
export interface PlacedStrip {
  id: string;
  title: string;
  caption: string;
  landY: number;
  footY: number;
  path: StripPath;
  /** Dips in view that are on no trail. */
  dips: { id: string; fraction: number; y: number }[];
}

/** The steps that lie between two strips, or over the newest one. */
export interface PlacedSteps {
  y: number;
  heightPx: number;
  /** Nothing of it is done yet: ghosts stand in it. */
  planned: boolean;
  steps: { id: string; title: string; caption: string; planned: boolean }[];
}
