import type { BenchGiven, BenchStandards } from "~/measurement/bench";
import { type FigureField, GIVEN_FIELDS, STANDARD_FIELDS } from "./benches.schema";
import { dayOf } from "./words";

/** A version as its form is filled in: texts, in the units that the form shows. */
export interface VersionForm {
  validFrom: string;
  remark: string;
  parts: { kind: string; text: string }[];
  standards: Partial<Record<string, string>>;
  given: Partial<Record<string, string>>;
}

interface Version {
  validFrom: Date;
  remark: string;
  parts: { kind: string; text: string }[];
  standards: BenchStandards;
  given: BenchGiven;
}

export function versionForm({ validFrom, remark, parts, standards, given }: Version): VersionForm {
  return {
    validFrom: dayOf(validFrom),
    remark,
    parts,
    standards: textsOf(STANDARD_FIELDS, standards),
    given: textsOf(GIVEN_FIELDS, given),
  };
}

/** What was sent, back in the form; `otherwise` where nothing was. */
export function sentOr<Form extends object>(
  sent: Record<string, unknown> | null | undefined,
  otherwise: Form,
): Form {
  return sent ? ({ ...EMPTY, ...sent } as unknown as Form) : otherwise;
}

/** A figure in the unit of its field, without the last digits of a binary fraction. */
export function figureText({ scale }: { scale: number }, value: number | null): string {
  return value === null ? "" : String(Number((value / scale).toPrecision(10)));
}

function textsOf<Key extends string>(
  fields: readonly FigureField<Key>[],
  values: Record<Key, number | null>,
): Partial<Record<string, string>> {
  return Object.fromEntries(fields.map((field) => [field.key, figureText(field, values[field.key])]));
}

const EMPTY: VersionForm = { validFrom: "", remark: "", parts: [], standards: {}, given: {} };
