import * as batches from "~/db/batches.server";
import { inTransaction } from "~/db/client.server";
import { newPublicId } from "~/db/ids.server";
import * as jobs from "~/db/jobs.server";
import { deleteObjectsUnder } from "../storage.server.ts";
import { checkFile } from "./check.server.ts";
import { changeReport, prefixOf } from "./receive.server.ts";
import type { BatchReport, FileCheck, RowResult } from "./report.ts";
import { takeRow } from "./take.server.ts";

/** A batch's work, a file at a time: each outcome is written down before the next file, so that it goes on wherever it was broken off. */

/** Begins or goes on with a batch for a moment, and leaves the rest to the background. */
export async function startOnBatch(publicId: string): Promise<void> {
  // Noted first: should this process die, another goes on.
  const goOn = await jobs.insert("batch", { run: publicId }, new Date(Date.now() + 2 * LEASE_MS));
  const left = await workOn(publicId, AT_ONCE_MS);
  if (left === "more") await jobs.insert("batch", { run: publicId });
  if (left !== "busy") await jobs.deleteById(goOn);
}

/** The background's part: some of it at a time, so that other work has its turn. */
export async function goOnWithBatch(publicId: string): Promise<void> {
  const left = await workOn(publicId, SLICE_MS);
  if (left === "more") await jobs.insert("batch", { run: publicId });
  // Whoever is at it may have died: looked at again when the time of that one is over.
  if (left === "busy") await jobs.insert("batch", { run: publicId }, new Date(Date.now() + LEASE_MS));
}

/** The end of a batch, done or not: what was kept for it goes. */
export async function dropBatch(publicId: string): Promise<void> {
  await inTransaction(async (tx) => {
    const run = await batches.lock(publicId, tx);
    if (run) await batches.deleteById(run.id, tx);
  });
  await deleteObjectsUnder(prefixOf(publicId));
}

export async function workOn(publicId: string, forMs: number): Promise<"finished" | "more" | "busy"> {
  const worker = newPublicId();
  const until = Date.now() + forMs;
  for (;;) {
    const run = await claim(publicId, worker);
    if (run === "busy" || run === undefined) return run ?? "finished";
    const { report } = run;
    const next = nextOf(report);
    if (next === null) {
      await finish(publicId, worker);
      return "finished";
    }
    if (Date.now() >= until) {
      await changeReport(publicId, (now) => (now.worker?.id === worker ? { ...now, worker: null } : now));
      return "more";
    }
    if (next.kind === "check") {
      const check = await checkFile(run, report.files[next.file], report.rows[next.row]);
      await keepCheck(publicId, next.file, check, report.files[next.file].kept?.sha256);
    } else {
      const result = await takeRow(run, report, report.rows[next.row]);
      await keepResult(publicId, next.row, result);
    }
  }
}

type Next = { kind: "check"; file: number; row: number } | { kind: "take"; row: number };

/** The first file that was not read yet with its row's bench, or the first row to be taken in. */
function nextOf({ phase, files, rows }: BatchReport): Next | null {
  if (phase === "checking") {
    const row = rows.findIndex(({ file, wanted, leftOut, result }) => {
      if (file === null || leftOut || result !== null || files[file].kept === null) return false;
      const { check } = files[file];
      return (
        check === null ||
        (check.bench !== wanted.bench && rows.find((r) => r.file === file)?.wanted === wanted)
      );
    });
    return row < 0 ? null : { kind: "check", file: rows[row].file as number, row };
  }
  if (phase !== "taking") return null;
  const row = rows.findIndex(({ leftOut, result }) => !leftOut && result === null);
  return row < 0 ? null : { kind: "take", row };
}

interface ClaimedRun {
  projectId: number;
  userId: number;
  report: BatchReport;
}

/** Undefined where the run is gone or its sender is. */
async function claim(publicId: string, worker: string): Promise<ClaimedRun | "busy" | undefined> {
  return inTransaction(async (tx) => {
    const run = await batches.lock(publicId, tx);
    if (!run?.projectId || !run.userId) return undefined;
    const report = run.report as BatchReport;
    const other = report.worker && report.worker.id !== worker ? report.worker : null;
    if (other && new Date(other.until).getTime() > Date.now()) return "busy";
    const claimed = {
      ...report,
      worker: { id: worker, until: new Date(Date.now() + LEASE_MS).toISOString() },
    };
    await batches.update(run.id, { report: claimed }, tx);
    return { projectId: run.projectId, userId: run.userId, report: claimed };
  });
}

async function keepCheck(publicId: string, file: number, check: FileCheck, sha256: string | undefined) {
  await changeReport(publicId, (report) => {
    // Another file took its place while this one was read.
    if (report.files[file].kept?.sha256 !== sha256) return report;
    return { ...report, files: report.files.with(file, { ...report.files[file], check }) };
  });
}

async function keepResult(publicId: string, row: number, result: RowResult) {
  await changeReport(publicId, (report) => {
    if (report.rows[row].result !== null) return report;
    return { ...report, rows: report.rows.with(row, { ...report.rows[row], result }) };
  });
}

async function finish(publicId: string, worker: string) {
  const report = await changeReport(publicId, (now) => {
    const own = now.worker?.id === worker ? null : now.worker;
    // What came in the meantime is worked on first.
    if (nextOf(now) !== null) return { ...now, worker: own };
    const phase = ({ checking: "checked", taking: "done" } as const)[now.phase as "checking" | "taking"];
    return { ...now, phase: phase ?? now.phase, worker: own };
  });
  const failed = report?.rows.some(({ result }) => result?.kind === "failed");
  if (report?.phase === "done" && !failed) await deleteObjectsUnder(prefixOf(publicId));
}

/** Longer than the largest file takes to be read. */
const LEASE_MS = 90_000;
const AT_ONCE_MS = 2500;
const SLICE_MS = 8000;
