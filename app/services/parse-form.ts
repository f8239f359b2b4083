import { parseWithZod } from "@conform-to/zod/v4";
import { brokenForm } from "~/errors";

/**
 * A form that was sent, by its schema. The library makes lists as long as the highest place that a field's name gives, and
 * walks through every place of them: whoever names `a[30000000]` would keep the server busy for minutes. No form of ours has
 * such fields, nor does the library's own field of intents come from them; such a form is refused.
 */
export const parseForm = ((payload: FormData | URLSearchParams, options: never) => {
  if (!isOfOurs(payload)) throw brokenForm();
  return parseWithZod(payload, options);
}) as typeof parseWithZod;

export function isOfOurs(payload: FormData | URLSearchParams): boolean {
  let fields = 0;
  for (const name of payload.keys()) {
    if (++fields > MOST_FIELDS || name.length > LONGEST_NAME || name === INTENT || FAR_PLACE.test(name)) {
      return false;
    }
  }
  return true;
}

/** A place of four digits or more, or one that is no number. */
const FAR_PLACE = /\[(?!\d{0,3}\])/;
const INTENT = "__intent__";
/** An antenna of a hundred elements has a thousand fields. */
const MOST_FIELDS = 5000;
const LONGEST_NAME = 200;
