import { createWriteStream } from "node:fs";
import { mkdtemp, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import path from "node:path";
import { pipeline } from "node:stream/promises";
import { kindNamed } from "~/db/bundle-kinds.server";
import * as bundleRows from "~/db/bundle-rows.server";
import type { RunRow } from "~/db/bundle-runs.server";
import { inTransaction } from "~/db/client.server";
import { newPublicId } from "~/db/ids.server";
import * as jobs from "~/db/jobs.server";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import { deleteProject } from "../projects.server.ts";
import { deleteObject, getObjectStream } from "../storage.server.ts";
import { checkBag } from "./check-bag.server.ts";
import type { Lease } from "./lease.server.ts";
import { newIdsOf, rewriteText } from "./new-ids.server.ts";
import { openBag } from "./open-zip.server.ts";
import { placeholderOf } from "./placeholders.ts";
import { checkRecords, type Found } from "./read-records.server.ts";
import { Refused } from "./refused.ts";
import { restoreRows } from "./restore.server.ts";
import type { Places } from "./restore-rows.server.ts";
import { refusalOf } from "./unfit.server.ts";

/** What a taking-in has written that nobody sees yet. */
interface Half {
  projectId: number;
  people: number[];
}

/**
 * Takes a bundle in. Everything is checked before anything is written. Then the project is written without members, so that
 * nobody can see it, and the last write makes whoever gave it the owner. One that was broken off is cleared and begun anew.
 */
export async function takeInBundle(lease: Lease): Promise<void> {
  const { run } = lease;
  if (run.storageKey === null || run.userId === null)
    throw new Refused("Its file is not there any more. Send it again.");
  if (run.resume) {
    await clearHalf(run);
    await lease.keep({ resume: null });
  }
  const beat = setInterval(() => void lease.keep().catch(() => undefined), BEAT_MS);
  const folder = await mkdtemp(path.join(tmpdir(), "swale-bundle-"));
  try {
    const file = path.join(folder, "bundle.zip");
    await pipeline(await getObjectStream(run.storageKey), createWriteStream(file));
    const bag = await openBag(file);
    // The open file stays readable, and goes with the process whatever becomes of it.
    await rm(folder, { recursive: true, force: true });
    try {
      const checked = await checkBag(bag, (done, all) => lease.tell({ doneParts: done, allParts: all * 2 }));
      const found = await checkRecords(bag, checked);
      const allParts = checked.size + found.records;
      await lease.keep({ doneParts: checked.size, allParts });
      const { places, publicId } = await beginProject(lease, found);
      let written = 0;
      await restoreRows(bag, lease, places, publicId, (records) => {
        written += records;
        return lease.tell({ doneParts: checked.size + written, allParts });
      });
      await finish(lease, places.projectId, found);
    } catch (error) {
      throw refusalOf(error);
    } finally {
      bag.close();
    }
  } finally {
    clearInterval(beat);
    await rm(folder, { recursive: true, force: true });
  }
  await deleteObject(run.storageKey);
}

/** Removes what a taking-in wrote before it was broken off. Harmless to run twice. */
export async function clearHalf(run: Pick<RunRow, "resume">): Promise<void> {
  if (!run.resume) return;
  const half = JSON.parse(run.resume.toString()) as Half;
  await inTransaction(async (tx) => {
    const keys = await bundleRows.deletePlates(half.projectId, tx);
    await jobs.insertAll(
      "delete-object",
      keys.map((key) => ({ key })),
      tx,
    );
  });
  await deleteProject(half.projectId);
  await inTransaction((tx) => bundleRows.deletePersons(half.people, tx));
}

/** The project's own row and its people, and the note of them by which they would be cleared. */
async function beginProject(lease: Lease, found: Found): Promise<{ places: Places; publicId: string }> {
  const { run } = lease;
  return inTransaction(async (tx) => {
    const owner = await people.findById(run.userId ?? 0, tx);
    if (!owner || owner.closedAt) throw new Refused("The account that gave it is closed.");
    const rowIds = new Map<string, number>();
    const changed = new Map<string, string>();
    const made: number[] = [];
    for (const person of found.people) {
      if (person.id === owner.publicId) {
        rowIds.set(person.id, owner.id);
        continue;
      }
      const publicId = newPublicId();
      const id = await bundleRows.insertPlaceholder(
        { publicId, ...placeholderOf(person.name, publicId) },
        tx,
      );
      rowIds.set(person.id, id);
      changed.set(person.id, publicId);
      made.push(id);
    }
    const ids = await newIdsOf(found.ids, changed, tx);
    const { title, summary, ituRegion } = found.project as unknown as projects.NewProject;
    const told = { title, summary: rewriteText(summary, ids.changed), ituRegion };
    const project = await projects.insert({ ...told, visibility: "private" }, tx);
    // Known from here on by the id it had, where that is free.
    const publicId = ids.of("project", String(found.project.id));
    await bundleRows.updateRow(kindNamed("project"), project.id, { publicId }, tx);
    const half: Half = { projectId: project.id, people: made };
    await lease.keep({ resume: Buffer.from(JSON.stringify(half)) }, tx);
    lease.run.resume = Buffer.from(JSON.stringify(half));
    return { places: { projectId: project.id, ids, rows: new Map(), people: rowIds }, publicId };
  });
}

/** What makes it a project that somebody can see. */
async function finish(lease: Lease, projectId: number, found: Found): Promise<void> {
  const { run } = lease;
  const { demo, licence, createdAt, updatedAt } = found.project;
  await inTransaction(async (tx) => {
    await projects.insertMember(projectId, run.userId ?? 0, "owner", tx);
    const told = { demo, licence, createdAt, updatedAt };
    await bundleRows.updateRow(kindNamed("project"), projectId, told, tx);
    const report = { records: found.records, people: found.people.length };
    await lease.keep({ state: "done", projectId, report, resume: null, storageKey: null }, tx);
  });
}

const BEAT_MS = 10_000;
