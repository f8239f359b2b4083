import { z } from "zod";
import { cableNamed } from "~/measurement/cables";
import type { Feedline } from "~/measurement/feedline";

/** The feedline's form: a cable by name, one of the project's own, or figures. */

export interface OwnCable {
  publicId: string;
  name: string;
  k1: number;
  k2: number;
  velocityFactor: number;
  /** Those that k1 and k2 were fitted to; null where k1 and k2 were given. */
  points: { mhz: number; dbPer100m: number }[] | null;
}

export interface FeedlineFields {
  cable: string;
  lengthM: string;
  velocityFactor: string;
  k1: string;
  k2: string;
}

/** A number as people write it; empty is not said. */
const number = (words: string) =>
  z
    .string()
    .default("")
    .transform((text) => text.trim().replace(",", "."))
    .refine((text) => text === "" || Number.isFinite(Number(text)), words)
    .transform((text) => (text === "" ? null : Number(text)));

/** Feedlines of antennas reach a few hundred metres at most (common practice, no source). */
const LONGEST_M = 1000;

export const feedlineSchema = z
  .object({
    cable: z.string().min(1, "Choose a cable, or give its figures.").max(100),
    lengthM: number("Give the length in metres.").refine(
      (m) => m !== null && m > 0 && m <= LONGEST_M,
      `Give a length over 0 and at most ${LONGEST_M} m.`,
    ),
    velocityFactor: number("Give the velocity factor as a number.").refine(
      (vf) => vf === null || (vf > 0.3 && vf <= 1),
      "A velocity factor lies between 0.3 and 1.",
    ),
    k1: number("Give k1 as a number.").refine((k) => k === null || k >= 0, "Not under 0."),
    k2: number("Give k2 as a number.").refine((k) => k === null || k >= 0, "Not under 0."),
  })
  .superRefine(({ cable, k1, k2, velocityFactor }, context) => {
    if (cable !== "values") return;
    if (!((k1 ?? 0) + (k2 ?? 0) > 0))
      context.addIssue({ code: "custom", path: ["k1"], message: "Give k1 or k2 over 0, or choose a cable." });
    if (velocityFactor === null)
      context.addIssue({
        code: "custom",
        path: ["velocityFactor"],
        message: "Without a cable's sheet the velocity factor must be given.",
      });
  });

/** The line that the form says; null where it names a cable that is not there. */
export function feedlineFrom(
  form: z.output<typeof feedlineSchema>,
  own: readonly OwnCable[],
): Feedline | null {
  const lengthM = form.lengthM ?? 0;
  if (form.cable === "values") {
    const { k1, k2, velocityFactor } = form;
    return { name: OWN_VALUES, k1: k1 ?? 0, k2: k2 ?? 0, lengthM, velocityFactor: velocityFactor ?? 1 };
  }
  const cable = form.cable.startsWith(OWN)
    ? own.find(({ publicId }) => publicId === form.cable.slice(OWN.length))
    : cableNamed(form.cable);
  if (!cable) return null;
  const { name, k1, k2 } = cable;
  const velocityFactor = form.velocityFactor ?? cable.velocityFactor;
  const rangeMhz = "publicId" in cable ? rangeOf(cable.points) : undefined;
  return { name, k1, k2, lengthM, velocityFactor, ...(rangeMhz && { rangeMhz }) };
}

/** From the first point to the last; undefined where points don't span one. */
function rangeOf(points: OwnCable["points"]): Feedline["rangeMhz"] {
  const mhz = (points ?? []).map((point) => point.mhz);
  const [low, high] = [Math.min(...mhz), Math.max(...mhz)];
  return low < high ? { low, high } : undefined;
}

/** What the form begins with. */
export function feedlineFields(
  line: Feedline | null,
  own: readonly Pick<OwnCable, "publicId" | "name">[],
): FeedlineFields {
  if (!line)
    return { cable: own[0] ? OWN + own[0].publicId : "", lengthM: "", velocityFactor: "", k1: "", k2: "" };
  const fields = {
    lengthM: String(line.lengthM),
    velocityFactor: String(line.velocityFactor),
    k1: "",
    k2: "",
  };
  const mine = own.find(({ name }) => name === line.name);
  if (mine) return { ...fields, cable: OWN + mine.publicId };
  const cable = cableNamed(line.name);
  if (cable) return { ...fields, cable: cable.name };
  return { ...fields, cable: "values", k1: String(line.k1), k2: String(line.k2) };
}

export const OWN = "own:";
const OWN_VALUES = "own values";
