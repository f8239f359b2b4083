import type { EventAbout } from "~/db/schema";
import { formatFrequency } from "~/measurement/units";

/** What a note stands on, as it is stored beside it: all empty for the project itself. */
export interface StoredPlace {
  sweepPublicId: string | null;
  sweepTitle: string | null;
  dipPublicId: string | null;
  dipFrequencyHz: number | null;
  trailPublicId: string | null;
  trailName: string | null;
  trailFrequencyHz: number | null;
  stepPublicId: string | null;
  stepTitle: string | null;
  benchPublicId: string | null;
  benchName: string | null;
}

/** "7.1 MHz, Before the choke", "the step More radials", "the project". */
export function placeWords(place: StoredPlace): string {
  const { dipFrequencyHz, sweepTitle, trailFrequencyHz, stepTitle, benchName } = place;
  if (dipFrequencyHz !== null) return `${formatFrequency(dipFrequencyHz, null)}, ${sweepTitle}`;
  if (sweepTitle !== null) return sweepTitle;
  if (trailFrequencyHz !== null) {
    return `the trail ${place.trailName || `at ${formatFrequency(trailFrequencyHz, null)}`}`;
  }
  if (stepTitle !== null) return `the step ${stepTitle}`;
  if (benchName !== null) return `the bench ${benchName}`;
  return "the project";
}

/** What an event about a note is about. Its line says where the note stands and nothing of what it says: notes can be removed. */
export function aboutNote(note: string, place: StoredPlace): EventAbout {
  const ids = {
    sweep: place.sweepPublicId,
    dip: place.dipPublicId,
    trail: place.trailPublicId,
    step: place.stepPublicId,
    bench: place.benchPublicId,
  };
  const named = Object.entries(ids).filter(([, publicId]) => publicId !== null);
  return { ...Object.fromEntries(named), note, title: Array.from(placeWords(place)).slice(0, 200).join("") };
}
