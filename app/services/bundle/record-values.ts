import { z } from "zod";
import { ELEMENT_KINDS } from "../../measurement/antenna.ts";
import { LIMIT_SOURCES } from "../../measurement/sweep.ts";

/** The values inside a bundle's records that are more than a word or a number. SI units; null is "not known" or "not said". */

const number = z.number();
const maybe = z.number().nullish();
const text = z.string();

export const id = z
  .string()
  .regex(/^[0-9a-z]{1,16}$/)
  .describe("Public id");
export const ref = id.nullable().describe("Public id of the row it names; null for none");
export const person = z
  .string()
  .regex(/^[0-9a-z]{1,16}$/)
  .nullable()
  .describe("Id of a person in people.json; null where nobody is known");
export const time = z.iso
  .datetime()
  .transform((at) => new Date(at))
  .describe("UTC");
export const sha256 = z
  .string()
  .regex(/^[0-9a-f]{64}$/)
  .describe("SHA-256 of the bytes, in hexadecimal");
export const path = z
  .string()
  .regex(/^data\/[^\\]+$/)
  .describe("Where the bytes are in this bundle");
/** It is linked to where mentions are shown. */
export const webAddress = z.url({ protocol: /^https?$/ }).max(2000);
export const count = z.number().int().min(0).max(4_294_967_295);

export const hz = z.number().describe("Hz");
export const upTo = (most: number) => z.string().max(most);
export const markdown = z.string().max(400_000).describe("Markdown");
export const file = { sizeBytes: count, sha256 };
export const pixels = z.number().int().min(1).max(1_000_000);
export const made = { createdBy: person, createdAt: time };

export const feedline = z
  .looseObject({ name: text, k1: number, k2: number, lengthM: number, velocityFactor: number })
  .nullable();

const share = z.looseObject({ source: z.enum(LIMIT_SOURCES), share: number });
const unknown = z.looseObject({ source: z.enum(LIMIT_SOURCES), remedy: text });
const limits = z.looseObject({ low: number, high: number }).nullish();

const bandwidth = z
  .looseObject({
    limitSwr: number,
    lowHz: number.nullable(),
    highHz: number.nullable(),
    widthHz: number,
    widthUncertaintyHz: maybe,
    widthLowHz: maybe,
    widthHighHz: maybe,
    lowEdge: limits,
    highEdge: limits,
    open: z.boolean(),
    shared: z.boolean(),
    fractional: maybe,
  })
  .nullable();

export const dip = z.looseObject({
  frequencyHz: number,
  frequencyUncertaintyHz: maybe,
  minimumSwr: number.nullable(),
  minimumSwrLow: maybe,
  minimumSwrHigh: maybe,
  minimumSwrNoiseLow: maybe,
  minimumSwrNoiseHigh: maybe,
  returnLossDb: number.nullable(),
  returnLossLowDb: maybe,
  returnLossHighDb: maybe,
  benchFrequencyHalfHz: maybe,
  prominenceDb: number.nullable(),
  bandwidth,
  q: maybe,
  qLow: maybe,
  qHigh: maybe,
  qLimits: limits,
  shares: z.array(share).optional(),
  unknown: z.array(unknown).optional(),
  method: z.enum(["fit", "parabola", "sample"]),
  edge: z.boolean(),
  sampleIndex: number,
  advice: z.looseObject({ startHz: number, stopHz: number, points: number }).nullish(),
});

export const foundDip = dip.extend({ publicId: id });
export const settings = z.looseObject({ swrLimit: number, minimumProminenceDb: number });
export const warnings = z.array(z.looseObject({ code: text, message: text }));

export const correction = z
  .looseObject({
    kind: z.enum(["none", "scalar", "three-term"]),
    plane: z.enum(["instrument", "port", "antenna"]),
    fromHz: number.nullable(),
    toHz: number.nullable(),
    bench: z.looseObject({ bench: id, version: id, number, name: text }).nullable(),
    references: z.partialRecord(z.enum(["open", "short", "load", "through"]), sha256),
    feedline,
    basis: text.optional(),
    validFrom: text.optional(),
  })
  .nullable();

/** Checked by the readers when it is used again; here only that it is what it says. */
export const given = z.looseObject({
  quantity: text.optional(),
  text: z.looseObject({}).optional(),
  touchstone: z.looseObject({}).optional(),
  screenshot: z.looseObject({}).optional(),
});

const stage = z.looseObject({ confidence: number, saw: text });

export const reading = z
  .looseObject({
    format: z.enum(["text", "touchstone", "screenshot"]),
    quantity: z.enum(["s11-db", "return-loss", "swr", "level", "gamma", "impedance"]),
    frequencyUnit: z.enum(["Hz", "kHz", "MHz", "GHz"]),
    assumed: z.array(text),
    confidence: number,
    questions: z.array(
      z.looseObject({
        id: text,
        text,
        choices: z.array(z.looseObject({ value: text, label: text })),
        proposed: text.nullable(),
      }),
    ),
    spec: given,
    shape: text,
    preview: z
      .looseObject({ headings: z.array(text), rows: z.array(z.array(text)), firstLine: number })
      .nullable(),
    picture: z
      .looseObject({
        width: number,
        height: number,
        sources: z.record(text, text).nullable(),
        stages: z.looseObject({ frame: stage, axes: stage, trace: stage }),
      })
      .optional(),
  })
  .nullable();

export const readProblem = z
  .looseObject({ code: text, message: text, line: number.optional(), column: number.optional() })
  .nullable();

export const antenna = z.looseObject({
  elements: z.array(
    z.looseObject({
      key: text,
      kind: z.enum(ELEMENT_KINDS),
      name: text,
      lengthM: number.nullable(),
      count: number,
      heightM: number.nullable(),
      diameterMm: number.nullable(),
      material: text,
      insulated: z.boolean().nullable(),
      where: text,
    }),
  ),
  feedline: z
    .looseObject({ cable: text.nullable(), lengthM: maybe, velocityFactor: maybe, route: text })
    .nullable(),
  choke: z.looseObject({ turns: maybe, core: text, where: text }).nullable(),
  ground: text,
  remarks: text,
});

export const quantities = z.array(
  z.looseObject({
    label: text,
    unit: text,
    from: number.nullable(),
    to: number.nullable(),
    target: z
      .looseObject({
        part: text,
        field: z.enum(["lengthM", "heightM", "count", "diameterMm", "turns"]),
      })
      .nullable(),
  }),
);

export const expected = z.array(
  z.looseObject({
    trail: id,
    frequencyHz: number,
    lowHz: number.nullable(),
    highHz: number.nullable(),
    how: text,
  }),
);

export const benchParts = z.array(
  z.looseObject({ kind: z.enum(["connector", "cable", "adapter", "other"]), text }),
);
export const standards = z.looseObject({
  openCapacitanceF: maybe,
  shortInductanceH: maybe,
  offsetDelayS: maybe,
  loadOhm: maybe,
  loadReturnLossDb: maybe,
});
export const benchGiven = z.looseObject({
  zeroDb: maybe,
  directivityDb: maybe,
  testPortMatchDb: maybe,
  trackingDb: maybe,
});
export const cablePoints = z.array(z.looseObject({ mhz: number, dbPer100m: number })).nullable();
export const region = z.looseObject({ x: number, y: number, width: number, height: number }).nullable();
export const evidence = z.array(
  z.looseObject({ kind: z.enum(["sweep", "step", "note", "cause", "dip"]), id: text, text }),
);
export const about = z.looseObject({ title: text });
