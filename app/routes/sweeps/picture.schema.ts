import { z } from "zod";
import type { FrequencyUnit } from "~/measurement/sweep";
import type { MaskedStretch, PicturePoint, ScreenshotSpec } from "~/readers/reading";
import { cornersOf } from "~/readers/screenshot/rectify";

/** The choices of a picture's reading as its form sends them: texts, empty for what is not known. */

export const CORNERS = ["Top left", "Top right", "Bottom right", "Bottom left"] as const;
export const CORNER_FIELDS = ["x0", "y0", "x1", "y1", "x2", "y2", "x3", "y3"] as const;
type CornerField = (typeof CORNER_FIELDS)[number];

const UNITS = { Hz: 1, kHz: 1e3, MHz: 1e6, GHz: 1e9 } as const satisfies Record<FrequencyUnit, number>;

const MASK_WORDS = "One stretch a line: its first and last column, and for a box its top and bottom row too.";

/** A number as people write it; empty is not known. */
function numberOf(what: string) {
  return z
    .string()
    .trim()
    .transform((text) => text.replace("−", "-").replace(",", "."))
    .refine((text) => text === "" || Number.isFinite(Number(text)), `Give ${what} as a number.`)
    .transform((text) => (text === "" ? undefined : Number(text)));
}
const colour = z
  .string()
  .trim()
  .toLowerCase()
  .refine((text) => text === "" || /^#[0-9a-f]{6}$/.test(text), "Give a colour as #rrggbb.")
  .transform((text) => text || undefined);
const place = numberOf("the corner's place");

export const pictureSchema = z.object({
  seenAs: z.enum(["straight", "angle"]),
  x0: place,
  y0: place,
  x1: place,
  y1: place,
  x2: place,
  y2: place,
  x3: place,
  y3: place,
  unit: z.enum(["Hz", "kHz", "MHz", "GHz"]),
  start: numberOf("the start frequency"),
  stop: numberOf("the stop frequency"),
  scale: z.enum(["linear", "log"]),
  quantity: z.enum(["s11-db", "return-loss", "swr", "level"]),
  top: numberOf("the value at the top line"),
  bottom: numberOf("the value at the bottom line"),
  referenceOhm: numberOf("the reference impedance").refine(
    (ohm) => ohm === undefined || ohm > 0,
    "Over 0 Ω.",
  ),
  traceColor: colour,
  // Asked of levels only.
  zeroFrom: z.enum(["number", "crest", "trace"]).default("number"),
  zeroDb: z.string().default("").pipe(numberOf("the level")),
  zeroTrace: z.string().default("").pipe(colour),
  masked: z
    .string()
    .max(4000)
    .transform(linesOf)
    .refine((lines) => lines.every((line) => stretchOf(line)), MASK_WORDS)
    .transform((lines) => lines.flatMap((line) => stretchOf(line) ?? [])),
});

export type PictureFields = Record<keyof z.input<typeof pictureSchema>, string>;
export type PictureErrors = Partial<Record<keyof PictureFields | "form", string>>;

/** What the fields say; a field that stands as the resolved reading has it keeps that value to the last digit. */
export function choicesFrom(
  fields: Record<string, unknown>,
  resolved: ScreenshotSpec,
): { choices: { spec: ScreenshotSpec; zeroAtCrest: boolean } } | { errors: PictureErrors } {
  const parsed = pictureSchema.safeParse(fields);
  if (!parsed.success) {
    return {
      errors: Object.fromEntries(parsed.error.issues.map((issue) => [String(issue.path[0]), issue.message])),
    };
  }
  const was = fieldsOf(resolved);
  const same = (...names: (keyof PictureFields)[]) => names.every((name) => fields[name] === was[name]);
  const { unit, start, stop, zeroFrom, zeroDb, zeroTrace, masked, ...data } = parsed.data;
  const level = data.quantity === "level";
  const hertz = (value: number | undefined) =>
    value === undefined ? undefined : Math.round(value * UNITS[unit] * 1000) / 1000;
  const spec: ScreenshotSpec = {
    ...(same("seenAs", ...CORNER_FIELDS)
      ? { frame: resolved.frame, corners: resolved.corners }
      : outlineOf(parsed.data)),
    startHz: same("start", "unit") ? resolved.startHz : hertz(start),
    stopHz: same("stop", "unit") ? resolved.stopHz : hertz(stop),
    scale: data.scale,
    quantity: data.quantity,
    top: same("top") ? resolved.top : data.top,
    bottom: same("bottom") ? resolved.bottom : data.bottom,
    referenceOhm: data.referenceOhm,
    traceColor: data.traceColor,
    zeroDb: level && zeroFrom === "number" ? zeroDb : undefined,
    zeroTrace: level && zeroFrom === "trace" ? zeroTrace : undefined,
    masked: masked.length > 0 ? masked : undefined,
  };
  const known = Object.entries(spec).filter(([, value]) => value !== undefined);
  return { choices: { spec: Object.fromEntries(known), zeroAtCrest: level && zeroFrom === "crest" } };
}

/** What the form begins with. */
export function fieldsOf(spec: ScreenshotSpec, found: readonly PicturePoint[] | null = null): PictureFields {
  const unit = unitOf(spec.stopHz ?? spec.startHz);
  const corners = spec.corners ?? (spec.frame ? cornersOf(spec.frame) : found);
  const text = (value: number | undefined, digits = 12) =>
    value === undefined ? "" : String(Number(value.toPrecision(digits)));
  const places = CORNER_FIELDS.map((name, i) => {
    const corner = corners?.[i >> 1];
    return [name, corner ? (i % 2 ? corner.y : corner.x).toFixed(2) : ""];
  });
  return {
    ...(Object.fromEntries(places) as Record<CornerField, string>),
    seenAs: spec.corners ? "angle" : "straight",
    unit,
    start: text(spec.startHz === undefined ? undefined : spec.startHz / UNITS[unit]),
    stop: text(spec.stopHz === undefined ? undefined : spec.stopHz / UNITS[unit]),
    scale: spec.scale ?? "linear",
    quantity: spec.quantity ?? "s11-db",
    top: text(spec.top),
    bottom: text(spec.bottom),
    referenceOhm: text(spec.referenceOhm ?? 50),
    traceColor: spec.traceColor ?? "",
    zeroFrom: spec.zeroTrace ? "trace" : "number",
    zeroDb: text(spec.zeroDb),
    zeroTrace: spec.zeroTrace ?? "",
    masked: (spec.masked ?? []).map(stretchText).join("\n"),
  };
}

/** The stretches of a text; lines that are none are passed over. */
export function stretchesIn(text: string): MaskedStretch[] {
  return linesOf(text).flatMap((line) => stretchOf(line) ?? []);
}

export function stretchText({ fromX, toX, top, bottom }: MaskedStretch): string {
  const numbers = top === undefined || bottom === undefined ? [fromX, toX] : [fromX, toX, top, bottom];
  return numbers.map((value) => Math.round(value)).join(" ");
}

function linesOf(text: string): string[] {
  return text
    .split(/[\n;]+/)
    .map((line) => line.trim())
    .filter(Boolean);
}

function stretchOf(line: string): MaskedStretch | null {
  const numbers = line.split(/[\s,–-]+/).map(Number);
  if (![2, 4].includes(numbers.length) || !numbers.every((n) => Number.isFinite(n) && n >= 0)) return null;
  const [a, b, c, d] = numbers;
  const columns = { fromX: Math.min(a, b), toX: Math.max(a, b) };
  return numbers.length === 2 ? columns : { ...columns, top: Math.min(c, d), bottom: Math.max(c, d) };
}

function outlineOf(data: z.output<typeof pictureSchema>): Pick<ScreenshotSpec, "frame" | "corners"> {
  const places = CORNER_FIELDS.map((name) => data[name]);
  if (places.some((value) => value === undefined)) return {};
  const [x0, y0, x1, y1, x2, y2, x3, y3] = places as number[];
  if (data.seenAs === "angle") {
    const corners = [
      { x: x0, y: y0 },
      { x: x1, y: y1 },
      { x: x2, y: y2 },
      { x: x3, y: y3 },
    ];
    return { corners };
  }
  return {
    frame: { left: (x0 + x3) / 2, top: (y0 + y1) / 2, right: (x1 + x2) / 2, bottom: (y2 + y3) / 2 },
  };
}

function unitOf(hz: number | undefined): FrequencyUnit {
  if (hz === undefined) return "MHz";
  return hz >= 3e9 ? "GHz" : hz >= 1e6 ? "MHz" : hz >= 1e3 ? "kHz" : "Hz";
}
