import type { Box, Picture } from "./picture.ts";

/** Side of the square whose median is taken as the ground there, pixels; far wider than a trace or grid line. */
const WINDOW = 40;
/** Pixels between the places where the ground is estimated. */
const STEP = 20;
/** Most samples a side of a window. */
const SAMPLES = 20;

/**
 * Takes unequal light out of a photographed plot: the ground of `plot` becomes one colour, all else keeps its
 * difference from the ground beside it. Outside the plot the shift of the nearest place inside is used.
 *
 * Method: the local median of each channel as the ground (background flattening by a median filter, common
 * practice, no source). Returns a new picture; a plot smaller than a window comes back as it is.
 */
export function evenLight(picture: Picture, plot: Box): Picture {
  const { width, height, data } = picture;
  const inner = { left: plot.left + 3, top: plot.top + 3, right: plot.right - 3, bottom: plot.bottom - 3 };
  const xs = places(inner.left, inner.right);
  const ys = places(inner.top, inner.bottom);
  if (xs.length < 2 || ys.length < 2) return picture;
  const out = new Uint8ClampedArray(data);
  for (let c = 0; c < 3; c++) {
    const ground = ys.map((y) => xs.map((x) => medianAround(picture, inner, x, y, c)));
    const common = median(ground.flat());
    for (let y = 0; y < height; y++) {
      const [row, down] = between(ys, y);
      const line = xs.map((_, i) => ground[row][i] * (1 - down) + ground[row + 1][i] * down);
      for (let x = 0; x < width; x++) {
        const [column, across] = between(xs, x);
        const at = 4 * (y * width + x) + c;
        out[at] = data[at] + common - line[column] * (1 - across) - line[column + 1] * across;
      }
    }
  }
  return { width, height, data: out };
}

function places(first: number, last: number): number[] {
  const from = first + WINDOW / 2;
  const to = last - WINDOW / 2;
  if (to <= from) return [];
  const count = Math.max(2, Math.round((to - from) / STEP) + 1);
  return Array.from({ length: count }, (_, i) => from + ((to - from) * i) / (count - 1));
}

/** The place before `at`, equally spaced, and the share of the way to the next; held at both ends. */
function between(places: number[], at: number): [number, number] {
  const step = places[1] - places[0];
  const along = Math.min(places.length - 1, Math.max(0, (at - places[0]) / step));
  const index = Math.min(places.length - 2, Math.floor(along));
  return [index, along - index];
}

function medianAround({ data, width }: Picture, inner: Box, x: number, y: number, c: number): number {
  const values: number[] = [];
  const stride = WINDOW / SAMPLES;
  for (let i = 0; i < SAMPLES; i++) {
    const row = Math.round(y - WINDOW / 2 + i * stride);
    if (row < inner.top || row > inner.bottom) continue;
    for (let j = 0; j < SAMPLES; j++) {
      const column = Math.round(x - WINDOW / 2 + j * stride);
      if (column >= inner.left && column <= inner.right) values.push(data[4 * (row * width + column) + c]);
    }
  }
  return median(values);
}

function median(values: number[]): number {
  const sorted = Float64Array.from(values).sort();
  return sorted[sorted.length >> 1];
}
