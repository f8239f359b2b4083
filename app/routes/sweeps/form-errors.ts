import { data } from "react-router";
import type { Conflict } from "~/components/edit-conflict/EditConflict";

/** What is wrong with a form of the sweep page: said at its head, and beside the fields that it names; or what two people made of it. */
export function formErrors(
  errors: string[],
  status = 400,
  fields?: Record<string, string[]>,
  conflict?: Conflict,
) {
  return data({ errors, fields, conflict }, status);
}
