import { z } from "zod";
import { ELEMENT_KINDS } from "~/measurement/antenna";

/** The shapes of the API for the experiment's story: antenna, steps, trails, benches, causes. SI units; null is "not said". */

const id = z.string().describe("Short public id");
const time = z.iso.datetime().describe("UTC");
const hz = z.number().describe("Hz");
const verdict = z.enum(["open", "proposed", "settled"]);
const metres = z.number().nullable().describe("Metres; null where it is not said");

export const antennaContentShape = z.object({
  elements: z.array(
    z.object({
      key: z.string().describe("Lasting within the project: what steps point at"),
      kind: z.enum(ELEMENT_KINDS),
      name: z.string(),
      lengthM: metres,
      count: z.number().int(),
      heightM: metres,
      diameterMm: z.number().nullable(),
      material: z.string(),
      insulated: z.boolean().nullable(),
      where: z.string(),
    }),
  ),
  feedline: z
    .object({
      cable: z.string().nullable(),
      lengthM: metres,
      velocityFactor: z.number().nullable(),
      route: z.string(),
    })
    .nullable(),
  choke: z.object({ turns: z.number().nullable(), core: z.string(), where: z.string() }).nullable(),
  ground: z.string(),
  remarks: z.string(),
});

export const antennaShape = z.object({
  on: time.describe("The day that was asked for; now without one"),
  antenna: antennaContentShape.nullable().describe("Null before the first day that it is described for"),
  describedFrom: time.nullable().describe("Null where it never was"),
  versions: z.array(
    z.object({
      number: z.number().int(),
      validFrom: time,
      remark: z.string(),
      step: z.string().nullable().describe("The step that made it"),
    }),
  ),
});

export const antennaQuerySchema = z.object({
  on: z
    .union([z.iso.date(), z.iso.datetime({ offset: true })], { error: "A day as 2026-04-18, or a time." })
    .optional()
    .describe("As it was then; without it, as it is now"),
});

const quantityShape = z.object({
  label: z.string(),
  unit: z.string(),
  from: z.number().nullable(),
  to: z.number().nullable(),
  target: z
    .object({ part: z.string(), field: z.enum(["lengthM", "heightM", "count", "diameterMm", "turns"]) })
    .nullable()
    .describe("What of the antenna it changes"),
});

export const stepShape = z.object({
  id,
  title: z.string(),
  body: z.string().describe("Markdown"),
  state: z.enum(["planned", "done"]),
  at: time.nullable().describe("When it was done; for a planned one the day it is meant for, or null"),
  by: z.string().nullable(),
  quantities: z.array(quantityShape),
  before: z.string().nullable().describe("The sweep before it, by date or as somebody said"),
  after: z.string().nullable(),
  expected: z
    .array(
      z.object({
        trail: id,
        frequencyHz: hz,
        lowHz: hz.nullable(),
        highHz: hz.nullable(),
        how: z.string().describe("The arithmetic"),
      }),
    )
    .describe("Where each trail was expected, as reckoned when it was planned"),
  links: z.object({ self: z.string(), page: z.string() }),
});

export const stepListShape = z.object({ items: z.array(stepShape) });

const newQuantity = z.strictObject({
  label: z.string().trim().max(80).optional().describe("Needed where it points at nothing of the antenna"),
  unit: z.string().trim().max(20).optional(),
  from: z.number().nullish().describe("Left out, it is what the antenna says"),
  to: z.number().nullish(),
  part: z.string().max(16).optional().describe("An element's key, `feedline` or `choke`"),
  field: z.enum(["lengthM", "heightM", "count", "diameterMm", "turns"]).optional(),
});

export const newStepSchema = z
  .strictObject({
    title: z.string().trim().min(1, "Say in a line what was changed.").max(160, "At most 160 characters."),
    body: z.string().max(20_000, "At most 20,000 characters.").default(""),
    state: z.enum(["planned", "done"]),
    at: z.iso.datetime({ offset: true, error: "A time as in 2026-09-14T17:20:00Z." }).nullish(),
    quantities: z.array(newQuantity).max(40, "At most 40 quantities.").default([]),
  })
  .superRefine(({ state, at, quantities }, context) => {
    const fault = (path: (string | number)[], message: string) =>
      context.addIssue({ code: "custom", path, message });
    if (state === "done" && !at) fault(["at"], "Say when it was done.");
    if (state === "done" && at && new Date(at).getTime() > Date.now() + DAY_MS)
      fault(["at"], "This time is yet to come: then it is planned, not done.");
    for (const [i, { label, part, field, to }] of quantities.entries()) {
      const path = ["quantities", i];
      if ((part === undefined) !== (field === undefined))
        fault([...path, "field"], "Give `part` and `field` together, or neither.");
      else if (part === undefined && !label) fault([...path, "label"], "Say what this is.");
      else if (field && (to === null || to === undefined)) fault([...path, "to"], "Say what it became.");
      else if (field && !isPossible(field, to as number))
        fault([...path, "to"], "This is no size of an antenna: metres, millimetres or whole numbers.");
    }
  });

