import { z } from "zod";

/** What a published version of a write-up keeps of what it shows, so that it says the same for ever. Pure. */

const figureShape = z.object({
  /** "dip:57b…", "sweep:…", "plate:…". */
  subject: z.string(),
  /** "Plate 3, version 2"; null for what is numbered in the text. */
  label: z.string().nullable(),
  /** What it shows, in a line. */
  title: z.string(),
  /**
   * The drawing for wide and for narrow pages: SVG whose colours are `var(--color-…)` and whose ids begin with
   * `FIGURE_ID`. Null for a plate, which is at its own address, and for what can't be drawn.
   */
  wide: z.string().nullable(),
  narrow: z.string().nullable(),
  numbers: z.object({ columns: z.array(z.string()), rows: z.array(z.array(z.string())) }).nullable(),
  /** The page of it, on this server: a plate's for everybody, another's for whoever may read the project. */
  path: z.string().regex(/^\/(?!\/)/),
  /** ISO, UTC: when the numbers were these. Null for a plate, whose numbers never change. */
  asOf: z.string().nullable(),
});
export type FrozenFigure = z.infer<typeof figureShape>;

const frozenShape = z.object({
  figures: z.array(figureShape),
  /** What the project was called at that time: a private one's name of today is not for readers. */
  project: z.string().default(""),
  /** SPDX name of the licence of the project at that time. */
  licence: z.string(),
});
export type Frozen = z.infer<typeof frozenShape>;

/** What a plate is now. */
export interface PlateState {
  withdrawnAt: Date | null;
  withdrawnReason: string;
}

/** Stands in a drawing where its own id belongs: one drawing may be on a page twice. */
export const FIGURE_ID = "figure-id";

/** As it was stored; an unknown shape shows no figures rather than no page. */
export function parseFrozen(text: string): Frozen {
  try {
    return frozenShape.parse(JSON.parse(text));
  } catch {
    return { figures: [], project: "", licence: "" };
  }
}

/** Row ids aside: the public ids of the plates among the figures. */
export function platesOf(figures: readonly FrozenFigure[]): string[] {
  return figures.flatMap(({ subject }) => (subject.startsWith("plate:") ? [subject.slice(6)] : []));
}
