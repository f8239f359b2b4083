import type { BatchRow as Run } from "~/db/batches.server";
import { formatFrequency } from "~/measurement/units";
import { namedIn } from "~/services/batch/named.server";
import { benchNamed, problemsOf, type RowProblem, stepNamed } from "~/services/batch/problems";
import type { BatchReport, FileCheck, RowResult, Wanted } from "~/services/batch/report";

/** A batch as its page shows it. */
export interface ShownRow {
  /** Its place among the batch's rows. */
  index: number;
  name: string;
  line: number | null;
  wanted: Wanted;
  /** Public ids for the choices of a form, the text itself where it names nothing. */
  chosen: { bench: string; step: string };
  /** What was found in its file. */
  found: string;
  toRead: boolean;
  problems: RowProblem[];
  missing: boolean;
  keepable: boolean;
  keepUnread: boolean;
  leftOut: boolean;
  result: RowResult | null;
}

export async function showBatch(run: Run, projectId: number) {
  const report = run.report as BatchReport;
  const named = await namedIn(projectId);
  const problems = problemsOf(report, named, new Date());
  const rows = report.rows.map((row, index): ShownRow => {
    const check = row.file === null ? null : report.files[row.file].check;
    const { name, line, wanted, keepUnread, leftOut, result } = row;
    return {
      ...{ index, name, line, wanted, keepUnread, leftOut, result },
      chosen: {
        bench: benchNamed(wanted.bench, named)?.publicId ?? wanted.bench,
        step: stepNamed(wanted.step, named)?.publicId ?? wanted.step,
      },
      found: foundWords(check),
      toRead: check?.kind === "to-read" || (check?.kind === "unreadable" && keepUnread),
      problems: problems[index],
      missing: row.file === null,
      keepable: check?.kind === "unreadable" && check.keepable,
    };
  });
  const ofTable = new Set(report.rows.flatMap(({ file, line }) => (line === null ? [] : file)));
  return {
    publicId: run.publicId,
    phase: report.phase,
    table: report.table,
    passedOver: report.passedOver,
    done: run.doneParts,
    all: run.allParts,
    expiresAt: run.expiresAt,
    rows,
    benches: named.benches.map(({ publicId, name }) => ({ value: publicId, label: name })),
    steps: named.steps
      .filter(({ state }) => state === "done")
      .map(({ publicId, title }) => ({ value: publicId, label: title })),
    /** Files that no row of the table names: what a row without a file may be of. */
    spare: report.files.flatMap(({ path, kept }, i) =>
      kept && !ofTable.has(i) ? [{ value: String(i), label: path }] : [],
    ),
  };
}
export type ShownBatch = Awaited<ReturnType<typeof showBatch>>;

function foundWords(check: FileCheck | null): string {
  switch (check?.kind) {
    case "read": {
      const dips = check.dips === 1 ? "1 dip" : `${check.dips || "no"} dips`;
      const span = `${formatFrequency(check.startHz)} – ${formatFrequency(check.stopHz)}`;
      return `${dips}; ${check.points.toLocaleString("en")} points, ${span}`;
    }
    case "to-read":
      return check.words;
    case "unreadable":
      return check.words;
    default:
      return "";
  }
}
