import type { BenchGiven, BenchStandards } from "../../measurement/bench.ts";
import type { BenchReferences } from "../../measurement/correction/references.ts";
import type { Feedline } from "../../measurement/feedline.ts";
import type { AnalysisSettings, Plane } from "../../measurement/sweep.ts";
import type { Given } from "../../readers/reading.ts";

/** What turns the bytes of an original into a plate's numbers, kept beside it. Pure. */
export interface Recipe {
  /** Complete: reads the same bytes to the same points, with nothing guessed. */
  given: Given;
  /** Of sweeps; null for references. */
  analysis: { settings: AnalysisSettings; plane: Plane; feedline: Feedline | null } | null;
  /** The bench that the sweep is corrected with, or that the reference is of; null without one. */
  bench: RecipeBench | null;
}

export interface RecipeBench {
  standards: BenchStandards;
  given: BenchGiven;
  /** SHA-256 of the references by kind; they are among the plate's originals. */
  references: Partial<Record<keyof BenchReferences, string>>;
}

export function parseRecipe(text: string): Recipe {
  return JSON.parse(text) as Recipe;
}
