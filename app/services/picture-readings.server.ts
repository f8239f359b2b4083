import { inTransaction } from "~/db/client.server";
import * as projects from "~/db/projects.server";
import * as sweeps from "~/db/sweeps.server";
import type { AnalysisSettings } from "~/measurement/sweep";
import type { AxisSource, Given, PictureNotes, ReadProblem, ScreenshotSpec } from "~/readers/reading";
import { storeOutcome } from "./intake.server.ts";
import { readFile } from "./reading.server.ts";
import { type TriedReading, tryReading } from "./reading-preview.server.ts";
import { getObject } from "./storage.server.ts";
import { meansOf, planeToKeep, taskOf } from "./sweep-corrections.server.ts";
import { tellOfSweep } from "./sweep-edits.server.ts";

/** All choices of a picture's reading as a person sees them; what is left out is not known. */
export interface PictureChoices {
  spec: ScreenshotSpec;
  /** The highest level of the trace is the 0 dB line. */
  zeroAtCrest: boolean;
}

/** What the choices would give; nothing is kept. `print` reads the axes anew from the picture. */
export async function tryPicture(
  found: sweeps.FoundSweep,
  choices: PictureChoices,
  settings: AnalysisSettings,
  print = false,
): Promise<TriedReading> {
  const { file } = found;
  const bytes = await getObject(file.storageKey);
  const given = print ? withoutAxes(choices.spec) : choices.spec;
  const once = (spec: ScreenshotSpec) =>
    tryReading({ name: file.name, bytes }, { screenshot: spec }, settings, { kept: file.sha256, print });
  const tried = await once(choices.zeroAtCrest ? { ...given, zeroDb: undefined } : given);
  const crest = tried.picture?.crest ?? null;
  return choices.zeroAtCrest && crest !== null ? once({ ...given, zeroDb: roundDb(crest) }) : tried;
}

/** Reads the stored original as chosen and makes that the sweep's reading; a reading that fails changes nothing. */
export async function keepPicture(
  found: sweeps.FoundSweep,
  choices: PictureChoices,
  settings: AnalysisSettings,
  by: number,
): Promise<ReadProblem | null> {
  const { sweep, file } = found;
  const bytes = await getObject(file.storageKey);
  const means = await meansOf(sweep);
  const correct = taskOf(means, planeToKeep(found));
  const read = (spec: ScreenshotSpec) =>
    readFile({ name: file.name, bytes, given: { screenshot: spec }, settings, correct, kept: file.sha256 });
  let spec = choices.spec;
  if (choices.zeroAtCrest) {
    const crest = (await read({ ...spec, zeroDb: undefined })).picture?.crest ?? null;
    if (crest !== null) spec = { ...spec, zeroDb: roundDb(crest) };
  }
  const outcome = await read(spec);
  if (!outcome.ok) return outcome.problem;
  const before = found.reading?.reading ?? null;
  const given = fixedBy(spec, before?.spec.screenshot ?? {}, found.reading?.given ?? {});
  const { reading } = outcome;
  if (reading.picture) reading.picture.sources = sourcesOf(given, reading.picture, before?.picture);
  await inTransaction(async (tx) => {
    await projects.lock(sweep.projectId, tx);
    if (!(await sweeps.lock(sweep.id, tx))) return;
    await storeOutcome({ projectId: sweep.projectId, sweepId: sweep.id, given, outcome, means, by }, tx);
    await tellOfSweep("sweep.read-anew", sweep, by, tx);
  });
  return null;
}

/** What a person fixed: what was fixed before, and what now differs from the resolved reading. */
function fixedBy(spec: ScreenshotSpec, resolved: ScreenshotSpec, before: Given): Given {
  const same = (a: unknown, b: unknown) => JSON.stringify(a) === JSON.stringify(b);
  const fixed = (Object.keys(spec) as (keyof ScreenshotSpec)[]).filter(
    (key) =>
      spec[key] !== undefined && (before.screenshot?.[key] !== undefined || !same(spec[key], resolved[key])),
  );
  return { screenshot: Object.fromEntries(fixed.map((key) => [key, spec[key]])) };
}

/** An axis value that was left as it was keeps where it came from. */
function sourcesOf(given: Given, now: PictureNotes, before?: PictureNotes): PictureNotes["sources"] {
  const fixed = given.screenshot ?? {};
  if (!now.sources) return null;
  const entries = Object.entries(now.sources) as [keyof typeof now.sources, AxisSource][];
  return Object.fromEntries(
    entries.map(([key, source]) => [
      key,
      fixed[key] === undefined ? (before?.sources?.[key] ?? source) : "given",
    ]),
  ) as PictureNotes["sources"];
}

function withoutAxes(spec: ScreenshotSpec): ScreenshotSpec {
  const { startHz: _a, stopHz: _b, top: _c, bottom: _d, scale: _e, quantity: _f, ...rest } = spec;
  return rest;
}

/** A level is printed to a hundredth at most. */
function roundDb(level: number): number {
  return Math.round(level * 100) / 100;
}
