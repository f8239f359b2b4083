import type { z } from "zod";
import type { BatchRow as Run } from "~/db/batches.server";
import { namedIn } from "~/services/batch/named.server";
import { problemsOf } from "~/services/batch/problems";
import type { BatchReport, FileCheck } from "~/services/batch/report";
import type { batchShape, batchSummaryShape } from "./batch-schemas.ts";

type Told = Pick<Run, "publicId" | "doneParts" | "allParts" | "createdAt" | "expiresAt">;
type Summary = z.output<typeof batchSummaryShape>;

export function shapeBatchSummary(run: Told, phase: Summary["phase"], project: string): Summary {
  return {
    id: run.publicId,
    project,
    phase,
    done: run.doneParts,
    all: run.allParts,
    createdAt: run.createdAt.toISOString(),
    until: run.expiresAt?.toISOString() ?? null,
    links: {
      self: `/api/v1/batches/${run.publicId}`,
      page: `/projects/${project}/sweeps/batch/${run.publicId}`,
    },
  };
}

/** A batch with every row: what would be written, and what became of it. */
export async function shapeBatch(
  run: Run,
  project: { id: number; publicId: string },
): Promise<z.output<typeof batchShape>> {
  const report = run.report as BatchReport;
  const problems = problemsOf(report, await namedIn(project.id), new Date());
  return {
    ...shapeBatchSummary(run, report.phase, project.publicId),
    table: report.table,
    passedOver: report.passedOver,
    ready: isReady(report, problems),
    rows: report.rows.map(({ file, name, line, wanted, leftOut, result }, i) => ({
      ...{ file: name, line, ...wanted },
      check: shapeCheck(file === null ? null : report.files[file].check),
      problems: problems[i],
      ...{ leftOut, result },
    })),
  };
}

/** Whether all of it can be taken in as it is: a table that could not be used is nothing to be passed over. */
function isReady({ phase, table, rows }: BatchReport, problems: unknown[][]): boolean {
  if (phase !== "checked" || (table !== null && table.problem !== null)) return false;
  return problems.every((of) => of.length === 0) && rows.some(({ leftOut }) => !leftOut);
}

function shapeCheck(check: FileCheck | null): z.output<typeof batchShape>["rows"][number]["check"] {
  switch (check?.kind) {
    case undefined:
      return null;
    case "read": {
      const { kind, points, startHz, stopHz, dips } = check;
      return { kind, points, startHz, stopHz, dips };
    }
    case "to-read":
      return { kind: check.kind, words: check.words };
    case "unreadable": {
      const { kind, words, line, column } = check;
      return { kind, words, line, column };
    }
    case "here":
      return { kind: check.kind, sweep: check.sweep, title: check.title };
    default:
      return check satisfies never;
  }
}
