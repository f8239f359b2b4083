import * as batches from "~/db/batches.server";
import { inTransaction, isDuplicate, type Transaction } from "~/db/client.server";
import { newPublicId } from "~/db/ids.server";
import * as jobs from "~/db/jobs.server";
import { MAX_FILE_BYTES } from "~/readers/reading";
import { cleanFileName } from "../file-names.ts";
import { putObject, sha256Of } from "../storage.server.ts";
import { matchAgain, matchRows } from "./match.ts";
import { isOfSystem, safePath } from "./paths.ts";
import { type BatchFile, type BatchReport, EMPTY_REPORT, MOST_BYTES, MOST_FILES } from "./report.ts";
import { isTable, readTable } from "./table-csv.ts";
import { isZip, NotAZip, unpack } from "./unpack.server.ts";

/** Files of a batch on their way in: kept in the store until they are taken in or the batch ends. */

export interface Sent {
  /** With its folders, where the browser tells them. */
  name: string;
  bytes: Uint8Array;
}

/**
 * Begins a batch under an id of the form's own: the same form sent twice begins one batch. Its end is noted before anything
 * is stored. Undefined where the id is somebody else's.
 */
export async function beginBatch(
  publicId: string,
  project: { id: number },
  by: { id: number },
): Promise<batches.BatchRow | undefined> {
  const expiresAt = new Date(Date.now() + KEPT_MS);
  try {
    await inTransaction(async (tx) => {
      await batches.insert(
        { publicId, projectId: project.id, userId: by.id, report: EMPTY_REPORT, expiresAt },
        tx,
      );
      await jobs.insert("drop-batch", { run: publicId }, expiresAt, tx);
    });
  } catch (error) {
    if (!isDuplicate(error)) throw error;
  }
  const run = await batches.findByPublicId(publicId);
  return run?.projectId === project.id ? run : undefined;
}

/**
 * Keeps what was sent, ZIPs unpacked. A file of a path that is there already takes its place. False where the batch is being
 * taken in or was: what came later nobody has looked at, so nothing of it is kept.
 */
export async function addToBatch(publicId: string, sent: Sent[], table: Sent | null): Promise<boolean> {
  const run = await batches.findByPublicId(publicId);
  if (!run || isClosed(run.report as BatchReport)) return false;
  for (const one of sent) {
    if (table === null && isTable(one.name, one.bytes)) await addTable(publicId, one);
    else if (isZip(one.bytes)) await addZip(publicId, one);
    else await addFile(publicId, one);
  }
  if (table) await addTable(publicId, table);
  return true;
}

/** Everything has arrived: from here on it is checked. */
export async function sealBatch(publicId: string): Promise<void> {
  await changeOpen(publicId, (report) => ({
    ...report,
    phase: report.phase === "receiving" || report.phase === "checked" ? "checking" : report.phase,
    rows: matchAgain(report),
  }));
}

/** As `changeReport`, but a batch that is being taken in stays as it is. */
async function changeOpen(publicId: string, change: (report: BatchReport) => BatchReport): Promise<void> {
  await changeReport(publicId, (report) => (isClosed(report) ? report : change(report)));
}

function isClosed({ phase }: BatchReport): boolean {
  return phase === "taking" || phase === "done";
}

/** Changes a run's report under its lock; undefined where the run is gone. */
export function changeReport(
  publicId: string,
  change: (report: BatchReport, tx: Transaction) => BatchReport | Promise<BatchReport>,
): Promise<BatchReport | undefined> {
  return inTransaction(async (tx) => {
    const run = await batches.lock(publicId, tx);
    if (!run) return undefined;
    const report = await change(run.report as BatchReport, tx);
    await batches.update(run.id, { report, ...progressOf(report) }, tx);
    return report;
  });
}

function progressOf({ phase, files, rows }: BatchReport) {
  const wanted = rows.filter(({ leftOut }) => !leftOut);
  const taking = phase === "taking" || phase === "done";
  const [done, all] = taking
    ? [wanted.filter(({ result }) => result !== null).length, wanted.length]
    : [files.filter(({ check, kept }) => check !== null || kept === null).length, files.length];
  const state = ({ taking: "running", done: "done" } as const)[phase as "taking" | "done"] ?? "waiting";
  return { doneParts: done, allParts: all, state };
}

