import type { BatchFile, BatchReport, BatchRow, Wanted } from "./report.ts";
import type { TableRow } from "./table-csv.ts";

/** Which row of the table is of which file. Pure. */

/** A row for each row of the table, then one for each file that it does not name. */
export function matchRows(files: readonly BatchFile[], table: readonly TableRow[]): BatchRow[] {
  const known = namesOf(files);
  const rows = table.map(
    (row): BatchRow => ({
      ...EMPTY_ROW,
      file: fileOf(known, row.file),
      name: row.file,
      line: row.line,
      wanted: row.wanted,
    }),
  );
  return withTheRest(rows, files);
}

/** After files came that were missing: rows without a file find theirs; files that no row names get a row. */
export function matchAgain({ files, rows }: Pick<BatchReport, "files" | "rows">): BatchRow[] {
  const known = namesOf(files);
  const found = rows.map((row) => (row.file === null ? { ...row, file: fileOf(known, row.name) } : row));
  return withTheRest(found, files);
}

/** Then a row for each file that no row is of. */
function withTheRest(rows: BatchRow[], files: readonly BatchFile[]): BatchRow[] {
  const named = new Set(rows.map(({ file }) => file));
  const others = files.flatMap((file, i): BatchRow[] =>
    named.has(i) ? [] : [{ ...EMPTY_ROW, file: i, name: file.path }],
  );
  return [...rows, ...others];
}

/** By its whole path, else by its last part where only one file ends so; capitals count only where they must. */
function fileOf(files: readonly Name[], name: string): number | null {
  const path = name.trim().replaceAll("\\", "/").replace(/^\.\//, "");
  if (path === "") return null;
  const wanted: Name = { path, plain: plainOf(path) };
  for (const same of SAME) {
    const found = files.flatMap((file, i) => (same(file, wanted) ? [i] : []));
    if (found.length === 1) return found[0];
    if (found.length > 1) return null;
  }
  return null;
}

/** How many files a name may mean, for the words of a row that found none. */
export function countNamed(files: readonly BatchFile[], name: string): number {
  const wanted = plainOf(name.trim().replaceAll("\\", "/"));
  return files.filter(({ path }) => plainOf(lastPart(path)) === wanted).length;
}

function lastPart(path: string): string {
  return path.split("/").at(-1) ?? path;
}

interface Name {
  path: string;
  /** Whatever its capitals, and whether an accent is a sign of its own, as on some systems, or part of its letter. */
  plain: string;
}

function namesOf(files: readonly BatchFile[]): Name[] {
  return files.map(({ path }) => ({ path, plain: plainOf(path) }));
}

function plainOf(path: string): string {
  return path.normalize("NFC").toLowerCase();
}

type Same = (file: Name, wanted: Name) => boolean;
const SAME: Same[] = [
  (file, wanted) => file.path === wanted.path,
  (file, wanted) => file.path.endsWith(`/${wanted.path}`),
  (file, wanted) => file.plain === wanted.plain,
  (file, wanted) => file.plain.endsWith(`/${wanted.plain}`),
];
const NOTHING_SAID: Wanted = { title: "", takenAt: "", bench: "", step: "" };
const EMPTY_ROW: BatchRow = {
  file: null,
  name: "",
  line: null,
  wanted: NOTHING_SAID,
  leftOut: false,
  keepUnread: false,
  result: null,
};
