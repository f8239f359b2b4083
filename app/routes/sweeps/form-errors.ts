import { data } from "react-router";

/** What is wrong with a form of the sweep page: said at its head, and beside the fields that it names. */
export function formErrors(errors: string[], status = 400, fields?: Record<string, string[]>) {
  return data({ errors, fields }, status);
}
