import { countDivisions, evenEnds } from "./divisions.ts";
import { findLines } from "./lines.ts";
import { type Box, brightness, type Line, type Picture, type Stage, transpose } from "./picture.ts";
import { tickMarks } from "./tick-marks.ts";

/** The plot's outer lines and its divisions. */
export interface Frame {
  left: number;
  top: number;
  right: number;
  bottom: number;
  /** Equal divisions between the outer lines; null where no such grid is seen. */
  columns: number | null;
  rows: number | null;
}

export interface FoundFrame extends Stage {
  frame: Frame;
  /** Lines across the plot, the outer ones among them. */
  horizontal: Line[];
  vertical: Line[];
  /** Places of short tick marks along the bottom and the left line. */
  ticks: { columns: number[]; rows: number[] };
}

interface Span {
  from: number;
  to: number;
}

/** Ends of grid lines agree within this many pixels. */
const END_TOLERANCE = 3;
/** Ticks let a grid line stick out of the plot by up to this many pixels. */
const TICK_LENGTH = 12;
/** Half the width over which one outline may be found as several lines. */
const THICK_OUTLINE = 4.2;
/** Pixels by which that library's lines lie right of and below their true places, in the mean. */
const SNAP_BIAS = 0.5;
/** Pixels by which an outline may miss its library's standard place. */
const MARGIN_TOLERANCE = 2.7;
/** An outer line counts as much as so many lines inside. */
const SIDE_WORTH = 6;
/** A tick's label can seem to continue the line further. */
const LABEL_REACH = 32;
/** Share of a side that a line may be short: a trace or text lies over its end. */
const LARGEST_SHORTFALL = 0.16;
/** Smallest share of the picture's sides that a plot has. */
const SMALLEST_SIDE = 0.25;

/**
 * Finds the plot's frame by the lines that end together: outline, grid, or the border of its area.
 *
 * Returns null where no rectangle of lines is large enough. `given` replaces the search; divisions
 * are then counted inside it.
 */
export function findFrame(
  picture: Picture,
  given?: { left: number; top: number; right: number; bottom: number },
): FoundFrame | null {
  const { width, height } = picture;
  const grey = brightness(picture);
  const turned = transpose(grey, width, height);
  const horizontals = findLines(grey, width, height);
  const verticals = findLines(turned, height, width);
  const best = given
    ? { ...given, score: 0, sides: 4, inside: 0 }
    : bestRectangle(horizontals, verticals, width, height);
  if (!best) return null;
  const settle = (lines: Line[], at: number, from: number, to: number) =>
    given ? at : centreOfStroke(lines, at, from, to);
  const settled = {
    left: settle(verticals, best.left, best.top, best.bottom),
    right: settle(verticals, best.right, best.top, best.bottom),
    top: settle(horizontals, best.top, best.left, best.right),
    bottom: settle(horizontals, best.bottom, best.left, best.right),
  };
  const evened = given ? settled : evenOut(settled, horizontals, verticals);
  const { left, top, right, bottom } = given ? evened : onStandardMargins(evened, width, height);
  const snapped = onMargins({ left, top, right, bottom }, standardMargins(width, height), 0.01);
  const placed = (lines: Line[]) =>
    snapped ? lines.map((l) => ({ ...l, position: l.position - SNAP_BIAS })) : lines;
  const horizontal = placed(horizontals).filter(
    (l) => between(l.position, top, bottom) && covers(l, left, right),
  );
  const vertical = placed(verticals).filter(
    (l) => between(l.position, left, right) && covers(l, top, bottom),
  );
  const rows = countDivisions(grey, width, { left, right, top, bottom }, horizontal);
  const columns = countDivisions(
    turned,
    height,
    { left: top, right: bottom, top: left, bottom: right },
    vertical,
  );
  const exchanged = { left: top, right: bottom, top: right, bottom: left };
  const bias = snapped ? SNAP_BIAS : 0;
  const ticks = {
    columns: tickMarks(grey, width, { left, right, top, bottom }, -1).map((x) => x - bias),
    rows: tickMarks(turned, height, exchanged, 1).map((y) => y - bias),
  };
  const confidence = given ? 1 : Math.min(1, 0.3 + 0.12 * best.sides + 0.04 * Math.min(8, best.inside));
  const saw = given
    ? "The frame was given."
    : `${Math.round(best.sides)} of 4 outer lines and ${Math.round(best.inside)} lines inside that end at them.`;
  return { frame: { left, top, right, bottom, columns, rows }, horizontal, vertical, ticks, confidence, saw };
}

