import { type BundleKind, columnsOf, fieldOf, type KindName } from "~/db/bundle-kinds.server";
import type { Row } from "~/db/bundle-rows.server";
import { type NewIds, rewriteJson, rewriteText } from "./new-ids.server.ts";
import type { Rec } from "./records.ts";

/** What rows became here, for those that name them. */
export interface Places {
  projectId: number;
  ids: NewIds;
  /** Kind → id in the bundle → row id here. */
  rows: Map<KindName, Map<string, number>>;
  people: Map<string, number>;
}

/** A record as a row; what names a row that is not there yet is null, and written by `laterOf`. */
export function rowOf(kind: BundleKind, record: Rec, places: Places): Row {
  const row: Row = kind.name === "project" ? {} : { projectId: places.projectId };
  if (!("projectId" in kind.table)) delete row.projectId;
  for (const [column, { columnType }] of columnsOf(kind)) {
    const value = record[fieldOf(kind, column)];
    if (column === "publicId") row.publicId = places.ids.of(kind.name, String(value));
    else if (column in kind.refs)
      row[column] = isLater(kind, column) ? null : placeOf(kind, column, value, places);
    else if (columnType === "MySqlJson") row[column] = rewriteJson(value, places.ids.changed);
    else if (columnType.startsWith("MySqlText") && !FROZEN.has(column) && typeof value === "string") {
      row[column] = rewriteText(value, places.ids.changed);
    } else row[column] = value;
  }
  if (kind.name === "note-references") row.subject = rewriteJson(row.subject, places.ids.changed);
  return row;
}

/** What is to be written once all rows are there; undefined where it is nothing. */
export function laterOf(kind: BundleKind, record: Rec, places: Places): Row | undefined {
  const row: Row = {};
  for (const column of laterColumns(kind)) {
    const value = record[fieldOf(kind, column)];
    if (value !== null) row[column] = placeOf(kind, column, value, places);
  }
  return Object.keys(row).length > 0 ? row : undefined;
}

/** Columns that name rows of the same kind, or of one that comes after it. */
export function laterColumns(kind: BundleKind): string[] {
  return Object.keys(kind.refs).filter((column) => isLater(kind, column));
}

function isLater(kind: BundleKind, column: string): boolean {
  return kind.later.includes(column) || kind.refs[column] === kind.name;
}

/** Says for ever what it said where it was made; of mentions, the two addresses. */
const FROZEN = new Set(["recipe", "frozen", "source", "target"]);

function placeOf(kind: BundleKind, column: string, value: unknown, { rows, people }: Places): number | null {
  if (value === null) return null;
  const names = kind.refs[column];
  const place = names === "people" ? people.get(String(value)) : rows.get(names)?.get(String(value));
  return place ?? null;
}
