import { z } from "zod";
import type { CablePoint } from "~/measurement/cable-entry";
import { cableNamed, fitCable } from "~/measurement/cables";
import { plainText } from "~/services/file-names";

/** A cable of the project's own: by points of its sheet, or by k1 and k2. */

const MOST_POINTS = 40;

const number = (words: string) =>
  z
    .string()
    .default("")
    .transform((text) => text.trim().replace(",", "."))
    .refine((text) => text === "" || Number.isFinite(Number(text)), words)
    .transform((text) => (text === "" ? null : Number(text)));

const points = z
  .string()
  .max(4000)
  .default("")
  .transform((text) => linesOf(text))
  .refine((lines) => lines.every(pointOf), "One point a line: MHz, then dB for 100 m, as in “28 4.1”.")
  .refine((lines) => lines.length <= MOST_POINTS, `At most ${MOST_POINTS} points.`)
  .transform((lines) => lines.flatMap((line) => pointOf(line) ?? []).sort((a, b) => a.mhz - b.mhz));

export const cableSchema = z
  .object({
    name: z
      .string({ error: "Give the cable a name." })
      .overwrite(plainText)
      .min(1, "Give the cable a name.")
      .max(80, "A name has at most 80 characters.")
      .refine(
        (name) => cableNamed(name) === null,
        "The table already has a cable of this name: give another.",
      ),
    points,
    k1: number("Give k1 as a number.").refine((k) => k === null || k >= 0, "Not under 0."),
    k2: number("Give k2 as a number.").refine((k) => k === null || k >= 0, "Not under 0."),
    velocityFactor: number("Give the velocity factor as a number.").refine(
      (vf) => vf !== null && vf > 0.3 && vf <= 1,
      "A velocity factor lies between 0.3 and 1.",
    ),
    source: z.string().overwrite(plainText).max(300, "At most 300 characters.").default(""),
  })
  .superRefine(({ points: given, k1, k2 }, context) => {
    if (given.length === 0 && !((k1 ?? 0) + (k2 ?? 0) > 0))
      context.addIssue({
        code: "custom",
        path: ["points"],
        message: "Give points of the cable's sheet, or k1 and k2.",
      });
  });

export interface CableFigures {
  k1: number;
  k2: number;
  points: CablePoint[] | null;
  /** How far the points lie from the curve, as a part; null without points. */
  worstRelative: number | null;
}

/** Points outrank k1 and k2: they are what a sheet says. */
export function figuresOf({ points: given, k1, k2 }: z.output<typeof cableSchema>): CableFigures {
  if (given.length === 0) return { k1: k1 ?? 0, k2: k2 ?? 0, points: null, worstRelative: null };
  return { ...fitCable(given), points: given };
}

function linesOf(text: string): string[] {
  return text
    .split(/[\n;]+/)
    .map((line) => line.trim())
    .filter(Boolean);
}

function pointOf(line: string): CablePoint | null {
  const numbers = line.split(/[\s:]+/).map((cell) => Number(cell.replace(",", ".")));
  const [mhz, dbPer100m] = numbers;
  return numbers.length === 2 && mhz > 0 && dbPer100m > 0 ? { mhz, dbPer100m } : null;
}
