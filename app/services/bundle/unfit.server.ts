import { isUnfit, keyOfDuplicate } from "~/db/client.server";
import { Refused } from "./refused.ts";

/**
 * What went wrong while a bundle was written, as what it is: a refusal where the bundle is at fault, for which no second try
 * helps; else the fault itself.
 */
export function refusalOf(error: unknown): unknown {
  if (isUnfit(error)) return new Refused(UNFIT);
  const key = keyOfDuplicate(error);
  // A public id that another taking-in took in the meantime is another one next time.
  if (key !== undefined && !key.includes("public_id")) return new Refused(TWICE);
  if (error instanceof RangeError) return new Refused(NESTED);
  return error;
}

const UNFIT =
  "One of its records has a value that no project can hold: a text or a number that is too large, or something nested too deep.";
const TWICE = "Two of its records claim the same place, such as the same number of a plate or of a reading.";
const NESTED = "Something in it is nested too deep to be taken apart.";
