import type { Picture } from "~/readers/screenshot/picture";

/** An invented plot drawn pixel by pixel: ground, frame with four divisions a side, one or two traces 2 px thick. */
export const FRAME = { left: 60, top: 40, right: 460, bottom: 290 };
export const SPEC = {
  frame: FRAME,
  startHz: 1e6,
  stopHz: 31e6,
  scale: "linear",
  top: 0,
  bottom: -50,
  quantity: "s11-db",
  referenceOhm: 50,
  traceColor: "#ffd040",
} as const;

/** Level of the invented sweep at a column, dB: one dip in the middle. */
export function levelAt(x: number): number {
  const share = (x - FRAME.left) / (FRAME.right - FRAME.left);
  return -4 - 28 / (1 + ((share - 0.5) / 0.06) ** 2);
}

export function rowOf(level: number): number {
  return FRAME.top + ((SPEC.top - level) / (SPEC.top - SPEC.bottom)) * (FRAME.bottom - FRAME.top);
}

export function drawnPlot(more: { second?: (x: number) => number; blot?: boolean } = {}): Picture {
  const width = 520;
  const height = 340;
  const data = new Uint8ClampedArray(4 * width * height);
  const set = (x: number, y: number, [r, g, b]: number[], share = 1) => {
    const at = 4 * (y * width + x);
    [r, g, b].forEach((value, c) => {
      data[at + c] = data[at + c] * (1 - share) + value * share;
    });
    data[at + 3] = 255;
  };
  for (let y = 0; y < height; y++) for (let x = 0; x < width; x++) set(x, y, [18, 24, 30]);
  for (let i = 0; i <= 4; i++) {
    const column = FRAME.left + (100 * i) / 1;
    const row = Math.round(FRAME.top + (250 * i) / 4);
    for (let y = FRAME.top; y <= FRAME.bottom; y++) set(column, y, [90, 100, 110]);
    for (let x = FRAME.left; x <= FRAME.right; x++) set(x, row, [90, 100, 110]);
  }
  const pen = (level: (x: number) => number, color: number[]) => {
    for (let x = FRAME.left; x <= FRAME.right; x++) {
      const ends = [x - 0.5, x, x + 0.5].map((at) => rowOf(level(at)));
      const from = Math.min(...ends) - 1;
      const to = Math.max(...ends) + 1;
      for (let y = Math.floor(from); y <= Math.ceil(to); y++) {
        const covered = Math.min(to, y + 0.5) - Math.max(from, y - 0.5);
        if (covered > 0) set(x, y, color, Math.min(1, covered));
      }
    }
  };
  if (more.second) pen(more.second, [80, 160, 255]);
  pen(levelAt, [255, 208, 64]);
  if (more.blot) {
    for (let y = 60; y < 200; y++) for (let x = 330; x < 352; x++) set(x, y, [255, 208, 64]);
  }
  return { width, height, data };
}

/** Reads nothing; counts how often it was asked. */
export function countingOcr() {
  const asked = { times: 0 };
  const ocr = async () => {
    asked.times += 1;
    return [];
  };
  return { ocr, asked };
}
