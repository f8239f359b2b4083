import * as files from "~/db/files.server";
import { readForIntake } from "../intake.server.ts";
import { isBeyondReading } from "../picture-doubt.ts";
import { getObject } from "../storage.server.ts";
import { namedIn } from "./named.server.ts";
import { benchNamed } from "./problems.ts";
import type { BatchFile, BatchRow, FileCheck } from "./report.ts";
import { parseTaken } from "./taken.ts";

/** What would become of a file if it were taken in as its row says; nothing is written. */
export async function checkFile(
  run: { projectId: number },
  file: BatchFile,
  { wanted }: BatchRow,
): Promise<FileCheck> {
  const { bench } = wanted;
  if (!file.kept) throw new Error("A file that was refused is not to be read.");
  const twin = await files.findBySha256(run.projectId, file.kept.sha256);
  if (twin) return { bench, kind: "here", sweep: twin.sweep.publicId, title: twin.sweep.title };
  const bytes = await getObject(file.kept.key);
  const taken = parseTaken(wanted.takenAt, new Date());
  const benches = bench === "" ? [] : (await namedIn(run.projectId)).benches;
  const found = benchNamed(bench, { benches });
  const { outcome } = await readForIntake({
    // Its public id is for what is stored only.
    project: { id: run.projectId, publicId: "" },
    file: { name: file.path, bytes },
    benchId: benches.find(({ publicId }) => publicId === found?.publicId)?.id ?? null,
    takenAt: "at" in taken ? taken.at : null,
  });
  if (outcome.ok) {
    const { pointCount: points, startHz, stopHz, analysis } = outcome;
    return { bench, kind: "read", points, startHz, stopHz, dips: analysis.dips.length };
  }
  const { message, line, column, code } = outcome.problem;
  // A picture that is not certain waits for a look, as wherever it comes in.
  if (outcome.picture && /-doubtful$/.test(code)) return { bench, kind: "to-read", words: message };
  return {
    bench,
    kind: "unreadable",
    words: message,
    line: line ?? null,
    column: column ?? null,
    keepable: !isBeyondReading(outcome.problem),
  };
}
