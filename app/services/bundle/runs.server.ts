import * as runs from "~/db/bundle-runs.server";
import { inTransaction } from "~/db/client.server";
import * as jobs from "~/db/jobs.server";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import { deleteObject } from "../storage.server.ts";
import { KEPT_DAYS } from "./make.server.ts";
import { PartUpload } from "./store.server.ts";

/** Asking for bundles, and giving one. The work itself is done behind the pages. */

/** One bundle of a project is made at a time; who asks for a second finds the first. */
export function askForBundle(projectId: number, userId: number): Promise<Asked> {
  return inTransaction(async (tx) => {
    await projects.lock(projectId, tx);
    const open = (await runs.findExports(projectId, tx)).find(isOpen);
    if (open) return { run: open, there: true };
    const run = await runs.insert({ kind: "export", projectId, userId, expiresAt: expiry() }, tx);
    return { run, there: false };
  });
}

/** The same for all data of a person. */
export function askForMine(userId: number): Promise<Asked> {
  return inTransaction(async (tx) => {
    await people.lock(userId, tx);
    const open = (await runs.findByUser(userId, "mine", tx)).find(isOpen);
    if (open) return { run: open, there: true };
    const run = await runs.insert({ kind: "mine", projectId: null, userId, expiresAt: expiry() }, tx);
    return { run, there: false };
  });
}

export interface Asked {
  run: runs.ShownRun;
  /** It was asked for before, and is under way. */
  there: boolean;
}

export type Given = { kind: "given"; run: runs.ShownRun } | { kind: "too-large" } | { kind: "too-many" };

/** Stores a bundle as it comes in, and notes that it is to be taken in. It is noted for removal first. */
export async function giveBundle(userId: number, bytes: AsyncIterable<Uint8Array>): Promise<Given> {
  if ((await runs.findByUser(userId, "import")).filter(isOpen).length >= MOST_OPEN)
    return { kind: "too-many" };
  const key = `bundles/given/${crypto.randomUUID()}`;
  await jobs.insert("delete-object", { key }, expiry());
  const upload = await PartUpload.begin(key, "application/zip");
  let size = 0;
  try {
    for await (const chunk of bytes) {
      size += chunk.length;
      if (size > MOST_GIVEN_BYTES) break;
      await upload.write(Buffer.from(chunk.buffer, chunk.byteOffset, chunk.length));
    }
    if (size > MOST_GIVEN_BYTES) {
      await upload.abort();
      return { kind: "too-large" };
    }
    await upload.finish();
  } catch (error) {
    await upload.abort();
    throw error;
  }
  const about = { kind: "import" as const, projectId: null, userId, expiresAt: expiry(), storageKey: key };
  return { kind: "given", run: await runs.insert(about) };
}

/** Takes a finished run away before its time, with what it offers; false where it is still under way. */
export async function removeRun(run: runs.ShownRun): Promise<boolean> {
  if (isOpen(run)) return false;
  await runs.deleteById(run.id);
  if (run.storageKey) await deleteObject(run.storageKey);
  return true;
}

/** What a run offers, as long as it does. */
export function offered(run: Pick<runs.ShownRun, "state" | "storageKey" | "expiresAt" | "report">) {
  const here =
    run.state === "done" && run.storageKey !== null && (run.expiresAt?.getTime() ?? 0) > Date.now();
  if (!here || run.storageKey === null) return null;
  const { name, sizeBytes, files } = run.report as { name: string; sizeBytes: number; files: number };
  return { storageKey: run.storageKey, name, sizeBytes, files };
}

function isOpen(run: Pick<runs.ShownRun, "state">): boolean {
  return run.state === "waiting" || run.state === "running";
}

function expiry(): Date {
  return new Date(Date.now() + KEPT_DAYS * 24 * 60 * 60 * 1000);
}

export const MOST_GIVEN_BYTES = 2 * 1024 ** 3;
const MOST_OPEN = 3;
