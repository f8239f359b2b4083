import type { FoundFrame } from "./frame.ts";
import { lookApart, type Rgb } from "./oklab.ts";
import type { Picture } from "./picture.ts";

/** What lies behind the traces: the plot's ground and its grid. */
export interface Ground {
  color: Rgb;
  /** Colour of the grid lines; null where there are none. */
  grid: Rgb | null;
  /** Colour of the left and right outer lines; null where they are none or differ. */
  outline: Rgb | null;
  /** First and last column and row that belong to the plot's inside. */
  left: number;
  right: number;
  top: number;
  bottom: number;
  /** Rows of the top and the bottom line: a trace at the limit lies on them. */
  outerRows: number[];
  /** Colour behind a whole row or column where a grid line runs; undefined elsewhere. */
  rows: (Rgb | undefined)[];
  columns: (Rgb | undefined)[];
}

/** Rows above the top and below the bottom line in which a trace at the limit is still drawn. */
const OVERHANG = 2;
/** Smallest visible difference of a grid line from the ground. */
const SEEN = 0.02;
/** Difference within which lines have one colour. */
const LIKE = 0.08;
/** Pixels between two lines of a grid at least. */
const APART = 8;

/** Finds the plot's ground colour and the colours of its grid lines, row by row and column by column. */
export function findGround(picture: Picture, found: FoundFrame): Ground {
  const { frame } = found;
  const left = Math.max(0, Math.ceil(frame.left + 0.6));
  const right = Math.min(picture.width - 1, Math.floor(frame.right - 0.6));
  const top = Math.max(0, Math.round(frame.top) - OVERHANG);
  const bottom = Math.min(picture.height - 1, Math.round(frame.bottom) + OVERHANG);
  const color = commonest(picture, left, right, top + 4, bottom - 4);
  const ground: Ground = {
    color,
    grid: null,
    outline: null,
    left,
    right,
    top,
    bottom,
    outerRows: [Math.round(frame.top), Math.round(frame.bottom)],
    rows: [],
    columns: [],
  };
  const lineRows = [...found.horizontal.map((l) => l.position), frame.top, frame.bottom];
  const lineColumns = [...found.vertical.map((l) => l.position), frame.left, frame.right];
  const inner: { color: Rgb; position: number }[] = [];
  for (const position of lineRows) {
    const seen = around(position, top, bottom).map((y) => ({
      place: y,
      color: median(picture, (i) => [left + i, y], right - left + 1),
    }));
    for (const { place, color: typical } of seen)
      if (lookApart(typical, color) >= SEEN) ground.rows[place] = typical;
    if (position > frame.top + 3 && position < frame.bottom - 3)
      inner.push({
        color: farthest(
          seen.map((s) => s.color),
          color,
        ),
        position,
      });
  }
  for (const position of lineColumns) {
    const seen = around(position, left, right).map((x) => ({
      place: x,
      color: median(picture, (i) => [x, top + i], bottom - top + 1),
    }));
    for (const { place, color: typical } of seen)
      if (lookApart(typical, color) >= SEEN) ground.columns[place] = typical;
    if (position > frame.left + 3 && position < frame.right - 3)
      inner.push({
        color: farthest(
          seen.map((s) => s.color),
          color,
        ),
        position,
      });
  }
  ground.grid = shared(inner, color);
  const sides = [frame.left, frame.right].map((x) => {
    const near = around(x, 0, picture.width - 1).map((at) =>
      median(picture, (i) => [at, top + i], bottom - top + 1),
    );
    return farthest(near, color);
  });
  if (lookApart(sides[0], sides[1]) < LIKE && lookApart(sides[0], color) >= SEEN) ground.outline = sides[0];
  return ground;
}

/** Rows or columns within two pixels of a line. */
function around(position: number, first: number, last: number): number[] {
  const near: number[] = [];
  for (let i = Math.floor(position) - 1; i <= Math.ceil(position) + 1; i++)
    if (i >= first && i <= last) near.push(i);
  return near;
}

function commonest(picture: Picture, left: number, right: number, top: number, bottom: number): Rgb {
  const votes = new Map<number, [number, number, number, number]>();
  let best: [number, number, number, number] = [0, 0, 0, 1];
  let most = 0;
  for (let y = top; y <= bottom; y += 2) {
    for (let x = left; x <= right; x += 2) {
      const j = 4 * (y * picture.width + x);
      const { data } = picture;
      const key = ((data[j] >> 3) << 10) | ((data[j + 1] >> 3) << 5) | (data[j + 2] >> 3);
      let sum = votes.get(key);
      if (!sum) {
        sum = [0, 0, 0, 0];
        votes.set(key, sum);
      }
      sum[0] += data[j];
      sum[1] += data[j + 1];
      sum[2] += data[j + 2];
      sum[3]++;
      if (sum[3] > most) {
        most = sum[3];
        best = sum;
      }
    }
  }
  return [best[0] / best[3], best[1] / best[3], best[2] / best[3]];
}

function median(picture: Picture, place: (i: number) => [number, number], length: number): Rgb {
  const channels: number[][] = [[], [], []];
  const step = Math.max(1, Math.floor(length / 120));
  for (let i = 0; i < length; i += step) {
    const [x, y] = place(i);
    const j = 4 * (y * picture.width + x);
    for (let c = 0; c < 3; c++) channels[c].push(picture.data[j + c]);
  }
  return channels.map((v) => v.sort((a, b) => a - b)[Math.floor(v.length / 2)]) as Rgb;
}

function farthest(colors: Rgb[], from: Rgb): Rgb {
  return colors.reduce((a, b) => (lookApart(b, from) > lookApart(a, from) ? b : a), from);
}

/** The colour that at least three lines apart from each other have; lines close together may be one flat trace. */
function shared(lines: { color: Rgb; position: number }[], ground: Rgb): Rgb | null {
  let best: Rgb | null = null;
  let most = 2;
  for (const { color } of lines) {
    const like = lines.filter((l) => lookApart(color, l.color) < LIKE).map((l) => l.position);
    const apart = like.filter((p, i) => like.slice(0, i).every((q) => Math.abs(p - q) > APART)).length;
    if (apart > most && lookApart(color, ground) >= SEEN) {
      most = apart;
      best = color;
    }
  }
  return best;
}
