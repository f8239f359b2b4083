import { z } from "zod";
import { ELEMENT_KINDS } from "~/measurement/antenna";
import type { LengthUnit } from "~/measurement/lengths";
import { plainText } from "~/services/file-names";
import { diameterField, heightField, lengthField, type Sized, wholeField } from "./sizes";

/** The antenna as its form sends it. Lengths may be in metres or in feet; a bare number is in the person's own unit. */
export function antennaSchema(unit: LengthUnit) {
  const length = lengthField(unit);
  return z
    .object({
      intent: z.enum(["keep", "another"]),
      was: z.string().optional(),
      since: momentField,
      remark: words(300),
      confirm: z.string().optional(),
      elements: z
        .array(elementSchema(unit).optional())
        .max(MOST_ELEMENTS, `At most ${MOST_ELEMENTS} elements.`)
        .optional()
        .transform((rows) => (rows ?? []).map((row) => row ?? EMPTY)),
      feedline: z
        .object({
          cable: words(80),
          length,
          velocityFactor: z
            .string()
            .trim()
            .optional()
            .transform((text) => (text ? Number(text.replace(",", ".")) : null))
            .refine((value) => value === null || (value > 0 && value <= 1), "Over 0 and at most 1."),
          route: words(400),
        })
        .optional(),
      choke: z.object({ turns: wholeField(1000), core: words(120), where: words(400) }).optional(),
      ground: prose(2000),
      remarks: prose(4000),
    })
    .superRefine((value, context) => {
      if (value.confirm) return;
      const asked = askedAbout(value);
      for (const { path, ask } of asked) context.addIssue({ code: "custom", path, message: ask });
      if (asked.length > 0) {
        context.addIssue({ code: "custom", path: ["confirm"], message: "Look at the lengths in question." });
      }
    });
}
export type AntennaForm = z.output<ReturnType<typeof antennaSchema>>;

function elementSchema(unit: LengthUnit) {
  return z
    .object({
      key: z
        .string()
        .regex(/^[a-z0-9]{1,16}$/)
        .optional(),
      remove: z.string().optional(),
      kind: z.enum(ELEMENT_KINDS, { error: "Choose what it is." }).optional(),
      name: words(60),
      length: lengthField(unit),
      count: wholeField(999),
      height: heightField(unit),
      diameter: diameterField(),
      material: words(60),
      insulated: z.enum(["yes", "no"]).optional(),
      where: words(400),
    })
    .refine((row) => row.kind !== undefined || row.remove !== undefined || isEmpty(row), {
      path: ["kind"],
      error: "Choose what it is.",
    });
}

function isEmpty(row: { name: string; where: string; length: Sized; height: Sized }): boolean {
  return !row.name && !row.where && row.length.value === null && row.height.value === null;
}

/** Sizes that are possible but seldom meant. */
function askedAbout({
  elements,
  feedline,
}: {
  elements: { length: Sized; height: Sized }[];
  feedline?: { length: Sized };
}) {
  const one = (path: (string | number)[], { ask }: Sized) => (ask ? [{ path, ask }] : []);
  return [
    ...elements.flatMap((row, i) => [
      ...one(["elements", i, "length"], row.length),
      ...one(["elements", i, "height"], row.height),
    ]),
    ...(feedline ? one(["feedline", "length"], feedline.length) : []),
  ];
}

function words(most: number) {
  return z
    .string()
    .overwrite(plainText)
    .max(most, `At most ${most} characters.`)
    .optional()
    .transform((text) => text ?? "");
}

/** May have lines. */
function prose(most: number) {
  return z
    .string()
    .trim()
    .max(most, `At most ${most} characters.`)
    .optional()
    .transform((text) => text?.replaceAll("\r\n", "\n") ?? "");
}

/** As a `datetime-local` control gives it; read as UTC. */
const momentField = z
  .string({ error: "Say from when on it was so." })
  .regex(/^\d{4}-\d{2}-\d{2}(T\d{2}:\d{2}(:\d{2})?)?$/, "Give date and time as 2026-09-14T17:20.")
  .transform((text) => new Date(text.includes("T") ? `${text}Z` : `${text}T00:00Z`))
  .refine((at) => !Number.isNaN(at.getTime()), "There is no such day.")
  .refine((at) => at.getTime() < Date.now() + DAY_MS, "This day is yet to come. Plan it as a step instead.");

const NOTHING: Sized = { value: null, ask: null };
const EMPTY = {
  key: undefined,
  remove: undefined,
  kind: undefined,
  name: "",
  length: NOTHING,
  count: null,
  height: NOTHING,
  diameter: null,
  material: "",
  insulated: undefined,
  where: "",
};
const DAY_MS = 24 * 60 * 60 * 1000;
const MOST_ELEMENTS = 60;
