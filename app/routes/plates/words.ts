import type { PlateKind } from "~/services/plates/subject";

/** What a plate is of, for people. */
export const KINDS: Record<PlateKind, string> = {
  sweep: "A sweep",
  dip: "A dip",
  compare: "Sweeps compared",
  trail: "A trail",
  strip: "The strip map",
  bench: "A bench",
};
