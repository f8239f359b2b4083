import { PAGE_PALETTE } from "./palette.ts";

export interface TraceStyle {
  colour: string;
  /** Undefined for a whole line. */
  dash: string | undefined;
}

/** The look of the n-th of several lines; told apart by the dash as well as by the colour. */
export function traceStyle(index: number): TraceStyle {
  return STYLES[index % STYLES.length];
}

const { soft, ink, fen, clay, heather, moss } = PAGE_PALETTE;
/** Every pair of neighbours differs in lightness or in dash as well, so that no kind of colour blindness joins two. */
const STYLES: TraceStyle[] = [
  { colour: clay, dash: "7 4" },
  { colour: fen, dash: undefined },
  { colour: heather, dash: "2 4" },
  { colour: ink, dash: "12 4 2 4" },
  { colour: moss, dash: "4 3" },
  { colour: soft, dash: "1 3" },
];
