import { inTransaction, isDuplicate, isOutcomeUnknown, type Transaction } from "~/db/client.server";
import * as files from "~/db/files.server";
import { newPublicId } from "~/db/ids.server";
import * as jobs from "~/db/jobs.server";
import * as projects from "~/db/projects.server";
import * as sweeps from "~/db/sweeps.server";
import { DEFAULT_SETTINGS } from "~/measurement/sweep";
import { type Given, MAX_FILE_BYTES, type Reading, type ReadProblem } from "~/readers/reading";
import { placeInPicture } from "~/readers/screenshot/in-picture";
import { storeAnalysis } from "./analyses.server.ts";
import type { CorrectionTask } from "./correction.server.ts";
import { record } from "./events.server.ts";
import { cleanFileName, plainText, titleFromFileName } from "./file-names.ts";
import { doubted, isBeyondReading, rememberedFor } from "./picture-doubt.ts";
import type { ReadOutcome } from "./read-and-analyse.server.ts";
import { readFile } from "./reading.server.ts";
import type { PictureStage } from "./seen-picture.ts";
import { deleteObject, putObject, sha256Of } from "./storage.server.ts";
import { type Means, meansOf, taskOf, toStore, withBenchWarnings } from "./sweep-corrections.server.ts";
import { refreshTrails } from "./trails.server.ts";

export interface TakeIn {
  project: { id: number; publicId: string };
  by: { id: number };
  file: { name: string; bytes: Uint8Array };
  title?: string;
  takenAt?: Date | null;
  /** When it came in, where that is not now. */
  addedAt?: Date;
  given?: Given;
  /** "reference" for a bench's open, short, load or through; else it is a sweep of the antenna. */
  purpose?: sweeps.SweepRow["purpose"];
  /** Row id of the bench it was taken with: its dips are then found at that bench's port. */
  benchId?: number | null;
  /** Keep a file that can't be read, so that a person can say how to read it; else it is refused whole. */
  keepUnread: boolean;
  /** Written in the same transaction as the sweep. */
  also?: (sweep: { id: number; publicId: string }, tx: Transaction) => Promise<void>;
  /** Told each stage of a picture that is done. */
  progress?: (stage: PictureStage) => void;
}

export type Taken =
  | {
      kind: "read";
      sweepPublicId: string;
      title: string;
      dipCount: number;
      questions: number;
      halfColumnHz: number | null;
    }
  | { kind: "unread"; sweepPublicId: string; title: string; problem: ReadProblem }
  | { kind: "twice"; sweepPublicId: string; title: string }
  | { kind: "refused"; problem: ReadProblem };

/**
 * Takes one file in: reads it, stores the original, then writes the sweep with its reading, points, analysis and
 * dips in one transaction. A removal of the object is noted before it is stored and taken back in that
 * transaction: whatever dies half-way leaves neither an object nobody knows nor half a sweep.
 */
export async function takeIn(input: TakeIn): Promise<Taken> {
  const { project, file } = input;
  if (file.bytes.length > MAX_FILE_BYTES) return { kind: "refused", problem: tooLarge(file.bytes.length) };
  if (file.bytes.length === 0) return { kind: "refused", problem: EMPTY };
  const sha256 = sha256Of(file.bytes);
  const twin = await files.findBySha256(project.id, sha256);
  if (twin) return twiceOf(twin);

  const { outcome, given, means } = await readForIntake(input);
  if (!outcome.ok && (!input.keepUnread || isBeyondReading(outcome.problem))) {
    return { kind: "refused", problem: outcome.problem };
  }

  const storageKey = `originals/${project.publicId}/${newPublicId()}${newPublicId()}`;
  const undo = await jobs.insert("delete-object", { key: storageKey }, new Date(Date.now() + UNDO_AFTER_MS));
  await putObject(storageKey, file.bytes);
  try {
    return await inTransaction(async (tx) => {
      // First: whoever changes the project's trails at the same time waits, and then sees this sweep.
      await projects.lock(project.id, tx);
      const fileId = await files.insert(
        {
          projectId: project.id,
          name: cleanFileName(file.name),
          sizeBytes: file.bytes.length,
          sha256,
          storageKey,
          uploadedBy: input.by.id,
        },
        tx,
      );
      const title = Array.from(plainText(input.title ?? "") || titleFromFileName(file.name))
        .slice(0, 160)
        .join("");
      const sweep = await sweeps.insert(
        {
          projectId: project.id,
          fileId,
          title,
          takenAt: input.takenAt ?? null,
          createdBy: input.by.id,
          purpose: input.purpose,
        },
        tx,
      );
      if (input.benchId) await sweeps.update(sweep.id, { benchId: input.benchId }, tx);
      await storeOutcome(
        { projectId: project.id, sweepId: sweep.id, given, outcome, means, by: input.by.id },
        tx,
      );
      await input.also?.(sweep, tx);
      await jobs.deleteById(undo, tx);
      // What is done with a bench's references is told of the bench.
      if (input.purpose !== "reference") {
        const about = { sweep: sweep.publicId, title };
        const at = input.addedAt;
        await record({ projectId: project.id, kind: "sweep.added", actorId: input.by.id, about, at }, tx);
      }
      await projects.update(project.id, {}, tx);
      return outcome.ok
        ? {
            kind: "read" as const,
            sweepPublicId: sweep.publicId,
            title,
            dipCount: outcome.analysis.dips.length,
            questions: outcome.reading.questions.length,
            halfColumnHz: placeInPicture(outcome.reading.spec.screenshot ?? {})?.halfColumnHz ?? null,
          }
        : { kind: "unread" as const, sweepPublicId: sweep.publicId, title, problem: outcome.problem };
    });
  } catch (error) {
    // Its job removes it later, unless the sweep is there after all.
    if (isOutcomeUnknown(error)) throw error;
    await deleteObject(storageKey).catch(() => undefined);
    if (!isDuplicate(error)) throw error;
    const first = await files.findBySha256(project.id, sha256);
    if (!first) throw error;
    return twiceOf(first);
  }
}

