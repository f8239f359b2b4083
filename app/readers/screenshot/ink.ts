import type { Box, GreyPicture, Picture } from "./picture.ts";

/** A region made ready for text recognition: dark on white, enlarged. */
export interface InkRegion {
  grey: GreyPicture;
  /** Region pixels per pixel of the picture. */
  scale: number;
  /** Picture place of the region's first pixel. */
  left: number;
  top: number;
}

/** Share of the deviations that is darker than full black: text is a small part of any region. */
const FULL_INK_QUANTILE = 0.997;
/** Weakest deviation that is stretched to black; below it there is nothing printed. */
const FAINTEST_INK = 40;

/**
 * Draws a region as dark ink on white paper, whatever its colours are.
 *
 * Ink is the largest deviation of a colour channel from the region's commonest colour. `hide` is left
 * blank (the plot's inside). `box` is cut to the picture. Enlarged with straight-line interpolation.
 */
export function inkRegion(picture: Picture, box: Box, scale: number, hide: Box | null = null): InkRegion {
  const left = Math.max(0, Math.floor(box.left));
  const top = Math.max(0, Math.floor(box.top));
  const right = Math.min(picture.width - 1, Math.ceil(box.right));
  const bottom = Math.min(picture.height - 1, Math.ceil(box.bottom));
  const width = Math.max(1, right - left + 1);
  const height = Math.max(1, bottom - top + 1);
  const ground = commonestColor(picture, { left, top, right, bottom }, hide);
  const ink = new Float32Array(width * height);
  const { data } = picture;
  for (let y = 0; y < height; y++) {
    for (let x = 0; x < width; x++) {
      if (hide && inside(hide, x + left, y + top)) continue;
      const j = 4 * ((y + top) * picture.width + x + left);
      const red = Math.abs(data[j] - ground[0]);
      const green = Math.abs(data[j + 1] - ground[1]);
      const blue = Math.abs(data[j + 2] - ground[2]);
      ink[y * width + x] = Math.max(red, green, blue);
    }
  }
  const full = Math.max(FAINTEST_INK, quantile(ink, FULL_INK_QUANTILE));
  return { grey: enlarge(ink, width, height, scale, 255 / full), scale, left, top };
}

/** The same region turned a quarter, so that text that runs upwards runs to the right. */
export function turnClockwise(region: GreyPicture): GreyPicture {
  const { width, height, data } = region;
  const turned = new Uint8Array(data.length);
  for (let y = 0; y < height; y++) {
    for (let x = 0; x < width; x++) turned[x * height + (height - 1 - y)] = data[y * width + x];
  }
  return { width: height, height: width, data: turned };
}

function inside(box: Box, x: number, y: number): boolean {
  return x >= box.left && x <= box.right && y >= box.top && y <= box.bottom;
}

function commonestColor(picture: Picture, box: Box, hide: Box | null): [number, number, number] {
  const votes = new Map<number, number>();
  let best = 0;
  let most = 0;
  for (let y = box.top; y <= box.bottom; y += 2) {
    for (let x = box.left; x <= box.right; x += 2) {
      if (hide && inside(hide, x, y)) continue;
      const j = 4 * (y * picture.width + x);
      const key =
        ((picture.data[j] >> 2) << 12) | ((picture.data[j + 1] >> 2) << 6) | (picture.data[j + 2] >> 2);
      const count = (votes.get(key) ?? 0) + 1;
      votes.set(key, count);
      if (count > most) {
        most = count;
        best = key;
      }
    }
  }
  return [((best >> 12) << 2) + 2, (((best >> 6) & 63) << 2) + 2, ((best & 63) << 2) + 2];
}

function quantile(values: Float32Array, q: number): number {
  const counts = new Int32Array(257);
  let total = 0;
  for (const v of values) {
    if (v > 8) {
      counts[Math.round(v)]++;
      total++;
    }
  }
  let sum = 0;
  const enough = total * (1 - Math.min(0.5, ((1 - q) * values.length) / Math.max(1, total)));
  for (let level = 0; level < counts.length; level++) {
    sum += counts[level];
    if (sum >= enough) return level;
  }
  return 255;
}

function enlarge(ink: Float32Array, width: number, height: number, scale: number, gain: number): GreyPicture {
  const w = Math.round(width * scale);
  const h = Math.round(height * scale);
  const data = new Uint8Array(w * h);
  for (let y = 0; y < h; y++) {
    const sy = Math.min(Math.max((y + 0.5) / scale - 0.5, 0), height - 1);
    const y0 = Math.floor(sy);
    const y1 = Math.min(height - 1, y0 + 1);
    const fy = sy - y0;
    for (let x = 0; x < w; x++) {
      const sx = Math.min(Math.max((x + 0.5) / scale - 0.5, 0), width - 1);
      const x0 = Math.floor(sx);
      const x1 = Math.min(width - 1, x0 + 1);
      const fx = sx - x0;
      const upper = ink[y0 * width + x0] * (1 - fx) + ink[y0 * width + x1] * fx;
      const lower = ink[y1 * width + x0] * (1 - fx) + ink[y1 * width + x1] * fx;
      data[y * w + x] = 255 - Math.min(255, (upper * (1 - fy) + lower * fy) * gain);
    }
  }
  return { width: w, height: h, data };
}
