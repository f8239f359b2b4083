import { labelMarks, type Place, type TextMaker } from "./labels.ts";
import type { Content, Truth } from "./picture.ts";
import { truthOf } from "./picture.ts";
import type { Random } from "./random.ts";
import type { Mark, Scene } from "./scene.ts";
import { pickSkin, type Skin } from "./skins.ts";

const SIZES: [number, number][] = [
  [480, 320],
  [640, 480],
  [800, 480],
  [1024, 600],
  [1280, 800],
  [900, 600],
  [720, 540],
];

/** Draws a plot with its surroundings: an invented instrument's screen or a report's chart. */
export function layOut(random: Random, content: Content, name: string): { scene: Scene; truth: Truth } {
  const skin = pickSkin(random);
  const [width, height] = random.pick(SIZES);
  const size = Math.max(11, Math.round(height * random.between(0.022, 0.032)));
  const buttons = random.chance(0.4);
  const box: Place = {
    left: Math.round(width * 0.04 + size * 3.4),
    top: Math.round(size * random.between(2.6, 4)),
    right: Math.round(width * (buttons ? 0.84 : random.between(0.93, 0.97))),
    bottom: Math.round(height - size * random.between(4, 5)),
  };
  const { scale, sweep } = content;
  const columns = sweep.scale === "log" ? null : random.pick([5, 8, 10, 12]);
  const half = random.chance(0.5) ? 0.5 : 0;
  const marks: Mark[] = [
    { kind: "area", x: 0, y: 0, width, height, fill: skin.outer },
    {
      kind: "area",
      x: box.left,
      y: box.top,
      width: box.right - box.left,
      height: box.bottom - box.top,
      fill: skin.inner,
    },
    ...gridMarks(random, skin, box, columns, scale.rows, half),
  ];
  const at: Place = {
    left: box.left + half,
    right: box.right + half,
    top: box.top + half,
    bottom: box.bottom + half,
  };
  const text = (
    x: number,
    y: number,
    words: string,
    align: "start" | "middle" | "end",
    turned = false,
  ): Mark => ({
    kind: "text",
    x,
    y,
    text: words,
    size,
    color: skin.ink,
    font: skin.font,
    align,
    turned,
  });
  marks.push(...outerMarks(random, skin, at));
  const second = random.chance(0.2);
  const path = (values: number[], color: string, stroke: number): Mark => ({
    kind: "path",
    points: values.map((v, i) => [xOf(i / (values.length - 1), at), yOf(v, at, content)]),
    color,
    width: stroke,
    clip: [at.left, at.top - 1, at.right - at.left, at.bottom - at.top + 2],
  });
  if (second && scale.quantity !== "swr" && scale.quantity !== "return_loss_up") {
    marks.push(
      path(
        content.values.map(() => scale.zeroDb - 0.3 * random.next()),
        skin.second,
        1,
      ),
    );
  }
  const clipped = content.values.map((v) =>
    Math.min(Math.max(v, Math.min(scale.top, scale.bottom)), Math.max(scale.top, scale.bottom)),
  );
  marks.push(
    path(random.chance(0.7) ? clipped : content.values, skin.trace, random.pick([1, 1.2, 1.5, 2, 2.5])),
  );
  marks.push(...markerMarks(random, skin, at, content, size));
  const printed = labelMarks(random, content, at, columns, size, text, marks);
  if (buttons) marks.push(...buttonMarks(skin, box, width, size, text));
  const scene: Scene = { width, height, marks, crisp: random.chance(0.25) };
  const truth = truthOf(
    content,
    { name, skin: skin.name, size: [width, height], printed, color: skin.trace, columns },
    at,
  );
  return { scene, truth };
}

function xOf(share: number, at: Place): number {
  return at.left + share * (at.right - at.left);
}

function yOf(value: number, at: Place, { scale }: Content): number {
  return at.top + ((value - scale.top) / (scale.bottom - scale.top)) * (at.bottom - at.top);
}

function gridMarks(
  random: Random,
  skin: Skin,
  box: Place,
  columns: number | null,
  rows: number,
  half: number,
): Mark[] {
  const manner = random.pick(["solid", "solid", "dotted", "dashed", "none"]);
  if (manner === "none") return [];
  const dash = manner === "dotted" ? [1, 3] : manner === "dashed" ? [4, 4] : undefined;
  const marks: Mark[] = [];
  const snap = (v: number) => Math.round(v) + half;
  for (let i = 1; i < rows; i++) {
    const y = snap(box.top + (i * (box.bottom - box.top)) / rows);
    marks.push({ kind: "line", x1: box.left, x2: box.right, y1: y, y2: y, color: skin.grid, width: 1, dash });
  }
  for (let i = 1; i < (columns ?? 0); i++) {
    const x = snap(box.left + (i * (box.right - box.left)) / (columns ?? 1));
    marks.push({ kind: "line", x1: x, x2: x, y1: box.top, y2: box.bottom, color: skin.grid, width: 1, dash });
  }
  return marks;
}

function outerMarks(random: Random, skin: Skin, at: Place): Mark[] {
  const width = random.pick([1, 1, 1.5, 2]);
  const side = (x1: number, y1: number, x2: number, y2: number): Mark => ({
    kind: "line",
    x1,
    y1,
    x2,
    y2,
    color: skin.outline,
    width,
  });
  return [
    side(at.left, at.top, at.right, at.top),
    side(at.left, at.bottom, at.right, at.bottom),
    side(at.left, at.top, at.left, at.bottom),
    side(at.right, at.top, at.right, at.bottom),
  ];
}

function markerMarks(random: Random, skin: Skin, at: Place, content: Content, size: number): Mark[] {
  if (!random.chance(0.4)) return [];
  const down = content.scale.quantity === "return_loss_up" ? -1 : 1;
  const deepest = content.values.reduce(
    (best, v, i) => (down * v < down * content.values[best] ? i : best),
    0,
  );
  const x = xOf(deepest / (content.values.length - 1), at);
  const y = Math.min(Math.max(yOf(content.values[deepest], at, content), at.top + 8), at.bottom - 8);
  const tall = 0.55 * size * down;
  return [
    {
      kind: "shape",
      points: [
        [x, y],
        [x - size * 0.35, y - tall],
        [x + size * 0.35, y - tall],
      ],
      fill: skin.ink,
    },
    {
      kind: "text",
      x: x + size * 0.5,
      y: y - tall * 0.4,
      text: "1",
      size: size * 0.9,
      color: skin.ink,
      font: skin.font,
      align: "start",
    },
  ];
}

function buttonMarks(skin: Skin, box: Place, width: number, size: number, text: TextMaker): Mark[] {
  const left = box.right + size * 0.8;
  const wide = width - left - size * 0.5;
  const tall = (box.bottom - box.top) / 5.5;
  return ["Trace", "Hold", "Store", "Peak", "Back"].flatMap((word, i): Mark[] => {
    const y = Math.round(box.top + i * tall * 1.1);
    const edge = (x1: number, y1: number, x2: number, y2: number): Mark => ({
      kind: "line",
      x1,
      y1,
      x2,
      y2,
      color: skin.outline,
      width: 1,
    });
    return [
      edge(left, y, left + wide, y),
      edge(left, y + tall, left + wide, y + tall),
      edge(left, y, left, y + tall),
      edge(left + wide, y, left + wide, y + tall),
      text(left + size * 0.4, y + tall / 2 + size * 0.3, word, "start"),
    ];
  });
}