/** Lengths over 0 and under a kilometre; heights from 0 on; numbers of things whole. */
function isPossible(field: string, to: number): boolean {
  if (field === "count" || field === "turns") return Number.isInteger(to) && to >= 1 && to < 1000;
  return (field === "heightM" ? to >= 0 : to > 0) && to < 1000;
}

export const trailShape = z.object({
  id,
  name: z.string().describe("Empty where nobody named it"),
  frequencyHz: hz.describe("Hz, of its newest dip"),
  verdict,
  verdictText: z.string(),
  dips: z
    .array(
      z.object({
        id,
        sweep: id,
        takenAt: time.nullable(),
        frequencyHz: hz,
        frequencyUncertaintyHz: z.number().nullable(),
        minimumSwr: z.number().nullable(),
        minimumSwrLow: z.number().nullable(),
        minimumSwrHigh: z.number().nullable(),
      }),
    )
    .describe("From sweep to sweep, oldest first"),
  links: z.object({ page: z.string() }),
});

export const trailListShape = z.object({ items: z.array(trailShape) });

export const benchShape = z.object({
  id,
  name: z.string(),
  description: z.string().describe("Markdown"),
  owner: z.string().nullable().describe("Whose own bench it is; null for the project's"),
  retired: z.boolean(),
  versions: z
    .array(
      z.object({
        number: z.number().int(),
        validFrom: time,
        remark: z.string(),
        references: z.array(
          z.object({
            kind: z.enum(["open", "short", "load", "through"]),
            sweep: id,
            sha256: z.string(),
            read: z.boolean().describe("False while its file is still to be read"),
          }),
        ),
      }),
    )
    .describe("Newest first; a sweep counts with the one of its day"),
  links: z.object({ page: z.string() }),
});

export const benchListShape = z.object({ items: z.array(benchShape) });

export const causesShape = z.object({
  causes: z
    .array(
      z.object({
        kind: z.enum(["part", "multiple", "ripple", "reference"]),
        part: z.string().nullable(),
        order: z.number().int().nullable(),
        title: z.string().describe("Never more than “may be”"),
        arithmetic: z.string(),
        predictedHz: hz,
        toleranceHz: hz.describe("Half-width of what the prediction allows, Hz"),
        offsetHz: hz.describe("Dip minus prediction, Hz"),
        byChance: z.number().describe("Share of frequencies chosen blindly that it would fit as well"),
        test: z.string().describe("What would tell it apart"),
      }),
    )
    .describe("Likeliest first"),
  tests: z.array(
    z.object({
      change: z.string(),
      predictions: z.array(z.string()).describe("In the order of the causes"),
      shiftHz: z.array(z.number().nullable()).describe("Null where it is no shift"),
    }),
  ),
  notJudged: z.array(z.object({ part: z.string(), name: z.string(), reason: z.string() })),
  ripplePeriodHz: hz.nullable(),
  trims: z
    .array(
      z.object({
        part: z.string(),
        band: z.string(),
        targetHz: hz,
        method: z.enum(["proportion", "line"]),
        lengthM: z.number(),
        toM: z.number(),
        lowM: metres,
        highM: metres,
        how: z.string(),
      }),
    )
    .describe("What to make of a length to bring the dip to the nearest design band"),
  verdicts: z
    .array(
      z.object({
        verdict,
        text: z.string(),
        by: z.string().nullable(),
        at: time,
        ofTrail: z.boolean(),
        evidence: z.array(z.object({ kind: z.string(), id: z.string(), text: z.string() })),
      }),
    )
    .describe("Every one that was given, newest first"),
});

const DAY_MS = 24 * 60 * 60 * 1000;
