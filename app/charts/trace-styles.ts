import { PAGE_PALETTE, type Palette } from "./palette.ts";

export interface TraceStyle {
  colour: string;
  /** Undefined for a whole line. */
  dash: string | undefined;
}

/** The look of the n-th of several lines: MOST_TRACES of them differ, each by its own dash. */
export function traceStyle(index: number, palette: Palette = PAGE_PALETTE): TraceStyle {
  const at = index % MOST_TRACES;
  return { colour: palette[COLOURS[at % COLOURS.length]], dash: DASHES[at] };
}

/** Four that stay apart in full and with each kind of colour blindness, in both themes (tests/charts/trace-styles.test.ts). */
const COLOURS = ["clay", "fen", "ink", "iris"] as const;
/** Four lines that follow one another differ in colour, and those of one colour in a dash that is easily told. */
const DASHES = [
  "7 4",
  undefined,
  "12 4 2 4",
  "2 4",
  "2 3",
  "14 5",
  "5 3",
  "10 3 2 3 2 3",
  "16 4 4 4",
  "3 5 10 5",
  "1 5",
  "8 8",
] as const;
export const MOST_TRACES = DASHES.length;
