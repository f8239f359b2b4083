import { countNamed } from "./match.ts";
import type { BatchReport, BatchRow } from "./report.ts";
import { parseTaken } from "./taken.ts";

/** What stands in the way of each row of a batch. Pure. */

export interface RowProblem {
  code: ProblemCode;
  words: string;
  /** The sweep that is meant, where there is one. */
  sweep?: string;
}

export type ProblemCode = (typeof PROBLEM_CODES)[number];

/** What rows may name: the benches that can be used in the project, and its steps. */
export interface Named {
  benches: readonly { publicId: string; name: string }[];
  steps: readonly { publicId: string; title: string; state: "planned" | "done" }[];
}

/** A list for each row, in order; rows that are left out or were taken in stand in nobody's way and have none. */
export function problemsOf({ files, rows }: BatchReport, named: Named, now: Date): RowProblem[][] {
  const standing = rows.map((row) => !row.leftOut && row.result === null);
  return rows.map((row, i) => {
    if (!standing[i]) return [];
    const before = rows.slice(0, i).filter((_, j) => standing[j] || rows[j].result?.sweep);
    return [
      ...fileProblems(row, files, before),
      ...(row.wanted.title.length > LONGEST_TITLE
        ? [{ code: "long-title" as const, words: `A title has at most ${LONGEST_TITLE} characters.` }]
        : []),
      ...dateProblems(row, now),
      ...benchProblems(row, named),
      ...stepProblems(row, named, before),
    ];
  });
}

/** By its address's id or by its name; undefined where there is none, or more than one of that name. */
export function benchNamed(text: string, { benches }: Pick<Named, "benches">) {
  return only(text, benches, ({ name }) => name);
}

export function stepNamed(text: string, { steps }: Pick<Named, "steps">) {
  return only(text, steps, ({ title }) => title);
}

function only<T extends { publicId: string }>(text: string, all: readonly T[], nameOf: (one: T) => string) {
  const byId = all.find(({ publicId }) => publicId === text);
  const byName = all.filter((one) => nameOf(one).trim().toLowerCase() === text.trim().toLowerCase());
  return byId ?? (byName.length === 1 ? byName[0] : undefined);
}

function fileProblems(row: BatchRow, files: BatchReport["files"], before: readonly BatchRow[]): RowProblem[] {
  if (row.file === null) return [{ code: "missing-file", words: missingWords(row.name, files) }];
  if (before.some(({ file }) => file === row.file)) {
    return [{ code: "same-file", words: "Another row of the table is of this file already." }];
  }
  const { refused, check, kept } = files[row.file];
  if (refused !== null) return [{ code: "refused-file", words: refused }];
  const twin = before.find(({ file }) => file !== null && files[file].kept?.sha256 === kept?.sha256);
  if (twin)
    return [{ code: "same-bytes", words: `This is the same file, byte for byte, as “${twin.name}”.` }];
  if (check?.kind === "here") {
    const words = `This file is already in the project as “${check.title}”.`;
    return [{ code: "already-here", words, sweep: check.sweep }];
  }
  if (check?.kind !== "unreadable" || row.keepUnread) return [];
  return [{ code: "unreadable", words: `${placeOf(check)}${check.words}` }];
}

function missingWords(name: string, files: BatchReport["files"]): string {
  if (name.trim() === "") return "The table has a row without a file's name.";
  const n = countNamed(files, name);
  return n > 1
    ? `${n} files are named “${name}”: write the folder as well, such as “${files.find(({ path }) => path.includes("/"))?.path ?? name}”.`
    : `No file named “${name}” came with the batch.`;
}

function dateProblems({ wanted }: BatchRow, now: Date): RowProblem[] {
  const taken = parseTaken(wanted.takenAt, now);
  return "problem" in taken ? [{ code: "bad-date", words: taken.problem }] : [];
}

function benchProblems({ wanted: { bench } }: BatchRow, named: Named): RowProblem[] {
  if (bench === "" || benchNamed(bench, named)) return [];
  return [
    { code: "unknown-bench", words: `There is no one bench “${bench}” that can be used in this project.` },
  ];
}

function stepProblems(
  { wanted: { step } }: BatchRow,
  named: Named,
  before: readonly BatchRow[],
): RowProblem[] {
  if (step === "") return [];
  const found = stepNamed(step, named);
  if (!found) return [{ code: "unknown-step", words: `There is no one step “${step}” in this project.` }];
  if (found.state === "planned") {
    const words = `The step “${found.title}” is only planned: mark it as done first, or leave the step empty.`;
    return [{ code: "planned-step", words }];
  }
  const same = before.find((other) => other.wanted.step && stepNamed(other.wanted.step, named) === found);
  if (!same) return [];
  return [{ code: "same-step", words: `“${same.name}” is said to be the sweep after this step already.` }];
}

function placeOf({
  line,
  column,
  words,
}: {
  line: number | null;
  column: number | null;
  words: string;
}): string {
  if (line === null || /^Line \d/.test(words)) return "";
  return column === null ? `Line ${line}: ` : `Line ${line}, column ${column}: `;
}

const LONGEST_TITLE = 160;

export const PROBLEM_CODES = [
  "missing-file",
  "refused-file",
  "unreadable",
  "already-here",
  "same-file",
  "same-bytes",
  "long-title",
  "bad-date",
  "unknown-bench",
  "unknown-step",
  "planned-step",
  "same-step",
] as const;