/** Evenly spaced grid lines say where the outer lines lie better than these do alone. */
function evenOut<B extends Box>(box: B, horizontals: Line[], verticals: Line[]): B {
  const across = verticals.filter((l) => covers(l, box.top, box.bottom)).map((l) => l.position);
  const down = horizontals.filter((l) => covers(l, box.left, box.right)).map((l) => l.position);
  const [left, right] = evenEnds(across, box.left, box.right);
  const [top, bottom] = evenEnds(down, box.top, box.bottom);
  return { ...box, left, right, top, bottom };
}

/**
 * A common plotting library (matplotlib, defaults `figure.subplot.*`) sets its plot at fixed shares of the
 * picture, draws the data there, and the outline on the next whole pixels. Where all four sides agree with
 * those shares, the unrounded place is the better one.
 */
function onStandardMargins(box: Box, width: number, height: number): Box {
  const exact = standardMargins(width, height);
  const drawn = {
    left: exact.left + SNAP_BIAS,
    right: exact.right + SNAP_BIAS,
    top: exact.top + SNAP_BIAS,
    bottom: exact.bottom + SNAP_BIAS,
  };
  return onMargins(box, drawn, MARGIN_TOLERANCE) ? exact : box;
}

function standardMargins(width: number, height: number): Box {
  return {
    left: 0.125 * width - 0.5,
    right: 0.9 * width - 0.5,
    top: 0.12 * height - 0.5,
    bottom: 0.89 * height - 0.5,
  };
}

function onMargins(box: Box, margins: Box, tolerance: number): boolean {
  return (["left", "right", "top", "bottom"] as const).every(
    (side) => Math.abs(box[side] - margins[side]) <= tolerance,
  );
}

interface Rectangle {
  left: number;
  top: number;
  right: number;
  bottom: number;
  score: number;
  sides: number;
  inside: number;
}

function bestRectangle(
  horizontals: Line[],
  verticals: Line[],
  width: number,
  height: number,
): Rectangle | null {
  const across = spans(horizontals, verticals, SMALLEST_SIDE * width);
  const down = spans(verticals, horizontals, SMALLEST_SIDE * height);
  let best: Rectangle | null = null;
  const all: Rectangle[] = [];
  for (const x of across) {
    for (const y of down) {
      const candidate = judge(x, y, horizontals, verticals, width, height);
      if (candidate) all.push(candidate);
      if (candidate && (!best || candidate.score > best.score)) best = candidate;
    }
  }
  return best && preferInner(best, all);
}

/** Stretches that a plot may cover: from a line's end to its other end, or from one crossing line to another. */
function spans(lines: Line[], crossing: Line[], shortest: number): Span[] {
  const found: (Span & { votes: number })[] = [];
  const add = (from: number, to: number, votes: number) => {
    if (to - from < shortest) return;
    const known = found.find((s) => Math.abs(s.from - from) <= 1.2 && Math.abs(s.to - to) <= 1.2);
    if (known) known.votes += votes;
    else found.push({ from, to, votes });
  };
  for (const line of lines) {
    const from = snap(line.from, crossing, line.position, TICK_LENGTH);
    const to = snap(line.to, crossing, line.position, TICK_LENGTH);
    add(from, to, 1);
    add(snap(line.from, crossing, line.position, 1.5), snap(line.to, crossing, line.position, 1.5), 0.6);
  }
  for (const a of crossing) {
    for (const b of crossing) {
      if (Math.abs(a.from - b.from) <= LABEL_REACH && Math.abs(a.to - b.to) <= LABEL_REACH)
        add(a.position, b.position, 0.5);
    }
  }
  return found.sort((a, b) => b.votes - a.votes).slice(0, 60);
}

/** A line's end lies on the crossing line next to it, if there is one. */
function snap(end: number, crossing: Line[], position: number, reach: number): number {
  let best = end;
  let distance = reach;
  for (const line of crossing) {
    const reaches = line.from - TICK_LENGTH <= position && line.to + TICK_LENGTH >= position;
    const d = Math.abs(line.position - end);
    if (reaches && d < distance) {
      distance = d;
      best = line.position;
    }
  }
  return best;
}

