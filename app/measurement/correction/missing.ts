import type { BenchForCorrection } from "./references.ts";
import { sameSweep } from "./zero-line.ts";

/** What is not known of a bench, and what would make it known. */
export interface Missing {
  code: string;
  message: string;
}

/** What a bench lacks, in the order in which it helps most. */
export function missingOf(
  { references, standards, given }: BenchForCorrection,
  threeTerm: boolean,
): Missing[] {
  const { open, short, load, through } = references;
  const loadKnown = standards.loadReturnLossDb !== null || standards.loadOhm !== null;
  const residualKnown = standards.loadReturnLossDb !== null || given.directivityDb !== null;
  const missing: Missing[] = [];
  const add = (code: string, message: string) => missing.push({ code, message });
  if (!open && !short)
    add("zero-line", "The 0 dB line is not known: sweep the port with an open and with a short.");
  else if (!open || !short)
    add(
      open ? "short" : "open",
      `Only the ${open ? "open" : "short"} was swept: source match and directivity stay in the 0 dB line. A sweep of the ${open ? "short" : "open"} takes most of them out and shows how large they are.`,
    );
  else if (sameSweep(open, short))
    add("same-twice", "The open and the short are the same sweep: sweep each of them.");
  if (!load && given.directivityDb === null)
    add(
      "load",
      "The directivity is not known, so no SWR has limits: sweep the port with the best load at hand.",
    );
  else if (load && !(threeTerm ? residualKnown : loadKnown))
    add(
      "load-return-loss",
      threeTerm
        ? "The load's own return loss is not known. After the correction it is the directivity that is left, so no SWR has limits: compare the load with a better one and give the return loss that is found."
        : "The load's own return loss is not known, so the directivity may be better or worse than what the load leaves: compare the load with a better one, or give its resistance as measured.",
    );
  if ((!open || !short) && given.testPortMatchDb === null)
    add(
      "match",
      "The test port's match is not known, and 14 dB is taken for it: open and short together show it as a ripple.",
    );
  if (!through)
    add(
      "through",
      "The insertion loss is not known: sweep straight from the source to the detector, without the bridge.",
    );
  return missing;
}
