import { z } from "zod";
import type { AntennaField, QuantityTarget } from "~/measurement/antenna";
import { type LengthUnit, parseLength } from "~/measurement/lengths";
import { readDiameter } from "~/routes/antenna/sizes";
import { plainText } from "~/services/file-names";

export interface ReadQuantity {
  label: string;
  unit: string;
  from: number | null;
  to: number | null;
  target: QuantityTarget | null;
}

/** A step as its form sends it. */
export function stepSchema(unit: LengthUnit) {
  return z
    .object({
      intent: z.enum(["keep", "another"]),
      was: z.string().optional(),
      title: z
        .string({ error: "Say in a line what was changed." })
        .overwrite(plainText)
        .min(1, "Say in a line what was changed.")
        .max(160, "At most 160 characters."),
      body: z
        .string()
        .trim()
        .max(20_000, "At most 20,000 characters.")
        .optional()
        .transform((text) => text?.replaceAll("\r\n", "\n") ?? ""),
      state: z.enum(["planned", "done"], { error: "Say whether it is done or planned." }),
      at: momentField.optional().transform((at) => at ?? null),
      confirm: z.string().optional(),
      quantities: z.preprocess(
        wholeRows,
        z
          .array(z.record(z.string(), z.string().optional()).optional())
          .max(40, "At most 40 quantities.")
          .optional()
          .transform((rows) => rows ?? []),
      ),
    })
    .transform((value, context) => {
      const quantities: ReadQuantity[] = [];
      const fault = (path: (string | number)[], message: string) =>
        context.addIssue({ code: "custom", path, message });
      let asked = false;
      for (const [i, row] of value.quantities.entries()) {
        if (!row || !["target", "label", "from", "to"].some((key) => row[key]?.trim())) continue;
        const read = readQuantity(row, unit);
        for (const { field, message, question } of read.faults) {
          if (question && value.confirm) continue;
          asked ||= question;
          fault(["quantities", i, field], message);
        }
        quantities.push(read.quantity);
      }
      if (asked) fault(["confirm"], "Look at the lengths in question.");
      if (value.state === "done" && !value.at) fault(["at"], "Say when it was done.");
      if (value.state === "done" && value.at && value.at.getTime() > Date.now() + DAY_MS) {
        fault(["at"], "This day is yet to come: then it is planned, not done.");
      }
      return { ...value, quantities };
    });
}

interface Fault {
  field: "target" | "label" | "from" | "to";
  message: string;
  /** It may be meant; asked once. */
  question: boolean;
}

function readQuantity(row: Record<string, string | undefined>, unit: LengthUnit) {
  const faults: Fault[] = [];
  const target = parseTarget(row.target ?? "");
  const label = plainText(row.label ?? "").slice(0, 80);
  if (!target && row.target)
    faults.push({ field: "target", message: "There is no such part.", question: false });
  if (!target && !label) faults.push({ field: "label", message: "Say what this is.", question: false });
  const number = (field: "from" | "to") => {
    const text = row[field]?.trim() ?? "";
    if (!text) return null;
    const read = readNumber(text, target?.field ?? null, unit);
    if (read.message) faults.push({ field, message: read.message, question: read.value !== null });
    return read.value;
  };
  const [from, to] = [number("from"), number("to")];
  if (target && to === null && !faults.some(({ field }) => field === "to")) {
    faults.push({ field: "to", message: "Say what it became.", question: false });
  }
  return { faults, quantity: { label, unit: plainText(row.unit ?? "").slice(0, 20), from, to, target } };
}

function readNumber(
  text: string,
  field: AntennaField | null,
  unit: LengthUnit,
): { value: number | null; message: string | null } {
  switch (field) {
    case "heightM":
      if (/^0+([.,]0*)?\s*(m|ft)?$/.test(text)) return { value: 0, message: null };
      return lengthOf(parseLength(text, unit));
    case "lengthM":
      return lengthOf(parseLength(text, unit));
    case "diameterMm": {
      const read = readDiameter(text);
      return typeof read === "number" ? { value: read, message: null } : { value: null, message: read };
    }
    case "count":
    case "turns":
      return /^[1-9]\d{0,2}$/.test(text)
        ? { value: Number(text), message: null }
        : { value: null, message: "A whole number from 1 on." };
    default: {
      const value = Number(text.replace(",", "."));
      if (Number.isFinite(value)) return { value, message: null };
      return { value: null, message: "A number; what is no number belongs into the text above." };
    }
  }
}

function lengthOf(parsed: ReturnType<typeof parseLength>) {
  return parsed.ok ? { value: parsed.metres, message: parsed.ask } : { value: null, message: parsed.message };
}

/** All rows in one field, as the question to the later of two people sends them. */
function wholeRows(value: unknown): unknown {
  if (typeof value !== "string") return value;
  try {
    return JSON.parse(value);
  } catch {
    return value;
  }
}

/** `a1b2.lengthM`, as the form's choice has it. */
function parseTarget(text: string): QuantityTarget | null {
  const [, part, field] = /^([a-z0-9]{1,16})\.(lengthM|heightM|count|diameterMm|turns)$/.exec(text) ?? [];
  return part ? { part, field: field as AntennaField } : null;
}

/** As a `datetime-local` control gives it; read as UTC. The minute that runs is now: what came in before it is before. */
const momentField = z
  .string()
  .regex(/^\d{4}-\d{2}-\d{2}(T\d{2}:\d{2}(:\d{2})?)?$/, "Give date and time as 2026-09-14T17:20.")
  .transform((text) => {
    const now = new Date();
    if (now.toISOString().startsWith(text) && text.length > DAY_LENGTH) return now;
    return new Date(text.includes("T") ? `${text}Z` : `${text}T12:00Z`);
  })
  .refine((at) => !Number.isNaN(at.getTime()), "There is no such day.");

export const doneSchema = z.object({
  at: momentField.refine((at) => at.getTime() < Date.now() + DAY_MS, "This day is yet to come."),
});

/** Public ids; empty: as the dates say. */
export const sweepsSchema = z.object({
  before: z.string().max(16).optional(),
  after: z.string().max(16).optional(),
});

/** `2026-09-14` */
const DAY_LENGTH = 10;
const DAY_MS = 24 * 60 * 60 * 1000;
