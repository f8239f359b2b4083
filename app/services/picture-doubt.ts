import type { Given, Reading, ReadProblem } from "../readers/reading.ts";
import { reusableSpec } from "../readers/screenshot/correct.ts";
import type { ReadOutcome } from "./read-and-analyse.server.ts";

/**
 * A picture that was read, but not for certain, is not taken for a sweep: a person looks at it first. Of 82 invented
 * pictures 58 were over this in every stage, 4 of them with an axis misread; under it were 24, 3 of them misread.
 */
const SURE = 0.8;

const WORDS = {
  frame: "Where the plot ends is not certain.",
  axes: "The axes were not read for certain.",
  trace: "Which line is the trace is not certain.",
} as const;

/** The outcome with a problem in place of a sweep where a stage is not sure of itself. */
export function doubted(outcome: ReadOutcome): ReadOutcome {
  const stages = outcome.reading?.picture?.stages;
  if (!outcome.ok || !stages) return outcome;
  const weak = (["frame", "axes", "trace"] as const).find((stage) => stages[stage].confidence < SURE);
  if (!weak) return outcome;
  const problem: ReadProblem = { code: `${weak}-doubtful`, message: `${WORDS[weak]} ${stages[weak].saw}` };
  return { ok: false, problem, reading: outcome.reading, picture: outcome.picture };
}

/** True for what no choice of a person could make readable. */
export function isBeyondReading(problem: ReadProblem): boolean {
  return BEYOND.has(problem.code);
}

/** What was chosen for the last picture of this shape, as far as it holds for this one; null where nothing does. */
export function rememberedFor(reading: Reading, before: Given): Given | null {
  const { screenshot = {} } = reusableSpec(before.screenshot ?? {});
  const asked = reading.questions.some((question) => question.id === "quantity");
  const other = screenshot.quantity !== undefined && screenshot.quantity !== reading.quantity;
  if (other && !asked && reading.picture?.sources?.quantity === "printed") return null;
  const level = (screenshot.quantity ?? reading.quantity) === "level";
  const { zeroDb, zeroTrace, ...rest } = screenshot;
  const kept = level ? screenshot : rest;
  return Object.keys(kept).length > 0 ? { screenshot: kept } : null;
}

const BEYOND = new Set([
  "not-a-format",
  "not-a-picture",
  "picture-format",
  "animated",
  "too-large",
  "damaged",
]);
