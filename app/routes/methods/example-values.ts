import { z } from "zod";
import type { Definition, Field, Row } from "./definition";

export interface WorkedField {
  name: string;
  label: string;
  unit: string | null;
  /** As it was typed, also where that is wrong. */
  text: string;
  error: string | null;
  choices: readonly string[] | null;
}

export interface WorkedExample {
  fields: WorkedField[];
  /** Null where a field is wrong. */
  rows: Row[] | null;
}

/** The example with the values of the address; a field that is left out or empty has its first value. */
export function workExample({ id, example }: Definition, search: URLSearchParams): WorkedExample {
  const read = example.fields.map((field) => readField(field, search.get(addressName(id, field))));
  const wrong = read.some(({ error }) => error !== null);
  const values = Object.fromEntries(read.map(({ field, value }) => [field.name, value]));
  return {
    fields: read.map(({ field, text, error }) => ({
      name: addressName(id, field),
      label: field.label,
      unit: field.unit ?? null,
      text,
      error,
      choices: field.choices ?? null,
    })),
    rows: wrong ? null : example.work(values),
  };
}

function readField(field: Field, asked: string | null) {
  const text = asked?.trim() || textOf(field);
  const parsed = schemaOf(field).safeParse(text);
  return parsed.success
    ? { field, text, value: parsed.data, error: null }
    : { field, text, value: field.value, error: parsed.error.issues[0].message };
}

function schemaOf(field: Field): z.ZodType<number, unknown> {
  const { choices, least, most, whole } = field;
  if (choices) {
    return z
      .enum(choices as [string, ...string[]], { error: "That is not among the choices." })
      .transform((word) => choices.indexOf(word));
  }
  const between = `Write a number from ${least} to ${most}.`;
  const number = z.number({ error: between }).min(least, between).max(most, between);
  return z
    .string()
    .transform((text) => Number(text.replace(",", ".").replace("−", "-")))
    .pipe(whole ? number.int("Write a whole number.") : number);
}

function textOf({ choices, value }: Field): string {
  return choices ? choices[value] : String(value);
}

function addressName(id: string, { name }: Field): string {
  return `${id}.${name}`;
}
