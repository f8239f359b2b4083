import * as batches from "~/db/batches.server";
import { inTransaction } from "~/db/client.server";
import { namedIn } from "./named.server.ts";
import { problemsOf } from "./problems.ts";
import { changeReport } from "./receive.server.ts";
import type { BatchReport, BatchRow, Wanted } from "./report.ts";
import { dropBatch } from "./work.server.ts";

/** What a person decides about the rows of a batch while it waits. */

export interface RowChange {
  row: number;
  /** Of the row, as the form had it: another one by now is left alone. */
  name: string;
  wanted?: Partial<Wanted>;
  /** Place of the file that the row is of. */
  file?: number;
  leftOut?: boolean;
  keepUnread?: boolean;
}

/** Writes the changes down; a row with another bench is read again. Nothing changes once it is being taken in. */
export async function mendRows(publicId: string, changes: RowChange[]): Promise<void> {
  await changeReport(publicId, (report) => {
    if (report.phase !== "checked" && report.phase !== "checking") return report;
    const rows = [...report.rows];
    for (const { row, name, wanted, file, ...choice } of changes) {
      const old = rows[row];
      if (!old || old.result !== null || old.name !== name) continue;
      rows[row] = { ...old, ...choice, wanted: { ...old.wanted, ...wanted } };
      if (file === undefined || !report.files[file] || old.file === file) continue;
      rows[row] = { ...rows[row], file };
    }
    return { ...report, rows: withoutTwins(rows, changes), phase: "checking" };
  });
}

/** Leaves out every row that something stands in the way of. */
export async function leaveOutProblems(publicId: string, projectId: number): Promise<void> {
  const named = await namedIn(projectId);
  await changeReport(publicId, (report) => {
    if (report.phase !== "checked") return report;
    const problems = problemsOf(report, named, new Date());
    return {
      ...report,
      rows: report.rows.map((row, i) => (problems[i].length > 0 ? { ...row, leftOut: true } : row)),
    };
  });
}

/** From checked to being taken in, once; false where a row is still to be mended. Failed rows are tried again. */
export async function beginTaking(publicId: string, projectId: number): Promise<boolean> {
  const named = await namedIn(projectId);
  const report = await changeReport(publicId, (now) => {
    const again = now.phase === "done" && now.rows.some(({ result }) => result?.kind === "failed");
    if (again) {
      const rows = now.rows.map((row) => (row.result?.kind === "failed" ? { ...row, result: null } : row));
      return { ...now, phase: "taking", rows };
    }
    if (now.phase !== "checked" || isBlocked(now, problemsOf(now, named, new Date()))) return now;
    return { ...now, phase: "taking" };
  });
  return report?.phase === "taking" || report?.phase === "done";
}

/** Gives the batch up: nothing of it that was not taken in stays. */
export async function giveUp(publicId: string): Promise<boolean> {
  const taking = await inTransaction(async (tx) => {
    const run = await batches.lock(publicId, tx);
    return (run?.report as BatchReport | undefined)?.phase === "taking";
  });
  if (taking) return false;
  await dropBatch(publicId);
  return true;
}

function isBlocked({ rows }: BatchReport, problems: unknown[][]): boolean {
  return problems.some((of) => of.length > 0) || rows.every(({ leftOut }) => leftOut);
}

/** A file that a row of the table was given loses the row of its own that nobody wrote. */
function withoutTwins(rows: BatchRow[], changes: RowChange[]): BatchRow[] {
  const given = new Set(changes.flatMap(({ file }) => file ?? []));
  return rows.filter(
    ({ file, line, result }) => line !== null || result !== null || file === null || !given.has(file),
  );
}
