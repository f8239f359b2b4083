import type { Coverage } from "./coverage.ts";

/** Coverage of a pixel that belongs to a filled area. */
const FILLED = 0.55;

/**
 * Marks filled areas that no stroke of this thickness makes: markers, letters, fillings.
 *
 * A pixel is marked when it lies in a fully covered rectangle wider than two strokes side by side and higher
 * than one stroke. Row by row like the coverage; null where there is none.
 */
export function findBlobs(coverage: Coverage, thickness: number): Uint8Array | null {
  const wide = Math.max(5, Math.ceil(2 * thickness + 3));
  const high = Math.max(3, Math.ceil(thickness + 1.5));
  const { width, height, share } = coverage;
  const inRow = new Int16Array(width * height);
  for (let y = 0; y < height; y++) {
    let run = 0;
    for (let x = 0; x < width; x++) {
      run = share[y * width + x] >= FILLED ? run + 1 : 0;
      inRow[y * width + x] = run;
    }
  }
  let blobs: Uint8Array | null = null;
  for (let x = wide - 1; x < width; x++) {
    let run = 0;
    for (let y = 0; y < height; y++) {
      run = inRow[y * width + x] >= wide ? run + 1 : 0;
      if (run < high) continue;
      blobs ??= new Uint8Array(width * height);
      for (let b = y - high + 1; b <= y; b++) blobs.fill(1, b * width + x - wide + 1, b * width + x + 1);
    }
  }
  return blobs;
}
