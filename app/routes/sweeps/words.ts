import { formatFrequency } from "~/measurement/units";
import type { FileFormat } from "~/readers/reading";

/** Our words for where a sweep came from. */
export function kindOf(format: FileFormat | null): string {
  switch (format) {
    case "text":
      return "Text";
    case "touchstone":
      return "Touchstone";
    case "screenshot":
      return "Picture";
    case null:
      return "Not read yet";
  }
}

/** A frequency to two digits, for uncertainties. */
export function roughFrequency(hz: number): string {
  return formatFrequency(Number(hz.toPrecision(2)), null);
}
