import { data } from "react-router";

export type CableErrors = Partial<Record<string, string[]>>;

/** What is wrong with the form, field by field. */
export function refusedForm(errors: CableErrors) {
  return data({ errors }, 400);
}
