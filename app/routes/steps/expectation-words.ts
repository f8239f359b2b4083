import { formatFrequency, formatWidth } from "~/measurement/units";
import type { ExpectedAgainst } from "~/services/step-effects.server";
import { signed } from "./movement-words";

/** What came of an expectation: met inside its interval, or missed by so much. */
export function expectationWords(place: ExpectedAgainst, hasAfter: boolean): string {
  const { came, frequencyHz, lowHz, highHz } = place;
  if (!came)
    return hasAfter ? "The sweep after it shows no dip of this trail." : "No sweep was taken after it yet.";
  const at = formatFrequency(came.frequencyHz, came.frequencyUncertaintyHz);
  if (lowHz === null || highHz === null) {
    return `Came at ${at}, ${signed(came.frequencyHz - frequencyHz, came.frequencyUncertaintyHz)} from the expected place; whether that is a miss can't be said, as its limits are unknown.`;
  }
  if (came.frequencyHz >= lowHz && came.frequencyHz <= highHz)
    return `Met: it came at ${at}, inside the interval.`;
  const missHz = came.frequencyHz < lowHz ? lowHz - came.frequencyHz : came.frequencyHz - highHz;
  const side = came.frequencyHz < lowHz ? "under" : "over";
  // Its own limits may reach into the interval.
  const near = came.frequencyUncertaintyHz !== null && missHz <= came.frequencyUncertaintyHz;
  const by = formatWidth(missHz, came.frequencyUncertaintyHz ?? null);
  return near
    ? `Missed by ${by}, less than the dip's own limits: it came at ${at}, ${side} the interval.`
    : `Missed by ${by}: it came at ${at}, ${side} the interval.`;
}
