import type { BenchForCorrection } from "../../measurement/correction/references.ts";
import type { Wish } from "../../measurement/correction/wish.ts";
import type { Dip, Sweep } from "../../measurement/sweep.ts";
import type { PlateChoices } from "./choices.ts";
import type { PlateFigure } from "./record.ts";
import type { PlateKind } from "./subject.ts";

/** What a plate's figure and numbers are computed from: from the project when it is made, from its originals when it is checked. */
export interface Material {
  kind: PlateKind;
  choices: PlateChoices;
  /** Oldest first for trails and strips, in the order asked for else. Empty for a bench. */
  sweeps: MaterialSweep[];
  /** Public id of the dip that the plate is of. */
  focus: string | null;
  /** All that could be shown; design bands among them. */
  bands: PlateFigure["bands"];
  trails: PlateFigure["trails"];
  steps: PlateFigure["steps"];
  bench: { correction: BenchForCorrection; wish: Wish } | null;
}

export interface MaterialSweep {
  id: string;
  label: string;
  caption: string;
  /** At the plane that its dips were found at. */
  points: Sweep;
  /** abs Γ as measured where the correction does not hold. */
  measured: ArrayLike<number> | null;
  swrLimit: number;
  dips: MaterialDip[];
}

export interface MaterialDip extends Dip {
  id: string;
  label: string;
  verdict: string;
}