async function addTable(publicId: string, { name, bytes }: Sent): Promise<void> {
  const { rows, problem, remarks } = readTable(bytes);
  await changeOpen(publicId, (report) => {
    const taken = report.rows.filter(({ result }) => result !== null);
    const files = report.files;
    const open = rows.filter((row) => !taken.some((done) => done.name === row.file));
    return {
      ...report,
      table: { name: cleanFileName(name), problem, remarks },
      rows: problem ? report.rows : matchAgain({ files, rows: [...taken, ...matchRows([], open)] }),
    };
  });
}

async function addZip(publicId: string, { name, bytes }: Sent): Promise<void> {
  const limits = { mostEntries: MOST_FILES, mostBytes: MOST_BYTES };
  // Written down together: a ZIP may list thousands of files of which nothing is kept.
  let refused: BatchFile[] = [];
  let passedOver = 0;
  const tell = async () => {
    if (refused.length > 0 || passedOver > 0) await append(publicId, refused, passedOver);
    [refused, passedOver] = [[], 0];
  };
  try {
    for await (const found of unpack(bytes, limits)) {
      if (found.kind === "passed-over") passedOver++;
      else if (found.kind === "refused") refused.push(refusedFile(found.path, found.sizeBytes, found.words));
      else {
        await tell();
        if (isTable(found.path, found.bytes)) {
          await addTable(publicId, { name: found.path, bytes: found.bytes });
        } else await addFile(publicId, { name: found.path, bytes: found.bytes });
      }
    }
  } catch (error) {
    if (!(error instanceof NotAZip)) throw error;
    refused.push(refusedFile(cleanFileName(name), bytes.length, error.message));
  }
  await tell();
}

async function addFile(publicId: string, { name, bytes }: Sent): Promise<void> {
  const safe = safePath(name);
  if ("refused" in safe) {
    return append(publicId, [refusedFile(name.slice(0, 200), bytes.length, safe.refused)]);
  }
  const { path } = safe;
  if (isOfSystem(path)) return append(publicId, [], 1);
  const refusal = sizeRefusal(bytes.length);
  if (refusal) return append(publicId, [refusedFile(path, bytes.length, refusal)]);
  const key = `${prefixOf(publicId)}${newPublicId()}${newPublicId()}`;
  const kept = { key, sha256: sha256Of(bytes) };
  const file = { path, sizeBytes: bytes.length, kept, refused: null, check: null };
  // What there is no room for is not stored first.
  const run = await batches.findByPublicId(publicId);
  const bounded = withinBounds(file, (run?.report as BatchReport | undefined)?.files ?? []);
  if (bounded.kept) await putObject(key, bytes);
  await append(publicId, [bounded]);
}

/** Each in place of a file of the same path. */
async function append(publicId: string, added: readonly BatchFile[], passedOver = 0): Promise<void> {
  await changeOpen(publicId, (report) => {
    const files = [...report.files];
    for (const file of added) {
      const at = files.findIndex(({ path }) => path === file.path);
      const same = at >= 0 && file.kept !== null && files[at].kept?.sha256 === file.kept.sha256;
      if (!same) files[at < 0 ? files.length : at] = withinBounds(file, files);
    }
    return { ...report, files, passedOver: report.passedOver + passedOver };
  });
}

/** `files`: those that are there, the one that this one takes the place of among them. */
function withinBounds(file: BatchFile, files: readonly BatchFile[]): BatchFile {
  if (file.kept === null) return file;
  const kept = files.filter((other) => other.kept !== null && other.path !== file.path);
  const bytes = kept.reduce((sum, { sizeBytes }) => sum + sizeBytes, file.sizeBytes);
  if (kept.length < MOST_FILES && bytes <= MOST_BYTES) return file;
  const words =
    kept.length < MOST_FILES
      ? `All files together have more than ${MOST_BYTES / 1024 / 1024} MB. Send this one in the next batch.`
      : `At most ${MOST_FILES} files go at once. Send this one in the next batch.`;
  return refusedFile(file.path, file.sizeBytes, words);
}

function refusedFile(path: string, sizeBytes: number, refused: string): BatchFile {
  return { path, sizeBytes, kept: null, refused, check: null };
}

function sizeRefusal(bytes: number): string | null {
  if (bytes === 0) return "The file is empty: it has no bytes. Export it again and look at its size first.";
  if (bytes <= MAX_FILE_BYTES) return null;
  return `The file has ${Math.ceil(bytes / 1024 / 1024)} MB; the most that is taken is 64 MB.`;
}

/** Where a batch's files are kept. */
export function prefixOf(publicId: string): string {
  return `batches/${publicId}/`;
}

/** Long enough for a weekend in between. */
const KEPT_MS = 4 * 24 * 60 * 60 * 1000;
