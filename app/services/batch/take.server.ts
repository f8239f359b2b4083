import { mayInProject } from "~/auth/permissions";
import * as projects from "~/db/projects.server";
import * as steps from "~/db/steps.server";
import { takeIn } from "../intake.server.ts";
import { log } from "../log.server.ts";
import { getObject } from "../storage.server.ts";
import { namedIn } from "./named.server.ts";
import { benchNamed, stepNamed } from "./problems.ts";
import type { BatchReport, BatchRow, RowResult } from "./report.ts";
import { parseTaken } from "./taken.ts";

/** Takes one row in as any file is taken in; a row that fails says so and stops no other. */
export async function takeRow(
  run: { projectId: number; userId: number },
  { files }: BatchReport,
  row: BatchRow,
): Promise<RowResult> {
  const file = row.file === null ? null : files[row.file];
  if (!file?.kept) return failed(row.name, "There is no file for this row. Nothing was stored.");
  try {
    const [bytes, named, found] = await Promise.all([
      getObject(file.kept.key),
      namedIn(run.projectId),
      projects.findWithRoleById(run.projectId, run.userId),
    ]);
    if (!found || !mayInProject(found.role, "sweep.add")) {
      return failed(row.name, "Whoever sent the batch may no longer add sweeps here. Nothing was stored.");
    }
    const bench = benchNamed(row.wanted.bench, named);
    const step = stepNamed(row.wanted.step, named);
    if ((row.wanted.bench && !bench) || (row.wanted.step && step?.state !== "done")) {
      return failed(
        row.name,
        "Its bench or its step is no longer there. Nothing was stored; choose another.",
      );
    }
    const taken = parseTaken(row.wanted.takenAt, new Date());
    const after = named.steps.find(({ publicId }) => publicId === step?.publicId);
    const done = await takeIn({
      project: found.project,
      by: { id: run.userId },
      file: { name: file.path, bytes },
      title: row.wanted.title || undefined,
      takenAt: "at" in taken ? taken.at : null,
      benchId: named.benches.find(({ publicId }) => publicId === bench?.publicId)?.id ?? null,
      keepUnread: true,
      also: after ? (sweep, tx) => steps.update(after.id, { afterSweepId: sweep.id }, tx) : undefined,
    });
    switch (done.kind) {
      case "read": {
        const dips = done.dipCount === 1 ? "1 dip" : `${done.dipCount || "no"} dips`;
        return { kind: "read", title: done.title, sweep: done.sweepPublicId, words: `${dips} found` };
      }
      case "unread":
        return { kind: "unread", title: done.title, sweep: done.sweepPublicId, words: done.problem.message };
      case "twice": {
        const words = "Already in the project; it was not stored again.";
        return { kind: "twice", title: done.title, sweep: done.sweepPublicId, words };
      }
      case "refused":
        return { kind: "refused", title: row.name, sweep: null, words: done.problem.message };
      default:
        return done satisfies never;
    }
  } catch (error) {
    log.error({ err: error, name: file.path }, "a file of a batch could not be taken in");
    return failed(row.name, "Something failed here while the file was taken in. Nothing of it was stored.");
  }
}

function failed(title: string, words: string): RowResult {
  return { kind: "failed", title, sweep: null, words };
}
