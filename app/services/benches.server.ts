import * as benchReferences from "~/db/bench-references.server";
import * as benches from "~/db/benches.server";
import { inTransaction, type Transaction } from "~/db/client.server";
import * as jobs from "~/db/jobs.server";
import type { BenchPart } from "~/db/schema";
import * as sweeps from "~/db/sweeps.server";
import type { BenchGiven, BenchStandards } from "~/measurement/bench";
import { deleteAttachmentsUnder } from "./attachments.server.ts";
import { record } from "./events.server.ts";
import { conflictOf, mergeEdit } from "./merge-edit.ts";
import { deletePhotographsOf } from "./photographs.server.ts";

/** What a person says of a bench itself. */
export interface BenchValues {
  name: string;
  /** Markdown. */
  description: string;
  /** "yes": the bench of whoever says so, for every project where that person may add sweeps. */
  own: "yes" | "no";
}

/** What a person says of a version of a bench, besides its reference sweeps. */
export interface VersionValues {
  validFrom: Date;
  remark: string;
  parts: BenchPart[];
  standards: BenchStandards;
  given: BenchGiven;
}

interface By {
  id: number;
}

/** Writes a bench down with its first version; its references are taken in after that. */
export function createBench(
  project: { id: number },
  by: By,
  { own, ...values }: BenchValues,
  version: VersionValues,
) {
  return inTransaction(async (tx) => {
    const bench = await benches.insert(
      { ...values, projectId: project.id, ownerId: own === "yes" ? by.id : null, createdBy: by.id },
      tx,
    );
    const made = await benches.insertVersion({ ...version, benchId: bench.id, createdBy: by.id }, tx);
    await tell({ ...bench, ...values, projectId: project.id }, by, "bench.added", values.name, tx);
    return {
      bench: { ...bench, name: values.name },
      version: { ...made, validFrom: version.validFrom, given: version.given },
    };
  });
}

/** A rebuilt bench: another version, and the ones before it stay as they were. */
export function rebuildBench(bench: benches.BenchRow, by: By, version: VersionValues) {
  return inTransaction(async (tx) => {
    await benches.lock(bench.id, tx);
    const made = await benches.insertVersion({ ...version, benchId: bench.id, createdBy: by.id }, tx);
    await benches.update(bench.id, {}, tx);
    await tell(bench, by, "bench.changed", `${bench.name}, version ${made.number}: ${version.remark}`, tx);
    return { ...made, validFrom: version.validFrom, given: version.given };
  });
}

/** Keeps what a person changed of the bench itself; where that meets another's change it writes nothing and asks. */
export function changeBench(
  bench: benches.BenchRow,
  by: By,
  was: Partial<BenchValues>,
  wanted: BenchValues,
): Promise<ReturnType<typeof conflictOf> | null> {
  return inTransaction(async (tx) => {
    const row = (await benches.lock(bench.id, tx)) ?? bench;
    const now = benchValuesOf(row);
    const merged = mergeEdit<BenchFormValues>({ ...was }, now, { ...wanted });
    if (merged.conflicts.length > 0) return conflictOf<BenchFormValues>(now, wanted, merged);
    const { own, ...changes } = merged.changes;
    if (Object.keys(merged.changes).length === 0) return null;
    const ownerId = own === undefined ? row.ownerId : own === "yes" ? by.id : null;
    await benches.update(bench.id, { ...changes, ownerId }, tx);
    await tell(bench, by, "bench.changed", wanted.name, tx);
    return null;
  });
}

export type BenchFormValues = { name: string; description: string; own: string };

/** As the form shows them. */
export function benchValuesOf({ name, description, ownerId }: benches.BenchRow): BenchFormValues {
  return { name, description, own: ownerId === null ? "no" : "yes" };
}

/**
 * Corrects what was said wrong of a version: its date, parts, standards, or which reference is which. Sweeps keep their analyses until
 * somebody asks for new ones. `kinds` has a kind for each of its reference sweeps by public id.
 */
export function correctVersion(
  bench: benches.BenchRow,
  versionId: number,
  by: By,
  values: VersionValues,
  kinds: ReadonlyMap<string, benchReferences.ReferenceKind>,
): Promise<void> {
  return inTransaction(async (tx) => {
    await benches.lock(bench.id, tx);
    await benches.updateVersion(versionId, values, tx);
    const references = await benchReferences.findAllByVersions([versionId], tx);
    const wanted = references.map(({ sweep, kind }) => ({
      sweepId: sweep.id,
      kind: kinds.get(sweep.publicId) ?? kind,
    }));
    if (wanted.some(({ kind }, i) => kind !== references[i].kind)) {
      await benchReferences.replaceKinds(versionId, wanted, tx);
    }
    await benches.update(bench.id, {}, tx);
    await tell(bench, by, "bench.changed", `${bench.name}: details corrected`, tx);
  });
}

/** Puts a bench away, or takes it up again: old sweeps keep it, new ones are not offered one that is put away. */
export function setRetired(bench: benches.BenchRow, by: By, retired: boolean): Promise<void> {
  return inTransaction(async (tx) => {
    await benches.update(bench.id, { retiredAt: retired ? new Date() : null }, tx);
    const what = retired ? "put away" : "in use again";
    await tell(bench, by, "bench.changed", `${bench.name}: ${what}`, tx);
  });
}

/**
 * Deletes a bench with its versions, photographs, and the references that no other bench uses. False, with nothing deleted, where a
 * sweep says that it was taken with it: its numbers would lose their ground.
 */
export function deleteBench(bench: benches.BenchRow): Promise<boolean> {
  return inTransaction(async (tx) => {
    await benches.lock(bench.id, tx);
    if ((await benches.countSweeps(bench.id, tx)) > 0) return false;
    const files = await benchReferences.findOwnFiles(bench.id, tx);
    await deletePhotographsOf({ projectId: bench.projectId, benchId: bench.id }, tx);
    await jobs.insertAll(
      "delete-object",
      files.map(({ storageKey }) => ({ key: storageKey })),
      tx,
    );
    for (const file of files) await sweeps.deleteByFileId(file.id, tx);
    await deleteAttachmentsUnder({ benchId: bench.id }, tx);
    await benches.deleteById(bench.id, tx);
    return true;
  });
}

function tell(
  bench: { publicId: string; projectId: number },
  by: By,
  kind: "bench.added" | "bench.changed",
  title: string,
  tx: Transaction,
) {
  const about = { bench: bench.publicId, title: Array.from(title).slice(0, 200).join("") };
  return record({ projectId: bench.projectId, kind, actorId: by.id, about }, tx);
}
