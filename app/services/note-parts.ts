/** In shares of the picture as it is shown, 0 to 1. */
export interface PictureRegion {
  x: number;
  y: number;
  width: number;
  height: number;
}

/** Smaller than this share of the picture is a slip of the hand, not a region. */
export const SMALLEST_SHARE = 0.005;