function judge(
  x: Span,
  y: Span,
  horizontals: Line[],
  verticals: Line[],
  width: number,
  height: number,
): Rectangle | null {
  const h = support(horizontals, x, y);
  const v = support(verticals, y, x);
  const sides = h.sides + v.sides;
  const inside = h.inside + v.inside;
  if (sides < 1.2 && inside < 3) return null;
  if (h.sides + h.inside < 1.1 || v.sides + v.inside < 1.1) return null;
  const area = ((x.to - x.from) * (y.to - y.from)) / (width * height);
  const margins = [x.from / width, y.from / height, 1 - x.to / width, 1 - y.to / height];
  const bezel = margins.filter((m) => m < 0.015).length >= 3 ? 0.3 : 1;
  const exact = h.exact + v.exact;
  const score =
    (Math.min(6, h.inside) + Math.min(6, v.inside) + SIDE_WORTH * sides + 0.25 * Math.min(8, exact)) *
    Math.sqrt(area) *
    bezel;
  return { left: x.from, right: x.to, top: y.from, bottom: y.to, score, sides, inside };
}

function support(lines: Line[], along: Span, across: Span): { sides: number; inside: number; exact: number } {
  let first = 0;
  let last = 0;
  let inside = 0;
  let exact = 0;
  for (const line of lines) {
    const before = along.from - line.from;
    const after = line.to - along.to;
    const shortest = -Math.max(TICK_LENGTH, LARGEST_SHORTFALL * (along.to - along.from));
    if (Math.min(before, after) < shortest) continue;
    const beyond = Math.max(before, after) > LABEL_REACH;
    const outer = Math.abs(line.position - across.from) <= 1 || Math.abs(line.position - across.to) <= 1;
    if (beyond && !outer) continue;
    const ends = endVote(before) + endVote(after);
    exact += ends;
    if (Math.abs(line.position - across.from) <= 1) first = Math.max(first, ends);
    else if (Math.abs(line.position - across.to) <= 1) last = Math.max(last, ends);
    else if (line.position > across.from + 3 && line.position < across.to - 3) inside += ends;
  }
  return { sides: first + last, inside, exact };
}

/** Half a vote for an end that fits; a tick may stick out, a trace may cover the last stretch. */
function endVote(overshoot: number): number {
  if (Math.abs(overshoot) <= END_TOLERANCE) return 0.5;
  if (overshoot < 0) return overshoot >= -TICK_LENGTH ? 0.25 : 0.15;
  if (overshoot <= TICK_LENGTH) return 0.4;
  return overshoot <= LABEL_REACH ? 0.3 : 0.15;
}

/** A window's border around the plot scores by its size alone: the gridded rectangle inside it is meant. */
function preferInner(best: Rectangle, all: Rectangle[]): Rectangle {
  const area = (r: Rectangle) => (r.right - r.left) * (r.bottom - r.top);
  const within = (r: Rectangle) =>
    r.left > best.left + 6 && r.right < best.right - 6 && r.top > best.top + 6 && r.bottom < best.bottom - 6;
  if (best.inside > 4) return best;
  const inner = all
    .filter((r) => within(r) && area(r) > 0.35 * area(best) && (r.sides === 4 || r.inside > 6))
    .sort((a, b) => b.score - a.score)[0];
  return inner ?? best;
}

/** A thick or sharpened outline is found as several lines side by side: their middle by contrast is meant. */
function centreOfStroke(lines: Line[], at: number, from: number, to: number): number {
  const near = lines.filter((l) => Math.abs(l.position - at) <= THICK_OUTLINE && covers(l, from, to));
  const weight = near.reduce((sum, l) => sum + l.contrast * (l.kind === "stroke" ? 2 : 1), 0);
  if (weight === 0) return at;
  return near.reduce((sum, l) => sum + l.position * l.contrast * (l.kind === "stroke" ? 2 : 1), 0) / weight;
}

function between(position: number, from: number, to: number): boolean {
  return position > from - 2 && position < to + 2;
}

function covers(line: Line, from: number, to: number): boolean {
  return Math.min(line.to, to) - Math.max(line.from, from) > 0.7 * (to - from);
}
