/** What the methods page says of one number, and the worked example that reckons it by the product's own code. */
export interface Definition {
  /** The anchor: numbers elsewhere link to /methods#id. */
  id: string;
  title: string;
  /** What it is, in two or three sentences. */
  says: string;
  /** Formulas, as TeX. */
  formulas: string[];
  source: string;
  /** Where it does not hold. */
  limits: string;
  example: Example;
}

export interface Field<Name extends string = string> {
  name: Name;
  label: string;
  unit?: string;
  /** What stands in the field at first. */
  value: number;
  least: number;
  most: number;
  whole?: boolean;
  /** A choice of words; the value is then its place among them. */
  choices?: readonly string[];
}

export interface Row {
  label: string;
  value: string;
}

export interface Example {
  fields: readonly Field[];
  work: (values: Record<string, number>) => Row[];
}

/** An example whose work knows its fields by name. */
export function example<const Name extends string>(
  fields: readonly Field<Name>[],
  work: (values: Record<Name, number>) => Row[],
): Example {
  return { fields, work: (values) => work(values as Record<Name, number>) };
}

/** A field for a choice of words. */
export function choice<const Name extends string>(
  name: Name,
  label: string,
  choices: readonly string[],
): Field<Name> {
  return { name, label, choices, value: 0, least: 0, most: choices.length - 1, whole: true };
}

/** A plain number with up to `digits` digits that mean something. */
export function plain(value: number, digits = 4): string {
  if (value === Number.POSITIVE_INFINITY) return "∞";
  if (Number.isNaN(value)) return "unknown";
  return String(Number(value.toPrecision(digits))).replace("-", "−");
}
