import type { Movement } from "~/measurement/movement";
import { formatFrequency, formatPercent, formatWidth } from "~/measurement/units";

/** "moved −42 kHz ± 9 kHz (−0.59 %)", "did not move beyond its limits (+3 kHz ± 9 kHz)". */
export function movementWords({ kind, before, after, byHz, uncertaintyHz }: Movement): string {
  const at = formatFrequency(
    (before ?? after)?.frequencyHz ?? null,
    (before ?? after)?.frequencyUncertaintyHz,
  );
  switch (kind) {
    case "appeared":
      return `appeared at ${at}`;
    case "vanished":
      return `vanished from ${at}`;
    case "unseen":
      return before ? "the sweep after does not reach here" : "the sweep before does not reach here";
    case "unsure":
      return `${signed(byHz, null)}, limits unknown`;
    case "still":
      return `did not move beyond its limits (${signed(byHz, uncertaintyHz)} ± ${formatWidth(uncertaintyHz, uncertaintyHz)})`;
    case "moved":
      return `moved ${signed(byHz, uncertaintyHz)} ± ${formatWidth(uncertaintyHz, uncertaintyHz)} (${share(byHz, before?.frequencyHz)})`;
  }
}

/** A difference of frequencies with its sign: "−42 kHz". */
export function signed(hz: number | null, uncertaintyHz: number | null): string {
  if (hz === null) return "unknown";
  return `${hz < 0 ? "−" : "+"}${formatWidth(Math.abs(hz), uncertaintyHz)}`;
}

function share(byHz: number | null, ofHz: number | undefined): string {
  if (byHz === null || !ofHz) return "unknown";
  return `${byHz < 0 ? "−" : "+"}${formatPercent(Math.abs(byHz) / ofHz)}`;
}
