import * as benchReferences from "~/db/bench-references.server";
import * as benches from "~/db/benches.server";
import { inTransaction, isDuplicate, type Transaction } from "~/db/client.server";
import * as files from "~/db/files.server";
import { findZeroLines } from "~/db/readings.server";
import * as sweeps from "~/db/sweeps.server";
import type { BenchGiven } from "~/measurement/bench";
import { DEFAULT_SETTINGS } from "~/measurement/sweep";
import { record } from "./events.server.ts";
import { takeIn } from "./intake.server.ts";
import { log } from "./log.server.ts";
import { sha256Of } from "./storage.server.ts";
import { readAnew } from "./sweep-edits.server.ts";

export interface ReferenceFile {
  kind: benchReferences.ReferenceKind;
  file: { name: string; bytes: Uint8Array };
}

/** What became of one reference's file, in words for its person. */
export interface ReferenceTaken {
  kind: benchReferences.ReferenceKind;
  how: "read" | "unread" | "shared" | "refused" | "failed";
  message: string;
  /** The message says more than that it was read. */
  note?: boolean;
}

export interface TakeReferences {
  project: { id: number; publicId: string };
  bench: { id: number; publicId: string; name: string };
  version: { id: number; number: number; validFrom: Date; given: BenchGiven };
  by: { id: number };
}

/**
 * Takes files in as reference sweeps of a version, one after another; one that fails does not stop the others. A file that is in the
 * project already is used where it is. A kind that the version has already is refused: a rebuilt bench is another version.
 */
export async function takeReferences(
  input: TakeReferences,
  files: ReferenceFile[],
): Promise<ReferenceTaken[]> {
  const taken: ReferenceTaken[] = [];
  for (const one of files) {
    try {
      taken.push(await takeReference(input, one));
    } catch (error) {
      log.error({ err: error, name: one.file.name }, "a reference could not be taken in");
      const message = `“${one.file.name}” failed here while it was taken in. Nothing of it was kept; send it again.`;
      taken.push({ kind: one.kind, how: "failed", message });
    }
  }
  return taken;
}

/** What became of all of them, in a few sentences: those that were simply read share one. */
export function takenWords(taken: readonly ReferenceTaken[]): string {
  const read = taken.filter(({ how, note }) => how === "read" && !note).map(({ kind }) => kind);
  const list = read.length > 1 ? `${read.slice(0, -1).join(", ")} and ${read[read.length - 1]}` : read[0];
  const others = taken.filter(({ kind }) => !read.includes(kind)).map(({ message }) => message);
  return [...(list ? [`Read: the ${list}.`] : []), ...others].join(" ");
}

/** Two kinds that were given the same file, which can't both be right; null where all differ. */
export function sameFileTwice(
  files: ReferenceFile[],
): [benchReferences.ReferenceKind, benchReferences.ReferenceKind] | null {
  const seen = new Map<string, benchReferences.ReferenceKind>();
  for (const { kind, file } of files) {
    const sha256 = sha256Of(file.bytes);
    const first = seen.get(sha256);
    if (first) return [first, kind];
    seen.set(sha256, kind);
  }
  return null;
}

async function takeReference(input: TakeReferences, { kind, file }: ReferenceFile): Promise<ReferenceTaken> {
  const { bench, version, project, by } = input;
  const present = await benchReferences.findAllByVersions([version.id]);
  if (present.some((reference) => reference.kind === kind)) {
    return {
      kind,
      how: "refused",
      message: `“${file.name}” was not taken: there is ${aKind(kind)} already.`,
    };
  }
  const taken = await takeIn({
    project,
    by,
    file,
    title: `${bench.name}, ${kind}`,
    takenAt: version.validFrom,
    purpose: "reference",
    keepUnread: true,
    also: (sweep, tx) => attach(input, kind, sweep.id, tx),
  });
  switch (taken.kind) {
    case "read":
      return { kind, how: "read", message: `The ${kind} was read from “${file.name}”.` };
    case "unread":
      if (taken.problem.code === "zero-db-needed" && (await readAsRatio(input, taken.sweepPublicId))) {
        const message = `The ${kind} was read from “${file.name}” as levels: of references only their ratios count.`;
        return { kind, how: "read", message, note: true };
      }
      return {
        kind,
        how: "unread",
        message: `The ${kind} “${file.name}” is kept and still to be read: ${taken.problem.message}`,
      };
    case "refused":
      return { kind, how: "refused", message: `“${file.name}” was not taken: ${taken.problem.message}` };
    case "twice":
      return attachTwin(input, { kind, file }, present);
  }
}

/** The file is in the project: its sweep is used as it is, unless the version has it as another kind. */
async function attachTwin(
  input: TakeReferences,
  { kind, file }: ReferenceFile,
  present: benchReferences.FoundReference[],
): Promise<ReferenceTaken> {
  const twin = await files.findBySha256(input.project.id, sha256Of(file.bytes));
  if (!twin) throw new Error("The file that was here is gone.");
  const other = present.find(({ sweep }) => sweep.id === twin.sweep.id);
  if (other) {
    const message = `“${file.name}” was not taken as ${kind}: it is the same file as the ${other.kind}. Sweep each standard by itself.`;
    return { kind, how: "refused", message };
  }
  try {
    await inTransaction((tx) => attach(input, kind, twin.sweep.id, tx));
  } catch (error) {
    if (!isDuplicate(error)) throw error;
    return {
      kind,
      how: "refused",
      message: `“${file.name}” was not taken: there is ${aKind(kind)} already.`,
    };
  }
  const stays = twin.sweep.purpose === "antenna" ? " It also stays among the project's sweeps." : "";
  const message = `The ${kind} is “${twin.sweep.title}”, which is the same file as “${file.name}”.${stays}`;
  return { kind, how: "shared", message };
}

/**
 * Reads a file of levels against whatever 0 dB line the project's other levels have, else 0 dB: a reference is only divided by.
 * False where it is still not read, a picture for instance.
 */
async function readAsRatio({ project, by, version }: TakeReferences, publicId: string): Promise<boolean> {
  const found = await sweeps.findByPublicId(publicId);
  if (found?.reading?.reading?.format !== "text") return false;
  const others = await findZeroLines(project.id, found.sweep.id);
  const zeroDb = version.given.zeroDb ?? others[0]?.zeroDb ?? 0;
  return (await readAnew(found, { text: { zeroDb } }, DEFAULT_SETTINGS, by.id)) === null;
}

async function attach(
  { bench, version, project, by }: TakeReferences,
  kind: benchReferences.ReferenceKind,
  sweepId: number,
  tx: Transaction,
): Promise<void> {
  await benchReferences.insert({ versionId: version.id, kind, sweepId }, tx);
  await benches.update(bench.id, {}, tx);
  const about = {
    bench: bench.publicId,
    title: `${bench.name}: ${aKind(kind)} for version ${version.number}`,
  };
  await record({ projectId: project.id, kind: "bench.changed", actorId: by.id, about }, tx);
}

function aKind(kind: benchReferences.ReferenceKind): string {
  return kind === "open" ? "an open" : `a ${kind}`;
}
