import type { MaskedStretch } from "../reading.ts";
import type { Picture } from "./picture.ts";

/** How far around a box its ground is looked for, pixels. */
const RING = 3;

/** The picture with every box (a stretch that has rows) painted in the colour around it; a copy where there is one. */
export function paintAway(picture: Picture, masked: readonly MaskedStretch[]): Picture {
  const boxes = masked.flatMap(({ fromX, toX, top, bottom }) =>
    top === undefined || bottom === undefined ? [] : [inside(picture, { fromX, toX, top, bottom })],
  );
  if (boxes.length === 0) return picture;
  const painted = { ...picture, data: Uint8ClampedArray.from(picture.data) };
  for (const box of boxes) {
    const ground = around(picture, box);
    for (let y = box.top; y <= box.bottom; y++)
      for (let x = box.fromX; x <= box.toX; x++) painted.data.set(ground, 4 * (y * picture.width + x));
  }
  return painted;
}

type Boxed = Required<MaskedStretch>;

function inside({ width, height }: Picture, box: Boxed): Boxed {
  const within = (value: number, most: number) => Math.max(0, Math.min(most, value));
  return {
    fromX: within(Math.floor(box.fromX), width - 1),
    toX: within(Math.ceil(box.toX), width - 1),
    top: within(Math.floor(box.top), height - 1),
    bottom: within(Math.ceil(box.bottom), height - 1),
  };
}

/** The middle of each channel over a ring around the box. */
function around({ data, width, height }: Picture, box: Boxed): number[] {
  const channels: number[][] = [[], [], [], []];
  for (let y = Math.max(0, box.top - RING); y <= Math.min(height - 1, box.bottom + RING); y++) {
    for (let x = Math.max(0, box.fromX - RING); x <= Math.min(width - 1, box.toX + RING); x++) {
      if (x >= box.fromX && x <= box.toX && y >= box.top && y <= box.bottom) continue;
      for (let c = 0; c < 4; c++) channels[c].push(data[4 * (y * width + x) + c]);
    }
  }
  return channels.map((values) => values.sort((a, b) => a - b)[values.length >> 1] ?? 255);
}
