import type { PicturePoint } from "~/readers/reading";

/** How far around a press the line may lie, pixels of the picture. */
const REACH = 4;

/** The colour of the line nearest to a press: the pixel around it that differs most from what is usual there. */
export function pickColour(image: HTMLImageElement, at: PicturePoint): string | null {
  const size = 2 * REACH + 1;
  const canvas = document.createElement("canvas");
  canvas.width = size;
  canvas.height = size;
  const context = canvas.getContext("2d", { willReadFrequently: true });
  if (!context) return null;
  context.drawImage(image, REACH - Math.round(at.x), REACH - Math.round(at.y));
  const { data } = context.getImageData(0, 0, size, size);
  const pixels = Array.from({ length: size * size }, (_, i) => [...data.slice(4 * i, 4 * i + 3)]);
  const usual = [0, 1, 2].map(
    (c) => pixels.map((pixel) => pixel[c]).sort((a, b) => a - b)[pixels.length >> 1],
  );
  const centre = (size * size) >> 1;
  const worth = (pixel: number[], i: number) => {
    const away = Math.hypot((i % size) - REACH, Math.floor(i / size) - REACH);
    return Math.hypot(...pixel.map((value, c) => value - usual[c])) * (1 - away / (3 * REACH));
  };
  const best = pixels.reduce((b, pixel, i) => (worth(pixel, i) > worth(pixels[b], b) ? i : b), centre);
  return `#${pixels[best].map((value) => value.toString(16).padStart(2, "0")).join("")}`;
}