/** Reads and analyses a file as `takeIn` would, and stores nothing. */
export async function readForIntake(
  input: Pick<TakeIn, "project" | "file" | "given" | "purpose" | "benchId" | "takenAt" | "progress">,
): Promise<{ outcome: ReadOutcome; given: Given; means: Means }> {
  const means = await meansOf({
    benchId: input.benchId ?? null,
    feedline: null,
    takenAt: input.takenAt ?? null,
    createdAt: new Date(),
  });
  const task = taskOf(means, "port");
  return { ...(await againstBench(await readAsBefore(input, task), input, task)), means };
}

export interface StoreOutcome {
  projectId: number;
  sweepId: number;
  given: Given;
  outcome: ReadOutcome;
  /** What its dips were corrected with, as far as they were. */
  means: Means;
  by: number;
}

/** Writes a reading and, where it gave a sweep, its points and analysis, and makes them the sweep's current ones; under `projects.lock`. */
export async function storeOutcome(input: StoreOutcome, tx: Transaction): Promise<void> {
  const { outcome, sweepId, given, by } = input;
  const parts = outcome.ok ? outcome.parts.map((part) => Buffer.from(part)) : [];
  const readingId = await sweeps.insertReading(
    { sweepId, given, reading: outcome.reading, createdBy: by },
    parts,
    tx,
  );
  if (!outcome.ok) {
    await sweeps.update(sweepId, { readingId, problem: outcome.problem }, tx);
    return;
  }
  const analysisId = await storeAnalysis(
    {
      projectId: input.projectId,
      sweepId,
      readingId,
      analysis: withBenchWarnings(outcome.analysis, input.means),
      correction: toStore(outcome.correction, input.means),
      by,
    },
    tx,
  );
  const { pointCount, startHz, stopHz, referenceOhm, complex } = outcome;
  await sweeps.update(
    sweepId,
    {
      readingId,
      analysisId,
      problem: null,
      pointCount,
      startHz,
      stopHz,
      referenceOhm,
      complex,
      preview: Buffer.from(outcome.preview),
    },
    tx,
  );
  await refreshTrails(input.projectId, tx);
}

/** Reads the file, with what a person chose for the last file of the same shape in this project where it has one. */
async function readAsBefore(
  input: Parameters<typeof readForIntake>[0],
  correct: CorrectionTask,
): Promise<{ outcome: ReadOutcome; given: Given }> {
  const task = { ...input.file, settings: DEFAULT_SETTINGS, correct };
  const given = input.given ?? {};
  const outcome = await readFile({ ...task, given }, input.progress);
  const first = { outcome: doubted(outcome), given };
  const { reading } = outcome;
  if (input.given || !reading) return first;
  const divided = input.purpose === "reference" || Boolean(input.benchId);
  const last = await sweeps.findGivenByShape(input.project.id, reading.shape, divided);
  const before = last && reading.format === "screenshot" ? rememberedFor(reading, last) : last;
  if (!before || Object.keys(before).length === 0) return first;
  const again = doubted(await readFile({ ...task, given: withFound(before, reading) }));
  if (!again.ok) return first;
  again.reading.assumed.unshift("Read as the last file of this shape in the project was read.");
  return { outcome: again, given: before };
}

/** Levels without a 0 dB line are read against that of the bench's own levels: the bench's open or short is the line then. */
async function againstBench(
  first: { outcome: ReadOutcome; given: Given },
  { file, given }: Pick<TakeIn, "file" | "given">,
  correct: CorrectionTask,
): Promise<{ outcome: ReadOutcome; given: Given }> {
  const { outcome } = first;
  const line = correct.readAs.open ?? correct.readAs.short;
  if (outcome.ok || outcome.problem.code !== "zero-db-needed" || line?.quantity !== "level") return first;
  const zeroDb = line.zeroDb ?? 0;
  const format = outcome.reading?.format;
  const spec: Given =
    format === "screenshot"
      ? { screenshot: { ...outcome.reading?.spec.screenshot, zeroDb } }
      : { text: { ...given?.text, zeroDb } };
  const again = doubted(await readFile({ ...file, settings: DEFAULT_SETTINGS, given: spec, correct }));
  if (!again.ok) return first;
  again.reading.assumed.unshift("Levels are read against the 0 dB line of the bench's open and short.");
  return { outcome: again, given: format === "screenshot" ? { screenshot: { zeroDb } } : spec };
}

/** A picture's axes were just read: they are not read a second time. */
function withFound(before: Given, reading: Reading): Given {
  if (!before.screenshot) return before;
  return { screenshot: { ...reading.spec.screenshot, ...before.screenshot } };
}

function twiceOf(first: { sweep: { publicId: string; title: string } }): Taken {
  return { kind: "twice", sweepPublicId: first.sweep.publicId, title: first.sweep.title };
}

function tooLarge(bytes: number): ReadProblem {
  return {
    code: "too-large",
    message: `The file has ${Math.ceil(bytes / 1024 / 1024)} MB; the most that is taken is 64 MB. Nothing was stored: sweep with fewer points or split the file.`,
  };
}

const EMPTY: ReadProblem = {
  code: "empty",
  message:
    "The file is empty: it has no bytes. Nothing was stored: export it again and look at its size first.",
};
/** Longer than any upload takes; after that an object without a sweep is removed. */
const UNDO_AFTER_MS = 60 * 60 * 1000;
